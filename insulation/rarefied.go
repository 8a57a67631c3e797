package insulation

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/gas"
)

// Rarefied is what a gap that is called vacuum stands at most where its pressure leaves so much
// gas on its way that it lies right of the Paschen minimum: plates as far apart in that gas,
// taken as air, more than which no other electrodes do. Left of the minimum nothing is known.
func Rarefied(g gap.Gap) (gap.Answer[quantity.Voltage], error) {
	none := gap.Answer[quantity.Voltage]{}
	if g.TruePressure() <= 0 {
		return none, lack.Key("spacing.pressure")
	}
	g.Medium = gap.InGas
	if g.Temperature <= 0 {
		g.Temperature = 293.15
	}
	s, err := gas.StateOf(g)
	if err != nil {
		return none, err
	}
	right, err := gas.RightOfMinimum(s, g.Clearance)
	if err == nil && !right {
		err = lack.Range("%s over %s lie left of the Paschen minimum", quantity.Text(s.Pressure), quantity.Text(g.Clearance))
	}
	if err != nil {
		return none, err
	}
	a, err := gas.UniformBreakdown(s, g.Clearance)
	if err == nil && a.AtLeast {
		err = lack.Failed("only a lower bound is known")
	}
	a.Because = named(g) + " at " + quantity.Text(s.Pressure) + " between plates, more than which no other electrodes stand: " + a.Because
	return a, err
}
