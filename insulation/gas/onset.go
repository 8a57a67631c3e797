package gas

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/shape"
)

// Onset is the voltage at which a discharge starts along a critical line: the streamer
// criterion in air and sulphur hexafluoride, times the factor of the surface. In air
// the gap times density must be 0.1 mm or more. Plates are answered by
// UniformBreakdown, other gases by nothing here.
func Onset(s State, l shape.Line, surface gap.Surface) (gap.Answer[quantity.Voltage], error) {
	var none gap.Answer[quantity.Voltage]
	law, err := ionisationOf(s.Gas)
	if err != nil {
		return none, err
	}
	if x := quantity.Length(s.Density()) * l.Gap(); !quantity.AtLeast(x, shortestUniform) {
		return none, lack.Range("no onset between curved electrodes is known under 0.1 mm at normal density, asked for %s", quantity.Text(x))
	}
	if s.Pressure > highestPressure {
		return none, lack.Range("above 1 MPa the roughness of the electrodes decides, asked for %s", quantity.Text(s.Pressure))
	}
	m, rough, err := SurfaceFactor(surface)
	if err != nil {
		return none, err
	}
	v, err := law.Onset(l, s.Density())
	if err != nil {
		return none, err
	}
	a := gap.Answer[quantity.Voltage]{
		Value: v * quantity.Voltage(m), Because: "an avalanche along the critical line grows to a streamer",
		Sources: []gap.Source{law.Source.Governing()},
	}
	if m < 1 {
		a.Sources = append(a.Sources, rough)
	}
	if s.Gas == gap.AirGas {
		a.Shown = besides(l, s.Density(), m)
	}
	return ofUniform.applied(s, a), nil
}

// besides is the onset by the other ionisation coefficient of air, where its fit holds.
func besides(l shape.Line, density, m quantity.Fraction) []gap.Beside[quantity.Voltage] {
	v, err := AirQuadratic.Onset(l, density)
	if err != nil {
		return nil // past the end of its fit
	}
	return []gap.Beside[quantity.Voltage]{{Value: v * quantity.Voltage(m), Source: AirQuadratic.Source}}
}

// SurfaceFactor is Peek's irregularity factor on onset, the low end of its range:
// smooth 1, weathered or dirty 0.93, stranded 0.83 (F. W. Peek, read second-hand).
func SurfaceFactor(s gap.Surface) (quantity.Fraction, gap.Source, error) {
	source := gap.Source{Text: "F. W. Peek, irregularity factor", Mark: gap.Read}
	switch s {
	case gap.Smooth, "":
		return 1, source, nil
	case gap.Weathered:
		return 0.93, source, nil
	case gap.Stranded:
		return 0.83, source, nil
	}
	return 0, source, lack.Range("no surface factor is known here for %q", string(s))
}

// Growth is the streamer integral along a critical line at a voltage by the coefficient
// that judges in the gas, 1 at onset.
func Growth(s State, l shape.Line, v quantity.Voltage) (float64, error) {
	law, err := ionisationOf(s.Gas)
	if err != nil {
		return 0, err
	}
	return law.Growth(l, s.Density(), v)
}

// Critical is the field at or under which the gas does not ionise: 24.22 kV/cm of air
// at normal density, in proportion to the density.
func Critical(s State) (quantity.Field, gap.Source, error) {
	law, err := ionisationOf(s.Gas)
	return law.critical * quantity.Field(s.Density()), law.Source, err
}
