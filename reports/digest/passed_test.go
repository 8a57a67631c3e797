package digest_test

import (
	"testing"

	"github.com/google/go-cmp/cmp"

	"kilovet/reports/digest"
	"kilovet/rules/rule"
)

// A reason stands once, with every rule that it holds for.
func TestReasonsOfPassedRulesStandOnce(t *testing.T) {
	got := digest.PassedOver([]rule.PassedOver{
		{Rule: "field.edge", Because: "no field"}, {Rule: "beam.drift", Because: "no exposure"}, {Rule: "field.solid", Because: "no field"},
	})
	want := []digest.Passed{{Because: "no field", Names: []string{"field.edge", "field.solid"}}, {Because: "no exposure", Names: []string{"beam.drift"}}}
	if d := cmp.Diff(want, got); d != "" {
		t.Error(d)
	}
	if rules := got[0].Rules(); rules != "field.edge, field.solid" {
		t.Error(rules)
	}
}
