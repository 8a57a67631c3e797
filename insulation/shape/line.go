// Package shape knows the exact electrostatic fields of simple electrode
// arrangements: the peak field, the utilisation factor, and the field along the
// critical line, from the foot of the peak straight to the other electrode.
//
// All arrangements are ideal: cylinders and planes without end, nothing else near,
// one medium between. A nearby earthed wall, an edge or a dielectric raises the peak.
package shape

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

// PerLength is a field for each volt between the electrodes, in 1/m.
type PerLength float64

// Line is the field along the critical line of an arrangement for one volt, at a
// distance from the more highly stressed electrode.
type Line struct {
	gap    quantity.Length
	radius quantity.Length // over which the field falls; the gap where it is uniform
	trough quantity.Length // where the field is least
	bound  bool            // the field is an upper bound, not exact
	// computed lines come from a field that was worked out, not from an ideal shape.
	computed bool
	at       func(x float64) float64
}

// Gap is the length of the critical line.
func (l Line) Gap() quantity.Length { return l.gap }

// Radius is the radius of curvature at the foot of the peak; the gap for plates.
func (l Line) Radius() quantity.Length { return l.radius }

// Trough is where on the line the field is least: the far end, the middle of a
// symmetric arrangement, between them where the other electrode is curved too.
func (l Line) Trough() quantity.Length { return l.trough }

// Bound reports whether the field is an upper bound and not exact.
func (l Line) Bound() bool { return l.bound }

// Computed reports whether the line comes from a computed field.
func (l Line) Computed() bool { return l.computed }

// PerVolt is the field at x from the stressed electrode for each volt, 0 ≤ x ≤ gap.
func (l Line) PerVolt(x quantity.Length) PerLength { return PerLength(l.at(float64(x))) }

// Peak is the highest field at a voltage between the electrodes.
func (l Line) Peak(v quantity.Voltage) quantity.Field {
	return quantity.Field(float64(l.PerVolt(0)) * float64(v))
}

// Utilisation is the mean field over the peak field (Schwaiger's factor): 1 for plates.
func (l Line) Utilisation() quantity.Fraction {
	return quantity.Fraction(1 / (float64(l.gap) * float64(l.PerVolt(0))))
}

// Of is the critical line of a shape whose gap is the clearance. Coaxial cylinders
// and concentric spheres carry the gap in their radii; a clearance given beside them
// must agree within 1 %. A size that is missing or contradicts is a lack.
func Of(s gap.Shape, clearance quantity.Length) (Line, error) {
	d, err := gapOf(s, clearance)
	if err != nil {
		return Line{}, err
	}
	r := s.Sharpest()
	if r <= 0 && s.Kind != gap.Plates {
		return Line{}, lack.Key("spacing.shape." + radiusKey(s.Kind))
	}
	return arrange(s, float64(r), float64(d))
}

func arrange(s gap.Shape, r, d float64) (Line, error) {
	switch s.Kind {
	case gap.Plates:
		return plates(d), nil
	case gap.Coaxial:
		return coaxial(r, d), nil
	case gap.ConcentricSpheres:
		return concentric(r, d), nil
	case gap.CylinderPlane:
		return cylinderPlane(r, d), nil
	case gap.RoundedEdge:
		return roundedEdge(r, d), nil
	case gap.ParallelCylinders:
		return mirrored(cylinderPlane(r, d/2)), nil
	case gap.PointPlane:
		return hyperboloid(r, d), nil
	}
	return spheres(s, r, d)
}

// gapOf is the gap of a shape: the clearance, or what its radii leave between them.
func gapOf(s gap.Shape, clearance quantity.Length) (quantity.Length, error) {
	if s.Kind != gap.Coaxial && s.Kind != gap.ConcentricSpheres {
		if clearance <= 0 {
			return 0, lack.Key("spacing.clearance")
		}
		return clearance, nil
	}
	d := s.OuterRadius - s.InnerRadius
	switch {
	case s.InnerRadius <= 0:
		return 0, lack.Key("spacing.shape.inner_radius")
	case s.OuterRadius <= 0:
		return 0, lack.Key("spacing.shape.outer_radius")
	case d <= 0:
		return 0, lack.Range("the outer radius must exceed the inner one")
	case clearance > 0 && math.Abs(float64(clearance/d)-1) > 0.01:
		return 0, lack.Range("a clearance of %s is not the %s between the radii: the arrangement is not %s",
			quantity.Text(clearance), quantity.Text(d), string(s.Kind))
	}
	return d, nil
}

// radiusKey is the key of the description that holds the sharpest radius.
func radiusKey(k gap.Kind) string {
	switch k {
	case gap.PointPlane:
		return "tip_radius"
	case gap.RoundedEdge:
		return "edge_radius"
	case gap.Coaxial, gap.ConcentricSpheres:
		return "inner_radius"
	}
	return "radius"
}

// WithGap is the shape with another gap: its outer radius moves, where it has one.
func WithGap(s gap.Shape, d quantity.Length) gap.Shape {
	if s.Kind == gap.Coaxial || s.Kind == gap.ConcentricSpheres {
		s.OuterRadius = s.InnerRadius + d
	}
	return s
}

// mirrored joins a line to its mirror image: two like electrodes at ±½ V, of which
// half is the line of one against the plane between them.
func mirrored(half Line) Line {
	d := 2 * half.gap
	return Line{gap: d, radius: half.radius, trough: half.gap, bound: half.bound, at: func(x float64) float64 {
		return half.at(math.Min(x, float64(d)-x)) / 2
	}}
}
