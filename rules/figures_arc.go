package rules

import (
	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/exhibit"
)

// arcs lists what arcs at the gun do, with regulation lost.
func arcs(c *collector, e *evidence.Evidence) {
	const basis = evidence.Basis
	for _, node := range e.ArcNodes() {
		driven, err := e.Arc(node)
		if err != nil {
			continue
		}
		if !driven.Burning {
			add(c, "arc.ceases", node, basis, driven.Ceased, nil)
		}
		of(c, "arc.follow_current", node, basis, func() (quantity.Current, error) { return e.FollowCurrent(node) })
		spent, err := e.ArcSpent(node)
		if err != nil {
			continue
		}
		add(c, "arc.charge", node, basis, max(spent.Charge, -spent.Charge), nil)
		add(c, "arc.energy", node, basis, spent.Energy, nil)
		if !spent.Burning {
			add(c, "arc.ceases_undriven", node, basis, spent.Ceased, nil)
		}
	}
	for _, name := range arcParts(e) {
		s, err := e.ArcStress(name)
		add(c, "arc.part_voltage", name, basis, s.Voltage, err)
		add(c, "arc.part_current", name, basis, s.Current, err)
		add(c, "arc.part_energy", name, basis, s.Energy, err)
	}
}

// arcParts are the parts an arc stresses: series resistors and diodes.
func arcParts(e *evidence.Evidence) []string {
	var names []string
	for _, el := range e.Layout().Elements {
		if el.Kind == circuit.Diode || el.Kind == circuit.Resistor && el.Role == circuit.Series {
			names = append(names, el.Name)
		}
	}
	return names
}

// arcTables shows what an arc at each place does to the parts.
func arcTables(e *evidence.Evidence) []exhibit.Table {
	if !e.HasSupply() {
		return nil
	}
	e = e.Under(evidence.Condition{State: evidence.Lost})
	var all []exhibit.Table
	for _, node := range e.ArcNodes() {
		t := exhibit.Table{
			ID: "chain.arc", Subject: node, Chapter: exhibit.Parts, Title: "An arc from " + node + " to ground", Basis: evidence.Basis,
			Columns: []exhibit.Column{{Head: "part"}, {Head: "peak voltage", Unit: "V"}, {Head: "peak current", Unit: "A"},
				{Head: "energy of the stored charge", Unit: "J"}, {Head: "power while the arc stands", Unit: "W"}},
			Note: arcInWords(e, node),
		}
		standing, none := e.Standing(node)
		for _, name := range arcParts(e) {
			s, err := e.ArcStressAt(node, name)
			if err != nil {
				return nil
			}
			power := exhibit.OrWords(quantity.Power(0), none)
			if none == nil {
				power = exhibit.Number(standing.Power(name))
			}
			t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words(name), exhibit.Number(s.Voltage), exhibit.Number(s.Current), exhibit.Number(s.Energy), power})
		}
		all = append(all, tabled(t)...)
	}
	return all
}

// arcInWords says how the arc was taken and whether it goes out.
func arcInWords(e *evidence.Evidence, node string) string {
	text := "regulation lost, struck when the node is highest, arc of 1 Ω; peaks with the drive on, energy with the drive off"
	if b := e.Chain().Bias; b != nil && b.Clamp != nil {
		text += "; the clamp across the bias limits the voltage of its resistor only"
	}
	driven, err := e.Arc(node)
	if err != nil {
		return text
	}
	if !driven.Burning {
		return text + "; its current is below 1 mA after " + quantity.Text(driven.Ceased)
	}
	text += "; the drive keeps it burning until something switches it off"
	if i, err := e.FollowCurrent(node); err == nil {
		text += ", with " + quantity.Text(i)
	}
	if spent, err := e.ArcSpent(node); err == nil && !spent.Burning {
		text += "; then it is out after " + quantity.Text(spent.Ceased)
	}
	return text
}
