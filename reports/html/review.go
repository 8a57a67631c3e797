package html

import (
	"cmp"
	"fmt"
	"html/template"
	"strings"

	"kilovet/reports/digest"
	"kilovet/reports/drawing"
	"kilovet/rules"
	"kilovet/rules/rule"
)

// untitled stands where the description has no title.
const untitled = "A chain without a title"

// reviewed is the page of a review: every text of outside origin is cleaned.
type reviewed struct {
	shell
	Block                []fact
	Contents             []link
	Verdict              rule.Verdict
	Sentence, Counts     string
	Deference            string
	Summary              []fact
	Against, Narrow      []entry
	Missing              []digest.Key
	Schematic            *schematic
	Verdicts, Concerns   []choice
	Articles             template.HTML
	Chapters             []chapter
	Assumptions          []string
	Cautions, PassedOver []fact
	Inputs               []rules.Input
	Program              string
}

type (
	fact  struct{ Label, Text string }
	link  struct{ ID, Title string }
	entry struct {
		Verdict                     rule.Verdict
		Concern                     rule.Concern
		ID, Rule, Subjects, Because string
		Of                          string // the first subject
	}
	choice struct {
		Word  string
		Count int
	}
	finding struct {
		ID, Rule, Subject string
		Verdict           rule.Verdict
		Concern           rule.Concern
		Because           string
		Facts             []fact
		Sources           []string
	}
)

// mostSubjects is how many subjects of an entry are named.
const mostSubjects = 3

func reviewPage(r *rules.Review, o Options) (*reviewed, error) {
	p := &reviewed{
		shell:   newShell(clean(cmp.Or(r.Heading.Title, untitled)), "Review before first power-up", o, filter, light),
		Block:   block(r.Heading),
		Verdict: r.Verdict, Sentence: clean(digest.Sentence(r)), Counts: digest.Counts(r.Counts), Deference: clean(r.Deference),
		Assumptions: cleaned(r.Assumptions), Program: clean(strings.TrimSpace(r.Program.Name + " " + r.Program.Version)),
	}
	all := findings(r)
	ids := idsOf(all)
	p.Articles = articles(all)
	p.Against, p.Narrow = entries(digest.Against(r), ids), entries(digest.Narrow(r), ids)
	for _, l := range r.Summary {
		p.Summary = append(p.Summary, fact{clean(l.Label), clean(l.Text)})
	}
	for _, k := range digest.Missing(r) {
		p.Missing = append(p.Missing, digest.Key{Name: clean(k.Name), Wants: k.Wants})
	}
	for _, c := range r.Cautions {
		p.Cautions = append(p.Cautions, fact{clean(c.Subject), clean(c.Text)})
	}
	for _, over := range digest.PassedOver(r.PassedOver) {
		p.PassedOver = append(p.PassedOver, fact{clean(over.Rules()), clean(over.Because)})
	}
	for _, in := range r.Inputs {
		p.Inputs = append(p.Inputs, rules.Input{Role: clean(in.Role), Name: clean(in.Name), SHA256: clean(in.SHA256)})
	}
	p.Verdicts, p.Concerns = choices(r)
	pen, err := drawing.NewPen()
	if err != nil {
		return nil, err
	}
	p.Schematic = schematicOf(pen, cmp.Or(o.Diagram, r.Diagram), ids)
	p.Chapters = chapters(pen, r)
	p.Contents = p.contents()
	return p, nil
}

func clean(s string) string { return digest.Clean(s) }

func cleaned(texts []string) []string {
	var all []string
	for _, t := range texts {
		all = append(all, clean(t))
	}
	return all
}

// block is the title block (ISO 7200) without its empty fields; the title is the
// heading of the page.
func block(h rules.Heading) []fact {
	return filled(fact{"Document", h.Document}, fact{"Revision", h.Revision}, fact{"Type", h.DocumentType}, fact{"Owner", h.Owner},
		fact{"Creator", h.Creator}, fact{"Approver", h.Approver}, fact{"Date", h.Date})
}

// filled cleans facts and leaves out those that say nothing.
func filled(facts ...fact) []fact {
	var all []fact
	for _, f := range facts {
		if f.Text = clean(f.Text); f.Text != "" {
			all = append(all, f)
		}
	}
	return all
}

// findings lists all findings, the worst first, each with an anchor of its own.
func findings(r *rules.Review) []finding {
	var all []finding
	for i, f := range digest.Sorted(r.Findings) {
		needed, provided := digest.Labels(f)
		facts := filled(fact{"Concerns", string(f.Concern)}, fact{sentence(needed), digest.Needed(f)}, fact{sentence(provided), digest.Provided(f)},
			fact{"Margin", digest.Margin(f)}, fact{"Under", f.Under}, fact{"Remedy", f.Remedy}, fact{"Missing", digest.Lacking(f)},
			fact{"Assumed", strings.Join(f.Assumptions, "; ")}, fact{"Where", digest.Place(r, f)})
		out := finding{ID: fmt.Sprintf("finding-%d", i+1), Rule: clean(f.Rule), Subject: clean(f.Subject), Verdict: f.Verdict, Concern: f.Concern,
			Because: clean(f.Because), Facts: facts}
		for _, s := range f.Sources {
			out.Sources = append(out.Sources, clean(digest.Source(s)))
		}
		all = append(all, out)
	}
	return all
}

// sentence begins a word with a capital.
func sentence(word string) string { return strings.ToUpper(word[:1]) + word[1:] }

// about is what a finding speaks of.
type about struct{ rule, subject string }

func idsOf(findings []finding) map[about]string {
	ids := map[about]string{}
	for _, f := range findings {
		ids[about{f.Rule, f.Subject}] = f.ID
	}
	return ids
}

func entries(list []rule.Finding, ids map[about]string) []entry {
	var all []entry
	for _, e := range digest.Entries(list) {
		f := e.First
		all = append(all, entry{f.Verdict, f.Concern, ids[about{clean(f.Rule), clean(f.Subject)}], clean(f.Rule), clean(e.Names(mostSubjects)), clean(f.Because), clean(f.Subject)})
	}
	return all
}

// choices are the verdicts and concerns to filter by, with how many findings have them.
func choices(r *rules.Review) (verdicts, concerns []choice) {
	count := map[string]int{}
	for _, f := range r.Findings {
		count[string(f.Verdict)]++
		count[string(f.Concern)]++
	}
	for _, v := range rule.Verdicts {
		verdicts = append(verdicts, choice{string(v), count[string(v)]})
	}
	for _, c := range rule.Concerns {
		concerns = append(concerns, choice{string(c), count[string(c)]})
	}
	return verdicts, concerns
}

// contents lists the sections that the page has.
func (p *reviewed) contents() []link {
	all := []link{{"verdict", "Verdict"}}
	add := func(there bool, id, title string) {
		if there {
			all = append(all, link{id, title})
		}
	}
	add(p.Schematic != nil, "schematic", "Schematic")
	add(p.Articles != "", "findings", "Findings")
	for _, c := range p.Chapters {
		add(true, c.ID, c.Title)
	}
	add(len(p.Assumptions) > 0, "assumptions", "Assumptions")
	add(len(p.Cautions) > 0, "cautions", "Cautions")
	add(len(p.PassedOver) > 0, "passed-over", "Rules passed over")
	return append(all, link{"made-from", "Made from"})
}
