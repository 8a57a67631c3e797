package evidence

// Omission is a part of the review of gun and beam that was not made.
type Omission struct{ What, Because string }

// LeftOut lists them in the order of the chain.
func (e *Evidence) LeftOut() []Omission {
	var all []Omission
	note := func(what string, err error) {
		if err != nil {
			all = append(all, Omission{what, err.Error()})
		}
	}
	e.gunLeftOut(note)
	note("paths of ripple, hum, drift and noise to the beam", e.NoPaths())
	if e.NoPaths() == nil {
		_, err := e.disturbanceKnown()
		note("disturbance of the accelerating voltage", err)
	}
	e.beamLeftOut(note)
	return all
}

func (e *Evidence) gunLeftOut(note func(string, error)) {
	c := e.chain
	switch {
	case c.Gun == nil && e.Ions():
		note("emission, bias and heater", said("an ion source has no law of emission here: its current is a load"))
	case c.Gun == nil && c.Bias == nil:
		note("emission, bias and operating point", said("no gun is described"))
	case !c.Gun.IsFitted():
		note("emission, operating point, beam and spot", said("the gun is not fitted: supply, insulation and stored energy are reviewed without its load"))
	default:
		_, err := e.Gun()
		note("operating point of the gun", err)
		if err == nil {
			_, _, err = e.EmissionToTemperature()
			note("how the emission answers the cathode's temperature", err)
		}
	}
	if c.HasCathode() && c.Heater == nil && c.Gun.IsFitted() {
		note("hum and swing of the heater", said("no heater is described"))
	}
}

func (e *Evidence) beamLeftOut(note func(string, error)) {
	b := e.chain.Beam
	switch {
	case b == nil:
		note("energy widths, blur and what would reach an allowance", said("no beam is described"))
		return
	case e.Spotless() != nil:
		note("energy widths, blur and what would reach an allowance", e.Spotless())
	default:
		_, err := e.Spot()
		note("blur of the spot", err)
		if !b.BlurAllowance.Set() {
			note("allowed ripple and what would reach it", said("no blur allowance is stated"))
		}
	}
	if e.Ions() {
		note("space charge, neutralisation and the plasma's own spread", said("nothing here reckons them: the measured energy width must hold them"))
	}
	if b.Purpose.V == "x-ray tube" {
		note("focal spot, dose and spectrum", said("an X-ray tube is reviewed as a supply with a gun; what leaves its vessel is judged by the shields"))
	}
	if !b.Dwell.Set() {
		note("banding of a scanned image", said("no dwell is stated"))
	}
	_, err := e.Drifts()
	note("drift within an exposure", err)
}

// disturbanceKnown is the disturbance, or why it is not known.
func (e *Evidence) disturbanceKnown() (any, error) { return e.CathodeDisturbance() }

// said is a reason in plain words.
type said string

// Error is the reason.
func (s said) Error() string { return string(s) }
