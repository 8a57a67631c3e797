package page

import (
	"slices"

	"kilovet/reports/digest"
	"kilovet/rules"
	"kilovet/rules/figure"
	"kilovet/rules/rule"
)

// figures is the tables of the figures: those that depend on the state, and the
// others. Rows of parts that are nought throughout are left out, and that is said.
func figures(r *rules.Review) []Section {
	var sections []Section
	states := digest.States(r.Figures)
	if groups := telling(digest.ByState(r.Figures, states)); len(groups) > 0 {
		sections = append(sections, Section{Title: "Figures by state", Fresh: true, Blocks: []Block{figureTable(groups, states)}})
	}
	if groups := telling(digest.Stateless(r.Figures)); len(groups) > 0 {
		sections = append(sections, Section{Title: "Figures", Fresh: len(sections) == 0, Blocks: []Block{figureTable(groups, []string{"value"})}})
	}
	if last := len(sections) - 1; last >= 0 && silent(r.Figures, states) {
		sections[last].Blocks = append(sections[last].Blocks, Paragraph{"Nodes and parts at which a figure is nought in every state are left out here; the JSON results list them."})
	}
	return sections
}

// telling is the groups without the rows that say nothing.
func telling(groups []digest.Group) []digest.Group {
	var kept []digest.Group
	for _, g := range groups {
		g.Rows = slices.DeleteFunc(g.Rows, digest.Row.Silent)
		if len(g.Rows) > 0 {
			kept = append(kept, g)
		}
	}
	return kept
}

func silent(figures []figure.Figure, states []string) bool {
	return slices.ContainsFunc(append(digest.ByState(figures, states), digest.Stateless(figures)...), func(g digest.Group) bool {
		return slices.ContainsFunc(g.Rows, digest.Row.Silent)
	})
}

func figureTable(groups []digest.Group, columns []string) Table {
	share := min(0.2, 0.6/float64(len(columns)))
	t := Table{Columns: []Column{{Title: "Figure and subject", Share: 1 - share*float64(len(columns))}}}
	for _, c := range columns {
		t.Columns = append(t.Columns, Column{Title: c, Share: share, Right: true})
	}
	for _, g := range groups {
		if len(g.Rows) == 1 {
			t.Rows = append(t.Rows, valueRow(g.Rows[0], strong(g.ID), plain(g.What), plain(g.Rows[0].Part()), labelledSmall("basis:", g.Basis)))
			continue
		}
		t.Rows = append(t.Rows, Row{Group: true, Cells: []Cell{lines(strong(g.ID), plain(g.What), labelledSmall("basis:", g.Basis))}})
		for _, row := range g.Rows {
			under := valueRow(row, plain(row.Subject))
			under.Under = true
			t.Rows = append(t.Rows, under)
		}
	}
	return t
}

func valueRow(row digest.Row, first ...Line) Row {
	cells := []Cell{lines(first...)}
	for _, v := range row.Values {
		cells = append(cells, lines(plain(v)))
	}
	return Row{Cells: cells}
}

// remarks is what stands beside the findings: assumptions, cautions, rules that
// did not apply.
func remarks(r *rules.Review) []Section {
	var sections []Section
	add := func(title string, blocks []Block) {
		if len(blocks) > 0 {
			sections = append(sections, Section{Title: title, Blocks: blocks})
		}
	}
	add("Assumptions", paragraphs(r.Assumptions))
	add("Cautions", factsOf(r.Cautions, func(c rule.Caution) Fact { return Fact{c.Subject, c.Text} }))
	add("Rules passed over", factsOf(r.PassedOver, func(p rule.PassedOver) Fact { return Fact{p.Rule, p.Because} }))
	return sections
}

func paragraphs(texts []string) []Block {
	var blocks []Block
	for _, t := range texts {
		blocks = append(blocks, Paragraph{t})
	}
	return blocks
}

func factsOf[T any](list []T, fact func(T) Fact) []Block {
	if len(list) == 0 {
		return nil
	}
	var facts []Fact
	for _, item := range list {
		facts = append(facts, fact(item))
	}
	return []Block{Facts{facts}}
}

// signing is the last section: what was reviewed, by what, and who answers for it.
func signing(r *rules.Review) Section {
	t := Table{Columns: []Column{{Title: "Read", Share: 0.15}, {Title: "File", Share: 0.23}, {Title: "SHA-256", Share: 0.62}}}
	for _, in := range r.Inputs {
		t.Rows = append(t.Rows, Row{Cells: []Cell{lines(plain(in.Role)), lines(plain(in.Name)), lines(small(in.SHA256))}})
	}
	return Section{Title: "Sign-off", Whole: true, Blocks: []Block{
		Paragraph{"The signatures below are for the files named here by their SHA-256, as reviewed by " + r.Program.Name + " " + r.Program.Version + ". A file changed afterwards needs a new review."},
		t,
		Notice{r.Deference},
		Signatures{[]Blank{{"Prepared", r.Heading.Creator}, {"Checked", ""}, {"Approved", r.Heading.Approver}}},
	}}
}
