package evidence

import (
	"kilovet/hv/document"
	"kilovet/hv/quantity"
)

// Opposing is what takes something from the drive and counts as none, since it is not given.
func (e *Evidence) Opposing() []string {
	keys := e.StraysNotGiven()
	if !e.chain.Drive.Resistance.Set() {
		keys = append(keys, e.chain.Drive.Resistance.Key)
	}
	var all []string
	for _, key := range keys {
		all = append(all, "no "+key+": it is not given")
	}
	return all
}

// StraysNotGiven are the keys of the multiplier's strays that the description leaves out.
func (e *Evidence) StraysNotGiven() []string {
	m := e.chain.Multiplier
	var keys []string
	for _, g := range []document.Given[quantity.Capacitance]{m.StrayBetweenColumns, m.StrayToGround} {
		if !g.Set() {
			keys = append(keys, g.Key)
		}
	}
	if m.Diode == nil {
		return append(keys, "multiplier.diode.capacitance")
	}
	if !m.Diode.Capacitance.Set() {
		keys = append(keys, m.Diode.Capacitance.Key)
	}
	return keys
}
