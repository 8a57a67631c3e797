package fault_test

import (
	"slices"
	"strings"
	"testing"

	"kilovet/rules/rule"
)

// TestFaultsNotComputedAreNoPass: what a class-two capacitor has left at its voltage is
// not said, and no fault has an answer. No rule over all faults is met then, or passed over
// with a word about all of them; each names the key.
func TestFaultsNotComputedAreNoPass(t *testing.T) {
	const gap = "[[spacing]]\nname = \"g\"\nfrom = \"output\"\nto = \"ground\"\nmedium = \"air\"\nclearance = \"60 mm\"\n"
	const filter = "[[filter]]\nresistor = { value = \"1 Mohm\", rated_power = \"1 W\" }\ncapacitor = { value = \"1 nF\" }\n"
	whole := stiff(2, metered+filter+gap+"[access]\ntouchable = [\"divider.tap\"]\n")
	without := strings.Replace(whole, "coupling_capacitor = { value = \"100 nF\" }", "coupling_capacitor = { value = \"100 nF\", dielectric = \"X7R\" }", 1)
	for _, id := range []string{"fault.rating", "fault.spacing", "fault.touch", "series.arc_power"} {
		lacks := func(f rule.Finding) bool {
			return f.Verdict == rule.Unassessed && slices.Contains(f.Missing, "multiplier.coupling_capacitor.value_at_voltage") && (f.Subject == "chain" || f.Subject == "faults not computed")
		}
		if j := of(t, id, without); !slices.ContainsFunc(j.Findings, lacks) {
			t.Errorf("%s: %+v", id, j)
		}
		if j := of(t, id, whole); slices.ContainsFunc(j.Findings, lacks) {
			t.Errorf("%s of faults that were computed: %+v", id, j)
		}
	}
}
