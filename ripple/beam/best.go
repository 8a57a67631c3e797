package beam

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Best is the semi-angle that makes the spot smallest, and the spot there.
type Best struct {
	Angle     quantity.Angle
	TotalFW50 quantity.Length
}

// BestAngle is the best semi-angle with the disturbance.
func (s Spot) BestAngle() (Best, error) { return s.best(s.Energies) }

// BestAngleWithoutRipple is the best semi-angle of the source alone.
func (s Spot) BestAngleWithoutRipple() (Best, error) { return s.best(s.Source) }

// best minimises the root-power sum over the angle: diffraction falls with it,
// spherical and chromatic blur rise with powers of it, and sums of powers have one
// minimum over its logarithm. A lack where nothing rises, or where the minimum
// lies beyond third-order theory.
func (s Spot) best(energies Distribution) (Best, error) {
	o, disc := s.Optics, quantity.Length(energies.DiscFW50())
	total := func(logAngle float64) float64 {
		o.Angle = quantity.Angle(math.Exp(logAngle))
		return float64(Terms{o.SourceImage, o.DiffractionFW50(s.Particle), o.SphericalFW50(), o.perEnergy(s.Particle) * disc}.BarthKruit())
	}
	widest := math.Log(float64(widestAngle))
	x := least(math.Log(1e-7), widest, func(x float64) float64 { return math.Log(total(x)) })
	if x > widest-1e-6 {
		return Best{}, lack.Range("the spot shrinks up to a semi-angle of 0.5 rad, beyond which third-order aberrations do not hold")
	}
	return Best{quantity.Angle(math.Exp(x)), quantity.Length(total(x))}, nil
}
