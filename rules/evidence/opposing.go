package evidence

import (
	"kilovet/hv/document"
	"kilovet/hv/quantity"
)

// Opposing is what takes something from the drive and counts as none, since it is not given.
func (e *Evidence) Opposing() []string {
	var all []string
	for _, key := range e.StraysNotGiven() {
		all = append(all, "no "+key+": it is not given")
	}
	return append(all, e.Unresisted()...)
}

// Unresisted says that the resistance of the drive counts as none, where it is not given.
func (e *Evidence) Unresisted() []string {
	if e.chain.Drive.Resistance.Set() {
		return nil
	}
	return []string{"no " + e.chain.Drive.Resistance.Key + ": it is not given"}
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
