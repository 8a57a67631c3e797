package plan_test

import (
	"strings"
	"testing"

	"kilovet/rules/plan"
)

// The whole chain is tested at a stated voltage, which no part bears less than; every clamp
// has a check with its bounds.
func TestTheWholeChainAndTheClampsColdly(t *testing.T) {
	for rating, want := range map[string]string{"5 kV": "insulation tester at 5 kV", "300 V": "insulation tester at 2.5 kV"} {
		if c := checked(t, planned(t, rated(t, rating)), "whole chain"); !strings.HasPrefix(c.With, want) {
			t.Errorf("ten elements of %s: %s, want %s", rating, c.With, want)
		}
	}
	p := planned(t, described(t, "column", ""))
	if c := checked(t, p, "divider.clamp"); !strings.Contains(c.Words, "passes nothing at 72 V, conducts by 108 V") || !strings.Contains(c.With, "no insulation tester") {
		t.Errorf("%+v", c)
	}
	if c := checked(t, p, "bias.clamp"); !strings.Contains(c.Words, "passes nothing at 960 V, conducts by 1.44 kV") || !strings.Contains(c.With, "insulation tester at 500 V") {
		t.Errorf("%+v", c)
	}
}

func checked(t *testing.T, p *plan.Plan, what string) plan.Check {
	t.Helper()
	for _, c := range p.Cold {
		if c.What == what {
			return c
		}
	}
	t.Fatalf("no check of %s", what)
	return plan.Check{}
}

// The return current has bounds where no instrument of the plan reads it, those of the parts
// and of the drive; where one does, its reading has them.
func TestTheReturnCurrentHasBounds(t *testing.T) {
	for _, s := range planned(t, described(t, "column", "")).Steps {
		if s.Within.Unit != "A" || !s.Within.Holds(float64(*s.Return)) || s.Within.Holds(1.1*s.Within.High) || s.Within.Low > 0.98*s.Within.Value {
			t.Errorf("%s: %+v", s.Name, s.Within)
		}
	}
	for _, s := range planned(t, described(t, "column", instruments)).Steps {
		if s.Within.Unit != "" {
			t.Errorf("%s: %+v beside the ammeter", s.Name, s.Within)
		}
	}
}
