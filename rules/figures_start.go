package rules

import (
	"kilovet/hv/quantity"
	"kilovet/ripple/network"
	"kilovet/rules/evidence"
	"kilovet/rules/exhibit"
)

// starts lists what the parts bear on the way up.
func starts(c *collector, e *evidence.Evidence) {
	const basis = evidence.Basis
	if s, err := e.RampedStart(); err == nil {
		add(c, "start.ramped_rise_time", "", basis, s.Reached, nil)
	}
	s, err := e.Start()
	if err != nil {
		return
	}
	for _, name := range startParts(e) {
		x := s.Of(name)
		add(c, "start.part_voltage", name, basis, max(x.Greatest, -x.Least), nil)
		add(c, "start.part_current", name, basis, x.Peak, nil)
	}
}

// startParts are the parts that bear more on the way up than later: capacitors, diodes and
// what feeds them.
func startParts(e *evidence.Evidence) []string {
	return append(append(e.DriveSources(), e.Diodes()...), e.Capacitors()...)
}

// startTable shows the way up at full drive and, where one is described, on the ramp.
func startTable(e *evidence.Evidence) []exhibit.Table {
	s, err := e.Start()
	if err != nil {
		return nil
	}
	t := exhibit.Table{
		ID: "chain.start", Chapter: exhibit.Parts, Title: "What the parts bear on the way up", Basis: evidence.Basis,
		Columns: []exhibit.Column{{Head: "part"}, {Head: "peak voltage", Unit: "V"}, {Head: "peak current", Unit: "A"}},
		Note:    "all discharged, full drive from phase zero, loads on, no regulation, until the top has 95 % of its final mean after " + quantity.Text(s.Reached),
	}
	starts := []*network.Startup{s}
	if r, err := e.RampedStart(); err == nil {
		starts = append(starts, r)
		t.Columns = append(t.Columns, exhibit.Column{Head: "peak voltage on the ramp", Unit: "V"}, exhibit.Column{Head: "peak current on the ramp", Unit: "A"})
		t.Note += "; on the ramp of " + quantity.Text(e.Chain().Drive.Ramp.V) + " after " + quantity.Text(r.Reached)
	}
	for _, name := range startParts(e) {
		row := []exhibit.Cell{exhibit.Words(name)}
		for _, s := range starts {
			x := s.Of(name)
			row = append(row, exhibit.Number(max(x.Greatest, -x.Least)), exhibit.Number(x.Peak))
		}
		t.Rows = append(t.Rows, row)
	}
	return tabled(t)
}

// events shows what happens once: arcs, starts and load steps.
func events(e *evidence.Evidence) []exhibit.Table {
	return gather(e, unless("faults", arcTables), startTable, stepTable)
}
