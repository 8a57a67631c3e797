package rules_test

import (
	"strings"
	"testing"

	"kilovet/rules/rule"
)

// Sentences stay true at the edges: no emission is no share of a law, what a column gets back
// is not that of one part, and one wall is not several.
func TestSentencesAtTheEdges(t *testing.T) {
	none := columnWith(t, `emission            = "60 uA"`, `emission            = "0 uA"`)
	f := found(t, none, "gun.emission_law", "gun")
	if f.Verdict != rule.Fails || strings.Contains(f.Because, "Inf") {
		t.Errorf("no emission: %+v", f)
	}
	lock := columnWith(t, `interlock       = { switches = 2, acts_on = "drive supply"`, `interlock       = { switches = 2, acts_on = "nothing"`)
	for _, c := range []struct {
		finding rule.Finding
		says    string
	}{
		{found(t, lock, "access.interlock", "chain"), `it acts on "nothing", not on`},
		{found(t, none, "xray.ports", "vessel"), "1 wall, port or window is described"},
		{found(t, none, "discharge.recharge", "chain"), "over the whole column of multiplier.smoothing_capacitor"},
	} {
		if !strings.Contains(c.finding.Because, c.says) {
			t.Errorf("%s: %q, want %q", c.finding.Rule, c.finding.Because, c.says)
		}
	}
}
