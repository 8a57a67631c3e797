package plan

import (
	"fmt"
	"strings"

	"kilovet/hv/circuit"
	"kilovet/hv/gun"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
)

// testVoltages are those that insulation testers offer, highest first, above an
// ohmmeter's own: the usual list, from memory of IEC 61557-2.
var testVoltages = [...]quantity.Voltage{5000, 2500, 1000, 500, 250, 100}

// ohmmeter is the highest resistance that a hand-held ohmmeter reads: common practice,
// no source.
const ohmmeter quantity.Resistance = 50e6

// cold lists the checks made before any voltage.
func (m *maker) cold() {
	m.bonds()
	layout, err := m.e.Under(evidence.Condition{State: evidence.Cold}).Circuit()
	if err != nil {
		m.open("cold checks", err)
		return
	}
	m.alike = map[Check]*likes{}
	for i := range layout.Elements {
		el := &layout.Elements[i]
		switch {
		case el.Kind == circuit.Resistor && el.ResistorPart != nil:
			m.resistor(el)
		case el.Kind == circuit.Capacitor && el.CapacitorPart != nil:
			m.capacitor(el)
		case el.Kind == circuit.Diode && el.Role == circuit.Ladder:
			m.diode(el)
		case el.Kind == circuit.Gap:
			m.gap(el)
		}
	}
	m.whole()
	m.heater()
}

func (m *maker) check(c Check) {
	c.Number = 1
	m.plan.Cold = append(m.plan.Cold, c)
}

// likes are parts of the multiplier that are checked alike.
type likes struct {
	at          int // of their check in the plan
	first, last string
}

// each checks a part; like parts of the multiplier share one entry.
func (m *maker) each(el *circuit.Element, c Check) {
	if el.Role != circuit.Ladder {
		m.check(c)
		return
	}
	key := c
	key.What, key.Across = el.Name[:strings.LastIndex(el.Name, ".")], ""
	l := m.alike[key]
	if l == nil {
		m.alike[key] = &likes{len(m.plan.Cold), el.Name, el.Name}
		m.check(c)
		return
	}
	l.last = el.Name
	together := &m.plan.Cold[l.at]
	together.Number++
	together.What, together.Across = fmt.Sprintf("%s to %s, each of %d", l.first, l.last, together.Number), "its two ends"
	if el.Kind == circuit.Diode {
		together.Across = "anode to cathode"
	}
}

func (m *maker) bonds() {
	a := m.e.Chain().Access
	if a == nil || a.EarthBond == nil || !a.EarthBond.Resistance.Set() {
		m.plan.Open = append(m.plan.Open, "earth bonds: no access.earth_bond with its resistance is described")
		return
	}
	b := a.EarthBond
	with := "low-resistance ohmmeter"
	if b.TestCurrent.Set() {
		with += " at " + quantity.Text(b.TestCurrent.V)
	}
	m.check(Check{What: "every protective earth bond", Across: "enclosure to protective earth", With: with,
		Words: "no more than the " + quantity.Text(b.Resistance.V) + " described"})
}

// resistor is measured in place, with what hangs in parallel.
func (m *maker) resistor(el *circuit.Element) {
	from, to := el.Ends()
	read := func(corner evidence.Corner) (quantity.Resistance, error) {
		return m.e.Under(evidence.Condition{State: evidence.Cold, Corner: corner}).Ohms(from, to)
	}
	b, err := spread(read)
	if err != nil {
		m.open(el.Name, err)
		return
	}
	m.each(el, Check{What: el.Name, Across: from + " to " + to, With: m.tester(el, quantity.Resistance(b.Value)), Expected: b})
}

// spread is a value nominal and in both corners.
func spread[Q interface {
	quantity.Number
	Dimension() *quantity.Dimension
}](read func(evidence.Corner) (Q, error)) (Band, error) {
	var b Band
	for i, corner := range []evidence.Corner{evidence.Nominal, evidence.AllLow, evidence.AllHigh} {
		q, err := read(corner)
		if err != nil {
			return b, err
		}
		v := float64(q)
		if i == 0 {
			b = Band{v, v, v, q.Dimension().SI}
		}
		b.Low, b.High = min(b.Low, v), max(b.High, v)
	}
	return b, nil
}

// tester is what measures a resistance: an ohmmeter, or an insulation tester at the
// highest voltage that neither the part's rating nor its working voltage forbids.
func (m *maker) tester(el *circuit.Element, r quantity.Resistance) string {
	if r <= ohmmeter {
		return "ohmmeter"
	}
	bears, err := m.e.In(evidence.Cold).ElementPeak(el.Name)
	if p := el.ResistorPart; err == nil && p.RatedVoltage.Set() {
		count, _ := p.Elements()
		bears = min(bears, p.RatedVoltage.V*quantity.Voltage(count))
	}
	for _, v := range testVoltages {
		if err == nil && quantity.AtMost(v, bears) {
			return fmt.Sprintf("insulation tester at %s, polarity as at work", quantity.Text(v))
		}
	}
	return "megohmmeter below 100 V"
}

// capacitor is measured with one lead lifted.
func (m *maker) capacitor(el *circuit.Element) {
	if el.Doubt != nil {
		m.open(el.Name, el.Doubt)
		return
	}
	from, to := el.Ends()
	nominal, share := float64(el.Capacitance), float64(el.CapacitorPart.Tolerance.V)
	c := Check{What: el.Name, Across: from + " to " + to, With: "capacitance meter, one lead lifted",
		Expected: Band{nominal, nominal * (1 - share), nominal * (1 + share), "F"}}
	if el.CapacitorPart.Class2() {
		c.Expected, c.Words = Band{}, "its nominal value; at the working voltage it has only "+quantity.Text(el.Capacitance)
	}
	m.each(el, c)
}

// aboveDrop is by how much the source of a diode's check passes its drop: common practice, no
// source.
const aboveDrop quantity.Voltage = 30

// diode must conduct one way and block the other.
func (m *maker) diode(el *circuit.Element) {
	from, to := el.Ends()
	drop := el.Rectifier.Drop
	c := Check{What: el.Name, Across: from + " (anode) to " + to + " (cathode)",
		With: "direct source of " + quantity.Text(drop+aboveDrop) + ", through 10 kohm"}
	if drop > 0 {
		c.Words = "conducts from anode to cathode with about " + quantity.Text(drop) + "; reversed, passes nothing that the source shows"
	} else {
		c.Words = "conducts from anode to cathode; reversed, passes nothing that the source shows"
	}
	m.each(el, c)
}

func (m *maker) heater() {
	h := m.e.Chain().Heater
	if h == nil {
		return
	}
	if h.Voltage.Set() && h.Current.Set() && h.Current.V > 0 {
		hot := gun.HotResistance(h.Voltage.V, h.Current.V)
		m.check(Check{What: "filament", Across: "heater.a to heater.b", With: "low-resistance ohmmeter, four leads",
			Words: "not open, and well below the " + quantity.Text(hot) + " it has when hot"})
	}
	if f := h.Feed; f != nil && f.TestVoltage.Set() {
		m.check(Check{What: "heater feed", Across: "all of the secondary to earth and primary", With: "the maker's test record",
			Words: "was tested at " + quantity.Text(f.TestVoltage.V) + "; do not repeat that test on the assembled chain"})
	}
}
