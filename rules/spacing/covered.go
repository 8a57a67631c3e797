package spacing

import (
	"fmt"

	"kilovet/hv/quantity"
	"kilovet/insulation"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
)

// coverTaken is what is taken for granted of a coated board, or of conductors inside one: that
// the cover is of type 1 of IEC 60664-3, under which pollution degree 1 holds. Nothing is
// where the distance is enough at the degree of the site.
func coverTaken(id string, x evidence.Spacing, need, counted quantity.Length) []string {
	if !insulation.Covered(x.Gap) {
		return nil
	}
	bare, of := x.Gap, insulation.ClearanceNeeded
	bare.Exposed = true
	if id == "spacing.creepage" {
		of = insulation.CreepageNeeded
	}
	more, err := of(bare, x.Voltages)
	if err == nil && (quantity.AtMost(more.Value, need) || quantity.AtLeast(counted, more.Value*(1+limits.DistanceMargin))) {
		return nil
	}
	text := "what covers the conductors is protection of type 1, under which pollution degree 1 holds (IEC 60664-3, from memory)"
	if err == nil {
		text += fmt.Sprintf("; at degree %d %s would be needed", x.Gap.PollutionDegree, quantity.Text(more.Value))
	}
	return []string{text}
}
