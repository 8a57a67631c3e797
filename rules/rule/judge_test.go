package rule_test

import (
	"errors"
	"math"
	"testing"

	"kilovet/hv/lack"
	"kilovet/rules/rule"
)

func volts(v float64) rule.Amount { return rule.Amount{Value: v, Unit: "V"} }

// The rows stand just below, at and just above equality and margin; 1e-9 is slack.
func TestLeastAndMostAtTheirEdges(t *testing.T) {
	const hair, slack = 1e-6, 1e-10
	for _, c := range []struct {
		name             string
		provided, needed float64
		margin           float64
		want             rule.Verdict
	}{
		{"below", 1 - hair, 1, 0.1, rule.Fails},
		{"equal", 1, 1, 0.1, rule.Marginal},
		{"equal but for rounding", 1 - slack, 1, 0.1, rule.Marginal},
		{"just above", 1 + hair, 1, 0.1, rule.Marginal},
		{"below the margin", 1.1 - hair, 1, 0.1, rule.Marginal},
		{"at the margin", 1.1, 1, 0.1, rule.Meets},
		{"equal without margin", 1, 1, 0, rule.Meets},
		{"nothing is asked", 0, 0, 0.1, rule.Meets},
	} {
		if got := (rule.Finding{}).Least(volts(c.provided), volts(c.needed), c.margin).Verdict; got != c.want {
			t.Errorf("least, %s: %s, want %s", c.name, got, c.want)
		}
		// What is at most the allowed is the same with both sides exchanged.
		if got := (rule.Finding{}).Most(volts(c.needed), volts(c.provided), c.margin).Verdict; got != c.want && c.needed != 0 {
			t.Errorf("most, %s: %s, want %s", c.name, got, c.want)
		}
	}
}

func TestMarginsAreThoseOfTheContract(t *testing.T) {
	if f := (rule.Finding{}).Least(volts(0.110), volts(0.125), 0); math.Abs(*f.Margin+0.12) > 1e-12 || f.Relation != rule.AtLeast {
		t.Errorf("at least: margin %v", *f.Margin)
	}
	if f := (rule.Finding{}).Most(volts(50), volts(60), 0); math.Abs(*f.Margin-0.2) > 1e-12 || f.Relation != rule.AtMost {
		t.Errorf("at most: margin %v", *f.Margin)
	}
}

func TestWhatIsNoNumberNeverPasses(t *testing.T) {
	for _, v := range []float64{math.NaN(), math.Inf(1), -1} {
		for _, f := range []rule.Finding{(rule.Finding{}).Least(volts(v), volts(1), 0.1), (rule.Finding{}).Most(volts(v), volts(1), 0.1)} {
			if f.Verdict == rule.Meets || f.Verdict == rule.Marginal {
				t.Errorf("%v: %s", v, f.Verdict)
			}
		}
	}
}

func TestAssumptionsTemperAPassOnly(t *testing.T) {
	if v := (rule.Finding{}).Least(volts(2), volts(1), 0.1).Assume("x").Verdict; v != rule.Marginal {
		t.Errorf("a pass on an assumption %s", v)
	}
	if v := (rule.Finding{}).Least(volts(0.5), volts(1), 0.1).Assume("x").Verdict; v != rule.Fails {
		t.Errorf("a failure on an assumption %s", v)
	}
	if v := (rule.Finding{}).Assume("x").There(true).Verdict; v != rule.Marginal {
		t.Errorf("a presence on an assumption %s", v)
	}
}

func TestLackingKeepsTheSentenceAndNamesTheKey(t *testing.T) {
	f := rule.Finding{Because: "7 s are needed", Remedy: "widen it"}.Lacking(lack.Key("access.waiting_time"))
	if f.Verdict != rule.Unassessed || f.Because != "7 s are needed; access.waiting_time not given" || f.Remedy != "give access.waiting_time" {
		t.Errorf("%+v", f)
	}
	if f := (rule.Finding{}).Lacking(lack.Key("a", "b")); f.Because != "a, b not given" || f.Remedy != "give both of these" || len(f.Missing) != 2 {
		t.Errorf("several keys: %+v", f)
	}
	several := &lack.Lack{Kind: lack.Missing, Keys: []string{"a", "b"}, Why: "neither is known"}
	if f := (rule.Finding{}).Lacking(several); f.Remedy != "give a, b" {
		t.Errorf("keys that the reason does not list: %+v", f)
	}
	if f := (rule.Finding{}).Lacking(errors.New("odd")); f.Verdict != rule.Unassessed || f.Remedy == "" {
		t.Errorf("an error that is no lack: %+v", f)
	}
}

func TestWorst(t *testing.T) {
	of := func(v ...rule.Verdict) []rule.Finding {
		var all []rule.Finding
		for _, x := range v {
			all = append(all, rule.Finding{Verdict: x})
		}
		return all
	}
	for _, c := range []struct {
		findings []rule.Finding
		want     rule.Verdict
	}{
		{nil, rule.Unassessed},
		{of(rule.Meets, rule.Marginal), rule.Marginal},
		{of(rule.Marginal, rule.Unassessed, rule.Meets), rule.Unassessed},
		{of(rule.Unassessed, rule.Fails), rule.Fails},
		{of(rule.Meets), rule.Meets},
	} {
		if got := rule.Worst(c.findings); got != c.want {
			t.Errorf("%v: %s, want %s", c.findings, got, c.want)
		}
	}
}
