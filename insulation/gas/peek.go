package gas

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/shape"
)

// Peek is a corona law Ec = E₀ δ (1 + c/√(δ r)), the field at a smooth surface of
// radius r at which corona starts, with δ relative to 25 °C and 760 Torr.
type Peek struct {
	Field  quantity.Field // E₀, peak
	Curve  float64        // c √(1 m)
	Source gap.Source
}

// centimetreRoot turns c from √cm into √m.
const centimetreRoot = 0.1

// Peek's laws. The companion of one textbook multiplies by √(δ r) where Peek divides:
// the same at δ r = 1 cm and wrong elsewhere.
var (
	ParallelWires   = Peek{30e5, 0.301 * centimetreRoot, gap.Source{Text: "F. W. Peek, parallel wires, 30 δ (1 + 0.301/√(δ r)) kV/cm", Mark: gap.Read}}
	CoaxialAC       = Peek{31e5, 0.308 * centimetreRoot, gap.Source{Text: "F. W. Peek, coaxial cylinders, 31 δ (1 + 0.308/√(δ r)) kV/cm", Mark: gap.Memory}}
	CoaxialPositive = Peek{33.7e5, 8.13 / 33.7 * centimetreRoot, gap.Source{Text: "Whitehead and Brown, coaxial, positive, 33.7 δ + 8.13 √(δ/r) kV/cm", Mark: gap.Memory}}
	CoaxialNegative = Peek{31.02e5, 9.54 / 31.02 * centimetreRoot, gap.Source{Text: "Whitehead and Brown, coaxial, negative, 31.02 δ + 9.54 √(δ/r) kV/cm", Mark: gap.Memory}}
	SphereSurface   = Peek{27.2e5, 0.54 * centimetreRoot, gap.Source{Text: "F. W. Peek, spheres, 27.2 δ (1 + 0.54/√(δ r)) kV/cm", Mark: gap.Memory}}
)

// Onset is the field at which corona starts on a smooth surface of radius r.
func (p Peek) Onset(density25 quantity.Fraction, r quantity.Length) quantity.Field {
	d := float64(density25)
	return p.Field * quantity.Field(d*(1+p.Curve/math.Sqrt(d*float64(r))))
}

// fits reports whether a gap is wider than the layer c √(r/δ) in which by Peek the discharge
// gathers its energy: closer electrodes are nearly plates, which stand more (memory).
func (p Peek) fits(density25 quantity.Fraction, l shape.Line) bool {
	return float64(l.Gap()) > p.Curve*math.Sqrt(float64(l.Radius())/float64(density25))
}

// PeekOnset is the onset voltage of a shape by each of Peek's laws that belongs to it, for
// wires and cylinders and for spheres whose gap is not small against √r, times the
// irregularity factor of the surface. Where none does there is a lack.
func PeekOnset(s State, kind gap.Kind, l shape.Line, surface gap.Surface) ([]gap.Beside[quantity.Voltage], error) {
	m, _, err := SurfaceFactor(surface)
	if err != nil {
		return nil, err
	}
	var shown []gap.Beside[quantity.Voltage]
	for _, p := range peekLaws(kind) {
		if s.Gas != gap.AirGas || !p.fits(s.density25(), l) {
			continue
		}
		e := p.Onset(s.density25(), l.Radius()) * quantity.Field(m)
		shown = append(shown, gap.Beside[quantity.Voltage]{Value: quantity.Voltage(float64(e) / float64(l.PerVolt(0))), Source: p.Source})
	}
	if shown == nil {
		return nil, lack.Range("no corona law of Peek belongs to %s of this size in %s", string(kind), string(s.Gas))
	}
	return shown, nil
}

func peekLaws(kind gap.Kind) []Peek {
	switch kind {
	case gap.Coaxial:
		return []Peek{CoaxialAC, CoaxialPositive, CoaxialNegative}
	case gap.ParallelCylinders, gap.CylinderPlane, gap.RoundedEdge:
		return []Peek{ParallelWires}
	case gap.SpherePlane, gap.SphereSphere, gap.ConcentricSpheres:
		return []Peek{SphereSurface}
	}
	return nil
}
