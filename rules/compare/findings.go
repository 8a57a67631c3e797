package compare

import "kilovet/rules/rule"

// findings lists the findings whose verdict changed, that came or went.
func findings(old, new []rule.Finding) []Finding {
	var changed []Finding
	for _, p := range pairs(old, new, func(f *rule.Finding) [2]string { return [2]string{f.Rule, f.Subject} }) {
		if p.old != nil && p.new != nil && p.old.Verdict == p.new.Verdict {
			continue
		}
		f := p.first()
		lost := p.new == nil && p.old.Verdict == rule.Meets && judged(new, f.Rule) < judged(old, f.Rule)
		changed = append(changed, Finding{f.Rule, f.Subject, p.old, p.new, lost || worse(p.old, p.new)})
	}
	return changed
}

// judged counts the findings of a rule. A subject that is renamed leaves their number; one
// that is taken out lowers it, and what was met there is judged no longer.
func judged(findings []rule.Finding, name string) int {
	n := 0
	for _, f := range findings {
		if f.Rule == name {
			n++
		}
	}
	return n
}

// worse reports whether a finding stands worse than before; one that is gone may be
// mended, one that is new does where it stands against switching on.
func worse(old, new *rule.Finding) bool {
	switch {
	case new == nil:
		return false
	case old == nil:
		return new.Verdict != rule.Meets && new.Verdict != rule.Marginal
	}
	return rule.Graver(new.Verdict, old.Verdict)
}
