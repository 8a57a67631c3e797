package fault

import (
	"fmt"
	"slices"

	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
)

// connections lists leads, links and cables that come loose.
func (l *lister) connections() {
	links := l.circuit.Links()
	if slices.Contains(links, "multiplier return") {
		l.add(Fault{Name: "multiplier return open", Class: "return or earth open", Part: "multiplier return", Kind: Open, Add: addReturn,
			edit: (*circuit.Circuit).Unreturned, Lifts: []string{"foot"}})
	}
	l.add(Fault{Name: "earth link open", Class: "return or earth open", Part: "earth link", Kind: Open, Add: addEarth, edit: (*circuit.Circuit).Unearthed, Lifts: []string{circuit.Chassis}})
	if l.chain.Cable != nil {
		l.add(Fault{Name: "cable screen open", Class: "cable screen open", Part: "cable", Kind: Lost, Add: addCable, edit: unscreened, Lifts: []string{"cable.screen"}})
		l.short("cable", "cable shorted", addCable)
	}
	if d := l.chain.Divider; d != nil && d.Meter != nil {
		l.open("divider.meter", "meter lead open", addMeter)
		l.short("divider.meter", "meter lead shorted", addMeter)
	}
}

// unscreened is the circuit with the screen of the cable loose at both ends: it takes the
// potential of the core through the insulation, and no charge to speak of.
func unscreened(c *circuit.Circuit) *circuit.Circuit {
	return c.Open("cable").Join("cable screen", "cable.screen", "supply")
}

// functions lists what stops working without a part of the circuit being gone.
func (l *lister) functions() {
	if l.chain.Regulation != nil || l.chain.Drive.PeakLimit.Set() {
		l.add(Fault{Name: "regulation lost", Class: "regulation lost", Part: "regulation", Kind: Lost, Add: addRegulation, loop: evidence.RunsAway})
	}
	if l.chain.Regulation != nil {
		l.add(Fault{Name: "feedback lost", Class: "regulation lost", Part: "divider.tap", Kind: Lost, Add: addRegulation, loop: evidence.RunsAway})
	}
	if l.circuit.Element("gun") != nil {
		l.add(Fault{Name: "filament open", Class: "filament open", Part: "gun", Kind: Open, Add: addHeater,
			edit: func(c *circuit.Circuit) *circuit.Circuit { return c.Open("gun") }})
	}
	if h := l.chain.Heater; h != nil && h.Feed != nil && h.Feed.Kind.V != "battery" {
		l.add(Fault{Name: "heater feed breakdown", Class: "heater feed breakdown", Part: "heater.feed", Kind: Shorted, Add: addFeed,
			edit: func(c *circuit.Circuit) *circuit.Circuit { return c.Join("heater feed", "cathode", "mains") }})
	}
}

// arcResistance is that of an arc, far below everything it stands in series with: an
// assumption of this review.
const arcResistance quantity.Resistance = 1

// arcs lists what strikes to ground and stays.
func (l *lister) arcs() {
	for _, node := range []string{"output", "cathode"} {
		if l.distinct(node) {
			l.arc("arc at "+node, "arc", node, addArc)
		}
	}
	if l.chain.Vacuum != nil && l.chain.HasCathode() {
		l.arc("pressure rise", "pressure rise", "cathode", addPressure)
	}
}

// distinct reports whether a name is a node of its own among those that arcs are listed for.
func (l *lister) distinct(node string) bool {
	n, ok := l.circuit.Node(node)
	first, _ := l.circuit.Node("output")
	return ok && n != circuit.Ground && (node == "output" || n != first)
}

func (l *lister) arc(name, class, node, add string) {
	l.add(Fault{Name: name, Class: class, Part: node, Kind: Arc, Add: add,
		edit: func(c *circuit.Circuit) *circuit.Circuit { return c.Bridge("arc", node, "ground", arcResistance) }})
}

// assembly lists what is put together wrongly.
func (l *lister) assembly() {
	l.add(Fault{Name: LadderReversed, Class: "wrong polarity", Part: "multiplier", Kind: Reversed, Assembly: true, Add: addPolarity, edit: reversed})
	if l.chain.Multiplier.Symmetrical() {
		for _, half := range []string{"drive.source.a", "drive.source.b"} {
			l.add(Fault{Name: half + " lost", Class: "half of the drive lost", Part: half, Kind: Lost, edit: func(c *circuit.Circuit) *circuit.Circuit {
				return c.With(half, func(e *circuit.Element) { e.Wave.Amplitude = 0 })
			}})
		}
		l.add(Fault{Name: "halves in phase", Class: "halves in phase", Part: "drive.source.b", Kind: Reversed, Assembly: true, Add: addPhase,
			edit: func(c *circuit.Circuit) *circuit.Circuit {
				return c.With("drive.source.b", func(e *circuit.Element) { e.Wave.Amplitude = -e.Wave.Amplitude })
			}})
	}
	for _, el := range l.circuit.Elements {
		for _, times := range []float64{10, 0.1} {
			l.wrongValue(el, times)
		}
	}
}

// reversed turns every diode of the multiplier round.
func reversed(c *circuit.Circuit) *circuit.Circuit {
	for _, e := range c.Elements {
		if e.Kind == circuit.Diode && e.Role == circuit.Ladder {
			c = c.Reverse(e.Name)
		}
	}
	return c
}

// wrongValue lists a capacitor, or an element of the divider, that is off by a factor.
func (l *lister) wrongValue(el circuit.Element, times float64) {
	f := Fault{Name: fmt.Sprintf("%s %g times its value", el.Name, times), Part: el.Name, Kind: Value, Assembly: true, Add: addValue}
	switch {
	case el.Kind == circuit.Capacitor && el.CapacitorPart != nil:
		f.Class = "capacitor off by ten"
		f.edit = func(c *circuit.Circuit) *circuit.Circuit {
			return c.With(el.Name, func(e *circuit.Element) { e.Capacitance *= quantity.Capacitance(times) })
		}
	case el.Name == "divider.upper" || el.Name == "divider.lower":
		f.Class = "divider element off by ten"
		f.Name = fmt.Sprintf("%s: one element %g times its value", el.Name, times)
		f.edit = oneOff(el.Name, times)
	default:
		return
	}
	l.add(f)
}
