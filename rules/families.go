package rules

import (
	"kilovet/rules/fault"
	"kilovet/rules/fields"
	"kilovet/rules/optics"
	"kilovet/rules/parts"
	"kilovet/rules/people"
	"kilovet/rules/radiation"
	"kilovet/rules/rule"
	"kilovet/rules/spacing"
	"kilovet/rules/supply"
	"kilovet/rules/vessel"
)

// family is the rules of one matter under its name.
type family struct {
	name  string
	rules []rule.Rule
}

// families lists them in the order in which findings are given.
func families() []family {
	return []family{
		{"people", people.Rules()},
		{"radiation", radiation.Rules()},
		{"spacing", spacing.Rules()},
		{"fields", fields.Rules()},
		{"vessel", vessel.Rules()},
		{"parts", parts.Rules()},
		{"supply", supply.Rules()},
		{"optics", optics.Rules()},
		{"faults", fault.Rules()},
	}
}

// Families are the names under which rules can be left out of a review: those whose
// answers take time.
func Families() []string { return []string{"faults", "fields"} }

// omitted is why a rule of a family that is left out judges nothing.
const omitted = "left out on request: nothing of this was judged"
