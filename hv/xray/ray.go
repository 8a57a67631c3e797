package xray

import (
	"math"
	"slices"
)

// ray is one point of a spectrum behind a wall, for summing over energies in keV.
type ray struct {
	energy float64
	span   float64 // the weight of the point, keV
	air    float64 // µen/ρ of air, cm²/g
	depth  float64 // µx of the wall
}

// Points and weights of Gauss and Legendre on −1 … 1, order 6 (Abramowitz and Stegun,
// Table 25.4).
var gauss = [...][2]float64{
	{-0.932469514203152, 0.171324492379170}, {-0.661209386466265, 0.360761573048139}, {-0.238619186083197, 0.467913934572691},
	{0.238619186083197, 0.467913934572691}, {0.661209386466265, 0.360761573048139}, {0.932469514203152, 0.171324492379170},
}

const (
	// panelDepth is how far µx changes over one panel of points, about.
	panelDepth = 3.0
	// widestPanel is a panel in ln energy.
	widestPanel = 0.3
	// forgotten is how much deeper than the most transparent energy rays count no more:
	// e⁻⁴⁵ of it is below all rounding.
	forgotten = 45.0
)

// rays samples what may be below the energy top behind the screens. Energies between
// two rows, where every coefficient is a power, are cut into panels that shrink with
// the slope of µx; what is deeper than forgotten is left out. The points depend on the
// energy alone, so that equal inputs give equal sums.
func rays(screens []screen, top float64) []ray {
	knots := knots(screens, top)
	least := math.Inf(1)
	for i := 1; i < len(knots); i++ {
		s := newStretch(screens, knots[i-1], knots[i])
		least = min(least, s.depth(s.low), s.depth(s.high))
	}
	all := make([]ray, 0, 512)
	for i := 1; i < len(knots); i++ {
		s := newStretch(screens, knots[i-1], knots[i])
		all = s.sample(all, least+forgotten)
	}
	return all
}

// knots lists the energies at which some table has a row, from the lowest to top.
func knots(screens []screen, top float64) []float64 {
	all := []float64{top}
	add := func(t table) {
		for _, r := range t {
			if r.energy < top {
				all = append(all, r.energy)
			}
		}
	}
	add(airTable)
	for _, s := range screens {
		add(s.table)
	}
	slices.Sort(all)
	return slices.Compact(all)
}

// stretch lies between two knots, in ln energy; the laws of the screens hold their
// thickness too.
type stretch struct {
	low, high float64
	air       law
	laws      []law
}

func newStretch(screens []screen, from, to float64) stretch {
	middle := math.Sqrt(from * to)
	s := stretch{math.Log(from), math.Log(to), airTable.at(middle, absorption), make([]law, len(screens))}
	for i, sc := range screens {
		s.laws[i] = sc.table.at(middle, sc.of)
		s.laws[i].value += sc.areal
	}
	return s
}

// depth is µx at a logarithm of energy.
func (s stretch) depth(x float64) (sum float64) {
	for _, l := range s.laws {
		sum += math.Exp(l.ln(x))
	}
	return sum
}

// steep is how fast µx falls with ln energy.
func (s stretch) steep(x float64) (sum float64) {
	for _, l := range s.laws {
		sum -= l.slope * math.Exp(l.ln(x))
	}
	return sum
}

// sample appends the points of the stretch, from its more transparent end on (the upper
// one, but for the rise of heavy metals above their outer edges) to where it becomes
// deeper than deepest.
func (s stretch) sample(all []ray, deepest float64) []ray {
	x, end, way := s.high, s.low, -1.0
	if s.depth(s.low) < s.depth(s.high) {
		x, end, way = s.low, s.high, 1
	}
	for x != end && s.depth(x) < deepest {
		step, left := min(widestPanel, panelDepth/max(math.Abs(s.steep(x)), 1)), way*(end-x)
		next := x + way*step
		if left < step*9/8 { // no sliver is left over
			step, next = left, end
		}
		for _, g := range gauss {
			y := (x+next)/2 + g[0]*step/2
			energy := math.Exp(y)
			all = append(all, ray{energy, g[1] / 2 * step * energy, math.Exp(s.air.ln(y)), s.depth(y)})
		}
		x = next
	}
	return all
}
