package rules

import (
	"fmt"

	"kilovet/rules/evidence"
	"kilovet/rules/exhibit"
)

// openedTable shows what stays with one part open, and what the meter says then.
func openedTable(e *evidence.Evidence) []exhibit.Table {
	t := exhibit.Table{
		ID: "energy.one_open", Chapter: exhibit.Energy, Title: "Discharge with one part open", Basis: "decay of the whole network, each part open in turn",
		Columns: []exhibit.Column{{Head: "open"}, {Head: "last node"}, {Head: "to 60 V", Unit: "s"}, {Head: "the meter then shows", Unit: "V"}, {Head: "which of it"}},
		Note:    under(e) + "Elements in series open alike: any one of them opens its string. What the meter shows is that of the sensed node, when the last node is at 60 V, or in the end where one stays. A meter that shows nothing does not prove that nothing is there.",
	}
	all, err := e.OneOpen()
	if err != nil {
		return nil
	}
	for _, o := range all {
		t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words(o.Part), exhibit.Words(o.Worst.Node), lasting(o.Worst, nil), shown(e, o), exhibit.Words(which(e, o.Part))})
	}
	return table(t)
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
const nothing = 1

func shown(e *evidence.Evidence, o evidence.Opened) exhibit.Cell {
	if e.Chain().Divider == nil {
		return exhibit.Words("there is no meter")
	}
	v, err := e.MeterAfter(o)
	if err == nil && v < nothing {
		return exhibit.Words("nothing")
	}
	return exhibit.OrWords(v, err)
}
