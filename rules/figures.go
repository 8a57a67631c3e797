package rules

import (
	"kilovet/hv/circuit"
	"kilovet/rules/evidence"
	"kilovet/rules/figure"
)

// figures lists every figure of a chain that has a value.
func figures(e *evidence.Evidence) []figure.Figure {
	var parts []func() []figure.Figure
	in := func(state evidence.State, gather ...func(*collector, *evidence.Evidence)) {
		for _, g := range gather {
			parts = append(parts, func() []figure.Figure {
				c := &collector{state: state}
				at := e
				if state != "" {
					at = e.In(state)
				}
				g(c, at)
				return c.list
			})
		}
	}
	if e.HasSupply() {
		for _, state := range evidence.States {
			in(state, potentials, bearing, multiplier, output, divider, stored, elements)
		}
		if !e.Leaves("faults") {
			in(evidence.Lost, arcs)
		}
		in(evidence.Working, beam, gunFigures, paths)
		in("", once)
	}
	in("", spacings)
	if !e.Leaves("fields") {
		in("", computedFields)
	}
	return inTurn(parts...)
}

// potentials are listed under every name a node of the circuit has.
func potentials(c *collector, e *evidence.Evidence) {
	for _, node := range e.Chain().Nodes() {
		if _, there := e.Layout().Node(node); !there {
			continue
		}
		v, err := e.Potential(node)
		add(c, "potential", node, evidence.Basis, v, err)
	}
}

// bearing lists what every resistor and load bears.
func bearing(c *collector, e *evidence.Evidence) {
	const basis = evidence.Basis
	for _, el := range e.Layout().Elements {
		if el.Kind != circuit.Resistor && el.Kind != circuit.Sink || el.Role == circuit.Ladder {
			continue
		}
		v, err := e.ElementPeak(el.Name)
		add(c, "part.voltage", el.Name, basis, v, err)
		i, err := e.ElementCurrent(el.Name)
		add(c, "part.current", el.Name, basis, i, err)
		if el.Kind == circuit.Resistor {
			p, err := e.ElementPower(el.Name)
			add(c, "part.power", el.Name, basis, p, err)
		}
	}
}

func output(c *collector, e *evidence.Evidence) {
	const basis = evidence.Basis
	v, err := e.Potential("output")
	add(c, "output.mean", "", basis, max(v, -v), err)
	ripple, err := e.Swing("output", "ground")
	add(c, "output.ripple", "", basis, ripple, err)
	if e.Chain().HasCathode() {
		const phasors = "ripple.phasor"
		of(c, "cathode.ripple", "", phasors, e.CathodeRipple)
		of(c, "cathode.hum", "", phasors, e.CathodeHum)
		of(c, "cathode.disturbance", "", disturbanceBasis(e), e.CathodeDisturbance)
	}
	if e.Chain().Bias != nil {
		v, err := e.Potential("cathode")
		w, err2 := e.Potential("control")
		add(c, "bias.voltage", "", basis, v-w, first(err, err2))
		of(c, "bias.ripple", "", "ripple.phasor", e.BiasRipple)
	}
	emission(c, e)
	if e.Chain().Regulation != nil && c.state != evidence.Lost {
		of(c, "drive.peak_needed", "", basis, e.PeakNeeded)
	}
}

func disturbanceBasis(e *evidence.Evidence) string {
	if m, err := e.Measured(); m != nil && err == nil {
		return "as measured"
	}
	return "ripple.phasor"
}

func first(errs ...error) error {
	for _, err := range errs {
		if err != nil {
			return err
		}
	}
	return nil
}

func emission(c *collector, e *evidence.Evidence) {
	if e.Chain().Gun == nil {
		return
	}
	basis := "as stated"
	if !e.Chain().Gun.Emission.Set() {
		basis = "hv.gun"
	}
	if c.state != evidence.Working {
		basis = "no emission in this state"
	}
	of(c, "gun.emission", "", basis, e.Emission)
	if c.state == evidence.Working && e.Chain().Gun.IsFitted() {
		of(c, "gun.emission_law", "", "hv.gun", e.EmissionByLaw)
		if p, err := e.Gun(); err == nil {
			c.number("gun.loop_gain", "", "hv.gun", p.LoopGain())
		}
	}
}

// divider lists what the divider reads and bears.
func divider(c *collector, e *evidence.Evidence) {
	d, err := e.Divider()
	if err != nil {
		return
	}
	const basis = "hv.steady"
	of(c, "divider.current", "", basis, d.Current)
	if ratio, err := d.Ratio(); err == nil {
		c.number("divider.ratio", "", basis, ratio)
	}
	of(c, "divider.reading", "", basis, d.Reading)
	of(c, "divider.error", "", basis, e.DividerError)
	of(c, "divider.dissipation", "", basis, d.Dissipation)
	of(c, "divider.element_dissipation", "", basis, d.ElementDissipation)
	of(c, "divider.element_voltage", "", basis, d.ElementVoltage)
	of(c, "divider.open_lower_arm", "", basis, d.OpenLowerArm)
	of(c, "divider.open_lower_arm_metered", "", basis, d.OpenLowerArmMetered)
	of(c, "divider.open_lower_arm_clamped", "", basis, d.OpenLowerArmClamped)
}

// once lists what does not depend on the state.
func once(c *collector, e *evidence.Evidence) {
	if band, err := e.DischargeBand(); err == nil {
		add(c, "vacuum.band_from", "", "insulation.vacuum", band.From, nil)
		add(c, "vacuum.band_to", "", "insulation.vacuum", band.To, nil)
	}
	of(c, "stored.residue", "", "hv.steady", e.Residue)
	of(c, "multiplier.rise_time", "", evidence.Basis, e.RiseTime)
	starts(c, e)
	loadSteps(c, e)
}
