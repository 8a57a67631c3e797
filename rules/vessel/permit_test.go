package vessel_test

import (
	"slices"
	"strings"
	"testing"

	"kilovet/hv/chain"
	"kilovet/rules/evidence"
	"kilovet/rules/rule"
	"kilovet/rules/vessel"
)

func permit(t *testing.T, keys string) rule.Finding {
	t.Helper()
	c, faults := chain.Read([]byte("format = 1\n[[spacing]]\nname = \"g\"\nvoltage = \"20 kV\"\nmedium = \"air\"\n[vacuum]\n" + keys))
	if faults != nil {
		t.Fatal(faults)
	}
	return vessel.Rules()[0].Judge(evidence.New(c)).Findings[0]
}

// Over 100 mm 0.001 Torr cm are 1.33e-4 mbar, 0.01 Torr cm ten times that (common
// practice): met up to the one, marginal to the other, failed above it, ends included.
func TestPermitAtItsEdges(t *testing.T) {
	for pressure, want := range map[string]rule.Verdict{
		"1.333e-4 mbar": rule.Meets, "1.334e-4 mbar": rule.Marginal, "1.333e-3 mbar": rule.Marginal, "1.334e-3 mbar": rule.Fails,
	} {
		f := permit(t, "gas = \"air\"\nlongest_path = \"100 mm\"\npressure_permit = \""+pressure+"\"\n")
		if f.Verdict != want {
			t.Errorf("%s: %s, want %s", pressure, f.Verdict, want)
		}
		if said := strings.Contains(f.Because, "ratings of feedthroughs"); said != true {
			t.Errorf("%s lies above 1e-4 mbar, where feedthroughs are rated: %s", pressure, f.Because)
		}
	}
}

// A gas that is not given counts as air, and the review says so; a gauge in helium needs
// its factor, which lowers what it may read.
func TestPermitSaysWhatItTakesForGranted(t *testing.T) {
	const sizes = "longest_path = \"100 mm\"\npressure_permit = \"5e-5 mbar\"\n"
	for keys, want := range map[string][]string{
		"gas = \"air\"\n":                        nil,
		"":                                       {"the gas of the vessel is not given and counts as air"},
		"gas = \"helium\"\n":                     {"the gauge is taken to read true in helium: no gauge_factor is given"},
		"gas = \"helium\"\ngauge_factor = 2.0\n": nil,
	} {
		f := permit(t, keys+sizes)
		if !slices.Equal(f.Assumptions, want) || (f.Verdict == rule.Meets) != (want == nil) {
			t.Errorf("%q: %s, %v", keys, f.Verdict, f.Assumptions)
		}
	}
	if f := permit(t, "gas = \"helium\"\ngauge_factor = 5.9\n"+sizes); f.Verdict != rule.Marginal {
		t.Errorf("with a factor of 5.9: %s", f.Verdict)
	}
}
