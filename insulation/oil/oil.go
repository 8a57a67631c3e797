// Package oil knows what gaps in mineral oil stand: the laws of clean oil as upper
// bounds, the cautious figure of general tables that judges, working stress by practice,
// the condition of oil by its standard test, and what degassing and water take from it.
package oil

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/shape"
	"kilovet/insulation/solve"
)

// lineOf is the critical line of a gap; without a shape there is a lack.
func lineOf(g gap.Gap) (shape.Line, error) {
	if g.Shape == nil {
		return shape.Line{}, lack.Key("spacing.shape")
	}
	return shape.Of(*g.Shape, g.Clearance)
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

// gapWhere finds the gap between two, sharpest radius kept, at which a voltage that rises
// with it takes a value; what the closest exceeds and the widest does not reach is a lack.
func gapWhere(g gap.Gap, closest, widest quantity.Length, want quantity.Voltage, of func(gap.Gap) (quantity.Voltage, error)) (quantity.Length, error) {
	if g.Shape != nil {
		closest = max(closest, 1.0001e-4*g.Shape.Sharpest()) // closer spheres are plates
	}
	x, err := solve.Level(float64(closest), float64(widest), float64(want), func(d float64) (float64, error) {
		v, err := of(withGap(g, quantity.Length(d)))
		return float64(v), err
	}, func() error {
		return lack.Range("even %s of oil, the closest that is known, stands more than %s", quantity.Text(closest), quantity.Text(want))
	}, func() error {
		return lack.Range("even %s of oil, the widest that is known, stands less than %s", quantity.Text(widest), quantity.Text(want))
	})
	return quantity.Length(x), err
}
