package rules_test

import (
	"bytes"
	"testing"

	"kilovet/rules/rule"
)

// A rod is a resistor: without resistance it is none, and at 1 ohm the whole 22.9 kV begin
// with some 23 kA, where a few amperes are practice.
func TestARodIsAResistor(t *testing.T) {
	for ohms, want := range map[string]rule.Verdict{"100 kohm": rule.Meets, "5 kohm": rule.Meets, "4 kohm": rule.Marginal, "1 ohm": rule.Marginal, "0 ohm": rule.Fails} {
		text := bytes.Replace(described(t, "column"), []byte(`resistance = "100 kohm", rated_voltage = "50 kV"`), []byte(`resistance = "`+ohms+`", rated_voltage = "50 kV"`), 1)
		if got := findingOf(t, reviewed(t, text), "rod.there").Verdict; got != want {
			t.Errorf("a rod of %s: %s", ohms, got)
		}
	}
}
