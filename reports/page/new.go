package page

import (
	"cmp"
	"strings"

	"kilovet/reports/digest"
	"kilovet/rules"
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

// New lays out a review: the sheet that answers first, a chapter for each part of the
// chain, and what all of it rests on.
func New(r *rules.Review) *Document {
	n := newWriter(r)
	rest := append(n.chapters(), n.remarks()...)
	rest = append(rest, signing(r))
	front := n.front()
	front.Blocks = append(front.Blocks, contents(rest))
	return &Document{Block: titleBlock(r), Sections: append([]Section{front}, rest...)}
}

func contents(sections []Section) Contents {
	var c Contents
	for _, s := range sections {
		c.Entries = append(c.Entries, Entry{s.Title, s.Anchor})
	}
	return c
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
func (n *writer) front() Section {
	r := n.review
	blocks := []Block{
		Paragraph{"Review before first power-up"},
		Banner{Verdict: r.Verdict, Word: strings.ToUpper(string(r.Verdict)), Sentence: digest.Sentence(r), Rest: "Findings: " + digest.Counts(r.Counts) + "."},
		Notice{r.Deference},
	}
	if len(r.Summary) > 0 {
		blocks = append(blocks, summary(r.Summary))
	}
	blocks = append(blocks, n.against()...)
	blocks = append(blocks, missing(r)...)
	return Section{Title: shortened(cmp.Or(r.Heading.Title, untitled)), Anchor: "front", Blocks: blocks}
}

func summary(lines []rules.Line) Facts {
	var facts []Fact
	for _, l := range lines[:min(len(lines), mostSummary)] {
		facts = append(facts, Fact{l.Label, shortened(l.Text)})
	}
	return Facts{facts}
}

func missing(r *rules.Review) []Block {
	text := digest.MissingText(r, mostMissing)
	if text == "" {
		return nil
	}
	return []Block{Facts{[]Fact{{"missing in the description", text}}}}
}
