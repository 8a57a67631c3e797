package faulttest_test

import (
	"fmt"
	"strings"
	"testing"

	"kilovet/hv/document"
	"kilovet/hv/document/faulttest"
)

// recorder notes what a test would have failed with.
type recorder struct {
	testing.TB
	said []string
}

func (r *recorder) Helper() {}

func (r *recorder) Errorf(format string, args ...any) {
	r.said = append(r.said, fmt.Sprintf(format, args...))
}

const text = `a = 1 # FAULT 5 range: 1 is out of range; # FAULT 5 word: no word
b = "
#^ FAULT 4 syntax: the quotes
`

var met = document.Faults{
	{Code: "range", Line: 1, Column: 5, What: "1 is out of range", Remedy: "accepted: 2"},
	{Code: "word", Line: 1, Column: 5, What: "no word"},
	{Code: "syntax", Line: 2, Column: 4, What: "the quotes are not closed"},
}

func TestCheck(t *testing.T) {
	for _, row := range []struct {
		name   string
		faults document.Faults
		want   string
	}{
		{"all met", met, ""},
		{"one missing", met[:2], "not reported: line 2, column 4 (syntax)"},
		{"one too many", append(met[:3:3], met[0]), "not expected: line 1, column 5: 1 is out of range"},
		{"another order", document.Faults{met[1], met[0], met[2]}, "fault 1\nwant line 1, column 5 (range)"},
		{"another place", document.Faults{met[0], met[1], {Code: "syntax", Line: 2, Column: 5, What: "the quotes"}}, "fault 3\n"},
		{"another code", document.Faults{met[0], met[1], {Code: "text", Line: 2, Column: 4, What: "the quotes"}}, "fault 3\n"},
		{"another text", document.Faults{met[0], met[1], {Code: "syntax", Line: 2, Column: 4, What: "a quote"}}, "fault 3\n"},
	} {
		r := &recorder{TB: t}
		faulttest.Check(r, text, row.faults)
		if said := strings.Join(r.said, "\n"); (said == "") != (row.want == "") || !strings.HasPrefix(said, row.want) {
			t.Errorf("%s: said %q, want %q", row.name, said, row.want)
		}
	}
}
