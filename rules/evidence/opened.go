package evidence

import (
	"kilovet/hv/quantity"
	"kilovet/hv/steady"
)

// MeterAfter is what the meter shows with a part open after switching off, as the voltage of
// the sensed node: in the end where a node stays charged, else when the last one falls to
// what counts as discharged.
func (e *Evidence) MeterAfter(o Opened) (quantity.Voltage, error) {
	tap, err := o.decay.AtTime("divider.tap", o.when())
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

// when is the time at which the last node counts as discharged; the end where none does.
func (o Opened) when() quantity.Time {
	if o.Worst.Never {
		return steady.InTheEnd
	}
	return o.Worst.Time
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
