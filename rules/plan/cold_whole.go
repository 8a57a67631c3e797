package plan

import (
	"fmt"

	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
)

// strikeSpread is how far from its stated voltage a gap or clamp may conduct for the first
// time: common practice for gas tubes, no source.
const strikeSpread = 0.2

// gap must pass nothing below its voltage and conduct above it.
func (m *maker) gap(el *circuit.Element) {
	from, to := el.Ends()
	still, struck := el.Strikes*(1-strikeSpread), el.Strikes*(1+strikeSpread)
	m.check(Check{What: el.Name, Across: from + " to " + to + ", one lead lifted", With: "adjustable direct source through 1 Mohm (" + tried(still) + ")",
		Words: fmt.Sprintf("passes nothing at %s, conducts by %s (%.0f %% about its %s: common practice, no source)", quantity.Text(still), quantity.Text(struck), 100*strikeSpread, quantity.Text(el.Strikes))})
}

// tried says with which voltage of an insulation tester the first half of it can be done.
func tried(most quantity.Voltage) string {
	for _, v := range testVoltages {
		if quantity.AtMost(v, most) {
			return "for the lower bound also an insulation tester at " + quantity.Text(v)
		}
	}
	return "no insulation tester: the least of its voltages is above the lower bound"
}

// whole is the resistance that the output has to ground, which finds what hangs on it
// by mistake.
func (m *maker) whole() {
	volts, err := m.bears()
	if err != nil {
		m.open("whole chain", err)
		return
	}
	b, err := spread(func(corner evidence.Corner) (quantity.Resistance, error) {
		return m.e.Under(evidence.Condition{State: evidence.Cold, Corner: corner}).Ohms("output", "ground")
	})
	if err != nil {
		m.check(Check{What: "whole chain", Across: "output to ground", With: volts, Words: "no resistor joins them: no reading but the slow charging of the capacitors"})
		return
	}
	m.check(Check{What: "whole chain", Across: "output to ground", With: volts + ", polarity as at work: the diodes block; wait until the capacitors are charged, and discharge them after it", Expected: b})
}

// bears is the tester for the whole chain: at the highest voltage at which no part has more
// than at work, nor more than its rating where work already passes that.
func (m *maker) bears() (string, error) {
	cold := m.e.In(evidence.Cold)
	output, err := cold.Between("output", "ground")
	if err != nil {
		return "", err
	}
	most := output
	for _, el := range m.e.Layout().Elements {
		rated, known := ratedVoltage(&el)
		peak, err := cold.ElementPeak(el.Name)
		if !known || err != nil || quantity.AtMost(peak, rated) {
			continue
		}
		most = min(most, output*rated/peak)
	}
	for _, v := range testVoltages {
		if quantity.AtMost(v, most) {
			return "insulation tester at " + quantity.Text(v), nil
		}
	}
	return "megohmmeter below 100 V", nil
}

// ratedVoltage is the voltage that the whole of a part is rated for.
func ratedVoltage(el *circuit.Element) (quantity.Voltage, bool) {
	switch {
	case el.ResistorPart != nil && el.ResistorPart.RatedVoltage.Set():
		count, _ := el.ResistorPart.Elements()
		return el.ResistorPart.RatedVoltage.V * quantity.Voltage(count), true
	case el.CapacitorPart != nil && el.CapacitorPart.RatedVoltage.Set():
		return el.CapacitorPart.RatedVoltage.V, true
	case el.LoosePart != nil && el.LoosePart.RatedVoltage.Set():
		return el.LoosePart.RatedVoltage.V, true
	}
	return 0, false
}
