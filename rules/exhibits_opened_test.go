package rules_test

import (
	"math"
	"testing"

	"kilovet/rules/exhibit"
)

// Every node that holds charge stands in the tables of what one open part does, with every
// diode and every permanent resistor; what they say is worst is the worst of them, by the
// table of all.
func TestEveryNodeWithEveryPartOpen(t *testing.T) {
	r := reviewedWhole(t, described(t, "column"))
	worst := map[string]float64{}
	parts := map[string]bool{}
	for _, table := range r.Tables {
		if table.ID != "energy.one_open_times" {
			continue
		}
		for _, row := range table.Rows {
			parts[row[0].Text] = true
			for i, c := range row[1:] {
				node := table.Columns[i+1].Head
				worst[node] = max(worst[node], lastingOf(c))
			}
		}
	}
	for _, part := range []string{"multiplier.diode.1", "multiplier.diode.12", "bleeder.1", "divider.upper", "divider.lower", "filter.1.resistor", "bias.resistor"} {
		if !parts[part] {
			t.Errorf("nothing is said of %s open", part)
		}
	}
	table := tableOf(t, r, "energy.one_open_worst")
	if _, there := worst["mains"]; len(table.Rows) != 19 || len(worst) != 19 || there {
		t.Errorf("%d rows and %d nodes, want those of all 20 nodes but the mains, which does not discharge", len(table.Rows), len(worst))
	}
	for _, row := range table.Rows {
		most := max(lastingOf(row[1]), lastingOf(row[2]), lastingOf(row[5]))
		if want := worst[row[0].Text]; most != want && math.Abs(most-want) > 0.005*want {
			t.Errorf("%s: at worst %g, want %g", row[0].Text, most, want)
		}
	}
}

// lastingOf is the time of a cell, without end where something stays, zero for other words.
func lastingOf(c exhibit.Cell) float64 {
	switch {
	case c.Value != nil:
		return *c.Value
	case len(c.Text) > 9 && c.Text[:9] == "stays at ":
		return math.Inf(1)
	}
	return 0
}
