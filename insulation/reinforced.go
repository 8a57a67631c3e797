package insulation

import (
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

// The sources of the safety steps of reinforced insulation.
var (
	stepSource  = gap.Source{Text: "IEC 60664-1, reinforced insulation is dimensioned for 160 % of the peak", Mark: gap.Memory}
	twiceSource = gap.Source{Text: "IEC 60664-1, reinforced insulation takes twice the creepage, in Texas Instruments SLUAAR5", Mark: gap.Read}
)

// forStep is an answer for 160 % of the peak with the source of that, where there is one.
func forStep(g gap.Gap, a gap.Answer[quantity.Length]) gap.Answer[quantity.Length] {
	if g.Class() == gap.Reinforced && a.Sources != nil {
		a.Sources = append(a.Sources, stepSource)
	}
	return a
}

// safetyStep is what the peak is multiplied by before Table F.8 is read: 160 % for
// reinforced insulation (IEC 60664-1, memory).
func safetyStep(g gap.Gap) quantity.Voltage {
	if g.Class() == gap.Reinforced {
		return 1.6
	}
	return 1
}
