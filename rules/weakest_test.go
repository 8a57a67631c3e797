package rules_test

import (
	"strings"
	"testing"

	"kilovet/rules"
	"kilovet/rules/rule"
)

const tabledLead = `format = 1
[site]
altitude = "310 m"
air_temperature = "30 degC"
pollution_degree = 2
[[feedthrough]]
name = "lead"
voltage = "10 kV"
pin = { radius = "12 mm" }
hole = { radius = "26 mm" }
sleeve = { material = "alumina", outer_radius = "26 mm", strength = "17 kV/mm", tested_thickness = "3 mm" }
air_side = { length = "90 mm", shape = { kind = "rounded edge", edge_radius = "10 mm" } }
vacuum_side = { length = "200 mm", junction_angle = "80 deg" }
`

// The weakest part of a feedthrough is that of the local limits: a clearance that the
// standard passes and a local code does not makes the whole fail, by that code's name.
func TestWeakestPartFollowsLocalLimits(t *testing.T) {
	c, faults := rules.Read([]byte(tabledLead))
	if faults != nil {
		t.Fatal(faults)
	}
	review := func(limits string) map[string]rule.Finding {
		beside := rules.Beside{}
		if limits != "" {
			f, faults := rules.ReadLocal([]byte(limits))
			if faults != nil {
				t.Fatal(faults)
			}
			beside.Limits = f
		}
		r, faults := rules.RunUnder(c, nil, rules.Program{Name: "kilovet"}, beside)
		if faults != nil {
			t.Fatal(faults)
		}
		by := map[string]rule.Finding{}
		for _, f := range r.Findings {
			by[f.Rule+" | "+f.Subject] = f
		}
		if by["feedthrough.weakest | lead"].Verdict == rule.Fails && r.Verdict != rule.Fails {
			t.Error("the verdict of the review is another")
		}
		return by
	}
	plain := review("")
	if v := plain["feedthrough.weakest | lead"].Verdict; v == rule.Fails || v == rule.Unassessed {
		t.Fatalf("%s before any local limit: %s", v, plain["feedthrough.weakest | lead"].Because)
	}
	strict := review("title = \"House rules\"\n[[limit]]\nrule = \"spacing.clearance\"\nsubject = \"lead: air side\"\nvalue = \"250 mm\"\nsource = \"House rules HV-7\"\nclause = \"4.2\"\n")
	x := strict["feedthrough.weakest | lead"]
	if part := strict["spacing.clearance | lead: air side"]; x.Verdict != rule.Fails || part.Verdict != x.Verdict || x.Remedy != part.Remedy || !strings.Contains(x.Because, "House rules HV-7 4.2") {
		t.Errorf("%s: %s", x.Verdict, x.Because)
	}
}
