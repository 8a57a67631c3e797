package limits

import "kilovet/rules/rule"

// EdgeSource says where the distance comes from.
var EdgeSource = rule.Source{Text: "an edge or a joint is broken or filled to about 0.1 mm: the field is judged at that distance, in narrow places at a fourth of the gap", Mark: rule.Practice}

// Shares of the short-time strength that a solid may bear in work.
const (
	StrengthShare   = 0.25
	StrengthComfort = 0.20
)
