package rules

import (
	"strings"

	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/exhibit"
	"kilovet/rules/plan"
)

// powerUp shows the plan of the first power-up as sheets to fill in.
func powerUp(e *evidence.Evidence) []exhibit.Table {
	p, err := plan.Of(e)
	if err != nil {
		return nil
	}
	tables := []exhibit.Table{
		coldChecks(p),
		todo("plan.before", "Before the first voltage", p.Before),
		readying(p),
		steps(p),
		expectations(p),
		todo("plan.stops", "Switch off at once at", p.Stops),
		todo("plan.after", "After every step and at the end", p.After),
		todo("plan.open", "Not planned", p.Open),
	}
	var filled []exhibit.Table
	for _, t := range tables {
		if len(t.Rows) > 0 {
			t.Chapter, t.Basis = exhibit.Plan, evidence.Basis
			filled = append(filled, t)
		}
	}
	return filled
}

// done is the column in which people write.
var done = exhibit.Column{Head: "done, read"}

func coldChecks(p *plan.Plan) exhibit.Table {
	t := exhibit.Table{ID: "plan.cold", Title: "Cold checks: all off, unplugged, earthed first",
		Columns: []exhibit.Column{{Head: "what"}, {Head: "across"}, {Head: "with"}, {Head: "expected"}, done}}
	for _, c := range p.Cold {
		expected := c.Words
		if expected == "" {
			expected = c.Expected.Text()
		}
		t.Rows = append(t.Rows, texts(c.What, c.Across, c.With, expected, ""))
	}
	return t
}

func todo(id, title string, list []string) exhibit.Table {
	t := exhibit.Table{ID: id, Title: title, Columns: []exhibit.Column{{Head: "what"}, done}}
	for _, text := range list {
		t.Rows = append(t.Rows, texts(text, ""))
	}
	return t
}

func readying(p *plan.Plan) exhibit.Table {
	t := exhibit.Table{ID: "plan.first", Title: "Before a step", Columns: []exhibit.Column{{Head: "step"}, {Head: "what"}, done}}
	for _, s := range p.Steps {
		for _, first := range s.First {
			t.Rows = append(t.Rows, texts(s.Name, first, ""))
		}
	}
	return t
}

func steps(p *plan.Plan) exhibit.Table {
	t := exhibit.Table{ID: "plan.steps", Title: "Steps of the first power-up", Note: strings.Join(p.Takes, "; ") + "; more return current than this is leakage or corona",
		Columns: []exhibit.Column{{Head: "step"}, {Head: "drive, peak", Unit: "V"}, {Head: "held", Unit: "s"}, {Head: "output", Unit: "V"}, {Head: "ripple, pp", Unit: "V"}, {Head: "drive power", Unit: "W"}, {Head: "return current", Unit: "A"}, {Head: "off: to 60 V after"}, done}}
	for _, s := range p.Steps {
		t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words(s.Name), exhibit.Number(s.Peak), exhibit.Number(s.Dwell),
			exhibit.Number(s.Output), known(s.Ripple), exhibit.Number(s.Power), known(s.Return), exhibit.Words(until(s.Discharge)), exhibit.Words("")})
	}
	return t
}

func known[Q quantity.Number](q *Q) exhibit.Cell {
	if q == nil {
		return exhibit.Words("not known")
	}
	return exhibit.Number(*q)
}

func until(d evidence.Discharge) string {
	if d.Never {
		return d.Node + " only by the rod"
	}
	return quantity.Text(d.Time) + ", " + d.Node + " last"
}

func expectations(p *plan.Plan) exhibit.Table {
	t := exhibit.Table{ID: "plan.readings", Title: "What every instrument should show",
		Columns: []exhibit.Column{{Head: "step"}, {Head: "instrument"}, {Head: "expected"}, done}}
	for _, s := range p.Steps {
		if s.Polarity != "" {
			t.Rows = append(t.Rows, texts(s.Name, "polarity of the output", s.Polarity, ""))
		}
		for _, r := range s.Readings {
			t.Rows = append(t.Rows, texts(s.Name, r.Instrument, r.Text(), ""))
		}
	}
	return t
}

func texts(all ...string) []exhibit.Cell {
	cells := make([]exhibit.Cell, len(all))
	for i, t := range all {
		cells[i] = exhibit.Words(t)
	}
	return cells
}
