package drawing

import (
	"kilovet/reports/digest"
	"kilovet/rules/diagram"
)

// Sizes of the gun's part of the drawing.
const (
	biasDrop   = 30 // from the line of the control electrode to that of the cathode
	heaterArm  = 17 // from the cathode to each end of the filament
	tubeRadius = 9  // half the height of the electrodes
)

// gunPlan is where the pieces of the gun stand, from the place where the output enters.
type gunPlan struct {
	bias    []float64 // x of what lies between control electrode and cathode
	hanging []float64 // x of what hangs at the cathode
	heater  float64   // x of the cathode's junction
	supply  float64   // x of the heater's supply
	tube    float64   // x of the left edge of the tube
	width   float64
}

// gunZone draws what the output feeds: it ends the rail.
func (s *sheet) gunZone(g *diagram.Gun) zone {
	plan := s.planGun(g)
	over := 0.0
	if !g.Same {
		_, over = s.labelSize(s.nodeLabel(g.Control))
	}
	under := float64(biasDrop + heaterArm + leading)
	if len(plan.hanging) > 0 {
		under = biasDrop + drop + earthDepth
		if g.Heater.Mains != nil {
			under += drop
		}
	}
	return zone{width: plan.width, over: over + 1, under: under, ends: true, draw: func(origin at) { s.gun(g, plan, origin) }}
}

func (s *sheet) planGun(g *diagram.Gun) gunPlan {
	var plan gunPlan
	label, _ := s.labelSize(s.nodeLabel(g.Control))
	cathode, _ := s.labelSize(s.nodeLabel(g.Cathode))
	x, low := 5+cathode, 8.0
	for i := range g.Bias {
		plan.bias = append(plan.bias, x)
		x += s.uprightWidth(&g.Bias[i])
	}
	if h := g.Heater; h != nil {
		for _, p := range []*diagram.Part{h.Feed, h.Stray} {
			if p != nil {
				plan.hanging = append(plan.hanging, low)
				low += s.hangingWidth(h, p)
			}
		}
	}
	plan.heater = max(x, low, 4+label)
	plan.tube = plan.heater
	if h := g.Heater; h != nil {
		plan.supply = plan.heater + s.armWidth(h)
		plan.tube = plan.supply + s.uprightWidth(&h.Supply)
	}
	plan.width = plan.tube + 44
	return plan
}

// hangingWidth is the room of what hangs at the cathode; the feed has its mains below.
func (s *sheet) hangingWidth(h *diagram.Heater, p *diagram.Part) float64 {
	width := s.uprightWidth(p)
	if p == h.Feed && h.Mains != nil {
		width = max(width, s.uprightWidth(h.Mains))
	}
	return width
}

// armWidth is the room of the centre resistors or of the lines that stand for them.
func (s *sheet) armWidth(h *diagram.Heater) float64 {
	a, _ := s.labelSize(s.nodeLabel(h.A))
	b, _ := s.labelSize(s.nodeLabel(h.B))
	width := max(a, b) + 6
	for i := range h.Centre {
		width = max(width, s.uprightWidth(&h.Centre[i]))
	}
	return width
}

func (s *sheet) gun(g *diagram.Gun, plan gunPlan, origin at) {
	cathode := origin.plus(0, -biasDrop)
	s.feedGun(g, plan, origin, cathode)
	for i, x := range plan.bias {
		s.between(&g.Bias[i], origin.plus(x, 0), cathode.plus(x, 0), "cathode")
	}
	if g.Heater != nil {
		s.heater(g.Heater, plan, cathode)
	}
	s.tube(g, plan, origin, cathode)
}

// feedGun draws the lines of the control electrode and of the cathode, and which of
// them the output feeds.
func (s *sheet) feedGun(g *diagram.Gun, plan gunPlan, origin, cathode at) {
	s.above(cathode.plus(2, 0.8), toRight, s.nodeLabel(g.Cathode))
	if g.Same || g.FedCathode {
		s.line(origin, cathode)
	}
	s.line(cathode, cathode.plus(plan.heater, 0))
	switch {
	case g.Same && g.Emission == nil:
	case g.Same:
		s.line(origin, origin.plus(plan.tube+14, 0))
	default:
		start := origin
		if g.FedCathode && len(plan.bias) > 0 {
			start = origin.plus(plan.bias[0], 0)
		}
		s.line(start, origin.plus(plan.tube+14, 0))
		s.above(start.plus(1, 1), toRight, s.nodeLabel(g.Control))
		if !g.FedCathode {
			s.dot(start)
			s.line(cathode.plus(plan.first(), 0), cathode)
		}
	}
}

// first is the x of the first thing between the lines.
func (p gunPlan) first() float64 {
	if len(p.bias) > 0 {
		return p.bias[0]
	}
	return p.heater
}

// between draws an upright part between two lines, with dots and a label to the right;
// high names the node at its lower end.
func (s *sheet) between(p *diagram.Part, top, bottom at, low string) {
	if p.From == low {
		s.part(p, bottom, top)
	} else {
		s.part(p, top, bottom)
	}
	s.dot(top)
	s.dot(bottom)
	s.beside(at{top.x + hangRoom, (top.y + bottom.y) / 2}, toRight, s.label(p))
}

// heater draws the centre resistors, the floating supply and what couples it to ground.
func (s *sheet) heater(h *diagram.Heater, plan gunPlan, cathode at) {
	junction := cathode.plus(plan.heater, 0)
	a, b := junction.plus(0, heaterArm), junction.plus(0, -heaterArm)
	if len(h.Centre) == 2 {
		s.arm(&h.Centre[0], a, junction)
		s.arm(&h.Centre[1], b, junction)
	} else {
		s.line(junction, a)
	}
	s.dot(junction)
	supply := plan.supply - plan.heater
	s.line(a, a.plus(supply, 0))
	s.above(a.plus(1, 0.5), toRight, s.nodeLabel(h.A))
	if len(h.Centre) == 2 {
		s.line(b, b.plus(supply, 0))
	} else {
		b = b.plus(supply, 0)
	}
	s.stacked(b.plus(1, -0.5), toRight, s.nodeLabel(h.B))
	s.between(&h.Supply, cathode.plus(plan.supply, heaterArm), cathode.plus(plan.supply, -heaterArm), "heater.b")
	s.cathodeHangings(h, plan, cathode)
}

// arm draws a centre resistor from an end of the filament to the cathode.
func (s *sheet) arm(p *diagram.Part, end, junction at) {
	s.part(p, end, junction)
	s.beside(at{end.x + hangRoom, (end.y + junction.y) / 2}, toRight, s.label(p))
}

// cathodeHangings draws the feed with the mains behind it, and the stray to ground.
func (s *sheet) cathodeHangings(h *diagram.Heater, plan gunPlan, cathode at) {
	i := 0
	for _, p := range []*diagram.Part{h.Feed, h.Stray} {
		if p == nil {
			continue
		}
		top := cathode.plus(plan.hanging[i], 0)
		i++
		s.dot(top)
		s.upright(p, top, "cathode")
		end := top.plus(0, -drop)
		if p == h.Feed && h.Mains != nil {
			s.upright(h.Mains, end, "ground")
			end = end.plus(0, -drop)
		}
		s.earth(end)
	}
}

// tube draws cathode, control electrode and anode, with the beam.
func (s *sheet) tube(g *diagram.Gun, plan gunPlan, origin, cathode at) {
	left := cathode.plus(plan.tube, 0)
	s.filament(g, plan, cathode)
	if g.Emission == nil {
		s.write(left.plus(12, 0), toRight, named, "no gun fitted")
		return
	}
	control, anode := left.plus(14, 0), left.plus(25, 0)
	s.envelope(left.plus(3, tubeRadius+3), left.plus(31, -tubeRadius-3))
	s.electrode(control, 2.4)
	s.line(control.plus(0, tubeRadius), at{control.x, origin.y})
	s.electrode(anode, 1.6)
	s.line(anode.plus(0, -tubeRadius), anode.plus(0, -tubeRadius-5))
	s.earth(anode.plus(0, -tubeRadius-5))
	s.brokenLine(left.plus(10.5, 0), left.plus(37, 0))
	s.fill(ink, left.plus(38.5, 0), left.plus(36.5, 0.9), left.plus(36.5, -0.9))
	name := label{names: []string{g.Emission.Name}, value: digest.Clean(g.Emission.Value), flag: s.flagOf(g.Emission.Mark, true), of: g.Emission.Name}
	s.above(left.plus(17, tubeRadius+4), toRight, name)
}

// filament draws the emitting tip and its leads.
func (s *sheet) filament(g *diagram.Gun, plan gunPlan, cathode at) {
	left := cathode.plus(plan.tube, 0)
	if g.Heater == nil {
		s.line(cathode.plus(plan.heater, 0), left.plus(9, 0))
		s.heavyLine(left.plus(9, 1.6), left.plus(10.2, 0), left.plus(9, -1.6))
		return
	}
	for _, side := range []float64{1, -1} {
		end := cathode.plus(plan.supply, side*heaterArm)
		s.line(end, at{left.x, end.y}, left.plus(0, side*3), left.plus(6, side*3))
		s.heavyLine(left.plus(6, side*3), left.plus(10, 0))
	}
}

// electrode draws a plate with a hole.
func (s *sheet) electrode(middle at, hole float64) {
	s.heavyLine(middle.plus(0, hole), middle.plus(0, tubeRadius))
	s.heavyLine(middle.plus(0, -hole), middle.plus(0, -tubeRadius))
}

// envelope draws the vacuum vessel with rounded corners.
func (s *sheet) envelope(upperLeft, lowerRight at) {
	const r = 4.0
	x0, y0, x1, y1 := upperLeft.x, lowerRight.y, lowerRight.x, upperLeft.y
	path := lines([]at{{x0 + r, y0}, {x1 - r, y0}}, false)
	corner := func(control, to at) { path.QuadTo(control.point(), to.point()) }
	corner(at{x1, y0}, at{x1, y0 + r})
	path.Line(at{x1, y1 - r}.point())
	corner(at{x1, y1}, at{x1 - r, y1})
	path.Line(at{x0 + r, y1}.point())
	corner(at{x0, y1}, at{x0, y1 - r})
	path.Line(at{x0, y0 + r}.point())
	corner(at{x0, y0}, at{x0 + r, y0})
	s.stroke(path, fine, nil)
}
