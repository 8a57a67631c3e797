package digest_test

import (
	"testing"

	"kilovet/reports/digest"
)

func TestATitleNamesItsSubjectOnce(t *testing.T) {
	for _, c := range [][3]string{
		{"What a body would take at stage.6", "stage.6", "What a body would take at stage.6"},
		{"An arc from output to ground", "output", "An arc from output to ground"},
		{"Distance needed: gap", "gap", "Distance needed: gap"},
		{"Distances between gaps", "gap", "Distances between gaps, gap"},
		{"Decay", "stage.1 to stage.6", "Decay, stage.1 to stage.6"},
		{"Decay of stage.10", "stage.1", "Decay of stage.10, stage.1"},
		{"Decay", "", "Decay"},
	} {
		if got := digest.Titled(c[0], c[1]); got != c[2] {
			t.Errorf("%q of %q is %q", c[0], c[1], got)
		}
	}
}
