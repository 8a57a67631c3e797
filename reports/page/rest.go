package page

import (
	"slices"

	"kilovet/reports/digest"
	"kilovet/rules"
	"kilovet/rules/figure"
	"kilovet/rules/rule"
)

// figures is the tables of the figures of a chapter: those that depend on the state, and
// the others. Rows of parts that are nought throughout are left out, and that is said.
func figures(all []figure.Figure) []Block {
	var blocks []Block
	states := digest.States(all)
	if groups := telling(digest.ByState(all, states)); len(groups) > 0 {
		t := figureTable(groups, states)
		t.Title = "Figures by state"
		blocks = append(blocks, t)
	}
	fams, groups := families(telling(digest.Stateless(all)))
	for _, f := range fams {
		blocks = append(blocks, f.table())
	}
	if len(groups) > 0 {
		t := figureTable(groups, []string{"value"})
		t.Title = "Figures"
		blocks = append(blocks, t)
	}
	if silent(all, states) {
		blocks = append(blocks, Paragraph{"Nodes and parts at which a figure is nought in every state are left out here; the JSON results list them."})
	}
	return blocks
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
	share := min(0.15, 0.6/float64(len(columns)))
	t := Table{Columns: []Column{{Title: "Figure and subject", Share: 1 - share*float64(len(columns))}}}
	for _, c := range columns {
		t.Columns = append(t.Columns, Column{Title: c, Share: share, Right: true})
	}
	for _, g := range groups {
		if len(g.Rows) == 1 {
			only := valueRow(g.Rows[0], strong(g.ID), plain(g.Rows[0].Part()), small(meaning(g)))
			only.Anchor = anchor("figure", g.ID, g.Rows[0].Part())
			t.Rows = append(t.Rows, only)
			continue
		}
		t.Rows = append(t.Rows, Row{Group: true, Cells: []Cell{lines(strong(g.ID), small(meaning(g)))}})
		for _, row := range g.Rows {
			under := valueRow(row, plain(row.Subject))
			under.Under, under.Anchor = true, anchor("figure", g.ID, row.Part())
			t.Rows = append(t.Rows, under)
		}
	}
	return t
}

// meaning says what a figure is and how it was obtained.
func meaning(g digest.Group) string {
	if g.Basis == "" {
		return g.What
	}
	return g.What + "; basis: " + g.Basis
}

func valueRow(row digest.Row, first ...Line) Row {
	cells := []Cell{lines(first...)}
	for _, v := range row.Values {
		cells = append(cells, lines(plain(v)))
	}
	return Row{Cells: cells}
}

// remarks is what stands beside the findings: assumptions, cautions, rules that
// did not apply, sources.
func (n *writer) remarks() []Section {
	r := n.review
	var sections []Section
	add := func(title, anchor string, blocks []Block) {
		if len(blocks) > 0 {
			sections = append(sections, Section{Title: title, Anchor: anchor, Blocks: blocks})
		}
	}
	add("Assumptions", "assumptions", paragraphs(r.Assumptions))
	add("Cautions", "cautions", factsOf(r.Cautions, func(c rule.Caution) Fact { return Fact{c.Subject, c.Text} }))
	add("Rules passed over", "passed-over", factsOf(r.PassedOver, func(p rule.PassedOver) Fact { return Fact{p.Rule, p.Because} }))
	add("Sources", "sources", n.sourceTable())
	return sections
}

// sourceTable numbers the sources that findings refer to.
func (n *writer) sourceTable() []Block {
	if len(n.sources) == 0 {
		return nil
	}
	t := Table{Columns: []Column{{Title: "No.", Share: 0.08}, {Title: "Source", Share: 0.67}, {Title: "How it is known", Share: 0.25}}}
	for i, s := range n.sources {
		t.Rows = append(t.Rows, Row{Anchor: sourceAnchor(i + 1), Cells: []Cell{lines(plain(sourceWord(i + 1))), lines(plain(s.Text)), lines(plain(digest.Known(s)))}})
	}
	return []Block{t}
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

// signing is the last section: what was read and by what, and where the sheet is that
// people sign.
func signing(r *rules.Review) Section {
	return Section{Title: "Sign-off", Anchor: "sign-off", Whole: true, Blocks: []Block{
		Paragraph{"This review is for the files named here by their SHA-256, as read by " + r.Program.Name + " " + r.Program.Version + ". A file changed afterwards needs a new review."},
		inputTable(r.Inputs),
		Notice{r.Deference},
		Paragraph{"A review is read, not signed. The one sheet that people sign is written by kilovet signoff, and only when nothing that concerns life fails and every other open point has a disposition, a name and a reason."},
	}}
}
