package spacing_test

import (
	"fmt"
	"strings"
	"testing"

	"kilovet/rules/rule"
)

// Surfaces without a figure of their own: too short fails by the medium itself, long enough
// is marginal on its assumption, between the two it is unassessed with both said and what
// to give; never a plain pass. More surface never makes it worse.
func TestSurfacesWithoutAFigure(t *testing.T) {
	at := func(medium string, creepage float64) rule.Finding {
		return findings(t, site(100)+fmt.Sprintf("[[spacing]]\nname = \"g\"\nvoltage = \"20 kV\"\nclearance = \"1 mm\"\ncreepage = \"%g mm\"\nshape = { kind = \"plates\" }\n%s", creepage, medium))["spacing.creepage | g"]
	}
	for medium, c := range map[string]struct {
		short, between, long float64
		says                 string
	}{
		"medium = \"oil\"\n":                                                      {9.9, 79, 81, "lie between 10 mm"},
		"medium = \"solid\"\nmaterial = \"epoxy\"\n":                              {5, 79, 81, "lie between 5.7"},
		"medium = \"gas\"\ngas = \"helium\"\npressure = \"1013 mbar\"\n":          {8, 500, 0, "are more than 8.3"},
		"medium = \"gas\"\ngas = \"argon\"\npressure = \"1013 mbar\"\n":           {8, 500, 0, "are more than 8.3"},
		"medium = \"gas\"\ngas = \"carbon dioxide\"\npressure = \"1013 mbar\"\n":  {8, 500, 0, "are more than 8.3"},
		"medium = \"gas\"\ngas = \"hydrogen\"\npressure = \"1013 mbar\"\n":        {8, 500, 0, "are more than 8.3"},
		"medium = \"vacuum\"\nmaterial = \"PTFE\"\njunction_angle = \"80 deg\"\n": {1.6, 250, 0, "are more than 1.64"},
	} {
		last := rule.Fails
		for _, creepage := range []float64{1, c.short, c.short * 1.1, c.between, c.between * 1.1, c.between * 1.2} {
			f := at(medium, creepage)
			if rule.Graver(f.Verdict, last) {
				t.Errorf("%s%g mm: %s after %s", medium, creepage, f.Verdict, last)
			}
			last = f.Verdict
		}
		if f := at(medium, c.short); f.Verdict != rule.Fails || f.Margin == nil {
			t.Errorf("%s%g mm: %s: %s", medium, c.short, f.Verdict, f.Because)
		}
		f := at(medium, c.between)
		if f.Verdict != rule.Unassessed || !strings.Contains(f.Because, c.says) || len(f.Missing) != 2 || !strings.Contains(f.Remedy, "spacing.tested_voltage") {
			t.Errorf("%s%g mm: %s: %s; %v; %s", medium, c.between, f.Verdict, f.Because, f.Missing, f.Remedy)
		}
		if c.long == 0 {
			continue
		}
		if f := at(medium, c.long); f.Verdict != rule.Marginal || len(f.Assumptions) == 0 {
			t.Errorf("%s%g mm: %s: %s", medium, c.long, f.Verdict, f.Because)
		}
	}
}

// A gap of helium of which no law answers fails where air would, and proves nothing where
// air would hold.
func TestGapsOfWeakGases(t *testing.T) {
	at := func(clearance float64) rule.Finding {
		return findings(t, site(100)+fmt.Sprintf("[[spacing]]\nname = \"g\"\nvoltage = \"20 kV\"\nclearance = \"%g mm\"\nmedium = \"gas\"\ngas = \"helium\"\npressure = \"1013 mbar\"\nshape = { kind = \"plates\" }\n", clearance))["spacing.breakdown | g"]
	}
	if f := at(7); f.Verdict != rule.Fails || !strings.Contains(f.Because, "more than which helium does not stand") {
		t.Errorf("%s: %s", f.Verdict, f.Because)
	}
	if f := at(100); f.Verdict != rule.Unassessed || !strings.Contains(f.Because, "no pass") || !strings.Contains(f.Remedy, "measure at which voltage this gap breaks down in helium at 1013 mbar") {
		t.Errorf("%s: %s; %s", f.Verdict, f.Because, f.Remedy)
	}
}

// Carbon dioxide between plates 10 mm apart at 1013 mbar stands at least 18.8 kV (75 Td) and
// at most the 30.3 kV of air: under 80 % of the one it holds on what is remembered, above 80 % of the
// other it fails, between it is unassessed. So does a discharge begin, or not.
func TestCarbonDioxideBetweenItsBounds(t *testing.T) {
	for _, c := range []struct {
		voltage           string
		breakdown, corona rule.Verdict
	}{
		{"300 V", rule.Marginal, rule.Marginal}, {"14.9 kV", rule.Marginal, rule.Marginal}, {"15.2 kV", rule.Unassessed, rule.Marginal},
		{"19 kV", rule.Unassessed, rule.Unassessed}, {"24 kV", rule.Unassessed, rule.Unassessed}, {"24.5 kV", rule.Fails, rule.Unassessed},
	} {
		all := findings(t, site(0)+fmt.Sprintf("[[spacing]]\nname = \"g\"\nvoltage = %q\nclearance = \"10 mm\"\nmedium = \"gas\"\ngas = \"carbon dioxide\"\npressure = \"1013.25 mbar\"\ntemperature = \"20 degC\"\ninsulation = \"basic\"\nshape = { kind = \"plates\" }\n", c.voltage))
		if f := all["spacing.breakdown | g"]; f.Verdict != c.breakdown {
			t.Errorf("%s: breakdown %s: %s", c.voltage, f.Verdict, f.Because)
		}
		if f := all["spacing.corona | g"]; f.Verdict != c.corona {
			t.Errorf("%s: corona %s: %s", c.voltage, f.Verdict, f.Because)
		}
	}
}

// An edge too sharp for any distance fails, and the radius that its remedy names is enough:
// in vacuum 15.9 kV at 5 kV/mm, in oil 20 kV at 2 kV/mm.
func TestElectrodesTooSharpForAnyDistance(t *testing.T) {
	for _, c := range []struct{ voltage, medium, clearance, radius string }{
		{"15.9 kV", "vacuum", "3.9 mm", "0.3 mm"}, {"20 kV", "oil", "30 mm", "1 mm"},
	} {
		text := site(100) + fmt.Sprintf("[[spacing]]\nname = \"g\"\nvoltage = %q\nmedium = %q\nclearance = %q\nshape = { kind = \"rounded edge\", edge_radius = %q }\n", c.voltage, c.medium, c.clearance, c.radius)
		f := findings(t, text)["spacing.clearance | g"]
		if f.Verdict != rule.Fails || f.Needed != nil || !strings.Contains(f.Remedy, "round the sharper electrode to ") {
			t.Fatalf("%s: %s: %s; %s", c.medium, f.Verdict, f.Because, f.Remedy)
		}
		to := strings.TrimPrefix(strings.Split(f.Remedy, ", or")[0], "round the sharper electrode to ")
		after := findings(t, strings.Replace(text, fmt.Sprintf("edge_radius = %q", c.radius), fmt.Sprintf("edge_radius = %q", to), 1))["spacing.clearance | g"]
		if after.Verdict == rule.Fails || after.Verdict == rule.Unassessed {
			t.Errorf("%s, %s: %s: %s", c.medium, to, after.Verdict, after.Because)
		}
	}
}

// Round electrodes in nitrogen have a lower bound only: under it they hold, past what plates
// as far apart stand (30.3 kV over 10 mm) they fail, between they are unassessed with both
// said.
func TestALowerBoundIsNoBreakdown(t *testing.T) {
	at := func(kilovolts float64) rule.Finding {
		return findings(t, site(0)+fmt.Sprintf("[[spacing]]\nname = \"g\"\nvoltage = \"%g kV\"\nclearance = \"10 mm\"\nmedium = \"gas\"\ngas = \"nitrogen\"\npressure = \"1013.25 mbar\"\ntemperature = \"20 degC\"\nshape = { kind = \"sphere-plane\", radius = \"5 mm\" }\n", kilovolts))["spacing.breakdown | g"]
	}
	for kilovolts, want := range map[float64]rule.Verdict{5: rule.Marginal, 9: rule.Marginal, 9.1: rule.Unassessed, 24.2: rule.Unassessed, 24.3: rule.Fails} {
		f := at(kilovolts)
		if f.Verdict != want {
			t.Errorf("%g kV: %s: %s", kilovolts, f.Verdict, f.Because)
		}
		if strings.Contains(f.Because, "expected to break down") {
			t.Errorf("%g kV: a bound is called the breakdown: %s", kilovolts, f.Because)
		}
	}
	if f := at(15); !strings.Contains(f.Because, "at least 11.3") || !strings.Contains(f.Because, "at most 30.3") {
		t.Error(f.Because)
	}
}

// A sphere of 5 mm 0.7 m from a plane stands at least what positive streamers need over half
// a metre, 225 kV (4.5 kV/cm, read); more than that is unassessed, not failed.
func TestPastHalfAMetreOnlyTheLowerBoundIsKnown(t *testing.T) {
	for kilovolts, want := range map[float64]rule.Verdict{100: rule.Meets, 150: rule.Marginal, 300: rule.Unassessed} {
		f := findings(t, site(0)+fmt.Sprintf("[[spacing]]\nname = \"g\"\nvoltage = \"%g kV\"\nclearance = \"700 mm\"\nmedium = \"air\"\ntemperature = \"20 degC\"\nshape = { kind = \"sphere-plane\", radius = \"5 mm\" }\n", kilovolts))["spacing.breakdown | g"]
		if f.Verdict != want || !strings.Contains(f.Because, "at least 225 kV") {
			t.Errorf("%g kV: %s: %s", kilovolts, f.Verdict, f.Because)
		}
	}
}

// A solid thicker than its law knows stands at least what the thickest known does: PTFE to
// 100 mm; and so does a board wider than the needle table, which ends at 547 mm.
func TestPastTheEndOfALawTheLowerBoundHolds(t *testing.T) {
	for medium, material := range map[string]string{"solid": "PTFE", "printed board": "FR-4"} {
		clearance := map[string]string{"solid": "150 mm", "printed board": "600 mm"}[medium]
		for voltage, want := range map[string]rule.Verdict{"100 V": rule.Marginal, "900 kV": rule.Unassessed} {
			f := findings(t, site(0)+fmt.Sprintf("[[spacing]]\nname = \"g\"\nvoltage = %q\nmedium = %q\nclearance = %q\ncreepage = \"9 m\"\nmaterial = %q\n", voltage, medium, clearance, material))["spacing.breakdown | g"]
			if f.Verdict != want && f.Verdict != rule.Meets || want == rule.Unassessed && f.Verdict != want || !strings.Contains(f.Because, "where the law ends: this gap stands no less") {
				t.Errorf("%s, %s: %s: %s", medium, voltage, f.Verdict, f.Because)
			}
		}
	}
}
