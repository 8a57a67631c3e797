package evidence

import (
	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
	"kilovet/hv/steady"
)

// At is the discharge of one node with the part open.
func (o Opened) At(node string) (Discharge, error) {
	x, err := o.decay.Node(node)
	return discharge(x), err
}

// MeterAfter is what the meter shows with a part open after switching off, as the voltage of
// the sensed node, when a discharge is at its end: in the end of all where it never is.
func (e *Evidence) MeterAfter(o Opened, d Discharge) (quantity.Voltage, error) {
	tap, err := o.decay.AtTime("divider.tap", d.ends())
	if err != nil {
		return 0, err
	}
	div, err := e.Divider()
	if err != nil {
		return 0, err
	}
	ratio, err := div.Ratio()
	return magnitude(tap) * quantity.Voltage(ratio), err
}

// ends is when a discharge counts as ended.
func (d Discharge) ends() quantity.Time {
	if d.Never {
		return steady.InTheEnd
	}
	return d.Time
}

// IsDiode reports whether a part of the circuit is a diode.
func (e *Evidence) IsDiode(part string) bool {
	el := e.Layout().Element(part)
	return el != nil && el.Kind == circuit.Diode
}

// ElementsOf is how many elements in series and strings in parallel a resistor of the
// circuit is made of; one and one for what is no such part.
func (e *Evidence) ElementsOf(part string) (count, strings int) {
	el := e.Layout().Element(part)
	if el == nil || el.ResistorPart == nil {
		return 1, 1
	}
	return el.ResistorPart.Elements()
}
