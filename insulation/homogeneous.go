package insulation

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/table"
)

// homogeneousNeed is the clearance of case B in a gap that was impulse tested, for a
// nearly homogeneous field: plates, no radius under the clearance that is needed, or no
// shape, the test being taken as its proof. The clearance there is does not count: the same
// electrodes further apart stand no less. Else there is a lack, and case A holds.
func homogeneousNeed(g gap.Gap, v gap.Voltages, factor table.Reading[quantity.Fraction]) (gap.Answer[quantity.Length], error) {
	a, err := needIn(table.CaseB, g, v, factor)
	switch {
	case err != nil:
		return a, err
	case g.Shape == nil:
		a.Because += "; impulse tested"
		a.Assumptions = append(a.Assumptions, "the impulse voltage test is taken as proof that the field is nearly homogeneous: no shape is given")
		return a, nil
	case g.Shape.Kind == gap.Plates, quantity.AtLeast(g.Shape.Sharpest(), a.Value):
		a.Because += "; homogeneous by its shape and impulse tested"
		return a, nil
	}
	return a, lack.Range("a radius of %s is not homogeneous over %s", quantity.Text(g.Shape.Sharpest()), quantity.Text(a.Value))
}

// PeakByTable is the highest peak that the gap's clearance meets Table F.8 for, after
// altitude and safety step. Past the last row it is that of the last row.
func PeakByTable(g gap.Gap) (quantity.Voltage, error) {
	if err := inAir(g); err != nil {
		return 0, err
	}
	if g.Clearance <= 0 {
		return 0, lack.Key("spacing.clearance")
	}
	factor, err := altitudeFactor(g)
	if err != nil {
		return 0, err
	}
	reach := func(field table.Case, over quantity.Length) (quantity.Voltage, error) {
		v, err := table.SteadyClearance(field).Reach(over / quantity.Length(factor.Value))
		return v / safetyStep(g), err
	}
	v, err := reach(table.CaseA, g.Clearance)
	if over := homogeneousOver(g); over > 0 {
		if b, errB := reach(table.CaseB, over); errB == nil && (err != nil || b > v) {
			return b, nil
		}
	}
	return v, err
}

// homogeneousOver is the longest clearance within that of a gap over which case B holds, 0
// where it does not.
func homogeneousOver(g gap.Gap) quantity.Length {
	switch {
	case !g.ImpulseTested:
		return 0
	case g.Shape == nil, g.Shape.Kind == gap.Plates:
		return g.Clearance
	}
	return min(g.Clearance, g.Shape.Sharpest())
}
