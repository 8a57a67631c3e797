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
	}
	d.Marks = marks
	d.put()
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

// put writes the numbers of all marks on what they speak of: first each on the part or
// node of its name, then those of groups on parts without a mark of their own, all such of
// a kind of the ladder, the first of other groups. What the drawing has no room for is
// in the list of flags alone.
func (d *Diagram) put() {
	var groups []Mark
	for _, m := range d.Marks {
		if !d.putOn(m) {
			groups = append(groups, m)
		}
	}
	for _, m := range groups {
		d.putWithin(m)
	}
}

// putOn marks the part or node of a mark's name, if there is one.
func (d *Diagram) putOn(m Mark) bool {
	for _, n := range d.Nodes() {
		if n.Name == m.Subject {
			n.Mark = m.Number
			return true
		}
	}
	for _, p := range d.Parts() {
		if p.Name == m.Subject {
			p.Mark = m.Number
			return true
		}
	}
	return false
}

// putWithin marks the parts of a group that bear no mark or, where none is free, the first
// of them in place of a lesser mark.
func (d *Diagram) putWithin(m Mark) {
	var first *Part
	for _, p := range d.Parts() {
		if !p.belongs(m.Subject) {
			continue
		}
		if first == nil {
			first = p
		}
		if p.Mark > 0 {
			continue
		}
		p.Mark = m.Number
		if first = p; !strings.HasPrefix(m.Subject, "multiplier.") {
			return
		}
	}
	if first.Mark > m.Number { // the worst come first
		first.Mark = m.Number
	}
}
