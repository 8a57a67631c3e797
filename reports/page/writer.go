package page

import (
	"fmt"
	"slices"
	"strings"

	"kilovet/reports/digest"
	"kilovet/rules"
	"kilovet/rules/exhibit"
	"kilovet/rules/figure"
	"kilovet/rules/rule"
)

// writer lays out one review; it knows where links lead.
type writer struct {
	review  *rules.Review
	parts   []digest.Chapter
	sources []rule.Source
	labels  map[string]string // of figures and tables, by anchor
	anchors map[about]string  // of findings
	laid    []laid            // the figures of each part
	places  map[place]string  // anchors of figures
}

// place is a figure of a subject.
type place struct{ id, subject string }

// about is what a finding speaks of.
type about struct{ rule, subject string }

func newWriter(r *rules.Review) *writer {
	n := &writer{review: r, parts: digest.Chapters(r), sources: digest.Sources(r), labels: map[string]string{}, anchors: map[about]string{}, places: map[place]string{}}
	for i, f := range digest.Sorted(r.Findings) {
		n.anchors[about{f.Rule, f.Subject}] = fmt.Sprintf("finding-%d", i+1)
	}
	for _, same := range clusters(digest.Sorted(r.Findings)) {
		for _, f := range same {
			n.anchors[about{f.Rule, f.Subject}] = n.anchorOf(same[0])
		}
	}
	for k, c := range n.parts {
		c.Tables = slices.DeleteFunc(c.Tables, func(t exhibit.Table) bool { return t.Detail })
		n.parts[k].Tables = c.Tables
		for i := range c.Curves {
			c.Curves[i] = digest.Thinned(c.Curves[i])
		}
		n.lay(c, layFigures(c))
	}
	n.number()
	return n
}

// lay keeps the figures of a part and where each of them stands.
func (n *writer) lay(c digest.Chapter, l laid) {
	n.laid = append(n.laid, l)
	for _, t := range l.told {
		for _, r := range t.Rows {
			n.places[place{t.ID, r.Part()}] = t.tables[0]
		}
	}
	for _, g := range l.alike {
		for _, f := range c.Figures {
			if f.ID == g.ID {
				n.places[place{f.ID, f.Subject}] = anchor("figure", g.ID, g.Rows[0].Part())
			}
		}
	}
	for _, g := range append(slices.Clone(l.byState), l.others...) {
		for _, r := range g.Rows {
			n.places[place{g.ID, r.Part()}] = anchor("figure", g.ID, r.Part())
		}
	}
	for _, m := range l.matrices {
		for _, r := range m.folded() {
			for _, g := range m.groups {
				for _, s := range r.subjects {
					n.places[place{g.ID, digest.Row{Subject: s}.Part()}] = m.anchor(r.subjects[0])
				}
			}
		}
	}
}

func (n *writer) anchorOf(f rule.Finding) string { return n.anchors[about{f.Rule, f.Subject}] }

// number gives figures and tables their labels in the order in which they stand.
func (n *writer) number() {
	figures, tables := 0, 0
	if n.review.Diagram != nil {
		figures++
		n.labels[schematic] = fmt.Sprintf("Figure %d", figures)
	}
	for _, c := range n.parts {
		for _, curve := range c.Curves {
			figures++
			n.labels[anchor("curve", curve.ID, curve.Subject)] = fmt.Sprintf("Figure %d", figures)
		}
		for _, t := range c.Tables {
			tables++
			n.labels[anchor("table", t.ID, t.Subject)] = fmt.Sprintf("Table %d", tables)
		}
	}
}

// schematic is the anchor of the schematic.
const schematic = "schematic"

// anchor names what links lead to.
func anchor(kind, id, subject string) string { return kind + " " + id + " " + subject }

func sourceAnchor(n int) string { return fmt.Sprintf("source %d", n) }

// sourceWord stands for a source in a finding.
func sourceWord(n int) string { return fmt.Sprintf("[%d]", n) }

// sourceLine refers to the sources of a finding by their numbers; those that judged are
// named first.
func (n *writer) sourceLine(f rule.Finding) Line {
	var governing, others []string
	l := small("")
	for _, s := range f.Sources {
		k := digest.SourceNumber(n.sources, s)
		l.Links = append(l.Links, Link{sourceWord(k), sourceAnchor(k)})
		if s.Governs {
			governing = append(governing, sourceWord(k))
		} else {
			others = append(others, sourceWord(k))
		}
	}
	var texts []string
	if len(governing) > 0 {
		texts = append(texts, "judged by "+strings.Join(governing, " "))
	}
	if len(others) > 0 {
		texts = append(texts, "see also "+strings.Join(others, " "))
	}
	l.Text = strings.Join(texts, "; ")
	return l
}

// mostSeen is how many figures a finding refers to beside pictures and tables, where its
// rule does not say what its findings rest on.
const mostSeen = 2

// pointer is a word that leads somewhere.
type pointer struct{ word, to string }

// seenLine refers to what findings rest on, as far as they share it.
func (n *writer) seenLine(c digest.Chapter, same ...rule.Finding) Line {
	l := small("")
	for _, p := range n.pointers(c, same[0]) {
		if n.shared(c, p, same[1:]) {
			l = joinedBy(", ", l, Line{Text: p.word, Links: []Link{{p.word[strings.LastIndex(p.word, " ")+1:], p.to}}})
		}
	}
	if l.Text != "" {
		l.Text, l.Weight = "see "+l.Text, Small
	}
	return l
}

// shared reports whether other findings rest on what is pointed at too.
func (n *writer) shared(c digest.Chapter, p pointer, others []rule.Finding) bool {
	return !slices.ContainsFunc(others, func(f rule.Finding) bool { return !slices.Contains(n.pointers(c, f), p) })
}

// pointers lead to what a finding rests on, each place once.
func (n *writer) pointers(c digest.Chapter, f rule.Finding) []pointer {
	var all []pointer
	see := func(word, to string) {
		if to != "" && !slices.ContainsFunc(all, func(p pointer) bool { return p.to == to }) {
			all = append(all, pointer{word, to})
		}
	}
	for _, ref := range digest.Rests(f.Rule, f.Subject) {
		see(n.rest(ref))
	}
	if len(all) == 0 {
		n.seen(c, f, see)
	}
	return all
}

// rest is what a rule rests on, and where it stands; nowhere where there is none.
func (n *writer) rest(ref digest.Ref) (word, to string) {
	if ref.Kind == "figure" {
		return ref.ID, n.places[place{ref.ID, ref.Subject}]
	}
	for _, c := range n.parts {
		for _, curve := range c.Curves {
			if ref.Kind == "curve" && curve.ID == ref.ID {
				to = anchor("curve", curve.ID, curve.Subject)
				return n.labels[to], to
			}
		}
		for _, t := range c.Tables {
			if ref.Kind == "table" && t.ID == ref.ID {
				to = anchor("table", t.ID, t.Subject)
				return n.labels[to], to
			}
		}
	}
	return "", ""
}

// seen refers to what is shown and computed of the subject of a finding.
func (n *writer) seen(c digest.Chapter, f rule.Finding, see func(word, to string)) {
	for _, curve := range c.Curves {
		if to := anchor("curve", curve.ID, curve.Subject); speaksOf(curve.Subject, f.Subject) {
			see(n.labels[to], to)
		}
	}
	for _, t := range c.Tables {
		if to := anchor("table", t.ID, t.Subject); speaksOf(t.Subject, f.Subject) {
			see(n.labels[to], to)
		}
	}
	for _, fig := range nearest(c.Figures, f) {
		see(fig.ID, n.places[place{fig.ID, fig.Subject}])
	}
}

// nearest are the figures about the subject of a finding, one of each id; those first
// whose name shares a word with the rule's.
func nearest(figures []figure.Figure, f rule.Finding) []figure.Figure {
	var first, then []figure.Figure
	rule := strings.Split(heading(f.Rule), " ")
	for _, fig := range figures {
		known := func(o figure.Figure) bool { return o.ID == fig.ID }
		switch {
		case !speaksOf(fig.Subject, f.Subject) || slices.ContainsFunc(first, known) || slices.ContainsFunc(then, known):
		case slices.ContainsFunc(strings.Fields(heading(fig.ID)), func(w string) bool { return slices.Contains(rule, w) }):
			first = append(first, fig)
		default:
			then = append(then, fig)
		}
	}
	all := append(first, then...)
	return all[:min(len(all), mostSeen)]
}

// speaksOf reports whether a figure of one subject tells of another: of the same part,
// or of one of those it stands for.
func speaksOf(of, subject string) bool {
	rest, begins := strings.CutPrefix(of, subject)
	return subject != "" && begins && (rest == "" || rest[0] == '.')
}
