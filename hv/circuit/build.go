package circuit

import (
	"fmt"
	"math"

	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Setting says under which circumstances a circuit is built.
type Setting struct {
	Peak     quantity.Voltage // of the drive, zero to peak, unloaded
	Emission quantity.Current // of the gun; zero when cold
	// Corner scales the value of an element within its tolerance; nil leaves all nominal.
	Corner func(element string, tolerance quantity.Fraction) float64
}

func (s Setting) factor(element string, tolerance document.Given[quantity.Fraction]) float64 {
	if s.Corner == nil {
		return 1
	}
	return s.Corner(element, tolerance.V)
}

// Assumed strays where none are given: common practice, no source.
const (
	AssumedBypass quantity.Capacitance = 0.5e-12 // across a filter resistor
	AssumedPickup quantity.Capacitance = 0.1e-12 // from the coupling column to the output, past a filter
)

// ScreenFactor divides the coupled common mode of a screened feed: an assumption,
// after a maker's figure for shielded transformers (common-mode ratio 1000:1).
const ScreenFactor = 1000

// Build makes the circuit of a chain.
func Build(c *chain.Chain, s Setting) *Circuit {
	b := newBuilder()
	m := maker{builder: b, chain: c, setting: s}
	m.ladder()
	m.filters()
	m.cable()
	m.gun()
	m.heater()
	m.measuring()
	m.loads()
	m.parts()
	return b.circuit()
}

type maker struct {
	*builder
	chain   *chain.Chain
	setting Setting
}

func (m *maker) resistor(name, from, to string, role Role, part *chain.Resistor, permanent bool) {
	value := float64(part.Total()) * m.setting.factor(name, part.Tolerance)
	m.add(Element{Name: name, Kind: Resistor, Role: role, Resistance: quantity.Resistance(value),
		Permanent: permanent, ResistorPart: part, Place: part.Here()}, from, to)
}

// capacitor adds the stage-th value of a capacitor part (0 for a single one).
func (m *maker) capacitor(name, from, to string, role Role, part *chain.Capacitor, stage int) {
	value, doubt := biased(part, stage)
	value *= quantity.Capacitance(m.setting.factor(name, part.Tolerance))
	m.add(Element{Name: name, Kind: Capacitor, Role: role, Capacitance: value, Doubt: doubt,
		Permanent: true, CapacitorPart: part, Place: part.Here()}, from, to)
}

// biased is the capacitance at the part's working voltage: the nominal value of a
// stable dielectric, the stated one of a class-2 ceramic, and a doubt where that is missing.
func biased(part *chain.Capacitor, stage int) (quantity.Capacitance, *lack.Lack) {
	if list := part.ValueAtVoltage; list.Set() {
		return pick(list.V, stage), nil
	}
	if !part.Class2() {
		return pick(part.Value.V, stage), nil
	}
	return pick(part.Value.V, stage), lack.Because(fmt.Sprintf(
		"%s loses capacitance under voltage and %s is not given", part.Dielectric.V, part.ValueAtVoltage.Key), part.ValueAtVoltage.Key)
}

func pick(list []quantity.Capacitance, stage int) quantity.Capacitance {
	if len(list) == 1 {
		return list[0]
	}
	return list[stage]
}

func (m *maker) stray(name, from, to string, value quantity.Capacitance, place document.Place) {
	if value > 0 {
		m.add(Element{Name: name, Kind: Capacitor, Role: Stray, Capacitance: value, Permanent: true, Place: place}, from, to)
	}
}

func (m *maker) filters() {
	at := "multiplier"
	for i := range m.chain.Filters {
		f := &m.chain.Filters[i]
		name := fmt.Sprintf("filter.%d", i+1)
		m.resistor(name+".resistor", at, name, Series, f.Resistor, true)
		m.stray(name+".bypass", at, name, f.BypassCapacitance.Or(AssumedBypass), f.Here())
		if f.Capacitor != nil {
			m.capacitor(name+".capacitor", name, "ground", Shunt, f.Capacitor, 0)
		}
		at = name
	}
	m.link("supply terminal", at, "supply")
}

func (m *maker) cable() {
	cable := m.chain.Cable
	if cable == nil {
		m.link("gun lead", "supply", "output")
		return
	}
	e := Element{Name: "cable", Kind: Capacitor, Role: Shunt, Permanent: true, Place: cable.Here(),
		Capacitance: quantity.Capacitance(float64(cable.Capacitance.V) * float64(cable.Length.V))}
	if !cable.Capacitance.Set() {
		e.Doubt = lack.Key(cable.Capacitance.Key)
	}
	m.add(e, "supply", "ground")
	if cable.GunEndResistor != nil {
		m.resistor("cable.gun_end_resistor", "supply", "output", Series, cable.GunEndResistor, true)
	} else {
		m.link("gun lead", "supply", "output")
	}
}

func (m *maker) measuring() {
	d := m.chain.Divider
	if d == nil {
		return
	}
	permanent := d.Permanent.V
	m.resistor("divider.upper", d.Senses.Or("output"), "divider.tap", Load, d.Upper, permanent)
	m.resistor("divider.lower", "divider.tap", "ground", Load, d.Lower, permanent)
	if d.Meter != nil {
		m.add(Element{Name: "divider.meter", Kind: Resistor, Role: Load, Resistance: d.Meter.Resistance.V, Place: d.Meter.Here()}, "divider.tap", "ground")
	}
	if d.Clamp != nil {
		m.clamp("divider.clamp", "divider.tap", "ground", d.Clamp, permanent)
	}
}

// clamp adds a limiter and its leakage, a conductance read off at the clamp voltage.
func (m *maker) clamp(name, from, to string, c *chain.Clamp, permanent bool) {
	m.add(Element{Name: name, Kind: Gap, Role: Limiter, Strikes: c.Voltage.V, Permanent: permanent, Place: c.Here()}, from, to)
	if c.Leakage.V > 0 {
		m.add(Element{Name: name + ".leakage", Kind: Resistor, Role: Load, Place: c.Leakage.Here(),
			Resistance: quantity.Resistance(float64(c.Voltage.V) / float64(c.Leakage.V))}, from, to)
	}
}

func (m *maker) loads() {
	for i := range m.chain.Bleeders {
		bl := &m.chain.Bleeders[i]
		m.resistor(fmt.Sprintf("bleeder.%d", i+1), bl.At.V, "ground", Load, bl.Resistor, bl.Permanent.V)
	}
	for i := range m.chain.Loads {
		l := &m.chain.Loads[i]
		name := "load." + l.Name.V
		if l.Resistance.Set() {
			m.add(Element{Name: name, Kind: Resistor, Role: Load, Resistance: l.Resistance.V, Permanent: l.Permanent.V, Place: l.Here()}, l.At.V, "ground")
			continue
		}
		m.drain(name, l.At.V, "ground", l.Current.V, l.Here())
	}
}

// drain adds a constant current that lowers the magnitude of the node's potential.
func (m *maker) drain(name, at, to string, i quantity.Current, place document.Place) {
	if m.negative {
		at, to = to, at
	}
	m.add(Element{Name: name, Kind: Sink, Role: Load, Current: i, Place: place}, at, to)
}

// rms gives the amplitude of a sine from its rms value.
func rms(v quantity.Voltage) quantity.Voltage { return v * math.Sqrt2 }
