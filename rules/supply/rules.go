package supply

import (
	"kilovet/hv/lack"
	"kilovet/rules/rule"
)

func missing(key string) error { return lack.Key(key) }

// Rules lists the rules of this family.
func Rules() []rule.Rule {
	return []rule.Rule{headroom, balance, dividerClamp, meterRating, errorKnown}
}
