package text_test

import (
	"fmt"
	"strings"
	"testing"

	"kilovet/reports/internal/sample"
	"kilovet/reports/text"
	"kilovet/rules/rule"
)

var creepage = rule.Rule{
	ID: "spacing.creepage", Title: "creepage", Demands: "The surface path is long enough.", Applies: "To every spacing with a surface.",
	Margin: "10 % of what is needed", Concern: rule.Life, Sources: []rule.Source{{Text: "IEC 60664-1:2020 Table F.5", Mark: rule.Read, Governs: true}},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: "creepage   = \"320 mm\"\n", Becomes: ""}},
		Changes: []rule.Change{{Rule: "spacing.creepage", Subject: "lid", Verdict: rule.Unassessed}, {Rule: "spacing.described", Subject: "lid"}},
	},
}

func ExampleRule() {
	fmt.Print(string(text.Rule(creepage, text.Options{Width: 60})))
	// Output:
	// spacing.creepage: creepage
	//
	// demands      The surface path is long enough.
	// applies      To every spacing with a surface.
	// margin       10 % of what is needed
	// concerns     life
	// source       IEC 60664-1:2020 Table F.5 (read; governs)
	//
	// For example, in the built-in description, column.toml
	//   was        creepage = "320 mm"
	//   becomes    (nothing)
	// changes
	//   spacing.creepage, lid: unassessed
	//   spacing.described, lid: no longer judged
}

func TestExampleNamesTheDescriptionItChanges(t *testing.T) {
	other := creepage
	other.Example.Of = "plate"
	if out := string(text.Rule(other, text.Options{})); !strings.Contains(out, "in the description testdata/chains/plate.toml\n") {
		t.Error(out)
	}
}

func ExampleRules() {
	bond := rule.Rule{ID: "beam.blur", Title: "blur within the allowance", Concern: rule.Performance}
	fmt.Print(string(text.Rules([]rule.Rule{bond, creepage}, text.Options{})))
	// Output:
	// LIFE
	//
	// spacing.creepage              creepage
	//
	// PERFORMANCE
	//
	// beam.blur                     blur within the allowance
}

func TestRulePagesKeepTheirWidth(t *testing.T) {
	long := creepage
	long.ID, long.Title, long.Demands = sample.LongName, sample.LongName, strings.Repeat(sample.LongName+" "+sample.Foreign, 3)
	out := string(text.Rule(long, text.Options{Width: 50})) + string(text.Rules([]rule.Rule{long}, text.Options{Width: 50}))
	for _, line := range strings.Split(out, "\n") {
		if n := len([]rune(line)); n > 50 {
			t.Errorf("%d columns in %q", n, line)
		}
	}
}
