package rules

import (
	"slices"

	"kilovet/hv/parallel"
	"kilovet/hv/quantity"
	"kilovet/hv/touch"
	"kilovet/rules/evidence"
	"kilovet/rules/exhibit"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

// energyTables show what stays charged, what it could do to a person, and what a rod
// goes through, with regulation lost where that is known, else in the working state.
func energyTables(e *evidence.Evidence) []exhibit.Table {
	at := holding(e)
	if at == nil {
		return nil
	}
	return gather(at, nodeEnergy, unless("faults", openedAtNodes), unless("faults", openedTable), comebackAtNodes, comebackTable, limitTable, rodTable, bodyTable, unless("faults", openedEach))
}

func under(e *evidence.Evidence) string { return "state: " + e.Condition().Text() + ". " }

// nodeEnergy shows what each node holds, and how long.
func nodeEnergy(e *evidence.Evidence) []exhibit.Table {
	t := exhibit.Table{
		ID: "energy.nodes", Chapter: exhibit.Energy, Title: "What each node holds, and for how long", Basis: evidence.Basis,
		Columns: []exhibit.Column{{Head: "node"}, {Head: "voltage", Unit: "V"}, {Head: "charge", Unit: "C"}, {Head: "energy", Unit: "J"},
			{Head: "current through 2 kΩ", Unit: "A"}, {Head: "to 60 V", Unit: "s"}, {Head: "to 60 V, drive unplugged", Unit: "s"}},
		Note: under(e) + "Charge and energy are what an ideal short delivers, drive and loads off; the times count what is permanent alone; with the drive unplugged a node that only diodes lead to falls when one of them conducts, which hangs on little. A meter at the divider shows the sensed node only. The mains is that of its live conductor, peak: only its plug ends it.",
	}
	t.Rows = byNode(e.Nodes(), func(node string) []exhibit.Cell { return held(e, node) })
	return table(t)
}

// held is what one node holds; nil where that is not known.
func held(e *evidence.Evidence, node string) []exhibit.Cell {
	r, err := e.Reachable(node)
	if err != nil {
		return nil
	}
	i, errI := e.Available(node)
	if e.OnMains(node) {
		return []exhibit.Cell{exhibit.Words(node), exhibit.Number(r.Voltage), exhibit.Words("without end"), exhibit.Words("without end"),
			exhibit.OrWords(i, errI), exhibit.Words("never by itself"), exhibit.Words("stays live")}
	}
	d, errD := e.DischargeOf(node)
	u, errU := e.Unplugged(node)
	return []exhibit.Cell{exhibit.Words(node), exhibit.Number(r.Voltage), exhibit.Number(r.Short.Charge), exhibit.Number(r.Short.Energy),
		exhibit.OrWords(i, errI), lasting(d, errD), lasting(u, errU)}
}

// lasting is a time, or what stays.
func lasting(d evidence.Discharge, err error) exhibit.Cell {
	if err != nil {
		return exhibit.Words(err.Error())
	}
	if d.Never {
		return exhibit.Words("stays at " + quantity.Text(d.Left))
	}
	return exhibit.Number(d.Time)
}

func table(t exhibit.Table) []exhibit.Table {
	if len(t.Rows) == 0 {
		return nil
	}
	return []exhibit.Table{t}
}

// comebackTable shows what dielectric absorption brings back.
func comebackTable(e *evidence.Evidence) []exhibit.Table {
	t := exhibit.Table{
		ID: "energy.recharge", Chapter: exhibit.Energy, Title: "What comes back after a short discharge", Basis: "dielectric absorption as makers measure it: 15 min charged, 10 s shorted, read after 15 min",
		Columns: []exhibit.Column{{Head: "capacitor"}, {Head: "dielectric"}, {Head: "was at", Unit: "V"}, {Head: "back, at most", Unit: "V"}, {Head: "charge", Unit: "C"}, {Head: "energy", Unit: "J"}, {Head: "source"}},
		Note:    under(e) + "It is why what was discharged stays shorted.",
	}
	all, err := e.Comebacks()
	if err != nil {
		return nil
	}
	for _, b := range all {
		if b.Err != nil {
			t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words(b.Part), exhibit.Words("not known"), exhibit.Number(b.Voltage), exhibit.Words("not known"), exhibit.Words(""), exhibit.Words(""), exhibit.Words(b.Err.Error())})
			continue
		}
		t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words(b.Part), exhibit.Words(b.Absorption.Dielectric), exhibit.Number(b.Voltage),
			exhibit.Number(b.Back.Voltage), exhibit.Number(b.Back.Charge), exhibit.Number(b.Back.Energy), exhibit.Words(b.Absorption.Source + " (" + b.Absorption.Mark + ")")})
	}
	return table(t)
}

// most is the node that holds most of each, for comparison with limits.
type most struct {
	voltage, current, charge, energy, time exhibit.Cell
}

func mostOf(e *evidence.Evidence) most {
	var v, q, w, i float64
	for _, node := range e.Nodes() {
		if r, err := e.Reachable(node); err == nil {
			v, q, w = max(v, float64(r.Voltage)), max(q, float64(r.Short.Charge)), max(w, float64(r.Short.Energy))
		}
		if c, err := e.Available(node); err == nil {
			i = max(i, float64(c))
		}
	}
	d, err := e.SlowestDischarge()
	return most{inWords(v, "V"), inWords(i, "A"), inWords(q, "C"), inWords(w, "J"), timeInWords(d, err)}
}

func inWords(v float64, unit string) exhibit.Cell {
	return exhibit.Words(rule.Amount{Value: v, Unit: unit}.Text())
}

func timeInWords(d evidence.Discharge, err error) exhibit.Cell {
	c := lasting(d, err)
	if c.Value != nil {
		return inWords(*c.Value, "s")
	}
	return c
}

func (m most) of(what string) exhibit.Cell {
	switch what {
	case "voltage":
		return m.voltage
	case "current":
		return m.current
	case "charge":
		return m.charge
	case "energy":
		return m.energy
	}
	return m.time
}

// limitTable shows the limits of standards and codes side by side.
func limitTable(e *evidence.Evidence) []exhibit.Table {
	t := exhibit.Table{
		ID: "energy.limits", Chapter: exhibit.Energy, Title: "Limits of touch and stored charge, side by side", Basis: "the standards and codes named, as far as they were read",
		Columns: []exhibit.Column{{Head: "standard or code"}, {Head: "condition"}, {Head: "what"}, {Head: "limit"}, {Head: "most in this chain"}, {Head: "judges"}, {Head: "how known"}, {Head: "note"}},
		Note:    under(e) + "Most in this chain is that of any node, within reach or not. What is within reach is judged by touch.voltage, in a fault by fault.touch, the times by discharge.waiting_time.",
	}
	has := mostOf(e)
	for _, s := range limits.SideBySide() {
		judges := "shown"
		if s.Judges {
			judges = "judges"
		}
		t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words(s.Standard), exhibit.Words(s.Condition), exhibit.Words(s.What), exhibit.Words(s.Limit.Text()),
			has.of(s.What), exhibit.Words(judges), exhibit.Words(string(s.Mark)), exhibit.Words(s.Note)})
	}
	return table(t)
}

// rodTable shows what the earthing rod goes through at each node.
func rodTable(e *evidence.Evidence) []exhibit.Table {
	if a := e.Chain().Access; a == nil || a.EarthingRod == nil {
		return nil
	}
	t := exhibit.Table{
		ID: "energy.rod", Chapter: exhibit.Energy, Title: "The earthing rod at each node", Basis: "decay of the whole network with the rod on one node",
		Columns: []exhibit.Column{{Head: "node"}, {Head: "voltage", Unit: "V"}, {Head: "peak current", Unit: "A"}, {Head: "node to 60 V", Unit: "s"}, {Head: "all to 60 V", Unit: "s"}, {Head: "energy", Unit: "J"}},
		Note:    under(e) + "All to 60 V is the time after which no node comes back when the rod is lifted, absorption apart; to a tenth where charge runs off through diodes, for which of them conduct hangs on little. Touch every node in turn, from the earthy end to the hot end, then clip each; leave the earth on. Never the mains: it is unplugged.",
	}
	t.Rows = byNode(e.Discharged(), func(node string) []exhibit.Cell { // a rod ends no mains
		r, err := e.Reachable(node)
		x, err2 := e.Rod(node)
		if first(err, err2) != nil {
			return nil
		}
		return []exhibit.Cell{exhibit.Words(node), exhibit.Number(r.Voltage), exhibit.Number(x.Peak), lasting(x.Node, nil), lasting(x.Whole, nil), exhibit.Number(x.Energy)}
	})
	return table(t)
}

// byNode gives each node its row, in order; none where there is nothing to show.
func byNode(nodes []string, row func(node string) []exhibit.Cell) [][]exhibit.Cell {
	all := make([][]exhibit.Cell, len(nodes))
	parallel.Each(len(nodes), func(i int) { all[i] = row(nodes[i]) })
	return slices.DeleteFunc(all, func(r []exhibit.Cell) bool { return r == nil })
}

// bodyTable shows what a body would take at the node that holds most: information.
func bodyTable(e *evidence.Evidence) []exhibit.Table {
	node, largest := "", quantity.Energy(0)
	for _, n := range e.Nodes() {
		if r, err := e.Reachable(n); err == nil && r.Short.Energy > largest {
			node, largest = n, r.Short.Energy
		}
	}
	if node == "" {
		return nil
	}
	t := exhibit.Table{
		ID: "energy.body", Subject: node, Chapter: exhibit.Energy, Title: "What a body would take at " + node, Basis: "discharge of a capacitance through a resistance",
		Columns: []exhibit.Column{{Head: "body"}, {Head: "resistance", Unit: "Ω"}, {Head: "peak current", Unit: "A"}, {Head: "lasting", Unit: "s"}, {Head: "charge", Unit: "C"}, {Head: "energy", Unit: "J"}, {Head: "source"}, {Head: "zone"}},
		Note:    under(e) + "Information, never a permission: no current through a body is permitted by it. Lasting is the duration 3 R C that counts. Zones: " + touch.ZoneSource + "; impulses beside the " + touch.ThresholdSource + ", since the curves of IEC 60479-2 were not seen.",
	}
	for _, b := range touch.Bodies() {
		if s, err := e.Shock(node, b); err == nil {
			t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words(b.Name), exhibit.Number(b.Resistance), exhibit.Number(s.Peak), exhibit.Number(s.Duration),
				exhibit.Number(s.Charge), exhibit.Number(s.Energy), exhibit.Words(b.Source + " (" + b.Mark + ")"), exhibit.Words(ofThreshold(s))})
		}
	}
	if i, err := e.TouchCurrent(node); err == nil {
		t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words("with the drive on"), exhibit.Number(quantity.Resistance(2e3)), exhibit.Number(i), exhibit.Words("as long as touched"),
			exhibit.Words("–"), exhibit.Words("–"), exhibit.Words("the steady state with 2 kΩ at the node"), exhibit.Words(touch.ZoneOfDC(i))})
	}
	return table(t)
}

// ofThreshold says what share of the charge model's threshold an impulse is.
func ofThreshold(s touch.Shock) string {
	most, err := touch.ThresholdCharge(s.Duration)
	if err != nil {
		return "an impulse: " + err.Error()
	}
	return "an impulse: " + quantity.Text(quantity.Fraction(s.Charge/most)) + " of the charge from which a heart can fibrillate"
}
