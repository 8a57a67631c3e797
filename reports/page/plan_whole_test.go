package page_test

import (
	"fmt"
	"strings"
	"testing"

	"kilovet/reports/internal/sample"
	"kilovet/reports/page"
	"kilovet/rules/exhibit"
)

// A long table is cut on the sheets, but never one of the plan: its boxes are filled in on
// paper.
func TestTheWholePlanIsOnPaper(t *testing.T) {
	for chapter, want := range map[exhibit.Chapter]int{exhibit.Plan: 60, exhibit.Parts: 40} {
		r := sample.Hard()
		long := exhibit.Table{ID: "long", Chapter: chapter, Title: "a long table", Columns: []exhibit.Column{{Head: "what"}}}
		for i := range 60 {
			long.Rows = append(long.Rows, []exhibit.Cell{exhibit.Words(fmt.Sprintf("row of %d", i))})
		}
		r.Tables = []exhibit.Table{long}
		got := 0
		for _, table := range tablesOf(page.New(r)) {
			for _, row := range table.Rows {
				if strings.Contains(said(row.Cells[0]), "row of ") {
					got++
				}
			}
		}
		if got != want {
			t.Errorf("%s: %d rows on the sheets, want %d", chapter, got, want)
		}
	}
}
