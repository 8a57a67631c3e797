package rules

import (
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
)

// beam lists what the beam is and how it blurs, in working state.
func beam(c *collector, e *evidence.Evidence) {
	const basis = "ripple.beam"
	if c := e.Chain(); c.Beam == nil && c.Gun == nil || c.Gun != nil && !c.Gun.IsFitted() {
		return
	}
	if electron, err := e.Electron(); err == nil {
		add(c, "beam.energy", "", basis, electron.Energy(), nil)
		add(c, "beam.wavelength", "", basis, electron.Wavelength(), nil)
	}
	source, err := e.Source()
	add(c, "beam.width_source", "", basis, width(source.FW50, err), err)
	s, err := e.Spot()
	if err != nil {
		return
	}
	add(c, "beam.width_ripple", "", basis, s.WidthRippleFW50, nil)
	add(c, "beam.blur_chromatic", "", basis, s.BlurChromaticFW50, nil)
	add(c, "beam.blur_ripple", "", basis, s.BlurRippleFW50, nil)
	add(c, "beam.blur_spherical", "", basis, s.Terms.Spherical, nil)
	add(c, "beam.blur_diffraction", "", basis, s.Terms.Diffraction, nil)
	add(c, "beam.blur_total", "", basis, s.TotalFW50, nil)
	of(c, "beam.banding", "", basis, e.Banding)
	of(c, "beam.ripple_allowed", "", basis, e.RippleAllowed)
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
	for i := range e.Chain().Spacings {
		s := &e.Chain().Spacings[i]
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
