// Package difference writes how two reviews differ, for people and for other
// programs.
package difference

import (
	"cmp"

	"kilovet/reports/digest"
	"kilovet/rules/compare"
	"kilovet/rules/rule"
)

// Side names one of the two reviews.
type Side struct{ Name, SHA256, Title string }

// Report is a difference between two named reviews.
type Report struct {
	Program  struct{ Name, Version string }
	Old, New Side
	Local    File // the local limits that both were judged under; empty where none
	compare.Difference
}

// File names a file that was read.
type File struct{ Name, SHA256 string }

// Words for a side that lacks something.
const (
	notGiven  = "not given"
	notListed = "not listed"
	notJudged = "not judged"
)

// word says in a word how a finding changed.
func word(f compare.Finding) string {
	switch {
	case f.New == nil:
		return "gone"
	case f.Worse:
		return "worse"
	case f.Old == nil:
		return "new"
	}
	return "better"
}

func verdictOf(f *rule.Finding) string {
	if f == nil {
		return notJudged
	}
	return string(f.Verdict)
}

func amountOf(v *float64, unit string) string {
	if v == nil {
		return notListed
	}
	return digest.Amount(rule.Amount{Value: *v, Unit: unit})
}

func given(text string) string { return cmp.Or(text, notGiven) }
