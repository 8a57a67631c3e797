package evidence

import (
	"kilovet/hv/document"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/ripple/beam"
)

// Spot is the beam at the specimen, what disturbs it within exposure or dwell included.
func (e *Evidence) Spot() (beam.Spot, error) {
	return remember(e, "spot", func() (beam.Spot, error) {
		if err := e.Spotless(); err != nil {
			return beam.Spot{}, err
		}
		particle, err := e.Particle()
		if err != nil {
			return beam.Spot{}, err
		}
		optics, err := e.Optics()
		if err != nil {
			return beam.Spot{}, err
		}
		source, err := e.Source()
		if err != nil {
			return beam.Spot{}, err
		}
		disturbance, err := e.blurDisturbance()
		if err != nil {
			return beam.Spot{}, err
		}
		return beam.Compute(particle, optics, source, disturbance.OfCharge(particle.Charges()))
	})
}

// Optics are the described ones.
func (e *Evidence) Optics() (beam.Optics, error) {
	b := e.chain.Beam
	if b == nil {
		return beam.Optics{}, lack.Key("beam")
	}
	if err := document.Need(b.ChromaticAberration, b.SphericalAberration, b.HalfAngle, b.SourceImage); err != nil {
		return beam.Optics{}, err
	}
	return beam.Optics{Chromatic: b.ChromaticAberration.V, Spherical: b.SphericalAberration.V, Angle: b.HalfAngle.V, SourceImage: b.SourceImage.V}, nil
}

// Source is the energy distribution of the source: measured, else that of a hot cathode.
func (e *Evidence) Source() (beam.Distribution, error) {
	if b := e.before; b != nil && b.chain.Beam == e.chain.Beam && b.chain.Gun == e.chain.Gun {
		return b.Source()
	}
	return remember(e.Under(Condition{}), "source", e.source)
}

func (e *Evidence) source() (beam.Distribution, error) {
	b, g := e.chain.Beam, e.chain.Gun
	if b != nil && b.EnergyWidth.Set() {
		return beam.GaussianFWHM(b.EnergyWidth.V)
	}
	if e.Ions() {
		return beam.Distribution{}, lack.Because("the energy width of an ion source has no law: it must be measured", b.EnergyWidth.Key)
	}
	if g == nil || !g.CathodeTemperature.Set() {
		return beam.Distribution{}, lack.Because("the energy width of the source follows neither from a measurement nor from a temperature", "beam.energy_width", "gun.cathode_temperature")
	}
	return beam.Thermionic(g.CathodeTemperature.V)
}

// blurDisturbance is what blurs within exposure or dwell, noise included.
func (e *Evidence) blurDisturbance() (beam.Disturbance, error) {
	blurring, _, err := e.disturbing(e.averaging())
	if err != nil {
		return beam.Disturbance{}, err
	}
	d, err := beam.Disturb(blurring...)
	if err != nil {
		return d, err
	}
	return d.WithNoise(e.noise())
}

// averaging is the time over which a disturbance counts as blur: the exposure where
// given, else the dwell.
func (e *Evidence) averaging() quantity.Time {
	b := e.chain.Beam
	return b.Exposure.Or(b.Dwell.V)
}

// BlurTotal is the whole spot.
func (e *Evidence) BlurTotal() (quantity.Length, error) {
	s, err := e.Spot()
	return s.TotalFW50, err
}

// RippleAllowed is the disturbance at the cathode that just uses up the allowance.
func (e *Evidence) RippleAllowed() (quantity.Voltage, error) {
	return remember(e, "ripple allowed", func() (quantity.Voltage, error) {
		s, err := e.Spot()
		if err != nil {
			return 0, err
		}
		allowance, err := e.chain.Beam.BlurAllowance.Need()
		if err != nil {
			return 0, err
		}
		return s.RippleAllowed(allowance)
	})
}

// Angles are the best semi-angle with and without the disturbance.
type Angles struct{ With, Without beam.Best }

// BestAngles of the spot.
func (e *Evidence) BestAngles() (Angles, error) {
	return remember(e, "best angles", func() (a Angles, err error) {
		s, err := e.Spot()
		if err != nil {
			return a, err
		}
		if a.With, err = s.BestAngle(); err != nil {
			return a, err
		}
		a.Without, err = s.BestAngleWithoutRipple()
		return a, err
	})
}
