package rules

import (
	"kilovet/rules/evidence"
)

// multiplier lists the multiplier's own figures.
func multiplier(c *collector, e *evidence.Evidence) {
	const basis = evidence.Basis
	of(c, "multiplier.no_load", "", "ripple.cascade", e.NoLoad)
	of(c, "multiplier.mean", "", basis, e.MultiplierMean)
	most, err := e.Between("multiplier", "ground")
	add(c, "multiplier.maximum", "", basis, most, err)
	of(c, "multiplier.minimum", "", basis, e.MultiplierMinimum)
	if d, err := e.Drop(); err == nil {
		add(c, "multiplier.drop", "", basis, d.Total, nil)
		add(c, "multiplier.drop_load", "", basis, d.Load, first(d.Split, d.Rest))
		add(c, "multiplier.drop_stray", "", basis, d.Stray, d.Split)
		add(c, "multiplier.drop_source", "", basis, d.Source, d.Split)
	}
	ripple, err := e.Swing("multiplier", "ground")
	add(c, "multiplier.ripple", "", basis, ripple, err)
	v, err := e.Harmonic("multiplier", 1)
	add(c, "multiplier.ripple_fundamental", "", basis, v, err)
	v, err = e.Harmonic("multiplier", 2)
	add(c, "multiplier.ripple_second", "", basis, v, err)
	of(c, "multiplier.diode_reverse_peak", "", basis, e.DiodeReversePeak)
	of(c, "multiplier.diode_current_peak", "", basis, e.DiodeCurrentPeak)
	of(c, "multiplier.capacitor_peak", "", basis, e.CapacitorPeak)
	of(c, "multiplier.input_power", "", basis, e.InputPower)
	estimates(c, e)
}

// estimates are the closed forms, shown beside what governs.
func estimates(c *collector, e *evidence.Evidence) {
	const basis = "ripple.cascade"
	of(c, "multiplier.drop_estimate", "", basis, e.DropEstimate)
	of(c, "multiplier.ripple_estimate", "", basis, e.RippleEstimate)
	if n, err := e.StagesForMostOutput(); err == nil {
		c.number("multiplier.stages_for_most_output", "", basis, float64(n))
	}
}

// stored lists energy, charge and discharge times.
func stored(c *collector, e *evidence.Evidence) {
	const basis = "hv.steady"
	of(c, "stored.energy", "", basis, e.StoredEnergy)
	if parts, err := e.StoredByPart(); err == nil {
		for _, p := range parts {
			add(c, "stored.energy", p.Name, basis, p.Energy, nil)
		}
	}
	for _, node := range e.Chain().Nodes() {
		if e.IsGround(node) {
			continue
		}
		s, err := e.ShortAt(node)
		add(c, "stored.charge", node, basis, s.Charge, err)
		add(c, "stored.energy_released", node, basis, s.Energy, err)
		d, err := e.DischargeOf(node)
		if !d.Never {
			add(c, "stored.discharge_time", node, basis, d.Time, err)
		}
	}
	if c.state == evidence.Lost && !e.Leaves("faults") {
		left(c, e)
	}
	if d, err := e.SlowestDischarge(); !d.Never {
		add(c, "stored.discharge_time", "", basis, d.Time, err)
	}
}

// left lists what stays charged with one part open.
func left(c *collector, e *evidence.Evidence) {
	opened, err := e.OneOpen()
	if err != nil {
		return
	}
	for _, o := range opened {
		if o.Worst.Never {
			add(c, "stored.left", o.Part, "hv.steady", o.Worst.Left, nil)
		}
	}
}
