package evidence

import (
	"slices"

	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/hv/quantity"
	"kilovet/insulation"
)

// WallSize is one size of a sleeve with which its wall stands what it takes, and what must
// follow it.
type WallSize struct {
	Key         string
	Now, Needed quantity.Length
	Follows     string // empty: nothing
}

// WallAsked is what a wall must stand: a share of its thickness bears the voltage at work,
// and the voltage is a share of the breakdown.
type WallAsked struct {
	AtWork      float64           // share of the thickness, and of the onset of an annulus
	OfBreakdown quantity.Fraction // share of the estimate
}

// wallMove is a size of a feedthrough and the feedthrough with another.
type wallMove struct {
	key, follows string
	now, most    quantity.Length
	with         func(quantity.Length) *chain.Feedthrough
}

// WallSizes are the sizes of a sleeve of which each alone is enough, the least change first,
// by layers; what the computed field has more than those is kept in proportion.
func (e *Evidence) WallSizes(s *chain.Spacing, x Spacing, asked WallAsked) []WallSize {
	more := quantity.Fraction(1)
	if x.Wall.Layers > 0 {
		more = max(1, x.Wall.byField()/x.Wall.Layers)
	}
	lasting, err := e.Mean(s.Of)
	if err != nil {
		return nil
	}
	var all []WallSize
	for _, m := range wallMoves(s.Of) {
		enough := func(v quantity.Length) bool {
			f := m.with(v)
			w := e.wallOf(f, Wall{Whole: x.Wall.Whole, Part: 1, Layers: 1}, min(lasting, x.Wall.Whole), more, quantity.Voltage(1/asked.AtWork))
			return e.wallStands(f, x, w.Of(x.Wall.Whole), asked)
		}
		if v, found := leastMove(m, enough); found {
			all = append(all, WallSize{m.key, m.now, v, m.follows})
		}
	}
	slices.SortStableFunc(all, func(a, b WallSize) int {
		if a.Needed-a.Now < b.Needed-b.Now {
			return -1
		}
		return 1
	})
	return all
}

// wallOf is a wall by layers and by what the computed field has more than those.
func (e *Evidence) wallOf(f *chain.Feedthrough, w Wall, lasting quantity.Voltage, more quantity.Fraction, hand quantity.Voltage) Wall {
	if w = e.divided(f, w, lasting, hand); w.held {
		w.Part = w.Layers * more
	}
	return w
}

func (e *Evidence) wallStands(f *chain.Feedthrough, x Spacing, v quantity.Voltage, asked WallAsked) bool {
	all := f.Spacings()
	i := slices.IndexFunc(all, func(s chain.Spacing) bool { return isWall(&s) })
	if i < 0 {
		return false
	}
	x.Gap = e.gap(&all[i])
	stands, err := insulation.Breakdown(x.Gap, x.Voltages.Sharp)
	return err == nil && quantity.AtMost(v, stands.Value*quantity.Voltage(asked.OfBreakdown)) && x.BearsAtWork(v, asked.AtWork)
}

// leastMove grows a size from a two-hundredth on until it is enough.
func leastMove(m wallMove, enough func(quantity.Length) bool) (quantity.Length, bool) {
	const first, ratio = 0.005, 1.15
	before := m.now
	for by := first * m.now; m.now+by < m.most; by *= ratio {
		v := m.now + by
		if !enough(v) {
			before = v
			continue
		}
		for range 20 {
			if middle := (before + v) / 2; enough(middle) {
				v = middle
			} else {
				before = middle
			}
		}
		return v, true
	}
	return 0, false
}

// largest is how many times larger a size of a feedthrough may become in a remedy.
const largest = 5

// wallMoves are the sizes that a wall is made stronger by.
func wallMoves(f *chain.Feedthrough) (all []wallMove) {
	add := func(of document.Given[quantity.Length], follows string, most quantity.Length, edit func(*chain.Feedthrough, quantity.Length)) {
		all = append(all, wallMove{of.Key, follows, of.V, most, func(v quantity.Length) *chain.Feedthrough {
			other, pin, hole, sleeve := *f, *f.Pin, *f.Hole, *f.Sleeve
			other.Pin, other.Hole, other.Sleeve = &pin, &hole, &sleeve
			edit(&other, v-of.V)
			return &other
		}})
	}
	outer := func(f *chain.Feedthrough, by quantity.Length) {
		f.Sleeve.OuterRadius = at(f.Outer(), f.Outer().V+by)
	}
	hole := func(f *chain.Feedthrough, by quantity.Length) { f.Hole.Radius.V += by }
	if f.HasOuterGap() {
		add(f.Outer(), "", f.Hole.Radius.V, outer)
		add(f.Hole.Radius, "", largest*f.Hole.Radius.V, hole)
	}
	follows := "the hole as much wider"
	if !f.Sleeve.OuterRadius.Set() {
		follows = "the sleeve filling it"
	}
	add(f.Outer(), follows, largest*f.Outer().V, func(f *chain.Feedthrough, by quantity.Length) { outer(f, by); hole(f, by) })
	add(f.Pin.Radius, "bore, sleeve and hole as much wider", largest*f.Outer().V, func(f *chain.Feedthrough, by quantity.Length) {
		f.Sleeve.InnerRadius = at(f.Inner(), f.Inner().V+by)
		outer(f, by)
		hole(f, by)
		f.Pin.Radius.V += by
	})
	return all
}

// at is a length that stands where another was given.
func at(where document.Given[quantity.Length], v quantity.Length) document.Given[quantity.Length] {
	return document.Given[quantity.Length]{V: v, Place: where.Place}
}
