package beam

import (
	"math"

	"kilovet/hv/quantity"
)

// Spot is the beam at the specimen: widths of its energy and blur, source and
// disturbance apart and together.
type Spot struct {
	Particle    Particle
	Optics      Optics
	Source      Distribution
	Disturbance Disturbance
	// Energies is source and disturbance convolved.
	Energies Distribution

	// Widths of the energy, central half.
	WidthSourceFW50, WidthRippleFW50, WidthTotalFW50 quantity.ElectronEnergy
	// Chromatic discs in the focal plane of the mean energy: the source alone, the
	// disturbance alone.
	BlurChromaticFW50, BlurRippleFW50 quantity.Length
	// Terms of the whole spot; its chromatic one is the disc of both together.
	Terms Terms
	// Total is the root-power sum of the terms, Quadrature their plain one, and
	// TotalWithoutRipple the root-power sum without the disturbance.
	TotalFW50, QuadratureFW50, TotalWithoutRippleFW50 quantity.Length
}

// Compute works out the spot. It is a lack where the optics leave third-order theory.
//
// The disc of source and disturbance together is never more than both added in
// squares, but it can be up to 3 % less than the disturbance's alone: a source under
// a large sine blunts the ends at which the sine dwells.
func Compute(e Particle, o Optics, source Distribution, d Disturbance) (Spot, error) {
	if err := o.check(); err != nil {
		return Spot{}, err
	}
	s := Spot{Particle: e, Optics: o, Source: source, Disturbance: d, Energies: Convolve(source, d.Energies)}
	s.WidthSourceFW50, s.WidthRippleFW50, s.WidthTotalFW50 = source.FW50(), d.Energies.FW50(), s.Energies.FW50()
	s.BlurChromaticFW50, s.BlurRippleFW50 = o.ChromaticFW50(e, source), o.ChromaticFW50(e, d.Energies)
	s.Terms = Terms{o.SourceImage, o.DiffractionFW50(e), o.SphericalFW50(), o.ChromaticFW50(e, s.Energies)}
	s.TotalFW50, s.QuadratureFW50 = s.Terms.BarthKruit(), s.Terms.Quadrature()
	quiet := s.Terms
	quiet.Chromatic = s.BlurChromaticFW50
	s.TotalWithoutRippleFW50 = quiet.BarthKruit()
	return s, nil
}

// Shares says how much smaller, as a fraction of its area, the spot would be
// without each cause. They need not add up to one.
type Shares struct {
	SourceImage, Diffraction, Spherical, Chromatic, Ripple quantity.Fraction
}

// Shares of the spot; all zero where it has no size.
func (s Spot) Shares() Shares {
	if s.TotalFW50 == 0 {
		return Shares{}
	}
	share := func(change func(*Terms)) quantity.Fraction {
		t := s.Terms
		change(&t)
		return quantity.Fraction(1 - math.Pow(float64(t.BarthKruit()/s.TotalFW50), 2))
	}
	return Shares{
		SourceImage: share(func(t *Terms) { t.SourceImage = 0 }),
		Diffraction: share(func(t *Terms) { t.Diffraction = 0 }),
		Spherical:   share(func(t *Terms) { t.Spherical = 0 }),
		Chromatic:   share(func(t *Terms) { t.Chromatic = 0 }),
		Ripple:      share(func(t *Terms) { t.Chromatic = s.BlurChromaticFW50 }),
	}
}
