package rules_test

import (
	"regexp"
	"testing"

	"kilovet/rules/rule"
)

// Of a hot cathode whose heater is not described the hum is not known: what scans is
// unassessed, and what rests on the disturbance is met on an assumption at best.
func TestAHotCathodeWithoutItsHeater(t *testing.T) {
	heater := regexp.MustCompile(`(?m)^\[heater\]\n(.+\n)+`).FindString(columnText(t))
	if heater == "" {
		t.Fatal("no heater in the built-in description")
	}
	r := columnWith(t, heater, "")
	for id, want := range map[string]rule.Verdict{"beam.blur": rule.Marginal, "beam.disturbance": rule.Marginal, "beam.hum": rule.Unassessed, "heater.hum": rule.Unassessed} {
		subject := map[string]string{"beam.blur": "beam", "beam.disturbance": "cathode", "beam.hum": "hum", "heater.hum": "cathode"}[id]
		if f := found(t, r, id, subject); f.Verdict != want {
			t.Errorf("%s: %s, want %s", id, f.Verdict, want)
		}
	}
}
