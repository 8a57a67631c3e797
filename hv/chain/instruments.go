package chain

import (
	"kilovet/hv/document"
	"kilovet/hv/quantity"
)

// Instrument is what is read while the chain is switched on for the first time, beside
// the divider's own meter.
type Instrument struct {
	document.Table
	Name         document.Given[string]              `key:"name" needed:"yes" means:"name of the instrument" example:"bench probe"`
	Reads        document.Given[string]              `key:"reads" words:"voltage | return current" means:"a voltage, or the mean current in the return of the multiplier (default: voltage)" example:"voltage"`
	At           document.Given[string]              `key:"at" means:"node whose voltage it reads" example:"supply"`
	To           document.Given[string]              `key:"to" means:"node it is read against (default: ground)" example:"ground"`
	Resistance   document.Given[quantity.Resistance] `key:"resistance" range:"> 0 ohm, <= 1000 Tohm" means:"input resistance, which loads the chain" example:"1 Gohm"`
	Accuracy     document.Given[quantity.Fraction]   `key:"accuracy" range:">= 0 %, < 100 %" means:"worst error of a reading" example:"2 %"`
	RatedVoltage document.Given[quantity.Voltage]    `key:"rated_voltage" range:"> 0 V, <= 1 MV" means:"rated voltage" example:"40 kV"`
}

// ReadsCurrent reports whether it stands in the return of the multiplier.
func (i *Instrument) ReadsCurrent() bool { return i.Reads.V == "return current" }

// checkInstruments asks for the node of what reads a voltage and refuses one for what
// reads the current in the return.
func checkInstruments(s *survey) {
	for i := range s.Instruments {
		in := &s.Instruments[i]
		if in.Reads.Set() && !s.sound(in.Reads.Place) {
			continue
		}
		if !in.ReadsCurrent() {
			s.voltmeter(in)
			continue
		}
		for _, at := range []document.Place{in.At.Place, in.To.Place, in.Resistance.Place, in.RatedVoltage.Place} {
			if at.Line > 0 {
				s.fault(at, "the current in the return is read at the foot of the multiplier", "leave it out")
			}
		}
	}
}

func (s *survey) voltmeter(in *Instrument) {
	if s.lacks(in.At.Place) {
		s.fault(in.Here(), "an instrument that reads no node", `give at, as in at = "output", or write reads = "return current"`)
	}
	if s.lacks(in.Resistance.Place) {
		s.fault(in.Here(), "a voltmeter without its resistance", `give resistance, as in resistance = "1 Gohm": it loads the chain`)
	}
	if in.At.Set() && in.At.V == in.To.Or("ground") {
		s.fault(in.At.Place, "both ends on "+in.At.V, "name the node at high voltage")
	}
}
