package readings

import (
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/fault"
	"kilovet/rules/plan"
)

// Polarity is the sign of the output that was seen in a step, beside the one described.
type Polarity struct {
	Step, Read, Expected string
}

// Within reports whether it is the polarity described.
func (p Polarity) Within() bool { return p.Read == p.Expected }

// Sign is what is known of the polarity of the output.
type Sign int

// What is known of a polarity: no reading tells it, since readings are magnitudes.
const (
	Untaken Sign = iota
	Proved
	Reversed
)

// polarities lists the polarities that were seen, step by step, against that of the chain.
func polarities(p *plan.Plan, f *File) (all []Polarity, said Sign) {
	for i := range f.Steps {
		s := &f.Steps[i]
		if !s.Polarity.Set() {
			continue
		}
		seen := Polarity{s.Name.V, s.Polarity.V, p.Polarity}
		all = append(all, seen)
		switch {
		case !seen.Within():
			said = Reversed
		case said == Untaken:
			said = Proved
		}
	}
	return all, said
}

// reversals is what a wrong polarity points to, the whole ladder first; nothing else is
// looked for.
func reversals(e *evidence.Evidence) []Suspect {
	for _, f := range fault.Of(e) {
		if f.Name == fault.LadderReversed {
			return []Suspect{{Names: []string{f.Name, "leads of what showed the polarity changed over"}}}
		}
	}
	return nil
}

// doubtful is the share of the output of a healthy chain below which an output has no
// polarity to speak of: common practice, no source.
const doubtful = 0.01

// turned reports whether a change of the circuit gives the output the other polarity.
func (b *bench) turned(change evidence.Fault) bool {
	at := b.all[0].at
	healthy, err := b.e.Under(at).Potential("output")
	if err != nil {
		return false
	}
	at.Fault = both(change, at.Fault)
	v, err := b.e.Under(at).Potential("output")
	if err != nil || quantity.AtMost(max(v, -v), doubtful*max(healthy, -healthy)) {
		return false
	}
	return v > 0 != (healthy > 0)
}
