package page_test

import (
	"fmt"
	"strings"
	"testing"

	"kilovet/reports/internal/sample"
	"kilovet/reports/page"
	"kilovet/rules/figure"
	"kilovet/rules/rule"
)

// unanswered are so many findings that differ in their subject alone.
func unanswered(count int, v rule.Verdict) (all []rule.Finding) {
	for i := range count {
		all = append(all, rule.Finding{Rule: "fault.computed", Subject: fmt.Sprintf("diode %d open", i+1), Verdict: v, Concern: rule.Equipment, Because: "its consequences are not known"})
	}
	return all
}

// Findings that say the same of several subjects stand together and name them all, so many
// as a sheet holds well.
func TestFindingsThatSayTheSameStandOnce(t *testing.T) {
	r := sample.Sound()
	r.Findings = append(unanswered(40, rule.Unassessed), rule.Finding{Rule: "fault.computed", Subject: "diode 7 shorted", Verdict: rule.Unassessed, Concern: rule.Equipment, Because: "another reason"})
	text := outline(page.New(r))
	body := text[strings.Index(text, `section "Faults"`):]
	if got := strings.Count(body, "its consequences are not known"); got != 2 {
		t.Errorf("the reason stands %d times", got)
	}
	for _, want := range []string{"24 of the same, named with the reason", "Of: diode 1 open; diode 2 open; ", "; diode 24 open]", "16 of the same, named with the reason", "Of: diode 25 open; ", "; diode 40 open]", "another reason"} {
		if !strings.Contains(body, want) {
			t.Errorf("%q is missing in\n%s", want, body)
		}
	}
}

// A few have a row each, as have those that meet.
func TestAFewFindingsHaveARowEach(t *testing.T) {
	for _, c := range []struct {
		count   int
		verdict rule.Verdict
	}{{2, rule.Unassessed}, {5, rule.Meets}} {
		r := sample.Sound()
		r.Findings = unanswered(c.count, c.verdict)
		text := outline(page.New(r))
		body := text[strings.Index(text, `section "Faults"`):]
		if got := strings.Count(body, "its consequences are not known"); got != c.count {
			t.Errorf("%d findings that are %s: the reason stands %d times", c.count, c.verdict, got)
		}
	}
}

// Each of several leads to the figures that are its own; what all rest on stands once.
func TestEachOfSeveralLeadsToItsOwnFigures(t *testing.T) {
	r := sample.Sound()
	r.Findings = nil
	for _, name := range []string{"lid", "wall", "lid of the wall"} {
		r.Findings = append(r.Findings, rule.Finding{Rule: "spacing.onset", Subject: name, Verdict: rule.Unassessed, Concern: rule.Performance, Because: "its shape is not known"})
		r.Figures = append(r.Figures, figure.Figure{ID: "spacing.onset_estimate", Subject: name, What: "onset", Unit: "V", Value: float64(len(name))})
	}
	text := outline(page.New(r))
	for _, want := range []string{"{lid; figures spacing.onset_estimate lid}", "{wall; figures spacing.onset_estimate wall}", "{lid of the wall figures spacing.onset_estimate lid of the wall}"} {
		if !strings.Contains(text, want) {
			t.Errorf("%q is missing in\n%s", want, text)
		}
	}
	if strings.Contains(text, "see spacing.onset_estimate") {
		t.Errorf("what one rests on is told of all:\n%s", text)
	}
}
