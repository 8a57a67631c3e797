package network

import "math"

// The step is the Radau IIA method of three stages, order five (Hairer and Wanner,
// Solving Ordinary Differential Equations II, 1996, IV.5). For a linear network it
// is the rational function R(z) = (60 + 24 z + 3 z²)/(60 − 36 z + 9 z² − z³) of the
// matrix, the (2,3) Padé approximation of e^z: error z⁶/7200, R(∞) = 0. Split into
// partial fractions it asks for one real and one complex solution a step, and the
// stages are other sums of the same two.
const (
	poleR = 3.63783425274449573220841851357797 // real root of the denominator
	poleA = 2.68108287362775213389579074321102 // real and
	poleB = 3.05043019924741056942637762478739 // imaginary part of the complex one

	sqrt6  = 2.44948974278317809819728407470589
	node1  = (4 - sqrt6) / 10 // instants of the stages in parts of the step; the third is 1
	node2  = (4 + sqrt6) / 10
	share1 = (16 - sqrt6) / 36 // weights of the quadrature
	share2 = (16 + sqrt6) / 36
	share3 = 1.0 / 9
)

// residue makes a stage from the solutions at the poles; a and b carry the factor
// 2 of the conjugate pole.
var residue = [3]trio{
	{1.7279930842767245683729957884, 2 * 1.20569730353154457473187255062, -2 * 0.359580502485292749355406829722},
	{4.57827416078066481752064695038, -2 * 3.15883092606023926767869392001, -2 * 2.07747391432486938321868842481},
	{18.2974981748458432747227308557, -2 * 7.64874908742292163736136542786, 2 * 4.17164024474743740546144892578},
}

func (t *trio) of(x *trio) float64 { return t.r*x.r + t.a*x.a + t.b*x.b }

// share are the quadrature weights of the stages.
var share = [3]float64{share1, share2, share3}

// back extrapolates the parabola through the three stages to the start of the step.
func back(y1, y2, y3 float64) float64 {
	const (
		l1 = node2 / ((node1 - node2) * (node1 - 1))
		l2 = node1 / ((node2 - node1) * (node2 - 1))
		l3 = node1 * node2 / ((1 - node1) * (1 - node2))
	)
	return l1*y1 + l2*y2 + l3*y3
}

// stageOf is R_j(z) of stage j for a scalar z.
func stageOf(c float64, z complex128) complex128 {
	n := 60 + complex(60*c-36, 0)*z + complex(30*c*c-36*c+9, 0)*z*z
	return n / (60 + z*(-36+z*(9-z)))
}

// exact is the argument for which the method turns a phasor by an angle exactly,
// to the square of its error: the drive keeps its amplitude and phase.
func exact(angle float64) complex128 {
	z := complex(0, angle)
	sin, cos := math.Sincos(angle)
	return z + 1 - stageOf(1, z)*complex(cos, -sin)
}

// cubic is a polynomial in the part θ of a step, lowest power first.
type cubic [4]float64

// through is the cubic through the start and the three stages of a step: the
// collocation polynomial.
func through(y0, y1, y2, y3 float64) cubic {
	d01 := (y1 - y0) / node1
	d12 := (y2 - y1) / (node2 - node1)
	d23 := (y3 - y2) / (1 - node2)
	d012 := (d12 - d01) / node2
	d123 := (d23 - d12) / (1 - node1)
	c := d123 - d012
	return cubic{y0, d01 - node1*d012 + node1*node2*c, d012 - (node1+node2)*c, c}
}

// slopes are those at the stages of the cubic that is zero at the start and one at a
// stage, by stage and by that.
var slopes = [3][3]float64{
	{3.22474487139158904909864203735, 1.16784008469040549492404127222, -0.253197264742180826185942419922},
	{-3.56784008469040549492404127222, 0.775255128608410950901357962647, 1.05319726474218082618594241992},
	{5.53197264742180826185942419922, -7.53197264742180826185942419922, 5},
}

// parabola is the polynomial through the three stages alone. It leaves out a fast
// start that the step has passed over.
func parabola(y1, y2, y3 float64) cubic {
	d12 := (y2 - y1) / (node2 - node1)
	d23 := (y3 - y2) / (1 - node2)
	c := (d23 - d12) / (1 - node1)
	b := d12 - (node1+node2)*c
	return cubic{y1 - node1*(b+node1*c), b, c, 0}
}

func (p *cubic) at(x float64) float64    { return p[0] + x*(p[1]+x*(p[2]+x*p[3])) }
func (p *cubic) slope(x float64) float64 { return p[1] + x*(2*p[2]+x*3*p[3]) }

// monotonic reports whether the cubic surely only rises or only falls on [0, 1]: the Bézier
// points of its slope have one sign.
func (p *cubic) monotonic() bool {
	b1, b2 := p[1]+p[2], p[1]+2*p[2]+3*p[3]
	return p[1] >= 0 && b1 >= 0 && b2 >= 0 || p[1] <= 0 && b1 <= 0 && b2 <= 0
}

// hull holds the cubic on [0, 1]: the least and greatest of its Bézier points.
func (p *cubic) hull() (low, high float64) {
	b1, b2, b3 := p[0]+p[1]/3, p[0]+(2*p[1]+p[2])/3, p[0]+p[1]+p[2]+p[3]
	return min(p[0], b1, b2, b3), max(p[0], b1, b2, b3)
}
