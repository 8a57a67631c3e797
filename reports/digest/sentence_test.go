package digest_test

import (
	"strings"
	"testing"

	"kilovet/reports/digest"
	"kilovet/reports/internal/sample"
	"kilovet/rules/rule"
)

// No sentence calls a finding met whose limit is passed.
func TestALimitThatIsPassedIsNotMet(t *testing.T) {
	below, above := 0.05, -0.4
	for _, c := range []struct {
		finding rule.Finding
		says    string
	}{
		{rule.Finding{Verdict: rule.Marginal, Margin: &below, Stated: 0.1}, "met with less than the stated margin"},
		{rule.Finding{Verdict: rule.Marginal, Margin: &above, Stated: 0.1}, "not met: the limit is passed"},
		{rule.Finding{Verdict: rule.Marginal, Graded: true}, "not met: the limit is passed"},
		{rule.Finding{Verdict: rule.Marginal, Assumptions: []string{"cold"}}, "met on an assumption"},
	} {
		if got := digest.Marginal(c.finding); !strings.HasPrefix(got, c.says) {
			t.Errorf("%q, want %q", got, c.says)
		}
		r := sample.Sound()
		r.Verdict, r.Findings = rule.Marginal, append(r.Findings, c.finding)
		met := strings.HasPrefix(digest.Sentence(r), "Every rule that applies is met")
		if met == strings.HasPrefix(c.says, "not met") {
			t.Errorf("%s: %q", c.says, digest.Sentence(r))
		}
	}
}
