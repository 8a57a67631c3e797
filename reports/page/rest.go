package page

import (
	"cmp"
	"slices"
	"unicode/utf8"

	"kilovet/reports/digest"
	"kilovet/rules"
	"kilovet/rules/rule"
)

// figures is the tables of the figures of a chapter: matrices of those of several
// subjects, those that depend on the state, and the others. Rows of parts that are nought
// throughout are left out, and that is said.
func (n *writer) figures(l laid) []Block {
	var blocks []Block
	for _, m := range l.matrices {
		blocks = append(blocks, sized{m.table(l.states), m.narrow()})
	}
	if len(l.alike) > 0 {
		blocks = append(blocks, sized{figureTable("Figures that are the same for several", l.alike, l.states), false})
	}
	if len(l.byState) > 0 {
		blocks = append(blocks, sized{figureTable("Figures by state", l.byState, l.states), false})
	}
	if len(l.others) > 0 {
		blocks = append(blocks, sized{figureTable("Figures", l.others, l.states), false})
	}
	blocks = paired(blocks)
	if len(l.told) > 0 {
		blocks = append(blocks, n.toldTable(l.told))
	}
	if l.silent {
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

// figureTable lists figures: what each is, and its value in each state that any has one
// in.
func figureTable(title string, groups []digest.Group, states []string) Table {
	var used []int
	for i := range states {
		if slices.ContainsFunc(groups, func(g digest.Group) bool { return slices.Contains(statesOf(g), i) }) {
			used = append(used, i)
		}
	}
	share := min(valueShare(groups), 0.5/float64(len(used)))
	t := Table{Title: title, Columns: []Column{{Title: "Figure", Share: 0.235}, {Title: "What it is; what computed it", Share: 0.765 - share*float64(len(used))}}}
	for _, s := range used {
		t.Columns = append(t.Columns, Column{Title: cmp.Or(states[s], "value"), Share: share, Right: true})
	}
	for _, g := range groups {
		for _, row := range g.Rows {
			out := Row{Anchor: anchor("figure", g.ID, row.Part()), Cells: []Cell{lines(strong(g.ID), plain(row.Part())), lines(small(meaning(g)))}}
			for _, s := range used {
				out.Cells = append(out.Cells, lines(plain(row.Values[s])))
			}
			t.Rows = append(t.Rows, out)
		}
	}
	return t
}

// valueShare is what a column of values takes of the width.
func valueShare(groups []digest.Group) float64 {
	const usual = 0.095
	longest := 0
	for _, g := range groups {
		for _, row := range g.Rows {
			for _, v := range row.Values {
				longest = max(longest, utf8.RuneCountInString(v))
			}
		}
	}
	return max(usual, float64(min(longest, longestText/2)+2)/lineRunes)
}

// toldTable names the figures that tables show, and those tables.
func (n *writer) toldTable(all []told) Table {
	t := Table{Title: "Figures shown in tables", Columns: []Column{{Title: "Figure", Share: 0.24}, {Title: "What it is; what computed it", Share: 0.56}, {Title: "Shown in", Share: 0.2}}}
	for _, f := range all {
		in := plain("")
		for _, to := range f.tables {
			in = joined(in, Line{Text: n.labels[to], Links: []Link{{n.labels[to], to}}})
		}
		t.Rows = append(t.Rows, Row{Cells: []Cell{lines(strong(f.ID)), lines(small(meaning(f.Group))), lines(in)}})
	}
	return t
}

// meaning says what a figure is and how it was obtained.
func meaning(g digest.Group) string {
	if g.Basis == "" {
		return g.What
	}
	return g.What + "; " + g.Basis
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
	add("Rules passed over", "passed-over", passedOver(r))
	add("Sources", "sources", n.sourceTable())
	return sections
}

// passedOver tells each reason once, beside the rules that it holds for.
func passedOver(r *rules.Review) []Block {
	if len(r.PassedOver) == 0 {
		return nil
	}
	t := Table{Columns: []Column{{Title: "Rules", Share: 0.5}, {Title: "Why they do not apply", Share: 0.5}}}
	for _, p := range digest.PassedOver(r.PassedOver) {
		t.Rows = append(t.Rows, Row{Cells: []Cell{lines(plain(p.Rules())), lines(small(p.Because))}})
	}
	return halved([]Block{t})
}

// sourceTable numbers the sources that findings refer to.
func (n *writer) sourceTable() []Block {
	if len(n.sources) == 0 {
		return nil
	}
	t := Table{Columns: []Column{{Title: "No.", Share: 0.08}, {Title: "Source, and how it is known", Share: 0.92}}}
	for i, s := range n.sources {
		t.Rows = append(t.Rows, Row{Anchor: sourceAnchor(i + 1), Cells: []Cell{lines(small(sourceWord(i + 1))), lines(small(s.Text + " (" + digest.Known(s) + ")"))}})
	}
	return halved([]Block{t})
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
