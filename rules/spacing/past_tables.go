package spacing

import (
	"fmt"

	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/rule"
)

// pastTables judges a distance in air past the last row of the tables, or a surface in vacuum
// past the longest that is known: less than those is too little, more is unassessed.
func pastTables(f rule.Finding, s *chain.Spacing, x evidence.Spacing, given document.Given[quantity.Length], why *lack.Lack) rule.Finding {
	ask := x.ClearanceAtLeast
	if f.Rule == "spacing.creepage" {
		ask = x.CreepageAtLeast
	}
	least, err := ask()
	if err != nil {
		return f.Lacking(why)
	}
	counted, taken, err := countedOf(f.Rule, x, given.V)
	if err != nil {
		return f.Lacking(err)
	}
	f.Because = fmt.Sprintf("%s; less than %s is too little (%s)%s", why.Error(), quantity.Text(least.Value), least.Because, taken)
	f.Sources = rule.Cited(least.Sources)
	if !quantity.AtLeast(counted, least.Value) {
		f.Under = x.Under.Text()
		f = f.Least(rule.Of(counted), rule.Of(least.Value), 0)
		f.Remedy = alternatives("lower the voltage", wider(s, given, least.Value+given.V-counted)) + "; that much is needed at least"
		return f
	}
	because := f.Because
	f.Because = ""
	f = f.Lacking(why)
	f.Because = because
	proof := "prove it by a voltage test that a local code or a standard of the product names"
	if s.Medium.V == "vacuum" {
		proof = "divide the surface into stages, or give a tested one: spacing.tested_voltage, spacing.tested_length"
	}
	f.Remedy = alternatives("lower the voltage", proof)
	return f
}
