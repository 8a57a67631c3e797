package local_test

import (
	"strings"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/hv/document"
	"kilovet/hv/document/faulttest"
	"kilovet/rules/local"
	"kilovet/rules/rule"
)

var ids = []string{"spacing.clearance", "diode.reverse_voltage", "divider.error", "access.interlock", "access.enclosure", "touch.voltage", "spacing.corona"}

func TestDeclarationsAreSound(t *testing.T) {
	for _, flaw := range document.Flaws(&local.File{}) {
		t.Error(flaw)
	}
}

func TestFaultsAreFoundInPlace(t *testing.T) {
	const text = `
[[limit]]
rule = "spacing.clearence"     # FAULT 8 rule: was "spacing.clearance" meant?
value = "3,5 mm"               # FAULT 9 quantity: "3,5 mm": a decimal comma
source = "House rules"

[[limit]]                      # FAULT 1 missing: source
rule = "touch.voltage"
value = "-5 V"                 # FAULT 9 range: not above nought
clase = "4"                    # FAULT 1 unknown: was "clause" meant?

[[relaxation]]                 # FAULT 1 missing: test_record # FAULT 1 missing: reason
rule = "diode.reverse_voltage"
value = 90                     # FAULT 9 type: text is wanted
name = "A. N. Other"
`
	_, faults := local.Read([]byte(text), ids)
	faulttest.Check(t, text, faults)
}

func TestAFileWithNothingInItIsRefused(t *testing.T) {
	if _, faults := local.Read([]byte("format = 1\n"), ids); len(faults) != 1 || faults[0].Code != "purpose" {
		t.Error(faults)
	}
}

func metres(v float64) rule.Amount { return rule.Amount{Value: v, Unit: "m"} }
func volts(v float64) rule.Amount  { return rule.Amount{Value: v, Unit: "V"} }

var (
	standard = rule.Source{Text: "IEC 60664-1", Mark: rule.Read, Governs: true}
	practice = rule.Source{Text: "85 % of rating", Mark: rule.Practice, Governs: true}
	memory   = rule.Source{Text: "from memory", Mark: rule.Memory, Governs: true}
)

// clearance is a finding about life by a standard; diode one about equipment by practice,
// 85 % of 10 kV.
func clearance(subject string, provided, needed float64) rule.Finding {
	return rule.Finding{Rule: "spacing.clearance", Subject: subject, Concern: rule.Life, Sources: []rule.Source{standard}}.Least(metres(provided), metres(needed), 0.1)
}

func diode(found float64) rule.Finding {
	return rule.Finding{Rule: "diode.reverse_voltage", Subject: "multiplier.diode", Concern: rule.Equipment, Sources: []rule.Source{practice}}.
		ShareOf(volts(10e3)).Most(volts(found), volts(8.5e3), 0.85/0.70-1)
}

func apply(t *testing.T, text string, findings ...rule.Finding) ([]rule.Finding, []local.Outcome) {
	t.Helper()
	f, faults := local.Read([]byte(text), ids)
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	got, outcomes, faults := local.Apply(f, findings, nil)
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	return got, outcomes
}

func limit(id, value string) string {
	return "[[limit]]\nrule = \"" + id + "\"\nvalue = \"" + value + "\"\nsource = \"House rules HV-7\"\nclause = \"4.2\"\n"
}

func relaxation(id, value string) string {
	return "[[relaxation]]\nrule = \"" + id + "\"\nvalue = \"" + value + "\"\ntest_record = \"TR-17\"\nname = \"A. N. Other\"\nreason = \"it held\"\n"
}

func TestAStricterLimitGoverns(t *testing.T) {
	for _, c := range []struct {
		value string
		was   rule.Finding
		want  rule.Verdict
	}{
		{"80 mm", clearance("lid", 0.060, 0.034), rule.Fails},
		{"60 mm", clearance("lid", 0.060, 0.034), rule.Marginal}, // equality passes, under the rule's 10 %
		{"50 mm", clearance("lid", 0.060, 0.034), rule.Meets},
		{"60 %", diode(6.1e3), rule.Fails},
		{"6 kV", diode(5.9e3), rule.Marginal},
		{"60 %", diode(4.0e3), rule.Meets},
	} {
		got, outcomes := apply(t, limit(c.was.Rule, c.value), c.was)
		f := got[0]
		if f.Verdict != c.want || outcomes[0].Result != local.Governs || !strings.Contains(f.Because, "House rules HV-7 4.2 asks for") {
			t.Errorf("%s of %s: %s, %+v", c.value, c.was.Rule, f.Verdict, outcomes)
		}
		if s := f.Sources[0]; s.Mark != rule.Local || !s.Governs || f.Sources[1].Governs {
			t.Errorf("%s: sources %+v", c.value, f.Sources)
		}
		if c.want != rule.Meets && !strings.Contains(f.Remedy, "as House rules HV-7 4.2 asks") {
			t.Errorf("%s: remedy %q", c.value, f.Remedy)
		}
	}
}

func TestALaxerLimitIsRefusedWithTheReason(t *testing.T) {
	for _, was := range []rule.Finding{clearance("lid", 0.060, 0.034), clearance("lid", 0.020, 0.034), diode(9e3)} {
		value := map[string]string{"spacing.clearance": "20 mm", "diode.reverse_voltage": "90 %"}[was.Rule]
		got, outcomes := apply(t, limit(was.Rule, value), was)
		if o := outcomes[0]; o.Result != local.Refused || !strings.Contains(o.Because, "is laxer than") || got[0].Verdict != was.Verdict || *got[0].Needed != *was.Needed {
			t.Errorf("%+v: %+v", got[0], outcomes)
		}
	}
	_, outcomes := apply(t, limit("spacing.clearance", "34 mm"), clearance("lid", 0.060, 0.034))
	if outcomes[0].Result != local.Same {
		t.Error(outcomes)
	}
}

func TestTheStrictestOfSeveralGoverns(t *testing.T) {
	for _, text := range []string{limit("spacing.clearance", "50 mm") + limit("spacing.clearance", "70 mm"), limit("spacing.clearance", "70 mm") + limit("spacing.clearance", "50 mm")} {
		got, _ := apply(t, text, clearance("lid", 0.060, 0.034))
		if got[0].Needed.Value != 0.070 || got[0].Verdict != rule.Fails || len(got[0].Sources) < 2 {
			t.Errorf("%+v", got[0])
		}
	}
}

func TestALimitOfOneSubjectLeavesTheOthers(t *testing.T) {
	got, _ := apply(t, strings.Replace(limit("spacing.clearance", "80 mm"), "value", "subject = \"lid\"\nvalue", 1), clearance("lid", 0.060, 0.034), clearance("base", 0.060, 0.034))
	if got[0].Verdict != rule.Fails || got[1].Verdict != rule.Meets {
		t.Errorf("%+v", got)
	}
}

func TestWhatCannotBeComparedIsUnassessed(t *testing.T) {
	byVoltage := rule.Finding{Rule: "touch.voltage", Subject: "tap", Concern: rule.Life}.Most(volts(20), volts(60), 0)
	byCharge := rule.Finding{Rule: "touch.voltage", Subject: "supply", Concern: rule.Life}.Most(rule.Amount{Value: 1e-6, Unit: "C"}, rule.Amount{Value: 45e-6, Unit: "C"}, 0)
	got, _ := apply(t, limit("touch.voltage", "25 V"), byVoltage, byCharge)
	if got[0].Verdict != rule.Meets || got[1].Verdict != rule.Unassessed || got[1].Needed != nil || !strings.Contains(got[1].Because, "cannot be compared") {
		t.Errorf("%+v", got)
	}
	got, _ = apply(t, limit("touch.voltage", "25 V")+limit("touch.voltage", "0.5 uC"), byVoltage, byCharge)
	if got[0].Verdict != rule.Meets || got[1].Verdict != rule.Fails {
		t.Errorf("both given: %+v", got)
	}
}

// What is about nothing here is a fault, told with its place.
func TestFaultsAgainstAChain(t *testing.T) {
	there := rule.Finding{Rule: "access.enclosure", Subject: "enclosure", Concern: rule.Life}.There(true)
	switches := rule.Finding{Rule: "access.interlock", Subject: "interlock", Concern: rule.Life}.Least(rule.Amount{Value: 2, Unit: "1"}, rule.Amount{Value: 2, Unit: "1"}, 0)
	for _, c := range []struct {
		text, code, says string
		line             int
	}{
		{limit("spacing.clearance", "5 kV"), "unit", "judged by a length, not by 5 kV", 3},
		{limit("spacing.clearance", "60 %"), "unit", "judged by a length, not by 60 %", 3},
		{limit("diode.reverse_voltage", "5 mm"), "unit", "judged by a voltage or by a share in %, not by 5 mm", 3},
		{limit("access.interlock", "60 %"), "unit", "judged by a count", 3},
		{limit("access.enclosure", "2"), "unit", "asks whether something is there", 2},
		{strings.Replace(limit("spacing.clearance", "80 mm"), "value", "subject = \"lit\"\nvalue", 1), "subject", "judges nothing of the name \"lit\" here", 3},
	} {
		f, faults := local.Read([]byte(c.text), ids)
		if len(faults) > 0 {
			t.Fatal(faults)
		}
		_, _, faults = local.Apply(f, []rule.Finding{clearance("lid", 0.06, 0.034), diode(5e3), there, switches}, nil)
		if len(faults) != 1 || string(faults[0].Code) != c.code || !strings.Contains(faults[0].What, c.says) || faults[0].Line != c.line {
			t.Errorf("%s\n%v", c.text, faults)
		}
	}
}

func TestACountIsACount(t *testing.T) {
	switches := rule.Finding{Rule: "access.interlock", Subject: "interlock", Concern: rule.Life}.Least(rule.Amount{Value: 2, Unit: "1"}, rule.Amount{Value: 2, Unit: "1"}, 0)
	got, outcomes := apply(t, limit("access.interlock", "3"), switches)
	if got[0].Verdict != rule.Fails || outcomes[0].Because != "at least 3 in place of at least 2" {
		t.Errorf("%+v %+v", got, outcomes)
	}
}

func TestARuleThatWasPassedOverIsToldSo(t *testing.T) {
	f, _ := local.Read([]byte(limit("spacing.corona", "80 %")), ids)
	_, outcomes, faults := local.Apply(f, nil, []rule.PassedOver{{Rule: "spacing.corona", Because: "no spacing is described"}})
	if len(faults) > 0 || len(outcomes) != 1 || outcomes[0].Because != "the rule was passed over: no spacing is described" {
		t.Error(outcomes, faults)
	}
}

func TestPracticeIsRelaxedByATestRecord(t *testing.T) {
	got, outcomes := apply(t, relaxation("diode.reverse_voltage", "95 %"), diode(9.0e3))
	f := got[0]
	if f.Verdict != rule.Marginal || outcomes[0].Result != local.Relaxed || f.Needed.Value != 9.5e3 {
		t.Errorf("%+v %+v", f, outcomes)
	}
	for _, want := range []string{"TR-17", "A. N. Other", "it held", "at most 9.5 kV in place of at most 8.5 kV"} {
		if !strings.Contains(f.Assumptions[0], want) {
			t.Errorf("%q is not in %q", want, f.Assumptions[0])
		}
	}
	if s := f.Sources[0]; s.Mark != rule.Tested || !s.Governs || f.Sources[1].Governs {
		t.Errorf("%+v", f.Sources)
	}
	if got, _ := apply(t, relaxation("diode.reverse_voltage", "87 %"), diode(9.0e3)); got[0].Verdict != rule.Fails {
		t.Errorf("past the relaxed limit too: %s", got[0].Verdict)
	}
}

func TestWhatIsNeverRelaxed(t *testing.T) {
	of := func(concern rule.Concern, sources ...rule.Source) rule.Finding {
		f := diode(9.0e3)
		f.Concern, f.Sources = concern, sources
		return f
	}
	for _, c := range []struct {
		name, text string
		was        rule.Finding
		result     local.Result
		says       string
	}{
		{"life", relaxation("diode.reverse_voltage", "95 %"), of(rule.Life, practice), local.Refused, "concerns life"},
		{"a standard that was read", relaxation("diode.reverse_voltage", "95 %"), of(rule.Equipment, practice, standard), local.Refused, "IEC 60664-1"},
		{"physics", relaxation("diode.reverse_voltage", "95 %"), of(rule.Equipment, rule.Source{Text: "law", Mark: rule.Derived, Governs: true}), local.Refused, "more than practice"},
		{"no source", relaxation("diode.reverse_voltage", "95 %"), of(rule.Equipment), local.Refused, "no source"},
		{"past the rating", relaxation("diode.reverse_voltage", "110 %"), of(rule.Equipment, practice), local.Refused, "lies past the 10 kV"},
		{"stricter", relaxation("diode.reverse_voltage", "60 %"), of(rule.Equipment, practice), local.Refused, "is not laxer"},
		{"under a local code", limit("diode.reverse_voltage", "60 %") + relaxation("diode.reverse_voltage", "95 %"), of(rule.Equipment, practice), local.Refused, "a local code governs it: House rules HV-7 4.2"},
		{"met", relaxation("diode.reverse_voltage", "95 %"), diode(5e3), local.NotNeeded, "met without it"},
		{"unassessed", relaxation("diode.reverse_voltage", "95 %"), rule.Finding{Rule: "diode.reverse_voltage", Verdict: rule.Unassessed, Because: "no rating"}, local.NotApplied, "no rating"},
	} {
		got, outcomes := apply(t, c.text, c.was)
		o := outcomes[len(outcomes)-1]
		if o.Result != c.result || !strings.Contains(o.Because, c.says) || rule.Graver(c.was.Verdict, got[0].Verdict) {
			t.Errorf("%s: %s, %+v", c.name, got[0].Verdict, o)
		}
	}
	if got, _ := apply(t, relaxation("diode.reverse_voltage", "95 %"), of(rule.Equipment, memory)); got[0].Verdict != rule.Marginal {
		t.Errorf("memory may be relaxed: %s", got[0].Verdict)
	}
}

// No local limit makes a verdict better, and no relaxation makes one meet.
func TestLocalLimitsNeverHelp(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		amount := func(name string) float64 { return rapid.Float64Range(1e-3, 1).Draw(t, name) }
		was := []rule.Finding{clearance("lid", amount("provided"), amount("needed")), diode(1e4 * amount("found"))}
		f, faults := local.Read([]byte(limit("spacing.clearance", rapid.StringMatching(`[1-9][0-9]{0,3} mm`).Draw(t, "least"))+
			limit("diode.reverse_voltage", rapid.StringMatching(`[1-9][0-9]? %`).Draw(t, "most"))), ids)
		if len(faults) > 0 {
			t.Fatal(faults)
		}
		got, _, _ := local.Apply(f, was, nil)
		for i := range was {
			if rule.Graver(was[i].Verdict, got[i].Verdict) {
				t.Fatalf("%s became %s", was[i].Verdict, got[i].Verdict)
			}
		}
		f, _ = local.Read([]byte(relaxation("diode.reverse_voltage", rapid.StringMatching(`[1-9][0-9]? %`).Draw(t, "relaxed"))), ids)
		got, _, _ = local.Apply(f, was, nil)
		if got[1].Verdict == rule.Meets && was[1].Verdict != rule.Meets {
			t.Fatal("a relaxation made a finding meet")
		}
	})
}

// FuzzRead reads any bytes: it ends without panic, every fault says what is wrong, and
// what was read can be applied.
//
//	go test -fuzz FuzzRead ./rules/local
func FuzzRead(f *testing.F) {
	f.Add(limit("spacing.clearance", "80 mm"))
	f.Add(relaxation("diode.reverse_voltage", "95 %"))
	f.Add(limit("access.interlock", "3") + "subject = \"\xff\"\n")
	f.Add("[[limit]]\nrule = []\nvalue = 1e400\n")
	f.Fuzz(func(t *testing.T, text string) {
		file, faults := local.Read([]byte(text), ids)
		for _, f := range faults {
			if f.What == "" || f.Line < 1 || f.Column < 1 {
				t.Fatalf("%+v", f)
			}
		}
		if len(faults) > 0 {
			return
		}
		_, outcomes, faults := local.Apply(file, []rule.Finding{clearance("lid", 0.06, 0.034), diode(5e3)}, nil)
		if len(outcomes)+len(faults) == 0 {
			t.Fatal("nothing is told of the file")
		}
	})
}

// A share of an estimate is relaxed where the share is practice, though the estimate was read;
// the estimate itself never is, nor a share that was read, nor one that concerns life.
func TestTheShareOfAnEstimateIsPractice(t *testing.T) {
	share := rule.Source{Text: "80 % of the estimate", Mark: rule.Practice}
	of := func(concern rule.Concern, from rule.Source) rule.Finding {
		return rule.Finding{Rule: "spacing.corona", Subject: "gap", Concern: concern, Sources: []rule.Source{standard, share}}.
			ShareBy(volts(10e3), from).Most(volts(9e3), volts(8e3), 0.6)
	}
	for _, c := range []struct {
		name, value string
		was         rule.Finding
		result      local.Result
	}{
		{"practice", "95 %", of(rule.Equipment, share), local.Relaxed},
		{"the estimate", "101 %", of(rule.Equipment, share), local.Refused},
		{"read", "95 %", of(rule.Equipment, standard), local.Refused},
		{"not said", "95 %", of(rule.Equipment, rule.Source{}), local.Refused},
		{"life", "95 %", of(rule.Life, share), local.Refused},
	} {
		got, outcomes := apply(t, relaxation("spacing.corona", c.value), c.was)
		if outcomes[0].Result != c.result || (got[0].Verdict == rule.Marginal) != (c.result == local.Relaxed) {
			t.Errorf("%s: %s, %+v", c.name, got[0].Verdict, outcomes[0])
		}
	}
}
