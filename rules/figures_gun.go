package rules

import (
	"kilovet/rules/evidence"
)

// gun lists where the gun works and how strongly it answers, in working state.
func gunFigures(c *collector, e *evidence.Evidence) {
	const basis = "hv.gun"
	of(c, "gun.richardson_limit", "", basis, e.RichardsonLimit)
	if e.Chain().Gun == nil || !e.Chain().Gun.IsFitted() {
		return
	}
	cutoffFigures(c, e)
	p, err := e.Gun()
	if err != nil {
		return
	}
	if !e.DiodeGun() {
		add(c, "gun.zero_bias_emission", "", basis, p.Law().ZeroBias(), nil)
		add(c, "gun.headroom", "", basis, p.Headroom, nil)
		of(c, "gun.resistor_needed", "", basis, e.ResistorNeeded)
		of(c, "gun.bias_needed", "", basis, e.BiasNeeded)
	}
	if r, err := e.GunRegulation(); err == nil {
		add(c, "gun.regulates_to", "", basis, r.Emission, nil)
		add(c, "gun.regulates_from_resistor", "", basis, r.Resistor, nil)
		if r.Whole > 0 {
			add(c, "gun.loop_corner", "", basis, r.Whole, nil)
			add(c, "gun.loop_end", "", basis, r.None, nil)
		}
	}
	sensitivities(c, e)
}

func cutoffFigures(c *collector, e *evidence.Evidence) {
	const basis = "hv.gun"
	if estimate, err := e.CutoffEstimate(); err == nil {
		add(c, "gun.cutoff_estimate", "", basis, estimate.Voltage, nil)
		add(c, "gun.cutoff_estimate_low", "", basis, estimate.Low, nil)
		add(c, "gun.cutoff_estimate_high", "", basis, estimate.High, nil)
	}
	if by, err := e.CutoffByField(); err == nil {
		add(c, "gun.cutoff_field", "", fieldBasis, by.Voltage, nil)
		add(c, "gun.cutoff_field_low", "", fieldBasis, by.Low, nil)
		add(c, "gun.cutoff_field_high", "", fieldBasis, by.High, nil)
		c.number("gun.influence_control", "", fieldBasis, by.ToControl)
		c.number("gun.influence_anode", "", fieldBasis, by.ToAnode)
	}
	if e.DiodeGun() {
		return
	}
	stated := "as stated"
	if e.CutoffByGeometry() {
		stated = basis
		if c, err := e.CutoffFromGeometry(); err == nil && c.By == evidence.ByField {
			stated = fieldBasis
		}
	}
	of(c, "gun.cutoff", "", stated, e.Cutoff)
	if ratio, err := e.CutoffRatio(); err == nil {
		c.number("gun.cutoff_ratio", "", stated, ratio)
	}
}

func sensitivities(c *collector, e *evidence.Evidence) {
	const basis = "hv.gun"
	s, err := e.GunSensitivities()
	if err != nil {
		return
	}
	c.number("gun.emission_to_voltage", "", basis, s.Here.Voltage)
	if e.Chain().Bias != nil {
		c.number("gun.emission_to_voltage_fixed", "", basis, s.Fixed.Voltage)
		c.number("gun.emission_to_bias_fixed", "", basis, s.Fixed.Bias)
		if s.Here.Resistor != 0 {
			c.number("gun.emission_to_resistor", "", basis, s.Here.Resistor)
		}
	}
	if here, fixed, err := e.EmissionToTemperature(); err == nil {
		c.number("gun.emission_to_temperature", "", basis, here)
		if e.Chain().Bias != nil {
			c.number("gun.emission_to_temperature_fixed", "", basis, fixed)
		}
	}
}

// paths lists every way by which something reaches the beam.
func paths(c *collector, e *evidence.Evidence) {
	if e.NoPaths() != nil {
		return
	}
	const basis = "ripple.phasor"
	for _, p := range e.Paths() {
		if p.Unknown != nil {
			continue
		}
		if p.Frequency > 0 {
			add(c, "path.frequency", p.Name, basis, p.Frequency, nil)
		}
		add(c, "path.voltage", p.Name, basis, p.Voltage, nil)
		if e.Chain().Bias != nil {
			add(c, "path.bias", p.Name, basis, p.Bias, nil)
		}
		add(c, "path.emission", p.Name, basis, p.Emission, e.NoAnswer())
	}
}
