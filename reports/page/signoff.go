package page

import (
	"cmp"
	"fmt"
	"strings"

	"kilovet/reports/digest"
	"kilovet/rules"
	"kilovet/rules/local"
	"kilovet/rules/readings"
	"kilovet/rules/rule"
	"kilovet/rules/signoff"
)

// Issue is what a sheet to sign holds that no file says.
type Issue struct {
	Date, Until string // of issue, and the last day of validity; ISO 8601, the latter may be empty
}

// SignOff lays out the sheet that people sign: what was reviewed, what is open and who
// answers for it, what can hurt, and what ends its validity.
func SignOff(r *rules.Review, s rules.SignOff, i Issue) *Document {
	block := titleBlock(r)
	block.Date, block.DocumentType = i.Date, "sign-off "+s.Code // on every sheet
	sections := []Section{released(r, s, i), reviewed(r, s), openPoints(s)}
	sections = append(sections, idleDispositions(s)...)
	sections = append(sections, localLimits(r)...)
	add := func(title string, blocks []Block) {
		if len(blocks) > 0 {
			sections = append(sections, Section{Title: title, Blocks: blocks})
		}
	}
	add("Assumptions", paragraphs(r.Assumptions))
	add("What can hurt", factsOf(s.Hazards, func(l rules.Line) Fact { return Fact{l.Label, l.Text} }))
	add("Cautions", factsOf(r.Cautions, func(c rule.Caution) Fact { return Fact{c.Subject, c.Text} }))
	return &Document{Block: block, Sections: append(sections, validity(i), signed(r, s))}
}

// released is the head of the sheet.
func released(r *rules.Review, s rules.SignOff, i Issue) Section {
	return Section{Title: shortened(cmp.Or(r.Heading.Title, untitled)), Anchor: "front", Blocks: []Block{
		Paragraph{"Sign-off before first power-up"},
		Banner{Verdict: r.Verdict, Word: strings.ToUpper(string(r.Verdict)), Sentence: openSentence(s), Rest: "Findings: " + digest.Counts(r.Counts) + "."},
		Notice{r.Deference},
		Facts{[]Fact{
			{"code", s.Code + "   for exactly the files, the program and the verdicts named here; kilovet verify tells whether it belongs to a description"},
			{"date of issue", i.Date},
			{"required concerns", concernsOf(s.Required)},
		}},
	}}
}

func openSentence(s rules.SignOff) string {
	open := 0
	for _, p := range s.Points {
		if p.Required && digest.Blocks(p.Finding.Verdict) {
			open++
		}
	}
	if open == 0 {
		return "Nothing of the required concerns fails or is unassessed."
	}
	return "Nothing that concerns life fails. " + count(open, "point") + " of the required concerns that fail or are unassessed have a disposition, below."
}

func concernsOf(required []rule.Concern) string {
	var words []string
	for _, c := range rule.Concerns {
		for _, r := range required {
			if r == c {
				words = append(words, string(c))
			}
		}
	}
	return strings.Join(words, ", ")
}

// reviewed names what was read, and by what.
func reviewed(r *rules.Review, s rules.SignOff) Section {
	facts := []Fact{
		{"document", cmp.Or(strings.TrimSpace(r.Heading.Document+revision(r.Heading.Revision)), "without a number")},
		{"reviewed by", r.Program.Name + " " + r.Program.Version},
	}
	if s.Readings != nil {
		facts = append(facts, Fact{"first power-up", powerUp(s.Readings)})
	} else {
		facts = append(facts, Fact{"first power-up", "no readings are given: this sheet comes before it"})
	}
	return Section{Title: "What was reviewed", Whole: true, Blocks: []Block{Facts{facts}, inputTable(r.Inputs)}}
}

// powerUp says how much of the plan was read: what was not is as unknown as before.
func powerUp(c *readings.Comparison) string {
	text := fmt.Sprintf("%d of %s of the plan %s taken, each within its bounds", len(c.Rows), count(c.Planned, "reading"), plural(len(c.Rows), "was", "were"))
	if missing := c.Planned - len(c.Rows); missing > 0 {
		text += fmt.Sprintf("; %d %s not taken, and nothing is known of what %s would have shown", missing, plural(missing, "was", "were"), plural(missing, "it", "they"))
	}
	if c.Sign == readings.Untaken {
		return text + "; the polarity was not taken: a reversed ladder would read alike"
	}
	return text + "; the polarity is as described"
}

func plural(n int, one, several string) string {
	if n == 1 {
		return one
	}
	return several
}

func revision(index string) string {
	if index == "" {
		return ""
	}
	return ", revision " + index
}

func inputTable(inputs []rules.Input) Table {
	t := Table{Columns: []Column{{Title: "Read", Share: 0.15}, {Title: "File", Share: 0.23}, {Title: "SHA-256", Share: 0.62}}}
	for _, in := range inputs {
		t.Rows = append(t.Rows, Row{Cells: []Cell{lines(plain(in.Role)), lines(plain(in.Name)), lines(small(in.SHA256))}})
	}
	return t
}

// openPoints is every finding that does not meet, with what is to become of it.
func openPoints(s rules.SignOff) Section {
	if len(s.Points) == 0 {
		return Section{Title: "Open points", Blocks: []Block{Paragraph{"None: every rule that applies is met."}}}
	}
	t := Table{Columns: []Column{{Title: "Verdict", Share: 0.14}, {Title: "Rule and subject", Share: 0.24}, {Title: "Why", Share: 0.32}, {Title: "Disposition, who answers for it", Share: 0.30}}}
	for _, p := range s.Points {
		t.Rows = append(t.Rows, Row{Cells: []Cell{
			{Verdict: p.Finding.Verdict},
			lines(strong(p.Finding.Rule), plain(p.Finding.Subject), small("concerns "+string(p.Finding.Concern))),
			lines(plain(p.Finding.Because)),
			dispositionCell(p),
		}})
	}
	return Section{Title: "Open points", Blocks: []Block{t}}
}

func dispositionCell(p signoff.Point) Cell {
	d := p.Disposition
	switch {
	case d != nil:
		return lines(strong(d.Word), labelled("by", d.Name), plain(d.Reason), labelled("record", d.Record), labelled("measured:", d.Measured()))
	case p.Finding.Verdict == rule.Marginal:
		return lines(plain(digest.Marginal(p.Finding)))
	}
	if !p.Required {
		return lines(plain("not among the required concerns"))
	}
	return lines(plain("none"))
}

func idleDispositions(s rules.SignOff) []Section {
	if len(s.Idle) == 0 {
		return nil
	}
	return []Section{{Title: "Dispositions without effect", Blocks: factsOf(s.Idle, func(i signoff.Idle) Fact {
		return Fact{strings.TrimSpace(i.Rule + " " + i.Subject), i.Word + " by " + i.Name + ": " + i.Because}
	})}}
}

func localLimits(r *rules.Review) []Section {
	if len(r.Local) == 0 {
		return nil
	}
	return []Section{{Title: "Local limits and relaxations", Blocks: factsOf(r.Local, func(o local.Outcome) Fact {
		return Fact{o.Rule, o.Kind + " of " + o.Value + ", " + string(o.Result) + " for " + strings.Join(o.Subjects, "; ") + ": " + o.Because + " (" + o.From + ")"}
	})}}
}

// validity says how long the sheet holds and what ends it at once.
func validity(i Issue) Section {
	until := "This sheet is valid until " + i.Until + ", that day included."
	if i.Until == "" {
		until = "This sheet is valid until ______________________ (write in the last day)."
	}
	return Section{Title: "Validity", Whole: true, Blocks: []Block{
		Paragraph{until + " It ends at once, whatever the day, when one of these is no longer so:"},
		Facts{[]Fact{
			{"the files", "each file named above has the SHA-256 given, and describes what is built"},
			{"the equipment", "no part, wire, distance, insulation, gas, oil or vacuum was changed, and it stands in the same place"},
			{"damage", "no arc, flashover, fall, flood or repair since; after one of these, a new look and a new sheet"},
			{"protection", "interlocks, earth bonds, earthing rod, trips and shields are in place and were tested as the plan says"},
			{"people", "those who work there know the cautions, and the restrictions of the open points are kept"},
			{"rules", "local codes and licensed persons ask for nothing more"},
		}},
	}}
}

// signed is the blanks to sign in.
func signed(r *rules.Review, s rules.SignOff) Section {
	return Section{Title: "Signatures", Anchor: "sign-off", Whole: true, Blocks: []Block{
		Paragraph{"Who checks is not who prepared. Signed is what stands above, under code " + s.Code + ", and nothing else."},
		Notice{"The code and the stamp in this file show damage and mix-up, not forgery: there is no key. Signatures on paper, or a signature of your own over this file, bind persons; kilovet does not."},
		Signatures{[]Blank{{"Prepared", r.Heading.Creator}, {"Checked", ""}, {"Approved", r.Heading.Approver}}},
	}}
}
