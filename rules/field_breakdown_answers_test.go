package rules_test

import (
	"regexp"
	"strconv"
	"strings"
	"testing"

	"kilovet/rules/rule"
)

// A gap of a described field that breaks down is told by how much one dimension must change,
// and doing so is enough; the other end of the same gap refers to it.
func TestBreakdownOfAFieldNamesOneDimension(t *testing.T) {
	of := func(name string, text []byte) rule.Finding {
		for _, f := range reviewed(t, text).Findings {
			if f.Rule == "field.breakdown" && f.Subject == name {
				return f
			}
		}
		t.Fatalf("no field.breakdown of %s", name)
		return rule.Finding{}
	}
	for volts, comfort := range map[float64]float64{24: 0.6, 45: 0} {
		before := of("gap/rod", rodAt(5, 15, 150, volts))
		if (before.Verdict == rule.Fails) != (volts > 40) {
			t.Fatalf("%s: %s", before.Verdict, before.Because)
		}
		m := regexp.MustCompile(`radius of rod, its end kept of ([0-9.]+) mm in place of 5 mm`).FindStringSubmatch(before.Remedy)
		if m == nil || strings.Contains(before.Remedy, "just enough") == (comfort > 0) {
			t.Fatalf("%q", before.Remedy)
		}
		radius, err := strconv.ParseFloat(m[1], 64)
		if err != nil {
			t.Fatal(err)
		}
		if after := of("gap/rod", rodAt(radius, 15, 150, volts)); *after.Margin < comfort || 1+*after.Margin > 1.1*(1+comfort) {
			t.Errorf("%g mm at %g kV: %s, margin %g: %s", radius, volts, after.Verdict, *after.Margin, after.Because)
		}
	}
	if other := of("gap/can", rodAt(5, 15, 150, 45)); other.Verdict == rule.Fails && !strings.Contains(other.Remedy, "see to gap/rod first") {
		t.Errorf("the other end: %s", other.Remedy)
	}
}
