package solid

import (
	"fmt"

	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

// Share is how much of the short-time strength is used in work.
type Share struct {
	Of     quantity.Fraction
	Source gap.Source
}

// Shares of the strength: the published design uses a fourth of it; a long life under
// DC asks for a fifth to a tenth.
var (
	Published = Share{0.25, gap.Source{Text: "working stress a fourth of the strength, 20 to 5 kV/mm: Naidu and Kamaraju, High Voltage Engineering, ex. 4.3", Mark: gap.Read}}
	LongLife  = Share{0.20, gap.Source{Text: "a fifth of the strength for a long life under DC", Mark: gap.Memory}}
	Careful   = Share{0.10, gap.Source{Text: "a tenth of the strength for a long life under DC", Mark: gap.Memory}}
)

// WorkingVoltage is a share of the breakdown voltage of a part.
func WorkingVoltage(g gap.Gap, s Share) (gap.Answer[quantity.Voltage], error) {
	a, err := Breakdown(g)
	if err != nil {
		return a, err
	}
	a.Value *= quantity.Voltage(s.Of)
	a.Because = fmt.Sprintf("%g %% of the strength; %s", float64(s.Of)*100, a.Because)
	a.Sources = append([]gap.Source{s.Source.Governing()}, gap.Plain(a.Sources)...)
	for i := range a.Shown {
		a.Shown[i].Value *= quantity.Voltage(s.Of)
	}
	return a, nil
}

// ThicknessFor is the thickness at which a voltage takes a share of the strength.
func ThicknessFor(g gap.Gap, v quantity.Voltage, s Share) (quantity.Length, error) {
	return ThicknessForBreakdown(g, v/quantity.Voltage(s.Of))
}

// losing is the frequency from which heat by losses may decide, which strengths of DC
// and mains do not hold (practice).
const losing quantity.Frequency = 30e3

// ClearanceNeeded is the thickness of solid at which the peak voltage takes a fourth of
// the strength, and never under the thinnest that is known; beside it stand those of a
// fifth and a tenth, for a long life. A class of insulation is proved by test, it does not
// change the thickness here.
func ClearanceNeeded(g gap.Gap, v gap.Voltages) (gap.Answer[quantity.Length], error) {
	none := gap.Answer[quantity.Length]{}
	t, err := atLeastThinnest(g, v.Peak, Published)
	if err != nil {
		return none, err
	}
	at, err := WorkingVoltage(withThickness(g, t), Published)
	if err != nil {
		return none, err
	}
	a := gap.Answer[quantity.Length]{
		Value: t, Because: quantity.Text(v.Peak) + " peak at " + at.Because,
		Sources: at.Sources, Assumptions: at.Assumptions,
	}
	if v.Alternating > 0 && quantity.AtLeast(v.Frequency, losing) {
		a.Assumptions = append(a.Assumptions, "heat by losses at "+quantity.Text(v.Frequency)+" is not judged")
	}
	for _, s := range []Share{LongLife, Careful} {
		if t, err := ThicknessFor(g, v.Peak, s); err == nil {
			a.Shown = append(a.Shown, gap.Beside[quantity.Length]{Value: t, Source: s.Source})
		}
	}
	return a, nil
}

// atLeastThinnest is the thickness for a voltage, or the thinnest where that stands more.
func atLeastThinnest(g gap.Gap, v quantity.Voltage, s Share) (quantity.Length, error) {
	m, err := Of(g)
	if err != nil {
		return 0, err
	}
	thin, _ := reach(g, m)
	if a, err := WorkingVoltage(withThickness(g, thin), s); err == nil && a.Value >= v {
		return thin, nil
	}
	return ThicknessFor(g, v, s)
}

// Discharge tests are asked of solids stressed above both (a converter standard as
// quoted; the 1 kV/mm is a handy entry for any solid).
const (
	DischargeTestVoltage quantity.Voltage = 700
	DischargeTestField   quantity.Field   = 1e6
)

// DischargeTestSource is where those two come from.
var DischargeTestSource = gap.Source{Text: "partial discharge test above 700 V peak and 1 kV/mm, 1.875 then 1.5 times, under 10 pC: power-converter standard, clause 7.5.3, as quoted", Mark: gap.Read}

// NeedsDischargeTest reports whether a solid asks for a partial discharge test.
func NeedsDischargeTest(v quantity.Voltage, peak quantity.Field) bool {
	return !quantity.AtMost(v, DischargeTestVoltage) && !quantity.AtMost(peak, DischargeTestField)
}
