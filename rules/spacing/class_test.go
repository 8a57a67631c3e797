package spacing_test

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"kilovet/rules/rule"
)

// In a gas other than air no table asks for a clearance: reinforced insulation takes the
// safety step of air, 160 % (IEC 60664-1, memory), on the breakdown estimate; basic and
// functional are judged alike; where none is given that is an assumption. 20 mm of nitrogen
// between plates stand 57.0 kV at 20 °C (24.22 d + 6.08 √d in cm).
func TestTheClassCountsInOtherGases(t *testing.T) {
	at := func(kilovolts float64, class string) rule.Finding {
		return findings(t, site(0)+fmt.Sprintf("[[spacing]]\nname = \"g\"\nvoltage = \"%g kV\"\nmedium = \"gas\"\ngas = \"nitrogen\"\npressure = \"1013.25 mbar\"\ntemperature = \"20 degC\"\nclearance = \"20 mm\"\nshape = { kind = \"plates\" }\n%s", kilovolts, class))["spacing.breakdown | g"]
	}
	stands := 24.22*2 + 6.08*math.Sqrt2
	for _, c := range []struct {
		kilovolts, step float64
		class           string
		want            rule.Verdict
	}{
		{28, 1, "insulation = \"basic\"\n", rule.Meets},
		{28, 1, "insulation = \"functional\"\n", rule.Meets},
		{28, 1, "", rule.Marginal},
		{28, 1.6, "insulation = \"reinforced\"\n", rule.Marginal},
		{10, 1.6, "insulation = \"reinforced\"\n", rule.Marginal},
		{29, 1.6, "insulation = \"reinforced\"\n", rule.Fails},
		{29, 1, "insulation = \"basic\"\n", rule.Marginal},
	} {
		f := at(c.kilovolts, c.class)
		if f.Verdict != c.want || math.Abs(f.Needed.Value/(0.8e3*stands/c.step)-1) > 2e-3 {
			t.Errorf("%g kV %q: %s, allowed %v, want %s, %g kV", c.kilovolts, c.class, f.Verdict, f.Needed, c.want, 0.8*stands/c.step)
		}
		if f.Verdict == rule.Marginal && f.Remedy == "" {
			t.Errorf("%g kV %q: no remedy", c.kilovolts, c.class)
		}
	}
}

// Where no law gives the breakdown the step is held against its bounds: 20 mm of helium
// stand at most what air does, 57.0 kV.
func TestTheClassCountsAgainstBounds(t *testing.T) {
	at := func(class string) rule.Finding {
		return findings(t, site(0)+fmt.Sprintf("[[spacing]]\nname = \"g\"\nvoltage = \"30 kV\"\nmedium = \"gas\"\ngas = \"helium\"\npressure = \"1013.25 mbar\"\ntemperature = \"20 degC\"\nclearance = \"20 mm\"\nshape = { kind = \"plates\" }\ninsulation = %q\n", class))["spacing.breakdown | g"]
	}
	if f := at("basic"); f.Verdict != rule.Unassessed {
		t.Errorf("basic: %s: %s", f.Verdict, f.Because)
	}
	if f := at("reinforced"); f.Verdict != rule.Fails || !strings.Contains(fmt.Sprint(f.Sources), "160 %") {
		t.Errorf("reinforced: %s: %s", f.Verdict, f.Because)
	}
}

// The rating of a cable answers for its own insulation: the bare metal at its ends is an
// assumption until a spacing is described there.
func TestACableAnswersForItsOwnInsulation(t *testing.T) {
	cable := "[cable]\nlength = \"1 m\"\ncapacitance = \"100 pF/m\"\nrated_voltage = \"40 kV\"\n"
	all := findings(t, supplied("negative", "stage.1", "from")+cable)
	var f rule.Finding
	for key, is := range all {
		if strings.HasPrefix(key, "spacing.described | ") && len(is.Assumptions) > 0 {
			f = is
		}
	}
	if f.Verdict != rule.Marginal || !strings.Contains(f.Assumptions[0], "its own insulation only") || f.Remedy == "" {
		t.Errorf("with a cable: %+v", f)
	}
	for key, is := range findings(t, supplied("negative", "output", "from")+cable) {
		if strings.HasPrefix(key, "spacing.described | ") && len(is.Assumptions) > 0 {
			t.Errorf("with a spacing there: %s: %+v", key, is)
		}
	}
}

// In vacuum and oil too reinforced insulation is dimensioned for 160 % of the peak, so the
// distance asked for rests on the class: where none is given that is said. What stands the
// voltage in vacuum does not ask for a class, and nothing is said of one.
func TestTheClassLeftOutIsSaidWhereItCounts(t *testing.T) {
	in := func(medium, class string) map[string]rule.Finding {
		return findings(t, site(0)+fmt.Sprintf("[[spacing]]\nname = \"g\"\nvoltage = \"10 kV\"\nmedium = %q\nclearance = \"20 mm\"\nshape = { kind = \"plates\" }\n%s%s", medium, class,
			map[string]string{"vacuum": "finish = \"polished\"\nconditioned = true\nstressed_area = \"80 mm2\"\npressure = \"1e-6 mbar\"\n"}[medium]))
	}
	said := func(f rule.Finding) bool { return strings.Contains(fmt.Sprint(f.Assumptions), "insulation is basic") }
	for _, medium := range []string{"vacuum", "oil"} {
		none, basic, reinforced := in(medium, ""), in(medium, "insulation = \"basic\"\n"), in(medium, "insulation = \"reinforced\"\n")
		const of = "spacing.clearance | g"
		if !said(none[of]) || none[of].Verdict != rule.Marginal || said(basic[of]) || said(reinforced[of]) {
			t.Errorf("%s: without a class %s, %v", medium, none[of].Verdict, none[of].Assumptions)
		}
		if !(reinforced[of].Needed.Value > basic[of].Needed.Value) {
			t.Errorf("%s: the class changes nothing", medium)
		}
		if said(none["spacing.breakdown | g"]) {
			t.Errorf("%s: a class is spoken of where it does not count", medium)
		}
	}
	if f := in("vacuum", "insulation = \"basic\"\n")["spacing.clearance | g"]; f.Verdict != rule.Meets {
		t.Errorf("basic in vacuum: %s: %s", f.Verdict, f.Because)
	}
}
