package drawing

import (
	"testing"

	"kilovet/rules/diagram"
	"kilovet/rules/rule"
)

func TestWords(t *testing.T) {
	all := diagrams(t)
	for name, want := range map[string]string{
		"column":   "A multiplier of 6 stages with one coupling column feeds the cathode through filter.1.resistor, cable, cable.gun_end_resistor. No part is marked.",
		"positive": "A multiplier of 3 stages with two coupling columns in antiphase feeds the output through filter.1.resistor. No part is marked.",
		"single":   "A multiplier of 1 stage with one coupling column feeds the cathode. No part is marked.",
	} {
		if got := Words(all[name]); got != want {
			t.Errorf("%s: %s", name, got)
		}
	}
	d := all["single"]
	d.Marks = []diagram.Mark{{Number: 1, Verdict: rule.Fails, Subject: "drive"}, {Number: 2, Verdict: rule.Marginal, Subject: "stage.1"}}
	if got, want := Words(d), "A multiplier of 1 stage with one coupling column feeds the cathode. Marked: drive fails; stage.1 marginal."; got != want {
		t.Errorf("got %s", got)
	}
	if Words(nil) == "" {
		t.Error("no words for no drawing")
	}
}
