package insulation

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/gas"
	"kilovet/insulation/solid"
)

// Voids looked for in a solid wall: from ten micrometres to a millimetre, or a third of
// the wall.
const (
	smallestVoid quantity.Length = 10e-6
	largestVoid  quantity.Length = 1e-3
)

// FlatVoid is a flat void of air in a solid wall, its size and the peak voltage across
// the wall at which it would begin to discharge.
type FlatVoid struct {
	Size    quantity.Length
	Voltage quantity.Voltage
}

// WorstVoid is the flat void that would discharge at the lowest voltage in a solid part,
// with the highest permittivity of its material and air of the site inside. Under DC the
// field in a void follows the resistivities and discharges come seldom. Real bubbles are
// rounder and start two to three times higher. Without a permittivity there is a lack.
func WorstVoid(g gap.Gap) (FlatVoid, error) {
	if g.Medium != gap.Solid {
		return FlatVoid{}, lack.Range("voids are those of solids")
	}
	m, err := solid.Find(g.Material)
	if err != nil {
		return FlatVoid{}, err
	}
	if m.Permittivity.Most == 0 {
		return FlatVoid{}, lack.Range("no permittivity of %s was read", m.Name)
	}
	air := g
	air.Medium = gap.Air
	state, err := gas.StateOf(air)
	if err != nil {
		return FlatVoid{}, err
	}
	if g.Clearance <= 0 {
		return FlatVoid{}, lack.Key("spacing.clearance")
	}
	size, v, err := solid.WorstVoid(state, g.Clearance, m.Permittivity.Most, smallestVoid, min(largestVoid, g.Clearance/3))
	return FlatVoid{size, v}, err
}

// DischargeTestAsked reports whether a solid part asks for a partial discharge test at the
// peak voltage, and by which source.
func DischargeTestAsked(g gap.Gap, v gap.Voltages) (bool, gap.Source) {
	if g.Medium != gap.Solid {
		return false, solid.DischargeTestSource
	}
	peak := quantity.Field(0)
	if g.Clearance > 0 {
		peak = quantity.Field(float64(v.Peak) / float64(g.Clearance))
	}
	if a, err := FieldPeak(g, v); err == nil {
		peak = a.Value
	}
	return solid.NeedsDischargeTest(v.Peak, peak), solid.DischargeTestSource
}
