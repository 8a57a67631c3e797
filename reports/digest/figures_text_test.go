package digest_test

import (
	"testing"

	"kilovet/reports/digest"
	"kilovet/rules/figure"
)

// By how many per cent something changes for one per cent of its cause is no share.
func TestRelativeChangesAreNoShares(t *testing.T) {
	for _, c := range []struct {
		what, unit string
		value      float64
		want       string
	}{
		{"relative change of the emission per relative change of the bias resistor", "1", -0.80341, "-0.8034"},
		{"relative change of the emission per relative change of the temperature", "1", 1.66e-9, "0"},
		{"relative swing of the emission", "1", -0.80341, "-80.34 %"},
		{"relative change of the voltage", "V", 0.5, "500 mV"},
	} {
		if got := digest.FigureText(figure.Figure{What: c.what, Unit: c.unit, Value: c.value}); got != c.want {
			t.Errorf("%s: %s, want %s", c.what, got, c.want)
		}
	}
}
