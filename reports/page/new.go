package page

import (
	"cmp"
	"strings"

	"kilovet/reports/digest"
	"kilovet/rules"
	"kilovet/rules/rule"
)

// How much of each list the first sheet shows; the rest stands on those after it.
const (
	mostSubjects = 3
	mostMissing  = 12
	mostSummary  = 10
	mostReason   = 200 // runes
)

// untitled stands where the description has no title.
const untitled = "A chain without a title"

// New lays out a review.
func New(r *rules.Review) *Document {
	sections := []Section{front(r)}
	sections = append(sections, findings(r)...)
	sections = append(sections, figures(r)...)
	sections = append(sections, remarks(r)...)
	return &Document{Block: titleBlock(r), Sections: append(sections, signing(r))}
}

func titleBlock(r *rules.Review) TitleBlock {
	h := r.Heading
	return TitleBlock{Title: cmp.Or(h.Title, untitled), Document: h.Document, Revision: h.Revision, Owner: h.Owner,
		Creator: h.Creator, Approver: h.Approver, Date: h.Date, DocumentType: cmp.Or(h.DocumentType, "review before first power-up"),
		Program: strings.TrimSpace(r.Program.Name + " " + r.Program.Version)}
}

// Noted is the document with a line above everything on its first sheet.
func (d *Document) Noted(note string) *Document {
	d.Sections[0].Lead = note
	return d
}

// front is the sheet that answers first: verdict, deference, what the chain is,
// what stands against switching on, what is missing.
func front(r *rules.Review) Section {
	blocks := []Block{
		Paragraph{"Review before first power-up"},
		Banner{Verdict: r.Verdict, Word: strings.ToUpper(string(r.Verdict)), Sentence: digest.Sentence(r), Rest: "Findings: " + digest.Counts(r.Counts) + "."},
		Notice{r.Deference},
	}
	if len(r.Summary) > 0 {
		blocks = append(blocks, summary(r.Summary))
	}
	blocks = append(blocks, against(r)...)
	blocks = append(blocks, missing(r)...)
	return Section{Title: shortened(cmp.Or(r.Heading.Title, untitled)), Blocks: blocks}
}

func summary(lines []rules.Line) Facts {
	var facts []Fact
	for _, l := range lines[:min(len(lines), mostSummary)] {
		facts = append(facts, Fact{l.Label, shortened(l.Text)})
	}
	return Facts{facts}
}

// against is what stands against switching on and, after it, what is met with little
// in hand: as many rows as the sheet holds.
func against(r *rules.Review) []Block {
	if len(r.Findings) == 0 {
		return nil
	}
	const little = "Met with little in hand or on an assumption"
	standing, narrow := entryRows(digest.Against(r)), entryRows(digest.Narrow(r))
	title := "Stands against switching on"
	var blocks []Block
	if len(standing) == 0 {
		blocks, title = append(blocks, Paragraph{"No finding stands against switching on."}), little
	} else if len(narrow) > 0 {
		standing = append(standing, Row{Group: true, Cells: []Cell{lines(strong(little))}})
	}
	if rows := append(standing, narrow...); len(rows) > 0 {
		blocks = append(blocks, Table{Columns: []Column{{Title: "", Share: 0.16}, {Title: title, Share: 0.34}, {Title: "Why", Share: 0.5}}, Rows: rows, Fill: true})
	}
	return blocks
}

func entryRows(findings []rule.Finding) []Row {
	var rows []Row
	for _, e := range digest.Entries(findings) {
		rows = append(rows, Row{Cells: []Cell{
			{Verdict: e.First.Verdict},
			lines(strong(e.First.Rule), plain(shortened(e.Names(mostSubjects))), small("concerns "+string(e.First.Concern))),
			lines(plain(shortened(e.First.Because))),
		}})
	}
	return rows
}

// Rest is the row that stands for those of a table from the given one on.
func (t Table) Rest(from int) Row {
	n := 0
	for _, r := range t.Rows[from:] {
		if !r.Group {
			n++
		}
	}
	return Row{Group: true, Cells: []Cell{lines(strong("And " + count(n, "rule") + " more, on the sheets that follow."))}}
}

func missing(r *rules.Review) []Block {
	text := digest.MissingText(r, mostMissing)
	if text == "" {
		return nil
	}
	return []Block{Facts{[]Fact{{"missing in the description", text}}}}
}

// findings is the table of all findings, the worst first.
func findings(r *rules.Review) []Section {
	if len(r.Findings) == 0 {
		return nil
	}
	t := Table{Columns: []Column{{Title: "Verdict", Share: 0.13}, {Title: "Rule and subject", Share: 0.24}, {Title: "Amounts", Share: 0.22}, {Title: "Reason, remedy, sources", Share: 0.41}}}
	for _, f := range digest.Sorted(r.Findings) {
		needed, provided := digest.Labels(f)
		t.Rows = append(t.Rows, Row{Cells: []Cell{
			{Verdict: f.Verdict},
			lines(strong(f.Rule), plain(f.Subject), small("concerns "+string(f.Concern)), small(digest.Line(f))),
			lines(labelled(needed, digest.Needed(f)), labelled(provided, digest.Provided(f)), labelled("margin", digest.Margin(f)), labelledSmall("under", f.Under)),
			reasons(f),
		}})
	}
	return []Section{{Title: "Findings", Fresh: true, Blocks: []Block{t}}}
}

func reasons(f rule.Finding) Cell {
	all := []Line{plain(f.Because), labelled("Remedy:", f.Remedy), labelled("Missing:", strings.Join(f.Missing, ", "))}
	for _, a := range f.Assumptions {
		all = append(all, labelled("Assumed:", a))
	}
	for _, s := range f.Sources {
		all = append(all, small(digest.Source(s)))
	}
	return lines(all...)
}
