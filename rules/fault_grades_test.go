package rules_test

import (
	"slices"
	"strings"
	"testing"

	"kilovet/rules"
	"kilovet/rules/rule"
)

// Insulation between the high voltage and people is no part like another: above its rating
// in a fault that nothing catches it fails, and that is of concern for life. A resistor that
// passes its rating in the same way is marginal.
func TestInsulationInAFault(t *testing.T) {
	r := wholeWith(t, `length        = "1.5 m"
capacitance   = "105 pF/m"
rated_voltage = "40 kV"`, `length        = "1.5 m"
capacitance   = "105 pF/m"
rated_voltage = "22.5 kV"`, `over_voltage = { trip = "23 kV", senses = "second divider", acts_on = "drive supply" }`, "")
	i := slices.IndexFunc(r.Findings, func(f rule.Finding) bool { return f.Rule == "fault.rating" && f.Subject == "gun-end resistor open" })
	if i < 0 || r.Findings[i].Verdict != rule.Fails || r.Findings[i].Concern != rule.Life || !strings.Contains(r.Findings[i].Because, "able") {
		t.Errorf("the cable is not judged: %+v", r.Findings[max(i, 0)])
	}
	if v := verdictOf(r, "fault.rating", "divider element off by ten"); v != rule.Marginal {
		t.Errorf("a resistor: %s", v)
	}
}

// A gap that a single fault brings above what it is expected to stand fails where nothing
// catches it; one that has more than the tables allow, and stands it, is marginal and known as
// one whose limit is passed.
func TestAGapInAFault(t *testing.T) {
	const gap = "to         = \"stage.2\"\nalso       = [\"stage.3\"]\nmedium     = \"air\"\ninsulation = \"functional\"\nclearance  = \"18 mm\""
	r := wholeWith(t, gap, strings.Replace(gap, "18 mm", "6 mm", 1))
	f := found(t, r, "fault.spacing", "stages 1 to 3")
	if f.Verdict != rule.Fails || f.Concern != rule.Equipment || !strings.Contains(f.Because, "it flashes over") {
		t.Errorf("6 mm: %+v", f)
	}
	r = wholeWith(t)
	f = found(t, r, "fault.spacing", "stages 1 to 3")
	if f.Verdict != rule.Marginal || !f.Passes() || !strings.Contains(f.Because, "the estimate of breakdown is not") {
		t.Errorf("18 mm: %+v", f)
	}
	if f := found(t, r, "fault.rating", "chain"); !f.Passes() {
		t.Errorf("ratings: %+v", f)
	}
}

// found is one finding of a review.
func found(t *testing.T, r *rules.Review, id, subject string) rule.Finding {
	t.Helper()
	i := slices.IndexFunc(r.Findings, func(f rule.Finding) bool { return f.Rule == id && f.Subject == subject })
	if i < 0 {
		t.Fatalf("no %s of %s", id, subject)
	}
	return r.Findings[i]
}

// The over-current trip senses what it is said to: a part that a fault leaves alone catches
// nothing, the part that failed neither, and what is no part leaves it unassessed.
func TestWhatTheOverCurrentTripSenses(t *testing.T) {
	const trip = `over_current = { trip = "200 uA", senses = "return", acts_on = "drive supply" }`
	for senses, want := range map[string]rule.Verdict{"return": rule.Meets, "filter.1.resistor": rule.Meets, "bias.resistor": rule.Marginal} {
		r := wholeWith(t, trip, strings.Replace(trip, "return", senses, 1))
		if v := verdictOf(r, "fault.rating", "filter capacitor shorted"); v != want {
			t.Errorf("sensing %s: %s, want %s", senses, v, want)
		}
	}
	assumed := wholeWith(t, trip, strings.Replace(trip, `senses = "return", `, "", 1))
	for _, subject := range []string{"arc", "filter capacitor shorted"} {
		if v := verdictOf(assumed, "fault.rating", subject); v != rule.Marginal {
			t.Errorf("%s rests on an assumption: %s", subject, v)
		}
	}
	if v := verdictOf(assumed, "protection.over_current", "chain"); v != rule.Marginal {
		t.Errorf("the trip rests on an assumption: %s", v)
	}
	strange := wholeWith(t, trip, strings.Replace(trip, "return", "the blue wire", 1))
	if v := verdictOf(strange, "protection.over_current", "chain"); v != rule.Unassessed {
		t.Errorf("what it senses is no part: %s", v)
	}
}

// wholeWith is columnWith, single faults and all.
func wholeWith(t *testing.T, swaps ...string) *rules.Review {
	t.Helper()
	return reviewedWhole(t, []byte(columnText(t, swaps...)))
}

// A standing arc at the output drives one current through all that stands in series (closed
// form: powers go as the resistances, 1 MΩ to 47 kΩ, but for what bleeder and divider draw
// before the second), and a trip that rests on the return ends it.
func TestPowerInAStandingArc(t *testing.T) {
	r := wholeWith(t)
	filter, end := provided(t, r, "series.arc_power", "filter.1.resistor"), provided(t, r, "series.arc_power", "cable.gun_end_resistor")
	nearly(t, "powers", filter/end, 1e6/47e3, 5e-3)
	for subject, want := range map[string]rule.Verdict{"filter.1.resistor": rule.Marginal, "cable.gun_end_resistor": rule.Meets} {
		if v := verdictOf(r, "series.arc_power", subject); v != want {
			t.Errorf("%s: %s, want %s", subject, v, want)
		}
	}
}

// A part without a rating is judged under no fault, and the sum of all faults says of which.
func TestPartsWithoutARatingUnderFaults(t *testing.T) {
	for _, c := range []struct{ was, becomes, part string }{
		{`rated_current = "5 mA", `, "", "multiplier.diode"},
		{`coupling_capacitor  = { value = "2.2 nF", rated_voltage = "8 kV",`, `coupling_capacitor  = { value = "2.2 nF",`, "multiplier.coupling_capacitor"},
	} {
		f := found(t, wholeWith(t, c.was, c.becomes), "fault.rating", "chain")
		if f.Verdict != rule.Unassessed || !strings.Contains(f.Because, c.part) {
			t.Errorf("%s: %+v", c.part, f)
		}
	}
}

// A trip that catches a fault since strays that would keep it from that are not given rests
// on their being none.
func TestATripRestsOnStraysThatAreNotGiven(t *testing.T) {
	f := found(t, wholeWith(t, `resistance = "60 ohm", capacitance = "1 pF"`, `resistance = "60 ohm"`), "fault.rating", "divider element off by ten")
	if f.Verdict != rule.Marginal {
		t.Errorf("%+v", f)
	}
}
