package rules

import (
	"fmt"
	"strings"

	"kilovet/hv/chain"
	"kilovet/rules/rule"
)

// otherMedium remarks where spacings at the nodes of the multiplier lie in another medium
// than its parts are said to stand in.
func otherMedium(c *chain.Chain) []rule.Caution {
	if c.Multiplier == nil || !c.Multiplier.Medium.Set() {
		return nil
	}
	medium := c.Multiplier.Medium.V
	var names []string
	for i := range c.Spacings {
		s := &c.Spacings[i]
		if (inColumn(s.From.V) || inColumn(s.To.V)) && !alike(medium, s.Medium.V) {
			names = append(names, fmt.Sprintf("%q in %s", s.Name.V, s.Medium.V))
		}
	}
	if names == nil {
		return nil
	}
	return []rule.Caution{{Subject: "medium of the multiplier", Text: fmt.Sprintf("The multiplier is described in %s, spacings at its nodes otherwise: %s. One of the two is not as it is.", medium, strings.Join(names, ", "))}}
}

// inColumn reports whether a node is one of the multiplier's columns.
func inColumn(node string) bool {
	family, _, _ := strings.Cut(node, ".")
	return family == "stage" || family == "coupling" || node == "multiplier"
}

// alike reports whether the medium of parts and that of a gap are the same: parts in
// potting have gaps in a solid, and printed boards stand in air.
func alike(parts, gap string) bool {
	switch parts {
	case "potting":
		return gap == "solid"
	case "air":
		return gap == "air" || gap == "printed board"
	}
	return parts == gap
}
