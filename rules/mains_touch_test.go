package rules_test

import (
	"math"
	"slices"
	"testing"

	"kilovet/rules"
	"kilovet/rules/rule"
)

// Whoever reaches the mains reaches its live conductor: 230 V r.m.s. are 325 V peak, whatever
// the common mode of a heater feed is, and no charge or time ends them. Without site.mains
// that is unassessed.
func TestTheMainsWithinReach(t *testing.T) {
	const reach = `touchable       = ["divider.tap"]`
	r := columnWith(t, reach, `touchable       = ["divider.tap", "mains"]`)
	f := found(t, r, "touch.voltage", "mains")
	if want := 230 * math.Sqrt2 / 2e3; f.Verdict != rule.Fails || math.Abs(f.Provided.Value-want) > 1e-6*want {
		t.Errorf("%+v", f)
	}
	if cells := numbersOf(t, r, "energy.nodes", "mains"); math.Abs(*cells[1]-230*math.Sqrt2) > 1e-3 {
		t.Errorf("the table says %g V", *cells[1])
	}
	unknown := columnWith(t, reach, `touchable       = ["divider.tap", "mains"]`, `mains                = "230 V"`, "")
	if f := found(t, unknown, "touch.voltage", "mains"); f.Verdict != rule.Unassessed {
		t.Errorf("without site.mains: %+v", f)
	}
}

// numbersOf is the values of the row of a table that begins with a word.
func numbersOf(t *testing.T, r *rules.Review, id, word string) (values []*float64) {
	t.Helper()
	for _, table := range r.Tables {
		if table.ID != id {
			continue
		}
		for _, row := range table.Rows {
			if row[0].Text == word {
				for _, c := range row {
					values = append(values, c.Value)
				}
			}
		}
	}
	if !slices.ContainsFunc(values, func(v *float64) bool { return v != nil }) {
		t.Fatalf("no row %s in %s", word, id)
	}
	return values
}
