package build

import (
	"math"

	"kilovet/hv/chain"
	"kilovet/hv/quantity"
)

// farPoint is how many gaps away the model of a point over a plane ends.
const farPoint = 4

// pointPlane is a hyperboloid of revolution over a plane, within an ellipsoid of the same
// foci, along which the field runs: exact, prolate spheroidal coordinates. Both are drawn
// of arcs that run on into each other.
func (b shapeBuilder) pointPlane(p pen, a *Arrangement, d shapeSizes) {
	h := newHyperboloid(float64(d.tip), float64(d.gap))
	end := math.Acosh(farPoint)
	tip := smooth(h.at, h.along, h.steps(end))
	rim := h.ellipse(end)
	rim[0] = at(quantity.Length(h.focus*math.Sinh(end)), 0)
	rim[len(rim)-1].r, rim[len(rim)-1].z = tip[len(tip)-1].r, tip[len(tip)-1].z
	a.Electrodes = []chain.Electrode{
		p.held(Sharper, -b.across, tip...),
		p.held(Blunter, 0, at(0, 0), rim[0]),
	}
	a.Boundary = []chain.Boundary{p.natural(rim...)}
}

// hyperboloid is z = a η cosh μ, r = a √(1 − η²) sinh μ, with its tip at μ = 0 and foci
// at ±a: η² = d/(d + ρ), a = d/η for a radius ρ at the tip and a gap d.
type hyperboloid struct{ focus, eta, tip float64 }

func newHyperboloid(tip, gap float64) hyperboloid {
	eta := math.Sqrt(gap / (gap + tip))
	return hyperboloid{gap / eta, eta, tip}
}

func (h hyperboloid) at(mu float64) complex128 {
	return complex(h.focus*math.Sqrt(1-h.eta*h.eta)*math.Sinh(mu), h.focus*h.eta*math.Cosh(mu))
}

func (h hyperboloid) along(mu float64) complex128 {
	return complex(h.focus*math.Sqrt(1-h.eta*h.eta)*math.Cosh(mu), h.focus*h.eta*math.Sinh(mu))
}

// steps are places between which the curve turns by few degrees at the tip, where the
// peak is, and farther on by no more than a pair of arcs follows within a part in a
// thousand of the potential.
func (h hyperboloid) steps(end float64) []float64 {
	const leastTurn, mostTurn, growth, stretch = 0.05, 0.2, 1.4, 0.4
	slope := h.eta / math.Sqrt(1-h.eta*h.eta) // of the asymptote
	list, mu, turn := []float64{0}, 0.0, leastTurn
	for {
		angle := math.Atan(slope*math.Tanh(mu)) + turn
		next := math.Inf(1)
		if part := math.Tan(angle) / slope; angle < math.Pi/2 && part < 1 {
			next = math.Atanh(part)
		}
		if mu > 0 {
			next = min(next, growth*mu, mu+stretch)
		}
		if next > end-stretch/4 {
			return append(list, end)
		}
		list, mu, turn = append(list, next), next, min(2*turn, mostTurn)
	}
}

// ellipse is that of the same foci through the end of the hyperboloid, from the plane on.
func (h hyperboloid) ellipse(mu float64) []mark {
	across, up := h.focus*math.Sinh(mu), h.focus*math.Cosh(mu)
	where := func(s float64) complex128 { return complex(across*math.Cos(s), up*math.Sin(s)) }
	along := func(s float64) complex128 { return complex(-across*math.Sin(s), up*math.Cos(s)) }
	end := math.Asin(h.eta)
	return smooth(where, along, []float64{0, end / 4, end / 2, 3 * end / 4, end})
}
