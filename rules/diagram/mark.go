package diagram

import (
	"cmp"
	"slices"
	"strings"

	"kilovet/rules/rule"
)

// mark puts the findings that do not simply meet onto the parts and nodes they speak
// of: one mark for each subject, the worst first.
func (d *Diagram) mark(findings []rule.Finding) {
	var marks []Mark
	for _, f := range findings {
		switch {
		case f.Verdict == rule.Meets:
		case !d.shows(f.Subject):
			d.Elsewhere++
		default:
			marks = noted(marks, f)
		}
	}
	slices.SortStableFunc(marks, func(a, b Mark) int {
		return cmp.Compare(slices.Index(rule.Verdicts, a.Verdict), slices.Index(rule.Verdicts, b.Verdict))
	})
	for i := range marks {
		marks[i].Number = i + 1
		d.put(marks[i])
	}
	d.Marks = marks
}

// noted adds a finding to the mark of its subject.
func noted(marks []Mark, f rule.Finding) []Mark {
	i := slices.IndexFunc(marks, func(m Mark) bool { return m.Subject == f.Subject })
	if i < 0 {
		return append(marks, Mark{Verdict: f.Verdict, Subject: f.Subject, Rules: []string{f.Rule}})
	}
	marks[i].Rules = append(marks[i].Rules, f.Rule)
	if rule.Graver(f.Verdict, marks[i].Verdict) {
		marks[i].Verdict = f.Verdict
	}
	return marks
}

// shows reports whether a subject is drawn.
func (d *Diagram) shows(subject string) bool {
	return slices.ContainsFunc(d.Parts(), func(p *Part) bool { return p.belongs(subject) }) ||
		slices.ContainsFunc(d.Nodes(), func(n *Node) bool { return n.Name == subject })
}

// belongs reports whether a part is the subject, or one of those it stands for:
// "multiplier.diode" stands for all diodes, "divider" for its resistors.
func (p *Part) belongs(subject string) bool {
	return subject != "" && (p.Name == subject || strings.HasPrefix(p.Name, subject+"."))
}

// put writes a mark's number on what it speaks of: the part or node of that name,
// all parts of a kind of the ladder, of other groups the first.
func (d *Diagram) put(m Mark) {
	for _, n := range d.Nodes() {
		if n.Name == m.Subject {
			n.Mark = m.Number
			return
		}
	}
	for _, p := range d.Parts() {
		if !p.belongs(m.Subject) {
			continue
		}
		p.Mark = m.Number
		if !strings.HasPrefix(m.Subject, "multiplier.") {
			return
		}
	}
}
