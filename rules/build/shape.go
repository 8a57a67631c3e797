package build

import (
	"fmt"

	"kilovet/hv/chain"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// The electrodes of the shape of a gap: the more highly stressed one and its counterpart.
const (
	Sharper = "sharper electrode"
	Blunter = "blunter electrode"
)

// FromShape is what says that an arrangement was built from the shape of a gap.
const FromShape = "spacing.shape"

// Shape is the arrangement of the shape of a gap with a voltage across it, its sharper
// electrode negative: coaxial cylinders between planes of symmetry; spheres, and plates
// with rounded rims, in open space; a sphere or a hyperboloid over a plane without end; a
// rod or tube end over a plane within an earthed wall. Cylinders along a plane are no
// figures of revolution.
func Shape(s *chain.Spacing, across quantity.Voltage) *Arrangement {
	sh := s.Shape
	d := shapeSizes{
		gap: s.Clearance.V, inner: sh.InnerRadius.V, outer: sh.OuterRadius.V, radius: sh.Radius.V,
		tip: sh.TipRadius.V, edge: sh.EdgeRadius.V, body: sh.BodyRadius.V, wall: sh.WallRadius.V,
	}
	b := shapeBuilder{s, across}
	a := b.arrangement(d)
	if a.Err == nil {
		a.Dimensions = b.dimensions(d)
	}
	return a
}

// shapeSizes are the sizes a shape is drawn from.
type shapeSizes struct {
	gap, inner, outer, radius, tip, edge, body, wall quantity.Length
}

// shapeBuilder draws the shape of one spacing.
type shapeBuilder struct {
	*chain.Spacing
	across quantity.Voltage
}

func (b shapeBuilder) arrangement(d shapeSizes) *Arrangement {
	p := pen{b.Shape.Here()}
	a := &Arrangement{Field: p.field(b.Name.V, b.Medium.V), From: FromShape, Of: b.Name.V, Gap: b.Spacing}
	a.Gas, a.Pressure, a.Temperature = b.Gas, b.Pressure, b.Temperature
	draw := map[string]func(pen, *Arrangement, shapeSizes){
		"coaxial": b.coaxial, "concentric spheres": b.concentric, "sphere-plane": b.spherePlane, "sphere-sphere": b.spheres,
		"point-plane": b.pointPlane, "rounded edge": b.rod, "plates": b.plates,
	}[b.Shape.Kind.V]
	if draw == nil {
		a.Err = lack.Range("a shape of kind %s is no figure of revolution: its closed form judges", b.Shape.Kind.V)
		return a
	}
	if a.Err = b.check(d); a.Err == nil {
		draw(p, a, d)
		a.Ideal = b.Name.V + ": insulators beside the gap and what else is near are left out"
	}
	return a
}

// check refuses what is no figure; a rod needs room within its wall.
func (b shapeBuilder) check(d shapeSizes) error {
	kind := b.Shape.Kind.V
	switch reach := max(d.body, d.radius); {
	case kind == "coaxial" || kind == "concentric spheres":
		if d.inner <= 0 || d.outer <= d.inner {
			return lack.Range("the outer radius must exceed the inner one")
		}
	case d.gap <= 0:
		return lack.Key(b.Clearance.Key)
	case kind == "rounded edge" || kind == "plates":
		if d.edge <= 0 || d.body < d.edge {
			return lack.Range("a rim needs an edge radius of at most that of its body")
		}
		fallthrough
	default:
		if d.wall > 0 && d.wall < reach+d.gap {
			return lack.Range("a wall at %s is nearer than the gap of %s", quantity.Text(d.wall), quantity.Text(d.gap))
		}
	}
	return nil
}

// dimensions are the sizes by name, each with the shape it would make.
func (b shapeBuilder) dimensions(d shapeSizes) (all []Dimension) {
	add := func(name, key string, size func(*shapeSizes) *quantity.Length) {
		if *size(&d) <= 0 {
			return
		}
		all = append(all, Dimension{Name: name, Key: key, Value: *size(&d), With: func(v quantity.Length) *Arrangement {
			other := d
			*size(&other) = v
			return b.arrangement(other)
		}})
	}
	if d.outer == 0 {
		add("clearance", "spacing.clearance", func(d *shapeSizes) *quantity.Length { return &d.gap })
	}
	add("inner radius", "spacing.shape.inner_radius", func(d *shapeSizes) *quantity.Length { return &d.inner })
	add("outer radius", "spacing.shape.outer_radius", func(d *shapeSizes) *quantity.Length { return &d.outer })
	add("radius", "spacing.shape.radius", func(d *shapeSizes) *quantity.Length { return &d.radius })
	add("tip radius", "spacing.shape.tip_radius", func(d *shapeSizes) *quantity.Length { return &d.tip })
	add("edge radius", "spacing.shape.edge_radius", func(d *shapeSizes) *quantity.Length { return &d.edge })
	add("radius of the body", "spacing.shape.body_radius", func(d *shapeSizes) *quantity.Length { return &d.body })
	add("radius of the wall", "spacing.shape.wall_radius", func(d *shapeSizes) *quantity.Length { return &d.wall })
	return all
}

// wallsAt says where a wall was taken to stand.
func (b shapeBuilder) wallsAt(a *Arrangement, wall quantity.Length) {
	a.Assumed = append(a.Assumed, fmt.Sprintf("%s: an earthed wall is taken to stand at %s", b.Name.V, quantity.Text(wall)))
}

// ClosedFor says where the closed form of a shape does not hold for what was drawn; empty
// where it does, and for arrangements that were not built from one.
func (a *Arrangement) ClosedFor() string {
	if a.Gap == nil {
		return ""
	}
	switch sh := a.Gap.Shape; {
	case sh.BodyRadius.Set() && sh.Kind.V == "plates":
		return ", without a rim or a wall"
	case sh.BodyRadius.Set():
		return ", a straight edge without a wall"
	case sh.WallRadius.Set():
		return ", without the wall"
	}
	return ""
}
