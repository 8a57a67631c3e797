package chain

import (
	"slices"
	"strconv"
	"strings"

	"kilovet/hv/document"
	"kilovet/hv/quantity"
)

func lineOf(p document.Place) string { return strconv.Itoa(p.Line) }

// checkSpacings asks of each spacing for two nodes or a voltage, not both.
func checkSpacings(s *survey) {
	for i := range s.Spacings {
		sp := &s.Spacings[i]
		s.spacingEnds(sp)
		s.tested(sp.TestedVoltage, sp.TestedLength)
		s.strengthOf(sp.Strength, sp.TestedThickness)
		s.spacingMedium(sp)
		s.sharperOf(sp)
	}
}

func (s *survey) spacingEnds(sp *Spacing) {
	const either = `give from and to, or voltage, as in voltage = "20 kV"`
	from, to, voltage := sp.From.Set(), sp.To.Set(), sp.Voltage.Set()
	switch {
	case voltage && (from || to):
		s.fault(sp.Voltage.Place, "both nodes and a voltage", "keep from and to, or voltage")
	case sp.Also.Set() && !from && !to && voltage:
		s.fault(sp.Also.Place, "further nodes to a spacing that is between none", "give from and to in place of voltage, or leave it out")
	case from && s.lacks(sp.To.Place):
		s.fault(sp.From.Place, "from without to", either)
	case to && s.lacks(sp.From.Place):
		s.fault(sp.To.Place, "to without from", either)
	case s.lacks(sp.From.Place) && s.lacks(sp.To.Place) && s.lacks(sp.Voltage.Place):
		s.fault(sp.Here(), "neither nodes nor a voltage", either)
	case from && s.without(s.Multiplier != nil) && !sp.ofMains():
		s.fault(sp.From.Place, "without a multiplier nothing tells the voltage between two nodes other than mains and ground", `give voltage in place of from and to, as in voltage = "20 kV"`)
	case from && sp.From.V == sp.To.V && s.sound(sp.To.Place):
		s.fault(sp.To.Place, "both sides on the same node", "name the node of the other side")
	}
}

// ofMains reports whether a spacing is between the mains and ground alone, whose voltage
// [site] tells.
func (sp *Spacing) ofMains() bool {
	return !slices.ContainsFunc(append([]string{sp.From.V, sp.To.V}, sp.Also.V...), func(node string) bool { return node != "mains" && node != "ground" })
}

// spacingMedium reports keys that another medium has.
func (s *survey) spacingMedium(sp *Spacing) {
	if !s.sound(sp.Medium.Place) {
		return
	}
	for _, k := range []struct {
		leaf   document.Leaf
		medium string
	}{
		{sp.Board, "printed board"}, {sp.Finish, "vacuum"}, {sp.Conditioned, "vacuum"}, {sp.StressedArea, "vacuum"}, {sp.JunctionAngle, "vacuum"},
		{sp.Shielded, "vacuum"}, {sp.Strength, "solid"}, {sp.OilTest, "oil"},
	} {
		if k.leaf.Set() && sp.Medium.V != k.medium {
			s.fault(k.leaf.Here(), "a key of spacings in "+k.medium+", not in "+sp.Medium.V, "leave it out, or correct the medium")
		}
	}
}

// size is one size of a shape.
type size struct {
	key   string
	given document.Given[quantity.Length]
}

func (sh *Shape) sizes() []size {
	return []size{{"inner_radius", sh.InnerRadius}, {"outer_radius", sh.OuterRadius}, {"radius", sh.Radius}, {"tip_radius", sh.TipRadius}, {"edge_radius", sh.EdgeRadius},
		{"body_radius", sh.BodyRadius}, {"wall_radius", sh.WallRadius}}
}

// sizesOf are the sizes that each kind of shape has, all needed.
var sizesOf = map[string][]string{
	"plates":             {},
	"coaxial":            {"inner_radius", "outer_radius"},
	"concentric spheres": {"inner_radius", "outer_radius"},
	"sphere-plane":       {"radius"},
	"sphere-sphere":      {"radius"},
	"cylinder-plane":     {"radius"},
	"parallel cylinders": {"radius"},
	"point-plane":        {"tip_radius"},
	"rounded edge":       {"edge_radius"},
}

func checkShapes(s *survey) {
	for i := range s.Spacings {
		s.shapeOf(s.Spacings[i].Shape, s.Spacings[i].Clearance)
		s.shapeField(s.Spacings[i].Shape, s.Spacings[i].Clearance, s.Spacings[i].Medium)
	}
	for i := range s.Feedthroughs {
		f := &s.Feedthroughs[i]
		if f.AirSide != nil {
			s.shapeOf(f.AirSide.Shape, f.AirSide.Clearance)
			s.shapeField(f.AirSide.Shape, f.AirSide.Clearance, document.Given[string]{})
		}
		if f.VacuumSide != nil {
			s.shapeOf(f.VacuumSide.Shape, f.VacuumSide.Length)
			s.shapeField(f.VacuumSide.Shape, f.VacuumSide.Length, document.Given[string]{})
		}
	}
}

// shapeOf judges a shape beside its clearance.
func (s *survey) shapeOf(sh *Shape, clearance document.Given[quantity.Length]) {
	if sh == nil || !s.sound(sh.Kind.Place) {
		return
	}
	s.shapeSizes(sh)
	s.shapeGap(sh, clearance)
}

func (s *survey) shapeSizes(sh *Shape) {
	kind := sh.Kind.V
	wanted, more := sh.sizesOf()
	for _, size := range sh.sizes() {
		belongs := slices.Contains(wanted, size.key)
		switch {
		case belongs && s.lacks(size.given.Place):
			s.fault(sh.Here(), "a shape of kind "+quoted(kind)+" without "+size.key, "give "+size.key+`, as in `+size.key+` = "3 mm"`)
		case !belongs && !slices.Contains(more, size.key) && size.given.Set():
			s.fault(size.given.Place, "no size of a shape of kind "+quoted(kind), "sizes of this kind: "+orNone(append(wanted, more...)))
		}
	}
	if sh.Earthed.Set() && kind != "sphere-plane" && kind != "sphere-sphere" {
		s.fault(sh.Earthed.Place, "only spheres are judged by whether one is earthed", "leave it out")
	}
}

func orNone(words []string) string {
	if len(words) == 0 {
		return "none"
	}
	return strings.Join(words, ", ")
}

// shapeGap holds the radii of a coaxial or spherical gap against its clearance.
func (s *survey) shapeGap(sh *Shape, clearance document.Given[quantity.Length]) {
	inner, outer := sh.InnerRadius, sh.OuterRadius
	if len(sizesOf[sh.Kind.V]) != 2 || !s.sound(inner.Place) || !s.sound(outer.Place) {
		return
	}
	if quantity.AtLeast(inner.V, outer.V) {
		s.fault(outer.Place, "the outer radius is not larger than the inner one", "give the outer radius of the gap")
		return
	}
	gap := outer.V - inner.V
	if s.sound(clearance.Place) && !near(gap, clearance.V) {
		s.fault(clearance.Place, "the radii of the shape leave a gap of "+quantity.Text(gap), "the clearance is the outer less the inner radius, within 1 %")
	}
}

// near reports whether a gap agrees with a clearance within 1 %, common practice of
// rounding in drawings.
func near(gap, clearance quantity.Length) bool {
	return quantity.AtMost(max(gap-clearance, clearance-gap), clearance/100)
}
