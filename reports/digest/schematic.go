package digest

import (
	"fmt"

	"kilovet/rules/diagram"
)

// SchematicCaption says what a schematic shows and leaves out.
func SchematicCaption(d *diagram.Diagram) string {
	text := "Schematic, drawn from the description. Potentials are means to ground in the working state, in volts with SI prefixes."
	if d.Unknown != "" {
		text = "Schematic, drawn from the description. Potentials are not known: " + d.Unknown + "."
	}
	text += " Strays and leakage of clamps are not drawn."
	switch {
	case d.Elsewhere == 1:
		text += " 1 finding speaks of what is not drawn here."
	case d.Elsewhere > 1:
		text += fmt.Sprintf(" %d findings speak of what is not drawn here.", d.Elsewhere)
	}
	return text
}
