package build

import (
	"fmt"
	"math"

	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// The electrodes and bodies of a feedthrough.
const (
	Pin      = "pin"
	Plate    = "plate"
	Sleeve   = "sleeve"
	InnerGap = "gap at the pin"
	OuterGap = "gap at the hole"
)

// FromFeedthrough is what says that an arrangement was built from a feedthrough.
const FromFeedthrough = "feedthrough"

// Feedthrough is the arrangements of a feedthrough, one a side: half of it from the
// middle of the plate on, with the pin going on beyond the sleeve and an earthed wall
// far around.
func Feedthrough(f *chain.Feedthrough) (all []*Arrangement) {
	if s := f.AirSide; s != nil {
		all = append(all, side(f, "air side", "air", s.Length))
	}
	if s := f.VacuumSide; s != nil {
		all = append(all, side(f, "vacuum side", "vacuum", s.Length))
	}
	return all
}

// throughSizes are the sizes a side of a feedthrough is drawn from.
type throughSizes struct {
	pin, hole, edge, half, length quantity.Length
	bore, outer                   quantity.Length // of the sleeve, 0: none
	joint                         quantity.Length // how wide the wedge is where the filling ends
}

func side(f *chain.Feedthrough, which, medium string, length document.Given[quantity.Length]) *Arrangement {
	d := throughSizes{pin: f.Pin.Radius.V, hole: f.Hole.Radius.V, edge: f.Hole.EdgeRadius.V, half: f.PlateThickness.V / 2, length: length.V}
	if f.Sleeve != nil {
		d.bore, d.outer, d.joint = f.Inner().V, f.Outer().V, f.Sleeve.JointWidth.V
	}
	b := throughBuilder{f, f.Name.V + ", " + which, medium, which, length.Key}
	a := b.arrangement(d)
	if a.Err == nil {
		a.Dimensions = b.dimensions(d)
	}
	return a
}

// throughBuilder draws sides of one feedthrough.
type throughBuilder struct {
	*chain.Feedthrough
	name, medium    string
	side, lengthKey string
}

func (b throughBuilder) arrangement(d throughSizes) *Arrangement {
	p := pen{b.Here()}
	a := &Arrangement{Field: p.field(b.name, b.medium), From: FromFeedthrough, Of: b.Name.V}
	if a.Err = b.check(d); a.Err != nil {
		return a
	}
	wall := d.hole + max(4*(d.hole-d.pin), 2*d.length)
	top := d.half + d.length + max(3*(d.hole-d.pin), d.length)
	a.Electrodes = []chain.Electrode{b.live(p, at(d.pin, 0), at(d.pin, top)), b.earthed(p, d.plate(wall, top)...)}
	a.Boundary = []chain.Boundary{p.natural(at(d.pin, top), at(wall, top)), p.natural(at(d.pin, 0), at(d.hole, 0))}
	if d.outer > 0 {
		a.Err = b.insulate(a, d)
	}
	a.Assumed = append(a.Assumed, fmt.Sprintf("%s: the pin goes on beyond the sleeve, an earthed wall stands at %s, ribs are left out", b.name, quantity.Text(wall)))
	return a
}

func (b throughBuilder) check(d throughSizes) error {
	switch {
	case !b.PlateThickness.Set():
		return lack.Key(b.PlateThickness.Key)
	case d.edge > d.half:
		return lack.Range("an edge of %s on both faces does not go into a plate of %s", quantity.Text(d.edge), quantity.Text(2*d.half))
	case d.pin <= 0 || d.hole <= d.pin || d.half <= 0 || d.edge < 0 || d.length <= 0:
		return lack.Range("a feedthrough needs a pin in a hole of a plate")
	case d.fills() && !b.Sleeve.JointWidth.Set():
		return lack.Because("a sleeve that fills its hole leaves a wedge of no width at the rounded edge: where its filling ends is not given", b.Sleeve.JointWidth.Key)
	case d.fills() && d.joint >= d.edge:
		return lack.Range("a joint filled to a width of %s is wider than the edge of %s", quantity.Text(d.joint), quantity.Text(d.edge))
	case d.outer > 0 && !(d.bore >= d.pin && d.outer > d.bore && d.outer <= d.hole):
		return lack.Range("the sleeve does not go between pin and hole")
	}
	return nil
}

// live is the pin, negative where only the size of its voltage is known: a gun's is.
func (b throughBuilder) live(p pen, marks ...mark) chain.Electrode {
	if b.Voltage.Set() {
		return p.held(Pin, -b.Voltage.V, marks...)
	}
	return p.at(Pin, b.Node.V, marks...)
}

func (b throughBuilder) earthed(p pen, marks ...mark) chain.Electrode {
	if b.Voltage.Set() {
		return p.held(Plate, 0, marks...)
	}
	return p.at(Plate, b.To.Or("ground"), marks...)
}

// plate is the hole's wall, its edge, the face and the far wall.
func (d throughSizes) plate(wall, top quantity.Length) []mark {
	if d.edge == 0 {
		return []mark{at(d.hole, 0), at(d.hole, d.half), at(wall, d.half), at(wall, top)}
	}
	return []mark{at(d.hole, 0), at(d.hole, d.half-d.edge), arc(d.hole+d.edge, d.half, d.hole+d.edge, d.half-d.edge, "right"), at(wall, d.half), at(wall, top)}
}

// insulate puts the sleeve in, and the gaps on both sides of it that another medium
// fills.
func (b throughBuilder) insulate(a *Arrangement, d throughSizes) error {
	p := pen{b.Sleeve.Here()}
	end := d.half + d.length
	eps, rho, err := insulation(b.Sleeve)
	if err != nil {
		return err
	}
	body := p.ring(Sleeve, eps, d.bore, d.outer, end)
	if d.fills() {
		body.Profile = p.outline(d.joined(end)...)
	}
	if rho > 0 {
		body.Resistivity = given(p, rho)
	}
	body.Material, body.Strength, body.TestedThickness = b.Sleeve.Material, b.Sleeve.Strength, b.Sleeve.TestedThickness
	a.Dielectrics = append(a.Dielectrics, body)
	if fill := b.Sleeve.InnerGap; d.bore > d.pin && fill.Set() && fill.V != b.medium {
		gap := p.ring(InnerGap, 1, d.pin, d.bore, end)
		gap.Fill = fill
		a.Dielectrics = append(a.Dielectrics, gap)
	}
	if fill := b.Sleeve.OuterGap; d.outer < d.hole && fill.Set() && fill.V != b.medium {
		gap := p.ring(OuterGap, 1, d.outer, d.hole, d.half-d.edge)
		gap.Fill = fill
		a.Dielectrics = append(a.Dielectrics, gap)
	}
	return nil
}

// joined is the outline of a sleeve that fills its hole: its filling follows the rounded
// edge to where the wedge beside it is as wide as described.
func (d throughSizes) joined(end quantity.Length) []mark {
	turn := math.Acos(1 - float64(d.joint/d.edge))
	up := d.half - d.edge + d.edge*quantity.Length(math.Sin(turn))
	return []mark{at(d.bore, 0), at(d.hole, 0), at(d.hole, d.half-d.edge), arc(d.hole+d.joint, up, d.hole+d.edge, d.half-d.edge, "right"), at(d.hole, up), at(d.hole, end), at(d.bore, end), at(d.bore, 0)}
}

// fills reports whether the sleeve fills a hole with rounded edges.
func (d throughSizes) fills() bool {
	return d.edge > 0 && d.outer > 0 && quantity.AtLeast(d.outer, d.hole)
}

// ring is a body from the middle of the plate to a height.
func (p pen) ring(name string, eps float64, inner, outer, end quantity.Length) chain.Dielectric {
	return chain.Dielectric{Name: given(p, name), Permittivity: given(p, eps),
		Profile: p.outline(at(inner, 0), at(outer, 0), at(outer, end), at(inner, end), at(inner, 0))}
}

// dimensions are the sizes by name, each with the side it would make.
func (b throughBuilder) dimensions(d throughSizes) (all []Dimension) {
	add := func(name, key string, size func(*throughSizes) *quantity.Length) {
		all = append(all, Dimension{Name: name, Key: key, Value: *size(&d), With: func(v quantity.Length) *Arrangement {
			other := d
			*size(&other) = v
			return b.arrangement(other)
		}})
	}
	add("pin radius", b.Pin.Radius.Key, func(d *throughSizes) *quantity.Length { return &d.pin })
	all = append(all, Dimension{Name: "plate thickness", Key: b.PlateThickness.Key, Value: 2 * d.half, With: func(v quantity.Length) *Arrangement {
		other := d
		other.half = v / 2
		return b.arrangement(other)
	}})
	add("length of the "+b.side, b.lengthKey, func(d *throughSizes) *quantity.Length { return &d.length })
	all = append(all, Dimension{Name: "hole radius", Key: b.Hole.Radius.Key, Value: d.hole, With: func(v quantity.Length) *Arrangement {
		other := d
		if other.hole = v; quantity.AtLeast(d.outer, d.hole) {
			other.outer = v // the sleeve goes on filling it
		}
		return b.arrangement(other)
	}})
	add("edge radius of the hole", b.Hole.EdgeRadius.Key, func(d *throughSizes) *quantity.Length { return &d.edge })
	if !(d.edge > 0) {
		corner := complex(float64(d.hole), float64(d.half))
		all[len(all)-1].Near = &corner
	}
	if d.outer > 0 && d.bore > d.pin {
		add("bore of the sleeve", b.Sleeve.InnerRadius.Key, func(d *throughSizes) *quantity.Length { return &d.bore })
	}
	if d.fills() {
		add("width of the joint", b.Sleeve.JointWidth.Key, func(d *throughSizes) *quantity.Length { return &d.joint })
	}
	if d.outer > 0 && d.outer < d.hole {
		add("outer radius of the sleeve", b.Sleeve.OuterRadius.Key, func(d *throughSizes) *quantity.Length { return &d.outer })
	}
	return all
}
