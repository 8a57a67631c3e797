package supply

import (
	"kilovet/rules/rule"
)

// Rules lists the rules of this family.
func Rules() []rule.Rule {
	return []rule.Rule{headroom, balance, strays, unbalanced, humShare, dividerClamp, meterRating, errorKnown}
}
