package rules

import (
	"kilovet/hv/quantity"
	spot "kilovet/ripple/beam"
	"kilovet/rules/evidence"
)

// beam lists what the beam is and how it blurs, in working state.
func beam(c *collector, e *evidence.Evidence) {
	const basis = "ripple.beam"
	if c := e.Chain(); c.Beam == nil && c.Gun == nil || c.Gun != nil && !c.Gun.IsFitted() {
		return
	}
	if particle, err := e.Particle(); err == nil {
		add(c, "beam.energy", "", basis, particle.Energy(), nil)
		add(c, "beam.wavelength", "", basis, particle.Wavelength(), nil)
	}
	source, err := e.Source()
	add(c, "beam.width_source", "", basis, width(source.FW50, err), err)
	slowFigures(c, e)
	s, err := e.Spot()
	if err != nil {
		return
	}
	blurs(c, s)
	widths(c, s)
	angles(c, e)
	of(c, "beam.ripple_allowed", "", basis, e.RippleAllowed)
	if a, err := e.Allowed(); err == nil {
		add(c, "beam.ripple_allowed_output", "", basis, a.Output, nil)
		add(c, "beam.ripple_allowed_multiplier", "", basis, a.Multiplier, nil)
	}
}

func blurs(c *collector, s spot.Spot) {
	const basis = "ripple.beam"
	add(c, "beam.width_ripple", "", basis, s.WidthRippleFW50, nil)
	add(c, "beam.blur_chromatic", "", basis, s.BlurChromaticFW50, nil)
	add(c, "beam.blur_ripple", "", basis, s.BlurRippleFW50, nil)
	add(c, "beam.blur_spherical", "", basis, s.Terms.Spherical, nil)
	add(c, "beam.blur_diffraction", "", basis, s.Terms.Diffraction, nil)
	add(c, "beam.blur_total", "", basis, s.TotalFW50, nil)
	add(c, "beam.blur_chromatic_total", "", basis, s.Terms.Chromatic, nil)
	add(c, "beam.blur_without_ripple", "", basis, s.TotalWithoutRippleFW50, nil)
	add(c, "beam.blur_quadrature", "", basis, s.QuadratureFW50, nil)
	for _, cause := range causes(s) {
		add(c, "beam.share", cause.name, basis, cause.share, nil)
	}
}

// cause is one cause of the spot's size.
type cause struct {
	name  string
	blur  quantity.Length
	share quantity.Fraction
}

func causes(s spot.Spot) []cause {
	share := s.Shares()
	return []cause{
		{"source image", s.Terms.SourceImage, share.SourceImage},
		{"diffraction", s.Terms.Diffraction, share.Diffraction},
		{"spherical aberration", s.Terms.Spherical, share.Spherical},
		{"chromatic aberration, ripple included", s.Terms.Chromatic, share.Chromatic},
		{"ripple alone", s.BlurRippleFW50, share.Ripple},
	}
}

func widths(c *collector, s spot.Spot) {
	const basis = "ripple.beam"
	add(c, "beam.width_source_rms", "", basis, s.Source.RMS(), nil)
	fwhm, err := s.Source.FWHM()
	add(c, "beam.width_source_fwhm", "", basis, fwhm, err)
	add(c, "beam.width_ripple_rms", "", basis, s.Disturbance.Energies.RMS(), nil)
	full, err := s.Disturbance.Lines.FullWidth()
	add(c, "beam.width_ripple_full", "", basis, full, err)
	add(c, "beam.width_total", "", basis, s.WidthTotalFW50, nil)
	add(c, "beam.width_total_rms", "", basis, s.Energies.RMS(), nil)
	fwhm, err = s.Energies.FWHM()
	add(c, "beam.width_total_fwhm", "", basis, fwhm, err)
}

func angles(c *collector, e *evidence.Evidence) {
	a, err := e.BestAngles()
	if err != nil {
		return
	}
	const basis = "ripple.beam"
	add(c, "beam.best_angle", "", basis, a.With.Angle, nil)
	add(c, "beam.best_angle_without_ripple", "", basis, a.Without.Angle, nil)
	add(c, "beam.best_blur", "", basis, a.With.TotalFW50, nil)
}

// slowFigures lists what moves focus and scan rather than blurs.
func slowFigures(c *collector, e *evidence.Evidence) {
	const basis = "ripple.beam"
	of(c, "beam.banding", "", basis, e.Banding)
	if s, err := e.BandingWithin(); err == nil {
		movement(c, "beam.banding", s)
	}
	if s, err := e.DriftWithin(); err == nil {
		add(c, "beam.drift", "", basis, s.Relative, nil)
		movement(c, "beam.drift", s)
	}
	m, err := e.Measured()
	if m != nil {
		add(c, "cathode.measured", "", "as measured", m.PeakToPeak(), err)
	}
	if e.Chain().Heater == nil {
		return
	}
	if tip, err := e.TipSwing(); err == nil && tip > 0 {
		add(c, "heater.tip_swing", "", "hv.gun", 2*tip, nil)
	}
	of(c, "heater.power", "", "as stated", e.HeaterPower)
}

func movement(c *collector, id string, s evidence.Slow) {
	const basis = "ripple.beam"
	if e := s.Edgeless; e != nil && s.Focus == 0 {
		return
	}
	add(c, id+"_focus", "", basis, s.Focus, nil)
	add(c, id+"_edge", "", basis, s.Edge, s.Edgeless)
}

// width asks for a width only where there is a distribution.
func width(of func() quantity.ElectronEnergy, err error) quantity.ElectronEnergy {
	if err != nil {
		return 0
	}
	return of()
}

// spacings lists what each spacing needs and stands.
func spacings(c *collector, e *evidence.Evidence) {
	for _, s := range e.Spacings() {
		x, err := e.Spacing(s)
		if err != nil {
			continue
		}
		const basis = "insulation"
		add(c, "spacing.voltage", s.Name.V, basis, x.Voltages.Peak, nil)
		a := x.Assessment
		of(c, "spacing.clearance_needed", s.Name.V, basis, a.ClearanceNeeded.Get)
		of(c, "spacing.creepage_needed", s.Name.V, basis, a.CreepageNeeded.Get)
		of(c, "spacing.breakdown_estimate", s.Name.V, basis, a.Breakdown.Get)
		of(c, "spacing.onset_estimate", s.Name.V, basis, a.Onset.Get)
		of(c, "spacing.field_peak", s.Name.V, basis, a.FieldPeak.Get)
	}
}
