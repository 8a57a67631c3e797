package page_test

import (
	"os"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"

	"kilovet/reports/internal/sample"
	"kilovet/reports/page"
	"kilovet/rules"
	"kilovet/rules/local"
	"kilovet/rules/readings"
	"kilovet/rules/rule"
	"kilovet/rules/signoff"
)

// signOff is a sheet with something in every part.
func signOff() *page.Document {
	r := sample.Failing()
	r.Local = []local.Outcome{{Kind: "relaxation", Rule: "rating.diode", Subjects: []string{"diode"}, Value: "90 %", From: "test record TR-17, A. N. Other: held", Result: local.Relaxed, Because: "at most 9 kV in place of at most 8 kV"}}
	var points []signoff.Point
	for _, f := range r.Findings {
		if f.Verdict != rule.Meets {
			points = append(points, signoff.Point{Finding: f, Required: true})
		}
	}
	points[0].Disposition = &signoff.Disposition{Word: "measured", Name: "A. N. Other", Reason: "it was looked at", Record: "MR-31", Measurement: "12.4 kV at 50 % drive"}
	return page.SignOff(r, rules.SignOff{
		Decision: signoff.Decision{Required: []rule.Concern{rule.Equipment, rule.Life}, Points: points,
			Idle: []signoff.Idle{{Disposition: signoff.Disposition{Rule: "spacing.corona", Subject: "lid", Word: "accepted", Name: "A. N. Other"}, Because: "the rule is met there"}}},
		Code: "7Q2M4K-9XB3TD-W0ZA5E", Hazards: []rules.Line{{Label: "stored energy", Text: "up to 0.4 J"}},
	}, page.Issue{Date: "2025-03-04", Until: "2026-03-03"})
}

func TestSignOffGolden(t *testing.T) {
	const golden = "testdata/signoff.txt"
	got := outline(signOff())
	if *update {
		if err := os.WriteFile(golden, []byte(got), 0o644); err != nil {
			t.Fatal(err)
		}
	}
	want, err := os.ReadFile(golden)
	if err != nil {
		t.Fatal(err)
	}
	if diff := cmp.Diff(string(want), got); diff != "" {
		t.Error(diff)
	}
}

func TestTheSheetHoldsWhatPeopleSign(t *testing.T) {
	text := outline(signOff())
	r := sample.Failing()
	wants := []string{"7Q2M4K-9XB3TD-W0ZA5E", "2025-03-04", "valid until 2026-03-03", "life, equipment", r.Deference, r.Program.Version,
		"A. N. Other", "it was looked at", "MR-31", "12.4 kV at 50 % drive", "TR-17", "the rule is met there", "up to 0.4 J",
		"not forgery: there is no key", "It ends at once", "Prepared", "Checked", "Approved", "Who checks is not who prepared"}
	for _, in := range r.Inputs {
		wants = append(wants, in.Name, in.SHA256)
	}
	for _, c := range r.Cautions {
		wants = append(wants, c.Text)
	}
	wants = append(wants, r.Assumptions...)
	for _, want := range wants {
		if !strings.Contains(text, want) {
			t.Errorf("%q is not on the sheet", want)
		}
	}
}

func TestASheetWithoutLastDayHasABlankForIt(t *testing.T) {
	text := outline(page.SignOff(sample.Sound(), rules.SignOff{}, page.Issue{Date: "2025-03-04"}))
	if !strings.Contains(text, "____ (write in the last day)") || !strings.Contains(text, "None: every rule that applies is met.") {
		t.Error(text)
	}
}

// The sheet says how much of the plan was read, and what nobody knows of the rest.
func TestTheSheetSaysWhatWasNotRead(t *testing.T) {
	for want, read := range map[string]readings.Comparison{
		"1 of 8 readings of the plan was taken, each within its bounds; 7 were not taken": {Rows: make([]readings.Row, 1), Planned: 8, Sound: true},
		"the polarity was not taken": {Rows: make([]readings.Row, 1), Planned: 8, Sound: true},
		"8 of 8 readings of the plan were taken, each within its bounds; the polarity is as described": {Rows: make([]readings.Row, 8), Planned: 8, Sound: true, Sign: readings.Proved},
	} {
		if text := outline(page.SignOff(sample.Sound(), rules.SignOff{Readings: &read}, page.Issue{Date: "2025-03-04"})); !strings.Contains(text, want) {
			t.Errorf("%q is not on the sheet", want)
		}
	}
}
