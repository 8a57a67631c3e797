package evidence

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/ripple/cascade"
)

// Cascade is the multiplier as the closed forms see it, under the condition's drive.
func (e *Evidence) Cascade() (cascade.Cascade, error) {
	peak, err := e.Peak()
	if err != nil {
		return cascade.Cascade{}, err
	}
	return e.cascadeAt(peak)
}

func (e *Evidence) cascadeAt(peak quantity.Voltage) (cascade.Cascade, error) {
	m, d := e.chain.Multiplier, e.chain.Drive
	if m == nil || d == nil {
		return cascade.Cascade{}, lack.Key("drive", "multiplier")
	}
	c := cascade.Cascade{
		Symmetrical: m.Symmetrical(), Square: d.Waveform.V == "square",
		Peak: peak, Frequency: d.Frequency.V,
		SourceResistance: d.Resistance.V, Inductance: d.Inductance.V,
		BetweenColumns: m.StrayBetweenColumns.V, ToGround: m.StrayToGround.V,
	}
	if m.Diode != nil {
		c.ForwardDrop, c.DiodeResistance, c.Junction = m.Diode.ForwardDrop.V, m.Diode.Resistance.V, m.Diode.Capacitance.V
	}
	return c, e.columns(&c)
}
