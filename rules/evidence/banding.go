package evidence

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/ripple/beam"
)

// Slow is what is too slow to blur and moves focus and scan instead.
type Slow struct {
	Lines      []beam.Line
	PeakToPeak quantity.Voltage // linear sum
	Relative   quantity.Fraction
	// Focus is how far the focus moves, Defocus the disc at an end of it, Edge how far the
	// edge of the scanned field moves against its middle; peak to peak but for the disc.
	Focus, Defocus, Edge quantity.Length
	// Edgeless is why there is no edge; nil where there is one.
	Edgeless error
}

// Banding is what is too slow to blur within the dwell.
func (e *Evidence) BandingWithin() (Slow, error) {
	return remember(e, "banding", func() (Slow, error) {
		b := e.chain.Beam
		if b == nil || !b.Dwell.Set() {
			return Slow{}, lack.Key("beam.dwell")
		}
		_, slow, err := e.disturbing(b.Dwell.V)
		if err != nil {
			return Slow{}, err
		}
		return e.slow(slow)
	})
}

// Banding is the relative energy swing of what is too slow to blur within the dwell, peak
// to peak.
func (e *Evidence) Banding() (quantity.Fraction, error) {
	s, err := e.BandingWithin()
	return s.Relative, err
}

// DriftWithin is what divider, reference and bias drift within one exposure.
func (e *Evidence) DriftWithin() (Slow, error) {
	return remember(e, "drift within", func() (Slow, error) {
		drifts, err := e.Drifts()
		if err != nil {
			return Slow{}, err
		}
		var lines []beam.Line
		for _, d := range drifts {
			lines = append(lines, beam.Line{Name: d.Name, Amplitude: d.Voltage / 2, Form: beam.Triangle()})
		}
		return e.slow(lines)
	})
}

func (e *Evidence) slow(lines []beam.Line) (Slow, error) {
	particle, err := e.Particle()
	if err != nil {
		return Slow{}, err
	}
	s := Slow{Lines: lines}
	for _, l := range lines {
		s.PeakToPeak += l.PeakToPeak()
	}
	s.Relative = particle.Relative(s.PeakToPeak)
	optics, err := e.Optics()
	if err != nil {
		s.Edgeless = err
		return s, nil
	}
	s.Focus = optics.FocusShift(particle, s.PeakToPeak)
	s.Defocus = optics.DefocusFW50(particle, beam.Line{Amplitude: s.PeakToPeak / 2, Form: beam.Square()})
	field, err := e.chain.Beam.FieldWidth.Need()
	if err != nil {
		s.Edgeless = err
		return s, nil
	}
	s.Edge = e.deflection().EdgeShift(particle, field, s.PeakToPeak)
	return s, nil
}

func (e *Evidence) deflection() beam.Deflection {
	if e.chain.Beam.Deflection.V == "electrostatic" {
		return beam.Electrostatic
	}
	return beam.Magnetic
}
