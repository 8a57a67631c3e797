package rules_test

import (
	"math"
	"os"
	"regexp"
	"strconv"
	"strings"
	"testing"

	"kilovet/rules/rule"
)

// annuliOf reviews the furnace lead with a gap on both sides of its sleeve.
func annuliOf(t *testing.T, voltage, thickness string) map[string]rule.Finding {
	data, err := os.ReadFile("../testdata/chains/lead.toml")
	if err != nil {
		t.Fatal(err)
	}
	text := strings.NewReplacer(`"12 kV"`, strconv.Quote(voltage), `plate_thickness = "12 mm"`, "plate_thickness = "+strconv.Quote(thickness),
		`inner_radius = "10 mm", outer_radius = "26 mm"`, `inner_radius = "10.6 mm", outer_radius = "25.5 mm", permittivity = 9.4, inner_gap = "vacuum", outer_gap = "air"`).Replace(string(data))
	found := map[string]rule.Finding{}
	for _, f := range reviewed(t, []byte(text)).Findings {
		if f.Rule == "feedthrough.annulus" {
			found[strings.TrimPrefix(f.Subject, "furnace lead: ")] = f
		}
	}
	return found
}

var sharesOf = regexp.MustCompile(`takes ([0-9.]+) % just after switching \(([0-9.]+) % by the greatest`)

// In the middle of a long plate the field is that of a coaxial divider, ln(26/25.5) and the
// like over ln(10.6/10) + ln(25.5/10.6)/9.4 + ln(26/25.5), exact.
func TestAnAnnulusOfALongPlateTakesItsLayersShare(t *testing.T) {
	f, there := annuliOf(t, "9 kV", "120 mm")["pin to sleeve"]
	m := sharesOf.FindStringSubmatch(f.Because)
	if !there || m == nil {
		t.Fatalf("no shares in %q", f.Because)
	}
	exact := 100 * math.Log(1.06) / (math.Log(1.06) + math.Log(25.5/10.6)/9.4 + math.Log(26/25.5))
	for _, text := range m[1:] {
		if share, _ := strconv.ParseFloat(text, 64); math.Abs(share/exact-1) > 0.01 {
			t.Errorf("%s %%, exact %.4g %%", text, exact)
		}
	}
}

// Beside the edge of a thin plate the field in the gap at the hole is 2.3 times that of
// the layers, whose shares would hold, 25 % once DC has settled: the computed field judges.
func TestTheComputedFieldJudgesAnAnnulus(t *testing.T) {
	f := annuliOf(t, "9.5 kV", "12 mm")["sleeve to hole"]
	if f.Verdict != rule.Fails || !sharesOf.MatchString(f.Because) {
		t.Errorf("%s: %s", f.Verdict, f.Because)
	}
	m := sharesOf.FindStringSubmatch(f.Because)
	if layers, _ := strconv.ParseFloat(m[1], 64); layers/100*9.5e3 > 0.5*f.Needed.Value {
		t.Errorf("%g %% by layers would not hold", layers)
	}
}
