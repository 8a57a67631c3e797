package gap

import "kilovet/hv/quantity"

// Kind is the arrangement of the two electrodes of a gap.
type Kind string

// The arrangements, in the words of the description.
const (
	Plates            Kind = "plates"
	Coaxial           Kind = "coaxial"
	ConcentricSpheres Kind = "concentric spheres"
	SpherePlane       Kind = "sphere-plane"
	SphereSphere      Kind = "sphere-sphere"
	CylinderPlane     Kind = "cylinder-plane"
	ParallelCylinders Kind = "parallel cylinders"
	PointPlane        Kind = "point-plane"
	RoundedEdge       Kind = "rounded edge"
)

// Shape is the shape of the electrodes on both sides of a gap; the gap itself is
// the clearance. Only the sizes that belong to the kind are read, a zero is not given.
type Shape struct {
	Kind        Kind
	InnerRadius quantity.Length // coaxial, concentric spheres
	OuterRadius quantity.Length // coaxial, concentric spheres
	Radius      quantity.Length // sphere or cylinder
	TipRadius   quantity.Length // point-plane
	EdgeRadius  quantity.Length // rounded edge
	Symmetric   bool            // sphere-sphere: both live with ±V/2; else one is earthed
}

// Sharpest is the smallest radius of curvature the shape names; zero for plates
// and where it is not given.
func (s Shape) Sharpest() quantity.Length {
	switch s.Kind {
	case Coaxial, ConcentricSpheres:
		return s.InnerRadius
	case PointPlane:
		return s.TipRadius
	case RoundedEdge:
		return s.EdgeRadius
	}
	return s.Radius
}

// WithSharpest is the shape with that radius in place of its sharpest.
func (s Shape) WithSharpest(r quantity.Length) Shape {
	switch s.Kind {
	case Coaxial, ConcentricSpheres:
		s.InnerRadius = r
	case PointPlane:
		s.TipRadius = r
	case RoundedEdge:
		s.EdgeRadius = r
	default:
		s.Radius = r
	}
	return s
}
