package local

import (
	"fmt"
	"slices"
	"strings"

	"kilovet/rules/rule"
)

// limit lets a stricter limit govern, and refuses a laxer one.
func (a *applying) limit(l Limit, i int, limit rule.Amount) (Result, string) {
	f := a.findings[i]
	switch {
	case laxer(f, limit):
		by := f.Rule + " itself"
		if other := a.governed[i]; other != "" {
			by = other
		}
		return Refused, fmt.Sprintf("%s is laxer than %s, which %s asks for: local limits can only be stricter", bound(f, limit), bound(f, *f.Needed), by)
	case !stricter(f, limit):
		return Same, bound(f, limit) + " is what the rule asks for itself"
	}
	a.governed[i] = l.named()
	a.findings[i] = governed(f, l, limit)
	return Governs, bound(f, limit) + " in place of " + bound(f, *f.Needed)
}

// governed is a finding under a stricter limit, whose verdict can only become worse.
func governed(f rule.Finding, l Limit, limit rule.Amount) rule.Finding {
	asks := bound(f, limit)
	g := judged(f, limit)
	if rule.Graver(f.Verdict, g.Verdict) {
		g.Verdict = f.Verdict
	}
	g = underSource(g, rule.Source{Text: l.named() + ": " + asks, Mark: rule.Local, Governs: true})
	g.Because += fmt.Sprintf("; %s asks for %s in place of %s", l.named(), asks, bound(f, *f.Needed))
	if g.Verdict != rule.Meets {
		g.Remedy = fmt.Sprintf("bring it to %s, as %s asks", asks, l.named())
	}
	return g
}

// uncompared leaves unassessed what a local limit is about that could not be compared,
// unless another limit of the same rule was.
func (a *applying) uncompared() {
	for i := range a.findings {
		u, there := a.unlike[i]
		if f := &a.findings[i]; there && !a.compared[i] && f.Verdict != rule.Fails {
			f.Verdict, f.Needed, f.Provided, f.Margin = rule.Unassessed, nil, nil, nil
			f.Because += fmt.Sprintf("; the local limit of %s (%s) cannot be compared: %s", u.value.V, u.from, u.why)
			f.Remedy = "give the local limit in the unit that judges here too"
		}
	}
}

// relax lets a test record stand in place of practice or memory where a finding fails.
func (a *applying) relax(from string, i int, limit rule.Amount) (Result, string) {
	f := a.findings[i]
	switch why := a.neverRelaxed(i, limit); {
	case why != "":
		return Refused, why
	case f.Verdict != rule.Fails:
		return NotNeeded, "met without it"
	}
	eased := fmt.Sprintf("%s of %s is relaxed to %s in place of %s: %s", f.Rule, f.Subject, bound(f, limit), bound(f, *f.Needed), from)
	g := judged(f, limit).Assume(eased)
	g = underSource(g, rule.Source{Text: from, Mark: rule.Tested, Governs: true})
	g.Because += fmt.Sprintf("; relaxed to %s in place of %s by %s", bound(f, limit), bound(f, *f.Needed), from)
	a.findings[i] = g
	return Relaxed, bound(f, limit) + " in place of " + bound(f, *f.Needed)
}

// neverRelaxed says why a limit of a finding may not be relaxed so; empty where it may.
func (a *applying) neverRelaxed(i int, limit rule.Amount) string {
	f := a.findings[i]
	switch {
	case f.Concern == rule.Life:
		return "it concerns life, and is never relaxed"
	case a.governed[i] != "":
		return "a local code governs it: " + a.governed[i]
	case !laxer(f, limit):
		return fmt.Sprintf("%s is not laxer than %s; a stricter limit is a [[limit]]", bound(f, limit), bound(f, *f.Needed))
	case pastWhole(f, limit):
		return fmt.Sprintf("%s lies past the %s that the limit is a share of", bound(f, limit), f.Whole.Text())
	}
	return firmly(f)
}

// firmly says on what a limit rests that is neither practice nor memory. Of a limit that is a
// share of an estimate the share alone is asked: the estimate stays as it is.
func firmly(f rule.Finding) string {
	if share := f.Share; share.Text != "" {
		f.Sources = []rule.Source{{Text: share.Text, Mark: share.Mark, Governs: true}}
	}
	governing := slices.DeleteFunc(slices.Clone(f.Sources), func(s rule.Source) bool { return !s.Governs })
	if len(governing) == 0 {
		return "no source of it is marked as the one that judges"
	}
	for _, s := range governing {
		if s.Mark != rule.Practice && s.Mark != rule.Memory {
			return fmt.Sprintf("it rests on more than practice or memory: %s (%s)", s.Text, s.Mark)
		}
	}
	return ""
}

// listed names the first of the subjects.
func listed(subjects []string) string {
	const most = 12
	if len(subjects) > most {
		return strings.Join(subjects[:most], "; ") + "; …"
	}
	return strings.Join(subjects, "; ")
}
