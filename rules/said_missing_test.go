package rules_test

import (
	"regexp"
	"slices"
	"strings"
	"testing"

	"kilovet/rules/rule"
)

// What a rule of performance needs and the description leaves out is named, never passed
// over: each key is taken from a description that has it.
func TestWhatPerformanceNeedsIsNamed(t *testing.T) {
	for key, c := range map[string]struct{ rule, cut string }{
		"multiplier.diode.recovery_time": {"diode.recovery", `recovery_time = "80 ns", `},
		"gun.emitting_area":              {"gun.emission_limit", "emitting_area       = \"0.03 mm2\"\n"},
		"gun.cutoff":                     {"gun.regulation", "cutoff              = \"420 V\"\n"},
		"beam.dwell":                     {"beam.hum", "dwell                = \"1 ms\"\n"},
	} {
		text := string(described(t, "column"))
		if strings.Count(text, c.cut) != 1 {
			t.Fatalf("%q does not stand once in the description", c.cut)
		}
		f := findingOf(t, reviewed(t, []byte(strings.Replace(text, c.cut, "", 1))), c.rule)
		if f.Verdict != rule.Unassessed || !slices.Contains(f.Missing, key) || f.Concern != rule.Performance {
			t.Errorf("%s without %s: %s, missing %v", c.rule, key, f.Verdict, f.Missing)
		}
	}
}

// A drive whose resistance is not given counts as without any, and a pass that rests on it
// is marginal.
func TestHeadroomSaysWhatCountsAsNone(t *testing.T) {
	text := strings.NewReplacer("resistance = \"600 ohm\"\n", "", "capacitance = \"1 pF\", leakage", "leakage", `peak       = "1.85 kV"`, `peak       = "1.95 kV"`).Replace(string(described(t, "column")))
	f := findingOf(t, reviewed(t, []byte(text)), "drive.headroom")
	said := strings.Join(f.Assumptions, "; ")
	if f.Verdict != rule.Marginal || !strings.Contains(said, "no drive.resistance") || !strings.Contains(said, "no multiplier.diode.capacitance") {
		t.Errorf("%s, assuming %q", f.Verdict, said)
	}
}

// Halves that differ by 4 % raise an almost unloaded output above what equal ones give: no
// part of a drop is negative then, and what the load takes is not listed. The drive's own
// node has no mean.
func TestNoNegativePartOfADrop(t *testing.T) {
	text := strings.NewReplacer(`current = "300 uA"`, `current = "1 uA"`, `unbalance  = "1 %"`, `unbalance  = "4 %"`).Replace(string(described(t, "positive")))
	r := reviewed(t, []byte(text))
	for _, f := range r.Figures {
		if f.ID == "multiplier.drop_load" || strings.HasPrefix(f.ID, "multiplier.drop_s") && f.Value < 0 {
			t.Errorf("%s %s is %g", f.ID, f.State, f.Value)
		}
	}
	for _, f := range reviewed(t, described(t, "column")).Figures {
		if f.ID == "potential" && f.Subject == "drive" && f.Value != 0 {
			t.Errorf("the drive stands at %g V in the mean", f.Value)
		}
	}
}

// What every state takes for granted about the supply is said by each finding that rests on
// one, and none of those is met then.
func TestAnUnsaidSupplyIsAnAssumption(t *testing.T) {
	for key, line := range map[string]string{
		"drive.waveform": `(?m)^waveform .*\n`, "multiplier.topology": `(?m)^topology .*\n`,
	} {
		text := regexp.MustCompile(line).ReplaceAllString(string(described(t, "column")), "")
		rests := 0
		for _, f := range reviewedWhole(t, []byte(text)).Findings {
			told := slices.ContainsFunc(f.Assumptions, func(a string) bool { return strings.HasSuffix(a, key+" is not given") })
			if f.Under == "" {
				continue
			}
			rests++
			if !told || f.Verdict == rule.Meets || f.Remedy == "" {
				t.Errorf("without %s: %s of %s: %s, %v, remedy %q", key, f.Rule, f.Subject, f.Verdict, f.Assumptions, f.Remedy)
			}
		}
		if rests < 80 {
			t.Errorf("without %s: %d findings under a state", key, rests)
		}
	}
}
