package evidence

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Allowed is the ripple that just uses up the blur allowance, at three places, when all
// of the disturbance is scaled alike; peak to peak.
type Allowed struct {
	// Scale is by how much the disturbance could grow, or must shrink.
	Scale                       float64
	Cathode, Output, Multiplier quantity.Voltage
}

// Allowed says what ripple the allowance leaves.
func (e *Evidence) Allowed() (Allowed, error) {
	cathode, err := e.RippleAllowed()
	if err != nil {
		return Allowed{}, err
	}
	s, err := e.Spot()
	if err != nil {
		return Allowed{}, err
	}
	if s.Disturbance.PeakToPeak == 0 {
		return Allowed{}, lack.Failed("nothing disturbs the beam")
	}
	a := Allowed{Scale: float64(cathode / s.Disturbance.PeakToPeak), Cathode: cathode}
	output, err := e.Swing("output", "ground")
	if err != nil {
		return Allowed{}, err
	}
	top, err := e.Swing("multiplier", "ground")
	a.Output, a.Multiplier = output*quantity.Voltage(a.Scale), top*quantity.Voltage(a.Scale)
	return a, err
}
