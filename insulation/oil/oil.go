// Package oil knows what gaps in mineral oil stand: the laws of clean oil as upper
// bounds, the cautious figure of general tables that judges, working stress by practice,
// the condition of oil by its standard test, and what degassing and water take from it.
package oil

import (
	"math"

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
	place := func(u float64) quantity.Length { return closest * quantity.Length(math.Exp(u-1)) }
	excess := func(u float64) (float64, error) {
		v, err := of(withGap(g, place(u)))
		return math.Log(float64(v / want)), err
	}
	most := 1 + math.Log(float64(widest/closest))
	low, err := excess(1)
	if err != nil {
		return 0, err
	}
	high, err := excess(most)
	switch {
	case err != nil:
		return 0, err
	case low > 0:
		return 0, lack.Range("even %s of oil, the closest that is known, stands more than %s", quantity.Text(closest), quantity.Text(want))
	case high < 0:
		return 0, lack.Range("even %s of oil, the widest that is known, stands less than %s", quantity.Text(widest), quantity.Text(want))
	}
	u, err := solve.Rise(1, most, excess)
	return place(u), err
}
