package fault

import (
	"slices"
	"sync"

	"kilovet/hv/parallel"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/parts"
	"kilovet/rules/people"
	"kilovet/rules/rule"
	"kilovet/rules/spacing"
)

// Outcome is what a fault does to a chain.
type Outcome struct {
	Fault
	Err error // why it could not be computed

	Drive  quantity.Voltage // peak of the drive at which the chain comes to rest
	Output quantity.Voltage // mean at the output, signed
	Struck []string         // gaps and clamps that conduct
	Ended  []string         // constant currents that nothing feeds any more
	// Findings are what the rules of ratings, spacings and touch say under the fault, of
	// every part and every spacing that the fault puts more on, and of every node within
	// reach; the worst first.
	Findings []rule.Finding
	Measures []Measure
	// Assumptions are what the state under the fault rests on.
	Assumptions []string
}

// Share is how much of what is allowed a finding uses; above 1 a limit is passed.
func Share(f rule.Finding) float64 {
	if f.Margin == nil {
		return 0
	}
	return 1 / (1 + *f.Margin)
}

// Passed are the findings whose limits are passed, the worst first.
func (o Outcome) Passed() []rule.Finding { return o.with(rule.Fails) }

// Unknown are the findings that could not be judged.
func (o Outcome) Unknown() []rule.Finding { return o.with(rule.Unassessed) }

func (o Outcome) with(v rule.Verdict) []rule.Finding {
	var all []rule.Finding
	for _, f := range o.Findings {
		if f.Verdict == v {
			all = append(all, f)
		}
	}
	return all
}

// Caught is the measure that catches the fault; not there where none does.
func (o Outcome) Caught() (Measure, bool) {
	i := slices.IndexFunc(o.Measures, func(m Measure) bool { return m.Catches })
	if i < 0 {
		return Measure{}, false
	}
	return o.Measures[i], true
}

// Study computes what one fault does.
func Study(e *evidence.Evidence, f Fault) Outcome {
	o := Outcome{Fault: f}
	x := e.Under(f.Condition())
	if o.Output, o.Err = x.Potential("output"); o.Err != nil {
		return o
	}
	o.Drive, o.Err = x.Peak()
	o.Struck, _ = x.Struck()
	o.Ended, _ = x.Ended()
	if p, err := x.Network(); err == nil {
		o.Assumptions = p.Assumptions
	}
	o.Findings = append(parts.InFault(x), spacing.InFault(x)...)
	for _, node := range reach(e, f) {
		o.Findings = append(o.Findings, people.InFault(x, node))
	}
	slices.SortStableFunc(o.Findings, func(a, b rule.Finding) int {
		switch x, y := Share(a), Share(b); {
		case x > y:
			return -1
		case x < y:
			return 1
		}
		return 0
	})
	o.Measures = measures(x, f)
	return o
}

// reach are the nodes within reach under a fault.
func reach(e *evidence.Evidence, f Fault) []string {
	var all []string
	if a := e.Chain().Access; a != nil {
		all = append(all, a.Touchable.V...)
	}
	for _, node := range f.Lifts {
		if !slices.Contains(all, node) {
			all = append(all, node)
		}
	}
	return all
}

// StudyAll computes what every fault of a chain does, in the order of the library. It is
// done once in a review; progress is told after each.
func StudyAll(e *evidence.Evidence) []Outcome {
	all, _ := evidence.Remember(e.Under(evidence.Condition{}), "faults", func() ([]Outcome, error) {
		_, _ = e.Under(evidence.Condition{State: evidence.Working}).Network() // all begin from there
		return study(e, Of(e)), nil
	})
	return all
}

// study computes a list of faults, several at once; results stand in the order of the list.
func study(e *evidence.Evidence, list []Fault) []Outcome {
	outcomes := make([]Outcome, len(list))
	var telling sync.Mutex
	done := 0
	parallel.Each(len(list), func(i int) {
		outcomes[i] = Study(e, list[i])
		e.Under(list[i].Condition()).Forget() // all that is asked of it stands in the outcome
		telling.Lock()
		defer telling.Unlock()
		done++
		e.Tell("single faults", done, len(list))
	})
	return outcomes
}
