package local

import (
	"fmt"
	"slices"

	"kilovet/hv/document"
	"kilovet/rules/rule"
)

// Result says what became of an entry at some findings.
type Result string

// The results.
const (
	Governs    Result = "governs"     // a stricter limit judged
	Same       Result = "the same"    // the rule asks for as much itself
	Refused    Result = "refused"     // laxer than the rule, or never to be relaxed
	Relaxed    Result = "relaxed"     // a test record judged
	NotNeeded  Result = "not needed"  // met without being relaxed
	NotApplied Result = "not applied" // nothing was there to compare it with
)

// Outcome is what became of one entry of the file, told once for all findings of which
// it became the same for the same reason.
type Outcome struct {
	Kind     string // limit or relaxation
	Rule     string
	Subjects []string
	Value    string // as written
	From     string // the code with its clause, or the test record with its name and reason
	Result   Result
	Because  string
	Place    document.Place // in the file
}

// Apply judges the findings anew by the file, whose outcomes it lists in the order of
// the entries. Faults are entries that can hold for no finding of their rule: a subject
// that is not there, a value in another unit. The findings given stay as they are.
func Apply(f *File, findings []rule.Finding, over []rule.PassedOver) ([]rule.Finding, []Outcome, document.Faults) {
	a := &applying{findings: slices.Clone(findings), over: over, compared: map[int]bool{}, unlike: map[int]unlike{}, governed: map[int]string{}}
	for _, l := range f.Limits {
		a.each(entry{"limit", l.Rule, l.Subject, l.Value, l.named()}, func(i int, limit rule.Amount) (Result, string) { return a.limit(l, i, limit) })
	}
	a.uncompared()
	for _, r := range f.Relaxations {
		from := fmt.Sprintf("test record %s, %s: %s", r.TestRecord.V, r.Name.V, r.Reason.V)
		a.each(entry{"relaxation", r.Rule, r.Subject, r.Value, from}, func(i int, limit rule.Amount) (Result, string) { return a.relax(from, i, limit) })
	}
	return a.findings, a.outcomes, a.faults.Sorted()
}

// entry is what limits and relaxations have in common.
type entry struct {
	kind                 string
	rule, subject, value document.Given[string]
	from                 string
}

type applying struct {
	findings []rule.Finding
	over     []rule.PassedOver
	outcomes []Outcome
	faults   document.Faults

	compared map[int]bool   // findings that some limit of theirs was compared with
	unlike   map[int]unlike // those that a limit in another unit is about
	governed map[int]string // those that a local code governs, and which
}

// unlike is a limit that could not be compared.
type unlike struct {
	entry
	why string
}

// each takes an entry to all findings it is about.
func (a *applying) each(e entry, judge func(i int, limit rule.Amount) (Result, string)) {
	about := a.about(e)
	if about == nil {
		return
	}
	start := len(a.outcomes)
	var wrong error
	could := false
	for _, i := range about {
		f := a.findings[i]
		if f.Needed == nil || f.Provided == nil {
			could = could || f.Verdict == rule.Unassessed || f.Verdict == rule.Fails
			a.tell(start, e, f.Subject, NotApplied, without(f))
			continue
		}
		limit, err := amountFor(e.value.V, f)
		if err != nil {
			wrong = err
			a.tell(start, e, f.Subject, NotApplied, err.Error())
			if _, already := a.unlike[i]; !already && e.kind == "limit" {
				a.unlike[i] = unlike{e, err.Error()}
			}
			continue
		}
		could = true
		a.compared[i] = a.compared[i] || e.kind == "limit"
		result, because := judge(i, limit)
		a.tell(start, e, f.Subject, result, because)
	}
	switch {
	case could:
	case wrong != nil:
		a.faults = append(a.faults, faultAt("unit", e.value.Place, wrong.Error(), "write the value in the unit of the rule"))
	default:
		a.faults = append(a.faults, faultAt("unit", e.rule.Place, e.rule.V+" asks whether something is there, not for an amount", "leave it out"))
	}
}

func without(f rule.Finding) string {
	if f.Verdict == rule.Unassessed {
		return "unassessed with or without it: " + f.Because
	}
	return f.Because + ": judged by what is there, not by an amount"
}

// about lists the findings an entry is about; nil where there are none, which is told.
func (a *applying) about(e entry) []int {
	var about []int
	var subjects []string
	for i, f := range a.findings {
		if f.Rule != e.rule.V {
			continue
		}
		subjects = append(subjects, f.Subject)
		if !e.subject.Set() || e.subject.V == f.Subject {
			about = append(about, i)
		}
	}
	switch {
	case about != nil:
	case subjects == nil:
		a.tell(len(a.outcomes), e, e.subject.V, NotApplied, "the rule was passed over: "+a.passedOver(e.rule.V))
	default:
		a.faults = append(a.faults, faultAt("subject", e.subject.Place, fmt.Sprintf("%s judges nothing of the name %q here", e.rule.V, e.subject.V), meant(e.subject.V, subjects, "its subjects: "+listed(subjects))))
	}
	return about
}

func (a *applying) passedOver(id string) string {
	for _, o := range a.over {
		if o.Rule == id {
			return o.Because
		}
	}
	return "nothing here concerns it"
}

// tell notes an outcome, joined with an earlier one of the same entry where it is alike.
func (a *applying) tell(start int, e entry, subject string, result Result, because string) {
	for i := start; i < len(a.outcomes); i++ {
		if o := &a.outcomes[i]; o.Result == result && o.Because == because {
			o.Subjects = append(o.Subjects, subject)
			return
		}
	}
	a.outcomes = append(a.outcomes, Outcome{Kind: e.kind, Rule: e.rule.V, Subjects: []string{subject}, Value: e.value.V, From: e.from, Result: result, Because: because, Place: e.rule.Place})
}
