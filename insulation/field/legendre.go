package field

import (
	"math"
	"slices"

	"gonum.org/v1/gonum/integrate/quad"
)

// order is the number of nodes of a panel: the unknowns on it are polynomials of
// degree order − 1 in the arc length, given by their values at Gauss's nodes.
const order = 8

// nodal holds one value at each node of a panel.
type nodal [order]float64

// rule is a quadrature rule on −1 … 1, each point with the values there of the
// order polynomials that are 1 at one node and 0 at the others.
type rule []rulePoint

type rulePoint struct {
	t, weight float64
	basis     nodal
}

// quadrature holds all that depends on the order alone.
type quadrature struct {
	nodes, weights nodal
	barycentric    nodal
	legendre       [order]nodal // from nodal values to Legendre coefficients
	slope          [order]nodal // from nodal values to those of the derivative by t
	fineRule       rule         // many even points with both ends, to look at a polynomial
	self           [order]rule  // for an integrand with a logarithm at a node
	log            rule         // for a logarithm at 0, on 0 … 1
	gauss, gaussW  []float64    // for parts of a panel
}

const (
	partPoints = 9  // of a part of a panel seen from at least its own length
	selfPoints = 18 // each side of the node
	finePoints = 41
	selfPower  = 5 // t = v⁵ smooths the logarithm (Monegato, Scuderi 1999)
)

func newQuadrature() *quadrature {
	q := &quadrature{gauss: make([]float64, partPoints), gaussW: make([]float64, partPoints)}
	quad.Legendre{}.FixedLocations(q.nodes[:], q.weights[:], -1, 1)
	slices.Sort(q.nodes[:]) // the weights are symmetric
	quad.Legendre{}.FixedLocations(q.gauss, q.gaussW, -1, 1)
	for j, tj := range q.nodes {
		q.barycentric[j] = 1
		for k, tk := range q.nodes {
			if k != j {
				q.barycentric[j] /= tj - tk
			}
		}
	}
	for k := range order {
		for j, t := range q.nodes {
			q.legendre[k][j] = (2*float64(k) + 1) / 2 * q.weights[j] * legendre(k, t)
		}
	}
	q.slope = q.derivative()
	for i := range finePoints {
		t := -1 + 2*float64(i)/(finePoints-1)
		q.fineRule = append(q.fineRule, rulePoint{t, 2.0 / finePoints, q.basis(t)})
	}
	q.log = q.graded(0, 1)
	for i := range q.self {
		q.self[i] = append(q.graded(q.nodes[i], -1), q.graded(q.nodes[i], 1)...)
	}
	return q
}

// legendre is the Legendre polynomial of degree k.
func legendre(k int, t float64) float64 {
	before, p := 0.0, 1.0
	for i := range k {
		n := float64(i)
		before, p = p, ((2*n+1)*t*p-n*before)/(n+1)
	}
	return p
}

// basis is the value at t of the polynomials that belong to the nodes.
func (q *quadrature) basis(t float64) (b nodal) {
	all := 1.0
	for j, tj := range q.nodes {
		d := t - tj
		if d == 0 {
			b = nodal{}
			b[j] = 1
			return b
		}
		all *= d
		b[j] = q.barycentric[j] / d
	}
	for j := range b {
		b[j] *= all
	}
	return b
}

// derivative is the matrix that differentiates nodal values by t.
func (q *quadrature) derivative() (d [order]nodal) {
	for i, ti := range q.nodes {
		for j, tj := range q.nodes {
			if i != j {
				d[i][j] = q.barycentric[j] / q.barycentric[i] / (ti - tj)
				d[i][i] -= d[i][j]
			}
		}
	}
	return d
}

// graded is a rule from t to the end at ±1 that takes in a logarithm at t; its
// points are counted from t.
func (q *quadrature) graded(t, end float64) rule {
	v, w := make([]float64, selfPoints), make([]float64, selfPoints)
	quad.Legendre{}.FixedLocations(v, w, 0, 1)
	var r rule
	for i := range v {
		off := (end - t) * math.Pow(v[i], selfPower)
		weight := w[i] * math.Abs(end-t) * selfPower * math.Pow(v[i], selfPower-1)
		r = append(r, rulePoint{off, weight, q.basis(t + off)})
	}
	return r
}

func (a *nodal) dot(b *nodal) float64 {
	sum := 0.0
	for i := range a {
		sum += a[i] * b[i]
	}
	return sum
}
