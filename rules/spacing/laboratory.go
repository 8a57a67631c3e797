package spacing

import (
	"fmt"

	"kilovet/hv/quantity"
	"kilovet/insulation"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
)

// laboratoryTaken is what is taken for granted of a circuit behind a mains for which the table
// of IEC 61010-1 was not read: that it asks for no more. Nothing is where the distance is
// enough for the most that it can ask for.
func laboratoryTaken(x evidence.Spacing, counted quantity.Length) []string {
	if !insulation.Unread(x.Gap, x.Voltages) {
		return nil
	}
	most, err := insulation.SecondaryAtMost(x.Gap, x.Voltages)
	if err == nil && quantity.AtLeast(counted, most*(1+limits.DistanceMargin)) {
		return nil
	}
	text := fmt.Sprintf("IEC 61010-1, whose table of overvoltage category %d for circuits behind the mains was not read, asks for no more", x.Gap.Mains.Category)
	if err == nil {
		text += "; by its Table K.11 for no less an impulse " + quantity.Text(most) + " would be needed"
	}
	return []string{text}
}
