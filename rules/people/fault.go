package people

import (
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

// InFault judges one node that can be touched with a fault, by the limits of a single
// fault: 120 V DC, or limited in current, charge and energy.
func InFault(e *evidence.Evidence, node string) rule.Finding {
	f := rule.Finding{Rule: "touch.voltage", Subject: node, Concern: rule.Life, Relation: rule.AtMost,
		Sources: []rule.Source{limits.TouchFaultSource, limits.StricterCharge}}
	return touchable(e, node, f)
}
