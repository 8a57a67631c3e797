package circuit

import (
	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// gun adds bias, control electrode and emission. Without [bias] control electrode
// and cathode are the output.
func (m *maker) gun() {
	if m.chain.Gun.EarthedCathode() {
		m.link("anode lead", "output", "anode")
	}
	if m.chain.Gun == nil && m.chain.Bias == nil {
		if m.chain.Heater != nil {
			m.link("cathode lead", "output", "cathode")
		}
		return
	}
	m.bias()
	if m.chain.Gun.IsFitted() {
		// Electrons leave the cathode for the anode: the current flows from anode to cathode.
		m.add(Element{Name: "gun", Kind: Sink, Role: Load, Current: m.setting.Emission, Place: m.chain.Gun.Here()}, m.anode(), "cathode")
	}
}

// anode is the node the electrons go to.
func (m *maker) anode() string {
	if m.chain.Gun.EarthedCathode() {
		return "anode"
	}
	return "ground"
}

// feeding is the node that the fed electrode hangs on: the output, or ground where the
// output feeds the anode.
func (m *maker) feeding() string {
	if m.chain.Gun.EarthedCathode() {
		return "ground"
	}
	return "output"
}

func (m *maker) bias() {
	b, feeding := m.chain.Bias, m.feeding()
	if b == nil {
		m.link("cathode lead", feeding, "cathode")
		m.link("control lead", feeding, "control")
		return
	}
	if b.Fed.Or("control") == "control" {
		m.link("control lead", feeding, "control")
	} else {
		m.link("cathode lead", feeding, "cathode")
	}
	if b.Kind.V == "fixed" {
		m.add(Element{Name: "bias.source", Kind: Source, Role: Series, Permanent: true, Wave: Wave{Direct, b.Voltage.V, 0}, Place: b.Here()}, "cathode", "control")
	}
	if b.Resistor != nil {
		m.resistor("bias.resistor", "cathode", "control", Series, b.Resistor, true)
	}
	if b.Bypass != nil {
		m.capacitor("bias.bypass", "cathode", "control", Shunt, b.Bypass, 0)
	}
	if b.Clamp != nil {
		m.clamp("bias.clamp", "cathode", "control", b.Clamp, true)
	}
}

// heater adds the filament, its supply, the centre resistors and the feed.
func (m *maker) heater() {
	h := m.chain.Heater
	if h == nil {
		return
	}
	m.filament(h)
	m.stray("heater.capacitance_to_ground", "cathode", "ground", h.CapacitanceToGround.V, h.CapacitanceToGround.Place)
	m.feed(h.Feed)
}

func (m *maker) filament(h *chain.Heater) {
	if r := h.CentreResistors; r != nil {
		m.centre("heater.centre_resistors.1", "heater.a", r.Value.V[0], r)
		m.centre("heater.centre_resistors.2", "heater.b", r.Value.V[1], r)
	} else {
		m.link("heater return", "heater.a", "cathode")
	}
	// heater.a is the positive end; an AC heater has no mean, its swing is reckoned apart.
	wave := Wave{Direct, h.Voltage.V, 0}
	if h.Supply.V == "ac" {
		wave = Wave{Sine, rms(h.Voltage.V), h.Frequency.Or(m.mainsFrequency())}
	}
	m.add(Element{Name: "heater.supply", Kind: Source, Role: Floating, Permanent: true, Wave: wave, Place: h.Here()}, "heater.a", "heater.b")
}

func (m *maker) centre(name, end string, value quantity.Resistance, r *chain.CentreResistors) {
	value *= quantity.Resistance(m.setting.factor(name, r.Tolerance))
	m.add(Element{Name: name, Kind: Resistor, Role: Floating, Resistance: value, Permanent: true, Place: r.Here()}, end, "cathode")
}

// feed adds the common mode of the earthed side and the capacitance of the isolation
// transformer; of that a screen takes all but a part to ground.
func (m *maker) feed(f *chain.Feed) {
	if f == nil || f.Kind.V == "battery" {
		return
	}
	m.add(Element{Name: "mains", Kind: Source, Role: Floating, Permanent: true, Place: f.Here(),
		Wave: Wave{Sine, rms(f.CommonMode.V), m.mainsFrequency()}}, "mains", "ground")
	through := f.Capacitance.V
	if f.Screen.V {
		through /= ScreenFactor
		m.stray("heater.feed.screen", "cathode", "ground", f.Capacitance.V-through, f.Capacitance.Place)
	}
	m.stray("heater.feed", "mains", "cathode", through, f.Capacitance.Place)
}

func (m *maker) mainsFrequency() quantity.Frequency {
	if m.chain.Site == nil {
		return 0
	}
	return m.chain.Site.MainsFrequency.V
}

// parts adds the loose parts.
func (m *maker) parts() {
	for i := range m.chain.Parts {
		p := &m.chain.Parts[i]
		e := Element{Name: "part." + p.Name.V, Role: Series, LoosePart: p, Place: p.Here()}
		// What drains a node to ground is a load, and unplugged unless said otherwise.
		drains := (p.Kind.V == "resistor" || p.Kind.V == "meter") && (p.From.V == "ground" || p.To.V == "ground")
		e.Permanent = p.Permanent.Or(!drains)
		switch {
		case drains:
			e.Role = Load
		case p.Kind.V == "capacitor":
			e.Role = Shunt
		}
		m.value(&e, p)
		m.add(e, p.From.V, p.To.V)
	}
}

// value fills in what kind of element a loose part is.
func (m *maker) value(e *Element, p *chain.Part) {
	scale := m.setting.factor(e.Name, p.Tolerance)
	e.Doubt = unvalued(p)
	switch p.Kind.V {
	case "resistor":
		e.Kind, e.Resistance = Resistor, quantity.Resistance(amount[quantity.Resistance](p.Value)*scale)
	case "meter":
		e.Kind, e.Resistance = Resistor, p.Resistance.V
	case "capacitor":
		e.Kind, e.Capacitance = Capacitor, quantity.Capacitance(amount[quantity.Capacitance](p.Value)*scale)
	case "inductor":
		e.Kind, e.Inductance = Inductor, quantity.Inductance(amount[quantity.Inductance](p.Value)*scale)
	case "diode":
		e.Kind = Diode
		e.Rectifier = Rectifier{Drop: p.ForwardDrop.V, On: p.Resistance.V, Junction: p.Capacitance.V, Leakage: conductance(p.Leakage.V, p.RatedVoltage.V)}
	default:
		e.Kind, e.Role, e.Strikes = Gap, Limiter, quantity.Voltage(amount[quantity.Voltage](p.Value))
	}
}

// unvalued is the doubt about a part whose value was not given.
func unvalued(p *chain.Part) *lack.Lack {
	switch {
	case p.Kind.V == "diode":
		return nil
	case p.Kind.V == "meter" && !p.Resistance.Set():
		return lack.Key(p.Resistance.Key)
	case p.Kind.V != "meter" && !p.Value.Set():
		return lack.Key(p.Value.Key)
	}
	return nil
}

// amount reads the value of a loose part; the description was checked when it was read.
func amount[Q quantity.Number](text document.Given[string]) float64 {
	var q Q
	v, err := q.Dimension().Parse(text.V)
	if err != nil && text.Set() {
		panic("circuit: unchecked value " + text.V)
	}
	return v
}
