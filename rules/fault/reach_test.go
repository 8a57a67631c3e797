package fault_test

import (
	"slices"
	"strings"
	"testing"

	"kilovet/rules/evidence"
	"kilovet/rules/fault"
	"kilovet/rules/rule"
)

// of judges a chain by one rule of the family.
func of(t *testing.T, id, text string) rule.Judgement {
	t.Helper()
	i := slices.IndexFunc(fault.Rules(), func(r rule.Rule) bool { return r.ID == id })
	if i < 0 {
		t.Fatalf("there is no rule %s", id)
	}
	return fault.Rules()[i].Judge(evidence.New(read(t, text)))
}

// TestAListedReturnIsWithinReach: whoever lists the return of the multiplier says that it
// can be touched, whatever closes the enclosure; unlisted, only an open one lays it bare.
// With the return open all of 4 kV stands there, and a bleeder of 100 kohm drives 39 mA of
// it through 2 kohm, where 15 mA are allowed.
func TestAListedReturnIsWithinReach(t *testing.T) {
	for enclosure, bare := range map[string]bool{"open": true, "tool": false, "interlocked": false} {
		for listed, there := range map[string]bool{`"foot"`: true, "": bare} {
			access := "[[bleeder]]\nat = \"output\"\nresistor = { value = \"100 kohm\" }\n[access]\nenclosure = \"" + enclosure + "\"\ntouchable = [" + listed + "]\n"
			j := of(t, "fault.touch", stiff(2, metered+access))
			i := slices.IndexFunc(j.Findings, func(f rule.Finding) bool { return f.Subject == "foot" })
			if (i >= 0) != there {
				t.Errorf("%s, listed [%s]: judged %v", enclosure, listed, i >= 0)
			} else if there && (j.Findings[i].Verdict != rule.Fails || !strings.Contains(j.Findings[i].Because, "multiplier return open: foot reaches")) {
				t.Errorf("%s, listed [%s]: %+v", enclosure, listed, j.Findings[i])
			}
		}
	}
}
