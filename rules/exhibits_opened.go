package rules

import (
	"fmt"

	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/exhibit"
)

const decayed = "decay of the whole network, each part open in turn"

// openedTable shows what stays with one part open, and what the meter says then.
func openedTable(e *evidence.Evidence) []exhibit.Table {
	t := exhibit.Table{
		ID: "energy.one_open", Chapter: exhibit.Energy, Title: "Discharge with one part open", Basis: decayed,
		Columns: []exhibit.Column{{Head: "open"}, {Head: "last node"}, {Head: "to 60 V", Unit: "s"}, {Head: "the meter then shows", Unit: "V"}, {Head: "which of it"}},
		Note:    under(e) + "Elements in series open alike: any one of them opens its string. What the meter shows is that of the sensed node, when the last node is at 60 V, or in the end where one stays. A meter that shows nothing does not prove that nothing is there.",
	}
	all, err := e.OneOpen()
	if err != nil {
		return nil
	}
	for _, o := range all {
		t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words(o.Part), exhibit.Words(o.Worst.Node), lasting(o.Worst, nil), shown(e, o, o.Worst), exhibit.Words(which(e, o.Part))})
	}
	return table(t)
}

// openedAtNodes shows of each node what is worst with one part open.
func openedAtNodes(e *evidence.Evidence) []exhibit.Table {
	t := exhibit.Table{
		ID: "energy.one_open_worst", Chapter: exhibit.Energy, Title: "Each node with one part open, at worst", Basis: decayed,
		Columns: []exhibit.Column{{Head: "node"}, {Head: "all whole, to 60 V", Unit: "s"},
			{Head: "with one resistor or string open", Unit: "s"}, {Head: "which"}, {Head: "the meter then shows", Unit: "V"},
			{Head: "with one diode open", Unit: "s"}, {Head: "which diode"}, {Head: "the meter shows then", Unit: "V"}},
		Note: under(e) + "Resistors are the permanent ones: bleeders, divider, filter, gun end, bias. What the meter shows is that of the sensed node when the node of the row is at 60 V, or in the end where it stays. Every node with every part is in the JSON results and with --all.",
	}
	all, err := e.OneOpen()
	if err != nil {
		return nil
	}
	for _, node := range e.Discharged() {
		intact, err := e.DischargeOf(node)
		if _, held := e.Reachable(node); err != nil || held != nil {
			continue
		}
		row := append([]exhibit.Cell{exhibit.Words(node), lasting(intact, nil)}, worstAt(e, all, node, intact, false)...)
		t.Rows = append(t.Rows, append(row, worstAt(e, all, node, intact, true)...))
	}
	return table(t)
}

// worstAt is the slowest discharge of a node with one diode open, or one resistor: how
// long, which part, and what the meter then shows; nothing of it where none is slower than
// with all whole.
func worstAt(e *evidence.Evidence, all []evidence.Opened, node string, intact evidence.Discharge, diode bool) []exhibit.Cell {
	var part evidence.Opened
	worst := intact
	for _, o := range all {
		d, err := o.At(node)
		if err == nil && e.IsDiode(o.Part) == diode && d.Slower(worst) && (d.Never || !quantity.AtMost(d.Time, worst.Time*noticed)) {
			part, worst = o, d
		}
	}
	if part.Part == "" {
		return []exhibit.Cell{exhibit.Words("no longer"), exhibit.Words("–"), exhibit.Words("–")}
	}
	return []exhibit.Cell{lasting(worst, nil), exhibit.Words(part.Part), shown(e, part, worst)}
}

// noticed is how much slower a discharge is that is worth a word; times are good to a part
// in a thousand.
const noticed = 1.005

// abreast is how many nodes stand beside each other in a table of every node.
const abreast = 6

// openedEach shows every node with every part open: how long it takes, and beside it what
// the meter then shows.
func openedEach(e *evidence.Evidence) []exhibit.Table {
	all, err := e.OneOpen()
	if err != nil {
		return nil
	}
	var tables []exhibit.Table
	nodes := e.Discharged()
	for i := 0; i < len(nodes); i += abreast {
		some := nodes[i:min(i+abreast, len(nodes))]
		of := some[0] + " to " + some[len(some)-1]
		tables = append(tables,
			eachOpen(all, some, exhibit.Table{ID: "energy.one_open_times", Subject: of, Title: "Each node to 60 V with each part open",
				Note: under(e) + "Of a resistor with several strings one string is open."}, "s", func(_ evidence.Opened, d evidence.Discharge) exhibit.Cell { return lasting(d, nil) }),
			eachOpen(all, some, exhibit.Table{ID: "energy.one_open_meter", Subject: of, Title: "What the meter shows when each node is at 60 V, with each part open",
				Note: under(e) + "The voltage of the sensed node by the meter; in the end, where the node stays above 60 V."}, "V", func(o evidence.Opened, d evidence.Discharge) exhibit.Cell { return shown(e, o, d) }))
	}
	return tables
}

// eachOpen fills a table with a row for each part open and a column for each node.
func eachOpen(all []evidence.Opened, nodes []string, t exhibit.Table, unit string, cell func(evidence.Opened, evidence.Discharge) exhibit.Cell) exhibit.Table {
	t.Chapter, t.Basis, t.Detail = exhibit.Energy, decayed, true
	t.Columns = []exhibit.Column{{Head: "open"}}
	for _, node := range nodes {
		t.Columns = append(t.Columns, exhibit.Column{Head: node, Unit: unit})
	}
	for _, o := range all {
		row := []exhibit.Cell{exhibit.Words(o.Part)}
		for _, node := range nodes {
			d, err := o.At(node)
			if err != nil {
				row = append(row, exhibit.Words(err.Error()))
				continue
			}
			row = append(row, cell(o, d))
		}
		t.Rows = append(t.Rows, row)
	}
	return t
}

// which says which element of a part is open.
func which(e *evidence.Evidence, part string) string {
	count, strings := e.ElementsOf(part)
	switch {
	case count == 1 && strings == 1:
		return "all of it"
	case strings == 1:
		return fmt.Sprintf("any of %d elements", count)
	case count == 1:
		return fmt.Sprintf("any of %d strings", strings)
	}
	return fmt.Sprintf("any of %d elements in any of %d strings", count, strings)
}

// nothing is below what a meter of high voltage shows.
const nothing quantity.Voltage = 1

func noMeter(e *evidence.Evidence) bool {
	d := e.Chain().Divider
	return d == nil || d.Meter == nil
}

func shown(e *evidence.Evidence, o evidence.Opened, d evidence.Discharge) exhibit.Cell {
	if noMeter(e) {
		return exhibit.Words("there is no meter")
	}
	v, err := e.MeterAfter(o, d)
	if err == nil && v < nothing {
		return exhibit.Words("nothing")
	}
	return exhibit.OrWords(v, err)
}

// comebackAtNodes shows what stands at each node again after a short discharge.
func comebackAtNodes(e *evidence.Evidence) []exhibit.Table {
	t := exhibit.Table{
		ID: "energy.recharge_nodes", Chapter: exhibit.Energy, Title: "What stands at each node again after a short discharge", Basis: "dielectric absorption of the capacitors between the node and ground, one above the other",
		Columns: []exhibit.Column{{Head: "node"}, {Head: "was at", Unit: "V"}, {Head: "back, at most", Unit: "V"}, {Head: "charge", Unit: "C"}, {Head: "energy", Unit: "J"}, {Head: "the meter then shows"}},
		Note:    under(e) + "At most: where nothing leads it away. A cable gets some back too; nothing is published of it here. What comes back behind a diode or an open part is not seen by any meter at the divider.",
	}
	for _, node := range e.Discharged() {
		r, err := e.Reachable(node)
		back, err2 := e.ComesBackAt(node)
		if first(err, err2) != nil || back.Voltage == 0 {
			continue
		}
		t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words(node), exhibit.Number(r.Voltage), exhibit.Number(back.Voltage), exhibit.Number(back.Charge), exhibit.Number(back.Energy), exhibit.Words(metered(e, node))})
	}
	return table(t)
}

// metered says what the meter shows of what came back at a node.
func metered(e *evidence.Evidence, node string) string {
	switch d := e.Chain().Divider; {
	case noMeter(e):
		return "there is no meter"
	case e.Same(node, d.Senses.Or("output")) && d.Permanent.V:
		return "nothing: the divider leads it away as it comes"
	case e.Same(node, d.Senses.Or("output")):
		return "up to this, while the divider is connected"
	}
	return "not this node"
}
