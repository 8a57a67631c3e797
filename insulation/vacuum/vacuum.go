// Package vacuum knows what gaps and insulator surfaces stand in vacuum, what cold
// electrodes emit, and at which pressures a vessel must carry no high voltage while it
// is pumped down.
//
// Three things differ from gases. Long gaps stand less for each millimetre than short
// ones; the surface of the electrodes decides as much as their distance; and while the
// pressure is low the longest path breaks down first, not the shortest.
package vacuum

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/shape"
	"kilovet/insulation/solve"
)

// The laws of gaps are used from 0.07 mm, where the linear one begins, to 6 m, where the
// survey behind the square root ends.
const (
	shortest quantity.Length = 0.07e-3
	longest  quantity.Length = 6
)

// even is the length of a gap between plates that has the peak field of this one at the
// same voltage: the gap times its utilisation. A pressure at which electrons no longer
// cross freely, a gap outside the laws and a missing shape are a lack.
func even(g gap.Gap) (quantity.Length, error) {
	if g.Shape == nil {
		return 0, lack.Key("spacing.shape")
	}
	l, err := shape.Of(*g.Shape, g.Clearance)
	if err != nil {
		return 0, err
	}
	if err := inRange(l.Gap()); err != nil {
		return 0, err
	}
	if pd := product(g.TruePressure(), l.Gap()); !quantity.AtMost(pd, Free) {
		return 0, lack.Range("at %s electrons meet gas on %s: no vacuum", quantity.Text(g.TruePressure()), quantity.Text(l.Gap()))
	}
	return quantity.Length(1 / float64(l.PerVolt(0))), nil
}

func inRange(d quantity.Length) error {
	if !quantity.AtLeast(d, shortest) || !quantity.AtMost(d, longest) {
		return lack.Range("the laws of vacuum gaps hold from 0.07 mm to 6 m, asked for %s", quantity.Text(d))
	}
	return nil
}

// withGap is the gap with another clearance, its shape moved along.
func withGap(g gap.Gap, d quantity.Length) gap.Gap {
	g.Clearance = d
	if g.Shape != nil {
		s := shape.WithGap(*g.Shape, d)
		g.Shape = &s
	}
	return g
}

// reach are the closest and widest gaps of these electrodes that the laws hold for.
func reach(g gap.Gap) (closest, widest quantity.Length) {
	closest, widest = shortest, longest
	if g.Shape != nil {
		closest = max(closest, 1.0001e-4*g.Shape.Sharpest()) // closer spheres are plates
	}
	if p := g.TruePressure(); p > 0 {
		widest = min(widest, quantity.Length(float64(Free)/float64(p)))
	}
	return closest, widest
}

// gapOf is the gap of the same electrodes, sharpest radius kept, whose even length is
// the wanted one. Electrodes whose field stays higher at any distance, and those that
// stand more at the closest, are a lack.
func gapOf(g gap.Gap, wanted quantity.Length) (quantity.Length, error) {
	closest, widest := reach(g)
	x, err := solve.Level(float64(closest), float64(widest), float64(wanted), func(d float64) (float64, error) {
		x, err := even(withGap(g, quantity.Length(d)))
		return float64(x), err
	}, func() error {
		return lack.Range("even %s, the closest gap of the law, stands more", quantity.Text(closest))
	}, func() error {
		if p := g.TruePressure(); p > 0 && !quantity.AtLeast(widest, longest) {
			return lack.Range("at %s the laws of vacuum end at a gap of %s, which stands less: pump lower", quantity.Text(p), quantity.Text(widest))
		}
		return lack.Range("even %s between these electrodes stands less: they are too sharp", quantity.Text(widest))
	})
	return quantity.Length(x), err
}
