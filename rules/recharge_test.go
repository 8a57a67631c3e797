package rules_test

import (
	"slices"
	"strings"
	"testing"

	"kilovet/rules"
	"kilovet/rules/evidence"
	"kilovet/rules/rule"
)

// Hand calculation (derived; shares read): what the smoothing column gets back is 0.6 % of
// the whole voltage on it, capacitor upon capacitor, with C0G; 2.5 %, the largest published,
// where nothing is published of the dielectric, and that is said.
func TestWhatComesBackOnAColumn(t *testing.T) {
	for dielectric, share := range map[string]float64{"C0G": 0.006, "film": 0.02, "X7R": 0.025, "mica": 0.025} {
		text := strings.ReplaceAll(string(described(t, "column")), `tolerance = "10 %", dielectric = "C0G" }`, `tolerance = "10 %", value_at_voltage = "2 nF", dielectric = "`+dielectric+`" }`)
		if dielectric != "X7R" {
			text = strings.ReplaceAll(text, `value_at_voltage = "2 nF", `, "")
		}
		text = strings.ReplaceAll(text, `{ value = "470 pF", rated_voltage = "40 kV", tolerance = "10 %", value_at_voltage = "2 nF"`, `{ value = "470 pF", rated_voltage = "40 kV", tolerance = "10 %", value_at_voltage = "400 pF"`)
		c, faults := rules.Read([]byte(text))
		if len(faults) > 0 {
			t.Fatal(faults)
		}
		e := evidence.New(c).In(evidence.Lost)
		back, err := e.MostComesBack()
		if err != nil {
			t.Fatal(err)
		}
		top, err := e.Between("multiplier", "ground")
		if err != nil {
			t.Fatal(err)
		}
		nearly(t, dielectric, float64(back.Voltage/top), share, 0.02)
		if unknown := len(back.Assumed) > 0; unknown != (dielectric == "mica") {
			t.Errorf("%s: assumed %v", dielectric, back.Assumed)
		}
	}
}

func TestComebackIsJudged(t *testing.T) {
	r := columnWith(t)
	i := slices.IndexFunc(r.Findings, func(f rule.Finding) bool { return f.Rule == "discharge.recharge" })
	if i < 0 || r.Findings[i].Verdict != rule.Marginal || !strings.Contains(r.Findings[i].Because, "multiplier.smoothing_capacitor") {
		t.Error("what comes back is not judged")
	}
}
