package spacing

import (
	"kilovet/hv/chain"
	"kilovet/hv/quantity"
	"kilovet/insulation"
	"kilovet/rules/evidence"
)

// warmest is the temperature up to which the strength of a solid is taken to be the one
// that was published, at room temperature (common practice, no source).
const warmest quantity.Temperature = 273.15 + 40

// beyond is what the laws of strength take for granted of a spacing that is not as what
// they were measured on was.
func beyond(e *evidence.Evidence, s *chain.Spacing, x evidence.Spacing) []string {
	var taken []string
	switch medium := s.Medium.V; {
	case medium == "solid" && x.Gap.Temperature > warmest:
		taken = append(taken, "the strength at "+quantity.Text(x.Gap.Temperature)+" is that at room temperature: heat takes a part that is not known, ask the maker")
	case medium == "vacuum" && !s.Pressure.Set() && e.Chain().Vacuum == nil:
		taken = append(taken, "the vacuum is good enough: spacing.pressure is not given")
	}
	if insulation.Fast(x.Voltages) && s.Medium.V != "vacuum" {
		taken = append(taken, "the strength at "+quantity.Text(x.Voltages.Frequency)+" is that at DC and mains frequency: in air at 40 kHz a gap of 1 mm stands a quarter less, one of 10 mm an eighth (Peek)")
	}
	return taken
}
