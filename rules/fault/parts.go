package fault

import (
	"strings"

	"kilovet/hv/chain"
	"kilovet/hv/circuit"
	"kilovet/rules/evidence"
)

// lister gathers the faults of a chain.
type lister struct {
	chain   *chain.Chain
	circuit *circuit.Circuit
	all     []Fault
}

func (l *lister) add(f Fault) {
	if f.loop == evidence.Held {
		f.loop = evidence.Reads
	}
	if f.Name == "" {
		f.Name = f.Part + " " + string(f.Kind)
	}
	l.all = append(l.all, f)
}

// element lists the faults of one part.
func (l *lister) element(el circuit.Element) {
	switch {
	case el.Kind == circuit.Diode:
		l.diode(el.Name)
	case el.Kind == circuit.Resistor && (el.ResistorPart != nil || loose(el) || el.Role == circuit.Floating):
		l.resistor(el)
	case el.Kind == circuit.Capacitor && (el.CapacitorPart != nil || loose(el)):
		l.capacitor(el)
	case el.Kind == circuit.Inductor && loose(el):
		l.pair(el.Name, "inductor", addSeries)
	case el.Kind == circuit.Gap:
		l.gap(el)
	case el.Kind == circuit.Sink && el.Name != "gun" || el.Kind == circuit.Resistor && strings.HasPrefix(el.Name, "load."):
		l.open(el.Name, "load open", "")
	case el.Name == "bias.source":
		l.pair(el.Name, "bias source", addBias)
	}
}

// loose reports whether an element is a loose part other than a meter.
func loose(el circuit.Element) bool { return el.LoosePart != nil && el.LoosePart.Kind.V != "meter" }

func (l *lister) open(name, class, add string) {
	l.add(Fault{Class: class, Part: name, Kind: Open, Add: add, whole: true, edit: func(c *circuit.Circuit) *circuit.Circuit { return c.Open(name) }})
}

func (l *lister) short(name, class, add string) {
	l.add(Fault{Class: class, Part: name, Kind: Shorted, Add: add, whole: true, edit: func(c *circuit.Circuit) *circuit.Circuit { return c.Short(name) }})
}

// pair lists a part open and shorted.
func (l *lister) pair(name, what, add string) {
	l.open(name, what+" open", add)
	l.short(name, what+" shorted", add)
}

func (l *lister) diode(name string) {
	l.open(name, "diode open", addDiode)
	l.short(name, "diode shorted", addDiode)
	l.add(Fault{Class: "diode reversed", Part: name, Kind: Reversed, Add: addPolarity, edit: func(c *circuit.Circuit) *circuit.Circuit { return c.Reverse(name) }})
}

func (l *lister) capacitor(el circuit.Element) {
	what, add := "capacitor", addCapacitor
	switch {
	case el.Role == circuit.Ladder:
		what = "ladder capacitor"
	case el.Name == "bias.bypass":
		what, add = "bias bypass", addBias
	case strings.HasPrefix(el.Name, "filter."):
		what = "filter capacitor"
	}
	l.add(Fault{Class: what + " open", Part: el.Name, Kind: Open, Add: add, whole: true,
		edit: func(c *circuit.Circuit) *circuit.Circuit { return c.Broken(el.Name) }})
	l.short(el.Name, what+" shorted", add)
}

// resistor lists a resistor open and shorted, one of several strings open, and one of
// several elements shorted.
func (l *lister) resistor(el circuit.Element) {
	what, add := nameOf(el)
	l.pair(el.Name, what, add)
	if el.ResistorPart == nil {
		return
	}
	count, strings := el.ResistorPart.Elements()
	if strings > 1 {
		l.add(Fault{Name: el.Name + ": one string open", Class: what + ": one string open", Part: el.Name, Kind: Open, Add: add,
			edit: func(c *circuit.Circuit) *circuit.Circuit { return c.OpenString(el.Name) }})
	}
	if count > 1 {
		l.add(Fault{Name: el.Name + ": one element shorted", Class: what + ": one element shorted", Part: el.Name, Kind: Shorted, Add: add,
			edit: oneOff(el.Name, 0)})
	}
}

// oneOff is a resistor of which one element is a number of times its value.
func oneOff(name string, times float64) func(*circuit.Circuit) *circuit.Circuit {
	return func(c *circuit.Circuit) *circuit.Circuit { return c.OneOff(name, times) }
}

func nameOf(el circuit.Element) (what, add string) {
	switch {
	case el.Name == "divider.upper":
		return "divider upper arm", addUpper
	case el.Name == "divider.lower":
		return "divider lower arm", addLower
	case el.Name == "bias.resistor":
		return "bias resistor", addBias
	case strings.HasPrefix(el.Name, "bleeder."):
		return "bleeder", addBleeder
	case strings.HasPrefix(el.Name, "filter."):
		return "filter resistor", addSeries
	case el.Name == "cable.gun_end_resistor":
		return "gun-end resistor", addSeries
	case el.Role == circuit.Floating:
		return "centre resistor", addHeater
	}
	return "resistor", addSeries
}

// gap lists a clamp or gap that conducts for good, and one that never does.
func (l *lister) gap(el circuit.Element) {
	name := el.Name
	l.short(name, "clamp shorted", addClamp)
	l.open(name, "clamp open", addClamp)
}
