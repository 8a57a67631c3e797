// Package rule holds the words of judgement: verdicts, concerns, sources, findings,
// and a rule as a value.
package rule

import (
	"fmt"

	"kilovet/hv/document"
	"kilovet/hv/quantity"
)

// Verdict is the answer of a rule.
type Verdict string

// The verdicts, from best to worst in the order of Worst.
const (
	Meets      Verdict = "meets"
	Marginal   Verdict = "marginal"
	Unassessed Verdict = "unassessed"
	Fails      Verdict = "fails"
)

// Verdicts lists them, the worst first.
var Verdicts = []Verdict{Fails, Unassessed, Marginal, Meets}

// Concern is what is at stake.
type Concern string

// The concerns.
const (
	Life        Concern = "life"
	Equipment   Concern = "equipment"
	Performance Concern = "performance"
)

// Concerns lists them, the gravest first.
var Concerns = []Concern{Life, Equipment, Performance}

// Relation says how needed and provided stand to each other.
type Relation string

// The relations.
const (
	AtLeast  Relation = "at_least" // provided must be at least needed
	AtMost   Relation = "at_most"  // provided must be at most needed
	Presence Relation = "presence" // something must be there; no amounts
)

// Mark says how well a source is known.
type Mark string

// The marks of sources.
const (
	Read     Mark = "read"
	Memory   Mark = "memory"
	Practice Mark = "common practice, no source"
	Derived  Mark = "derived"
	Local    Mark = "local code"  // stricter, given in a file of local limits
	Tested   Mark = "test record" // in place of practice or memory, given there
)

// Source is where a limit or law comes from.
type Source struct {
	Text    string
	Mark    Mark
	Governs bool // this one judged
}

// Amount is a number in SI units.
type Amount struct {
	Value float64
	Unit  string
}

// Text writes the amount for people.
func (a Amount) Text() string {
	if d := quantity.DimensionOf(a.Unit); d != nil {
		return d.Text(a.Value)
	}
	return quantity.Significant(a.Value) + " " + a.Unit
}

// Of is a quantity as an amount.
func Of[Q quantity.Number](q Q) Amount { return Amount{float64(q), q.Dimension().SI} }

// Finding is what one rule says of one subject.
type Finding struct {
	Rule     string
	Subject  string
	Verdict  Verdict
	Concern  Concern
	Relation Relation

	Needed, Provided *Amount  // nil for a rule of presence, or where unassessed
	Margin           *float64 // nil likewise
	Stated           float64  // the margin below which it is marginal
	// Graded says that a limit is passed and that the rule calls it marginal all the same.
	Graded bool
	// Whole is what the limit is a share of, a rating or an estimate; nil where it is none.
	Whole *Amount
	// Share is where that share comes from where it is not what Governs: the estimate may be
	// read while its share is practice. The zero source: nowhere else.
	Share Source

	Under       string   // the condition judged: state, corner
	Because     string   // one plain sentence
	Remedy      string   // what to do; empty where it meets
	Missing     []string // keys of the description
	Assumptions []string // what was assumed; the verdict is at best marginal
	Sources     []Source
	Place       document.Place
}

// Caution is a warning without verdict.
type Caution struct{ Subject, Text string }

// PassedOver is a rule that did not apply, and why.
type PassedOver struct{ Rule, Because string }

// Number is a number of things in words.
func Number(n int, one, many string) string {
	if n == 1 {
		return "1 " + one
	}
	return fmt.Sprintf("%d %s", n, many)
}
