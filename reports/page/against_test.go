package page_test

import (
	"fmt"
	"strings"
	"testing"

	"kilovet/reports/internal/sample"
	"kilovet/reports/page"
	"kilovet/rules"
	"kilovet/rules/rule"
)

// What one thing leaves unassessed stands in one row, with the rules by name and their
// number counted where the sheet ends.
func TestOneReasonIsToldOnce(t *testing.T) {
	r := sample.Sound()
	r.Findings = nil
	for i := range 11 {
		r.Findings = append(r.Findings, rule.Finding{Rule: fmt.Sprintf("access.rule_%d", i), Subject: "chain", Verdict: rule.Unassessed, Concern: rule.Life, Because: "access not given"})
	}
	r.Findings = append(r.Findings,
		rule.Finding{Rule: "access.other", Verdict: rule.Unassessed, Concern: rule.Equipment, Because: "access not given"},
		rule.Finding{Rule: "rod.voltage", Verdict: rule.Fails, Concern: rule.Life, Because: "access not given"})
	table := firstTable(t, r)
	if len(table.Rows) != 3 {
		t.Fatalf("%d rows", len(table.Rows))
	}
	var about []string
	for _, row := range table.Rows {
		about = append(about, row.Cells[1].Lines[0].Text)
	}
	if want := "rod.voltage|access.rule_0, access.rule_1, access.rule_2, access.rule_3, access.rule_4, access.rule_5, access.rule_6, access.rule_7 and 3 rules more|access.other"; strings.Join(about, "|") != want {
		t.Errorf("%q", about)
	}
	if got := table.Rest(1).Cells[0].Lines[0].Text; got != "And 12 rules more, on the sheets that follow." {
		t.Errorf("the rest reads %q", got)
	}
	if got := len(table.Rows[1].Cells[1].Lines[0].Links); got != 8 {
		t.Errorf("%d of the rules have links", got)
	}
}

// A limit that is passed is never told among what is met.
func TestWhatPassesALimitIsNotCalledMet(t *testing.T) {
	r := sample.Sound()
	amount := func(v float64) *rule.Amount { return &rule.Amount{Value: v, Unit: "V"} }
	below, above := -0.2, 0.01
	r.Findings = []rule.Finding{
		{Rule: "b.met", Verdict: rule.Marginal, Concern: rule.Life, Relation: rule.AtMost, Needed: amount(8), Provided: amount(7.9), Margin: &above, Because: "little"},
		{Rule: "a.passed", Verdict: rule.Marginal, Concern: rule.Equipment, Relation: rule.AtMost, Needed: amount(8), Provided: amount(10), Margin: &below, Because: "passed"},
	}
	table := firstTable(t, r)
	if got := table.Columns[1].Title; got != "A limit is passed where the rule calls that marginal" {
		t.Errorf("the table begins with %q", got)
	}
	if len(table.Rows) != 3 || table.Rows[0].Cells[1].Lines[0].Text != "a.passed" || !table.Rows[1].Group || table.Rows[2].Cells[1].Lines[0].Text != "b.met" {
		t.Errorf("%+v", table.Rows)
	}
}

// firstTable is the table of the first sheet.
func firstTable(t *testing.T, r *rules.Review) page.Table {
	t.Helper()
	for _, b := range page.New(r).Sections[0].Blocks {
		if table, ok := b.(page.Table); ok {
			return table
		}
	}
	t.Fatal("no table on the front sheet")
	return page.Table{}
}
