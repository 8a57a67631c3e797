package circuit

import (
	"fmt"

	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/hv/quantity"
)

// column names the nodes of one coupling column and its drive.
type column struct {
	mark string // "", "a" or "b"
	sign float64
}

func (c column) node(stage int) string { return c.join("coupling", fmt.Sprint(stage)) }
func (c column) drive() string         { return c.join("drive", "") }

func (c column) join(first, last string) string {
	switch {
	case c.mark == "" && last == "":
		return first
	case c.mark == "":
		return first + "." + last
	case last == "":
		return first + "." + c.mark
	}
	return first + "." + c.mark + "." + last
}

// ladder adds drive, columns and diodes. Stage k of the smoothing column is
// stage.k; the top one is also called multiplier.
func (m *maker) ladder() {
	mult := m.chain.Multiplier
	if mult == nil {
		return
	}
	m.negative = mult.Negative()
	m.link("multiplier return", "foot", "ground")
	for _, col := range m.columns() {
		m.drive(col)
		for k := 1; k <= mult.Stages.V; k++ {
			m.couplingStage(col, k)
		}
	}
	for k := 1; k <= mult.Stages.V; k++ {
		name := fmt.Sprintf("multiplier.smoothing_capacitor.%d", k)
		m.capacitor(name, stage(k), stage(k-1), Ladder, mult.SmoothingCapacitor, k-1)
		m.stray(fmt.Sprintf("stray.ground.%d", k), stage(k), "ground", mult.StrayToGround.V, mult.StrayToGround.Place)
	}
	m.link("multiplier top", stage(mult.Stages.V), "multiplier")
	m.pickup(mult)
	if mult.Symmetrical() {
		m.link("drive halves", "drive", "drive.a")
	}
}

func (m *maker) columns() []column {
	if !m.chain.Multiplier.Symmetrical() {
		return []column{{"", 1}}
	}
	half := float64(m.chain.Drive.Unbalance.V) / 2
	return []column{{"a", 1 + half}, {"b", -(1 - half)}}
}

// drive adds the source of one column with what stands in series with it.
func (m *maker) drive(col column) {
	d := m.chain.Drive
	form := Sine
	if d.Waveform.V == "square" {
		form = Square
	}
	source := col.join("drive.source", "")
	m.add(Element{Name: source, Kind: Source, Role: Ladder, Place: d.Here(), Permanent: true,
		Wave: Wave{form, m.setting.Peak * quantity.Voltage(col.sign), d.Frequency.V}}, source, "foot")
	at := m.seriesOf(col.join("drive.resistance", ""), source, col.join("drive.inner", ""), d.Resistance.Place,
		Element{Kind: Resistor, Resistance: d.Resistance.V}, d.Resistance.V > 0)
	at = m.seriesOf(col.join("drive.inductance", ""), at, col.join("drive.winding", ""), d.Inductance.Place,
		Element{Kind: Inductor, Inductance: d.Inductance.V}, d.Inductance.V > 0)
	m.link(col.join("drive lead", ""), at, col.drive())
}

// seriesOf adds an element and says where the chain goes on; without one, where it stood.
func (m *maker) seriesOf(name, from, to string, place document.Place, e Element, there bool) string {
	if !there {
		return from
	}
	e.Name, e.Role, e.Place, e.Permanent = name, Ladder, place, true
	m.add(e, from, to)
	return to
}

// couplingStage adds the coupling capacitor, both diodes and the stray of one stage.
func (m *maker) couplingStage(col column, k int) {
	mult := m.chain.Multiplier
	below := col.drive()
	if k > 1 {
		below = col.node(k - 1)
	}
	m.capacitor(col.join("multiplier.coupling_capacitor", fmt.Sprint(k)), col.node(k), below, Ladder, mult.CouplingCapacitor, k-1)
	m.diode(col.join("multiplier.diode", fmt.Sprint(2*k-1)), stage(k-1), col.node(k))
	m.diode(col.join("multiplier.diode", fmt.Sprint(2*k)), col.node(k), stage(k))
	m.stray(col.join("stray.columns", fmt.Sprint(k)), col.node(k), stage(k), mult.StrayBetweenColumns.V, mult.StrayBetweenColumns.Place)
}

// diode adds a diode that conducts from the first node to the second if the
// multiplier is positive.
func (m *maker) diode(name, from, to string) {
	if m.negative {
		from, to = to, from
	}
	e := Element{Name: name, Kind: Diode, Role: Ladder, Permanent: true, Place: m.chain.Multiplier.Here()}
	if d := m.chain.Multiplier.Diode; d != nil {
		e.Rectifier, e.DiodePart, e.Place = rectifier(d), d, d.Here()
	}
	m.add(e, from, to)
}

func rectifier(d *chain.Diode) Rectifier {
	return Rectifier{Drop: d.ForwardDrop.V, On: d.Resistance.V, Junction: d.Capacitance.V, Leakage: conductance(d.Leakage.V, d.RatedVoltage.V)}
}

func conductance(i quantity.Current, at quantity.Voltage) float64 {
	if at == 0 {
		return 0
	}
	return float64(i) / float64(at)
}

// pickup couples the top of the coupling column past the filter; of two columns in
// antiphase the first alone, since what cancels between them is not known.
func (m *maker) pickup(mult *chain.Multiplier) {
	value := mult.PickupToOutput.V
	if !mult.PickupToOutput.Set() && len(m.chain.Filters) > 0 {
		value = AssumedPickup
	}
	m.stray("stray.pickup", m.columns()[0].node(mult.Stages.V), "output", value, mult.PickupToOutput.Place)
}

func stage(k int) string {
	if k == 0 {
		return "foot"
	}
	return fmt.Sprintf("stage.%d", k)
}
