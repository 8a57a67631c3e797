package rules_test

import (
	"math"
	"slices"
	"strings"
	"testing"

	"kilovet/rules"
	"kilovet/rules/evidence"
	"kilovet/rules/rule"
)

// Hand calculation (derived): with one centre resistor 1 % high and the other 1 % low the
// tip swings by 1.9 V·√2·0.005 to either side, which the figure, at stated values, leaves
// out and both judgements of the hum add.
func TestMismatchOfCentreResistorsIsJudged(t *testing.T) {
	const more = 2 * 1.9 * math.Sqrt2 * 0.005
	r := columnWith(t, `supply  = "dc"`, `supply = "ac"`)
	nearly(t, "hum", provided(t, r, "heater.hum", "cathode"), number(r, "cathode.hum", "")+more, 1e-6)
	c, _ := rules.Read([]byte(strings.Replace(string(described(t, "column")), `supply  = "dc"`, `supply = "ac"`, 1)))
	hum, err := evidence.New(c).Under(evidence.Condition{State: evidence.Working, Corner: evidence.AllHigh}).CathodeHum()
	nominal, err2 := evidence.New(c).Under(evidence.Condition{State: evidence.Working}).CathodeHum()
	if err != nil || err2 != nil || float64(hum-nominal) < 0.9*more {
		t.Errorf("in a corner %v (%v), as stated %v (%v)", hum, err, nominal, err2)
	}
}

// Without a tolerance the stated values are an assumption, which judges and is said.
func TestCentreResistorsWithoutTolerance(t *testing.T) {
	r := columnWith(t, `supply  = "dc"`, `supply = "ac"`, `["22 ohm", "22 ohm"], tolerance = "1 %"`, `["22 ohm", "22 ohm"]`)
	for _, id := range []string{"heater.hum", "beam.disturbance"} {
		i := slices.IndexFunc(r.Findings, func(f rule.Finding) bool { return f.Rule == id })
		if i < 0 || !slices.Contains(r.Findings[i].Assumptions, "the heater's centre resistors are exactly as stated: no tolerance is") || r.Findings[i].Verdict == rule.Meets {
			t.Errorf("%s does not say what it assumes", id)
		}
	}
}

func provided(t *testing.T, r *rules.Review, id, subject string) float64 {
	t.Helper()
	i := slices.IndexFunc(r.Findings, func(f rule.Finding) bool { return f.Rule == id && f.Subject == subject })
	if i < 0 || r.Findings[i].Provided == nil {
		t.Fatalf("%s of %s is not judged", id, subject)
	}
	return r.Findings[i].Provided.Value
}
