package fault

import (
	"slices"
	"strings"

	"kilovet/rules/rule"
)

var gradeSource = rule.Source{Text: "decision of this review: a rating is no strength, and what the part would do if it broke is in the library as a fault of its own, judged at every spacing and every node within reach; only insulation whose breaking reaches a hand or the mains (cable, heater feed) cannot be left to that", Mark: rule.Practice}

// keepsOff reports whether a finding is about insulation that keeps the high voltage from
// people or from the mains.
func keepsOff(f rule.Finding) bool {
	return strings.HasPrefix(f.Rule, "cable.") || f.Rule == "feed.voltage"
}

// gravest is the worst of several, sorted by what they use: such insulation first.
func gravest(over []rule.Finding) rule.Finding {
	if i := slices.IndexFunc(over, keepsOff); i >= 0 {
		return over[i]
	}
	return over[0]
}

// graver orders what faults do: what nothing catches, then insulation, then the larger share.
func graver(f rule.Finding, caught bool, than rule.Finding, before bool) bool {
	switch {
	case caught != before:
		return !caught
	case keepsOff(f) != keepsOff(than):
		return keepsOff(f)
	}
	return Share(f) > Share(than)
}
