package page

import (
	"fmt"
	"slices"
	"strings"

	"kilovet/reports/digest"
	"kilovet/rules/diagram"
	"kilovet/rules/exhibit"
	"kilovet/rules/rule"
)

// chapters is one section for each part of the chain that there is something to say of.
func (n *writer) chapters() []Section {
	var all []Section
	for i, c := range n.parts {
		var blocks []Block
		if c.Of == exhibit.Chain {
			blocks = append(blocks, n.schematic()...)
		}
		blocks = append(blocks, n.curves(c)...)
		blocks = append(blocks, n.findings(c)...)
		blocks = append(blocks, n.tables(c)...)
		blocks = append(blocks, n.figures(n.laid[i])...)
		if len(blocks) > 0 {
			all = append(all, Section{Title: c.Title, Anchor: "chapter " + string(c.Of), Fresh: len(all) == 0, Blocks: blocks})
		}
	}
	return all
}

// schematic is the drawing of the chain with what its flags mean.
func (n *writer) schematic() []Block {
	d := n.review.Diagram
	if d == nil {
		return nil
	}
	f := Figure{Anchor: schematic, Label: n.labels[schematic], Diagram: d, Wide: true, Spots: map[string]string{}, Caption: digest.SchematicCaption(d) + flagsExplained(d)}
	for _, m := range d.Marks {
		for _, p := range d.Parts() {
			if p.Mark == m.Number {
				f.Spots[p.Name] = n.markAnchor(m)
			}
		}
		f.Spots[m.Subject] = n.markAnchor(m)
	}
	blocks := []Block{Gallery{[]Figure{f}}}
	if len(d.Marks) > 0 {
		blocks = append(blocks, n.flags(d))
	}
	return blocks
}

func flagsExplained(d *diagram.Diagram) string {
	if len(d.Marks) == 0 {
		return ""
	}
	return " Flags: black fails, double outline unassessed, broken outline marginal; their numbers are explained below."
}

func (n *writer) markAnchor(m diagram.Mark) string {
	for _, id := range m.Rules {
		if to := n.anchors[about{id, m.Subject}]; to != "" {
			return to
		}
	}
	return ""
}

// flags explains the numbers on the schematic.
func (n *writer) flags(d *diagram.Diagram) Table {
	t := Table{Title: "Flags of the schematic", Columns: []Column{{Title: "Flag", Share: 0.08}, {Title: "Verdict", Share: 0.15}, {Title: "Part or node", Share: 0.3}, {Title: "Rules", Share: 0.38}, {Title: "Sheet", Share: 0.09, Right: true}}}
	for _, m := range d.Marks {
		names := plain(strings.Join(m.Rules, ", "))
		for i, id := range m.Rules {
			word := id
			if i+1 < len(m.Rules) {
				word += ","
			}
			names.Links = append(names.Links, Link{word, n.anchors[about{id, m.Subject}]})
		}
		to := n.markAnchor(m)
		t.Rows = append(t.Rows, Row{Cells: []Cell{lines(strong(fmt.Sprint(m.Number))), {Verdict: m.Verdict}, lines(plain(m.Subject)), lines(names), {Lines: []Line{{Sheet: to, Links: []Link{{To: to}}}}}}})
	}
	return t
}

// mostKeys is how many lines, levels and marks a curve of half the width may have.
const mostKeys = 12

// curves is the pictures of a chapter.
func (n *writer) curves(c digest.Chapter) []Block {
	if len(c.Curves) == 0 {
		return nil
	}
	var g Gallery
	for i := range c.Curves {
		curve := &c.Curves[i]
		to := anchor("curve", curve.ID, curve.Subject)
		wide := len(curve.Lines)+len(curve.Levels)+len(curve.Marks) > mostKeys
		g.Figures = append(g.Figures, Figure{Anchor: to, Label: n.labels[to], Caption: caption(curve.Title, curve.Subject, curve.Basis, curve.Note), Curve: curve, Wide: wide})
	}
	return []Block{g}
}

func caption(title, subject, basis, note string) string {
	text := digest.Titled(title, subject) + "."
	if note != "" {
		text += " " + digest.Capital(strings.TrimSuffix(note, ".")) + "."
	}
	if basis != "" {
		text += " Basis: " + basis + "."
	}
	return text
}

// findings is the findings of a chapter, the worst first: those that do not meet with
// all that is said of them, then the others.
func (n *writer) findings(c digest.Chapter) []Block {
	first := slices.IndexFunc(c.Findings, func(f rule.Finding) bool { return f.Verdict == rule.Meets })
	if first < 0 {
		first = len(c.Findings)
	}
	return append(n.standing(c, c.Findings[:first]), n.met(c, c.Findings[first:])...)
}

// standing is the table of findings that do not meet.
func (n *writer) standing(c digest.Chapter, findings []rule.Finding) []Block {
	if len(findings) == 0 {
		return nil
	}
	t := Table{Title: "Findings", Columns: []Column{{Title: "Verdict", Share: 0.125}, {Title: "Rule and subject", Share: 0.215}, {Title: "Amounts", Share: 0.16}, {Title: "Reason and remedy", Share: 0.5}}}
	for _, same := range clusters(findings) {
		f := same[0]
		about, all := n.subjects(c, same)
		needed, provided := digest.Labels(f)
		beside, below := labelledSmall("under", f.Under), Line{}
		if long(f.Under) {
			beside, below = below, beside
		}
		t.Rows = append(t.Rows, Row{Anchor: n.anchorOf(f), Cells: []Cell{
			{Verdict: f.Verdict},
			lines(strong(f.Rule), about, small("concerns "+string(f.Concern)), small(digest.Line(f))),
			lines(labelled(needed, digest.Needed(f)), labelled(provided, digest.Provided(f)), labelled("margin", digest.Margin(f)), beside),
			n.reasons(c, same, all, below),
		}})
	}
	return []Block{t}
}

// reasons is why findings that say the same are as they are, with what it rests on after what else is to say.
func (n *writer) reasons(c digest.Chapter, same []rule.Finding, subjects, below Line) Cell {
	f := same[0]
	all := []Line{plain(f.Because), joined(labelled("Remedy:", f.Remedy), labelled("missing:", digest.Lacking(f)))}
	for _, a := range f.Assumptions {
		all = append(all, labelled("Assumed:", a))
	}
	return lines(append(all, subjects, joined(below, joined(n.sourceLine(f), n.seenLine(c, same...))))...)
}

// longTable is how many rows of a table stand on the sheets; tables put first what
// matters most.
const longTable = 40

// tables is the tables of a chapter.
func (n *writer) tables(c digest.Chapter) []Block {
	var all []Block
	for _, t := range c.Tables {
		to := anchor("table", t.ID, t.Subject)
		title := n.labels[to] + ": " + digest.Titled(t.Title, t.Subject)
		rest := 0
		if t.Chapter != exhibit.Plan { // every box to fill in stands on paper
			rest = max(len(t.Rows)-longTable, 0)
		}
		t.Rows = t.Rows[:len(t.Rows)-rest]
		out, narrow := set(t)
		out.Title, out.Note, out.Anchor = title, tableNote(t), to
		if rest > 0 {
			out.Legend = append(out.Legend, plain(fmt.Sprintf("%d more %s of %s %s in the JSON results and with --all.", rest, plural(rest, "row", "rows"), n.labels[to], plural(rest, "is", "are"))))
		}
		all = append(all, sized{out, narrow})
	}
	return paired(all)
}

// set is the columns and rows of a table, with its long texts that come again under it.
func set(t exhibit.Table) (out Table, narrow bool) {
	if t.Chapter != exhibit.Plan { // whose rows are read with hands busy
		t, out.Legend = withLegend(t)
	}
	out.Columns, narrow = columns(t)
	for _, row := range t.Rows {
		var cells []Cell
		for i, cell := range row {
			cells = append(cells, lines(plain(digest.Cell(t.Columns[i].Unit, cell.Value, cell.Text))))
		}
		out.Rows = append(out.Rows, Row{Cells: cells})
	}
	return out, narrow
}

func tableNote(t exhibit.Table) string {
	text := ""
	if t.Note != "" {
		text = digest.Capital(strings.TrimSuffix(t.Note, ".")) + ". "
	}
	if t.Basis != "" {
		text += "Basis: " + t.Basis + "."
	}
	return text
}
