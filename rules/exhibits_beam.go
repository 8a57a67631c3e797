package rules

import (
	"kilovet/hv/quantity"
	spot "kilovet/ripple/beam"
	"kilovet/rules/evidence"
	"kilovet/rules/exhibit"
)

// pathsTable gathers every way by which something reaches the beam.
func pathsTable(e *evidence.Evidence) []exhibit.Table {
	if e.NoPaths() != nil {
		return nil
	}
	t := exhibit.Table{
		ID: "beam.paths", Chapter: exhibit.Beam, Title: "Paths to the beam", Basis: "ripple.phasor",
		Columns: []exhibit.Column{{Head: "path"}, {Head: "what"}, {Head: "at", Unit: "Hz"}, {Head: "cathode to anode", Unit: "V"},
			{Head: "across the bias", Unit: "V"}, {Head: "of the emission", Unit: "1"}, {Head: "what it does"}},
		Note: "Peak to peak, of noise rms; drift is that of an exposure. The ways of one harmonic may add or take away from each other. Hum keeps step with the mains.",
	}
	for _, p := range e.Paths() {
		row := []exhibit.Cell{exhibit.Words(p.Name), exhibit.Words(p.What)}
		if p.Unknown != nil {
			none := exhibit.Words("")
			t.Rows = append(t.Rows, append(row, none, none, none, none, exhibit.Words("not known: "+p.Unknown.Error())))
			continue
		}
		t.Rows = append(t.Rows, append(row, frequencyCell(p), exhibit.Number(p.Voltage), biasCell(e, p), emissionCell(e, p), exhibit.Words(effect(e, p))))
	}
	return []exhibit.Table{t}
}

func biasCell(e *evidence.Evidence, p evidence.Path) exhibit.Cell {
	if e.Chain().Bias == nil {
		return exhibit.Words("no bias")
	}
	return exhibit.Number(p.Bias)
}

func emissionCell(e *evidence.Evidence, p evidence.Path) exhibit.Cell {
	if e.NoAnswer() != nil {
		return exhibit.Words("not known")
	}
	return exhibit.Number(p.Emission)
}

func frequencyCell(p evidence.Path) exhibit.Cell {
	switch {
	case p.Noise:
		return exhibit.Words("noise")
	case p.Drift:
		return exhibit.Words("slow")
	}
	return exhibit.Number(p.Frequency)
}

func effect(e *evidence.Evidence, p evidence.Path) string {
	text := e.Within(p)
	if !e.Locked(p) {
		return text
	}
	if text != "" {
		text += "; "
	}
	return text + "hum"
}

// spotTable lists the terms of the spot, their shares, and widths of energy.
func spotTable(e *evidence.Evidence) []exhibit.Table {
	s, err := e.Spot()
	if err != nil {
		return nil
	}
	t := exhibit.Table{
		ID: "beam.spot", Chapter: exhibit.Beam, Title: "What the spot is made of", Basis: "ripple.beam",
		Columns: []exhibit.Column{{Head: "cause"}, {Head: "diameter with half the current, FW50", Unit: "m"}, {Head: "area saved without it", Unit: "1"}},
		Note:    "Summed after Barth and Kruit, not in squares; ripple and source are convolved before, so that the shares do not add up to one.",
	}
	for _, c := range causes(s) {
		t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words(c.name), exhibit.Number(c.blur), exhibit.Number(c.share)})
	}
	whole := func(what string, v quantity.Length) {
		t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words(what), exhibit.Number(v), exhibit.Words("")})
	}
	whole("whole spot", s.TotalFW50)
	whole("whole spot without ripple", s.TotalWithoutRippleFW50)
	whole("for comparison, terms in squares", s.QuadratureFW50)
	if a, err := e.BestAngles(); err == nil {
		whole("at the best semi-angle of "+quantity.Text(a.With.Angle), a.With.TotalFW50)
		whole("without ripple, at the best semi-angle of "+quantity.Text(a.Without.Angle), a.Without.TotalFW50)
	}
	return []exhibit.Table{t, widthTable(s)}
}

func widthTable(s spot.Spot) exhibit.Table {
	t := exhibit.Table{
		ID: "beam.widths", Chapter: exhibit.Beam, Title: "Widths of the beam's energy", Basis: "ripple.beam",
		Columns: []exhibit.Column{{Head: "distribution"}, {Head: "central half, FW50", Unit: "eV"}, {Head: "FWHM", Unit: "eV"}, {Head: "rms", Unit: "eV"}, {Head: "full width", Unit: "eV"}},
		Note:    "A distribution that dwells at its turns or has several peaks has no FWHM, one with tails no full width.",
	}
	for _, d := range []struct {
		name string
		of   spot.Distribution
	}{{"source", s.Source}, {"disturbance", s.Disturbance.Lines}, {"both, convolved", s.Energies}} {
		t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words(d.name), exhibit.Number(d.of.FW50()),
			orNone(d.of.FWHM()), exhibit.Number(d.of.RMS()), orNone(d.of.FullWidth())})
	}
	return t
}

// orNone is a width, or that there is none.
func orNone(w quantity.ElectronEnergy, err error) exhibit.Cell {
	if err != nil {
		return exhibit.Words("none")
	}
	return exhibit.Number(w)
}

// spotCurves show the spot over the semi-angle and the energies of its electrons.
func spotCurves(e *evidence.Evidence) []exhibit.Curve {
	s, err := e.Spot()
	if err != nil {
		return nil
	}
	return []exhibit.Curve{angleCurve(e, s), energyCurve(s)}
}

func angleCurve(e *evidence.Evidence, s spot.Spot) exhibit.Curve {
	around := []quantity.Angle{s.Optics.Angle}
	c := exhibit.Curve{
		ID: "beam.angle", Chapter: exhibit.Beam, Title: "Spot against semi-angle", Basis: "ripple.beam",
		X:     exhibit.Axis{What: "semi-angle at the specimen", Unit: "rad", Log: true},
		Y:     exhibit.Axis{What: "diameter with half the current, FW50", Unit: "m", Log: true},
		Marks: []exhibit.Mark{{Name: "set", Point: exhibit.Point{X: float64(s.Optics.Angle), Y: float64(s.TotalFW50)}}},
		Note:  "Summed after Barth and Kruit.",
	}
	if a, err := e.BestAngles(); err == nil {
		around = append(around, a.With.Angle)
		c.Marks = append(c.Marks, exhibit.Mark{Name: "best", Point: exhibit.Point{X: float64(a.With.Angle), Y: float64(a.With.TotalFW50)}})
	}
	whole, diffraction := exhibit.Line{Name: "whole spot"}, exhibit.Line{Name: "diffraction"}
	spherical, chromatic := exhibit.Line{Name: "spherical"}, exhibit.Line{Name: "chromatic, ripple included"}
	for _, a := range spot.Angles(curveSteps/2, around...) {
		t := s.AtAngle(a)
		at := func(l *exhibit.Line, v quantity.Length) {
			if v > 0 {
				l.Points = append(l.Points, exhibit.Point{X: float64(a), Y: float64(v)})
			}
		}
		at(&whole, t.BarthKruit())
		at(&diffraction, t.Diffraction)
		at(&spherical, t.Spherical)
		at(&chromatic, t.Chromatic)
	}
	c.Lines = []exhibit.Line{whole, diffraction, spherical, chromatic}
	if allowed := e.Chain().Beam.BlurAllowance; allowed.Set() {
		c.Levels = []exhibit.Level{{Name: "allowed", Value: float64(allowed.V)}}
	}
	return c
}

func energyCurve(s spot.Spot) exhibit.Curve {
	c := exhibit.Curve{
		ID: "beam.energies", Chapter: exhibit.Beam, Title: "Energies about their mean", Basis: "ripple.beam",
		X: exhibit.Axis{What: "energy off the mean", Unit: "eV"}, Y: exhibit.Axis{What: "share of the particles per electronvolt", Unit: "1"},
	}
	for _, d := range []struct {
		name string
		of   spot.Distribution
	}{{"source", s.Source}, {"source and disturbance", s.Energies}} {
		l := exhibit.Line{Name: d.name}
		for _, p := range d.of.Densities(curveSteps) {
			l.Points = append(l.Points, exhibit.Point{X: float64(p.Energy), Y: p.Share})
		}
		c.Lines = append(c.Lines, l)
	}
	return c
}

// cathodeSpectrum shows the computed harmonics at the cathode, or those that were measured.
func cathodeSpectrum(e *evidence.Evidence) []exhibit.Curve {
	if e.NoPaths() != nil {
		return nil
	}
	c := exhibit.Curve{
		ID: "beam.spectrum", Chapter: exhibit.Beam, Title: "Ripple at the cathode by frequency", Basis: "ripple.phasor",
		X: exhibit.Axis{What: "frequency", Unit: "Hz", Log: true}, Y: exhibit.Axis{What: "amplitude, zero to peak", Unit: "V", Log: true},
	}
	if m, err := e.Measured(); err == nil && m != nil {
		l := exhibit.Line{Name: "measured"}
		for _, tone := range m.Record.Spectrum() {
			if tone.Amplitude > 0 {
				l.Points = append(l.Points, exhibit.Point{X: float64(tone.Frequency), Y: float64(tone.Amplitude)})
			}
		}
		l.Points = exhibit.Thin(l.Points, mostPoints)
		c.Lines = append(c.Lines, l)
	}
	if sticks := sticks(e.Tones()); len(sticks) > 0 {
		c.Lines = append(c.Lines, exhibit.Line{Name: "computed", Points: sticks})
	}
	if len(c.Lines) == 0 {
		return nil
	}
	return []exhibit.Curve{c}
}

// mostPoints is how many points of a record's spectrum are shown.
const mostPoints = 400

// sticks draws each tone as a stick that stands on a floor; tones below it are not shown.
func sticks(tones []spot.Tone) []exhibit.Point {
	const depth, width = 1e-5, 1e-3
	floor := 0.0
	for _, t := range tones {
		floor = max(floor, depth*float64(t.Amplitude))
	}
	var points []exhibit.Point
	for _, t := range tones {
		f, a := float64(t.Frequency), float64(t.Amplitude)
		if a > floor {
			points = append(points, exhibit.Point{X: f * (1 - width), Y: floor}, exhibit.Point{X: f, Y: a}, exhibit.Point{X: f * (1 + width), Y: floor})
		}
	}
	return points
}
