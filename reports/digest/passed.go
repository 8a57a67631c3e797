package digest

import (
	"slices"
	"strings"

	"kilovet/rules/rule"
)

// Passed is a reason why rules were passed over, and which.
type Passed struct {
	Because string
	Names   []string
}

// Rules names them.
func (p Passed) Rules() string { return strings.Join(p.Names, ", ") }

// PassedOver is each reason once, with all rules that it holds for, in the order of the
// first of them.
func PassedOver(list []rule.PassedOver) []Passed {
	var all []Passed
	for _, p := range list {
		i := slices.IndexFunc(all, func(q Passed) bool { return q.Because == p.Because })
		if i < 0 {
			all = append(all, Passed{p.Because, []string{p.Rule}})
			continue
		}
		all[i].Names = append(all[i].Names, p.Rule)
	}
	return all
}
