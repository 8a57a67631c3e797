package signoff_test

import (
	"strings"
	"testing"

	"kilovet/hv/chain"
	"kilovet/rules/rule"
	"kilovet/rules/signoff"
)

const whole = `format = 1
[drive]
frequency = "38 kHz"
peak = "1.75 kV"
[multiplier]
polarity = "negative"
stages = 3
coupling_capacitor.value = "1 nF"
smoothing_capacitor.value = "1 nF"
`

func accepted(rule, subject, disposition, more string) string {
	text := "[[accepted]]\nrule = \"" + rule + "\"\n"
	if subject != "" {
		text += "subject = \"" + subject + "\"\n"
	}
	return text + "disposition = \"" + disposition + "\"\nname = \"A. N. Other\"\nreason = \"it holds\"\n" + more
}

const recorded = "record = \"MR-1\"\nmeasurement = \"0.2 uSv/h at 0.1 m, survey meter SM-2, 2025-03-04\"\n"

func decide(t *testing.T, text string, required []rule.Concern, findings ...rule.Finding) signoff.Decision {
	t.Helper()
	c, faults := chain.Read([]byte(text))
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	return signoff.Decide(c, findings, required)
}

func finding(id string, c rule.Concern, v rule.Verdict) rule.Finding {
	return rule.Finding{Rule: id, Subject: "thing", Concern: c, Verdict: v}
}

// The whole of what lets a sheet be issued.
func TestWhatLetsASheetBeIssued(t *testing.T) {
	for _, c := range []struct {
		name, accepted string
		finding        rule.Finding
		issued         bool
		says           string
	}{
		{"met", "", finding("a.b", rule.Life, rule.Meets), true, ""},
		{"marginal", "", finding("a.b", rule.Life, rule.Marginal), true, ""},

		{"fails, life", "", finding("a.b", rule.Life, rule.Fails), false, "no disposition lets"},
		{"fails, life, accepted", accepted("a.b", "thing", "accepted", ""), finding("a.b", rule.Life, rule.Fails), false, "no disposition lets"},
		{"fails, life, measured", accepted("a.b", "thing", "measured", recorded), finding("a.b", rule.Life, rule.Fails), false, "no disposition lets"},

		{"unassessed, life", "", finding("a.b", rule.Life, rule.Unassessed), false, "only a recorded measurement answers it"},
		{"unassessed, life, accepted", accepted("a.b", "thing", "accepted", recorded), finding("a.b", rule.Life, rule.Unassessed), false, `"accepted" is not enough`},
		{"unassessed, life, restricted", accepted("a.b", "thing", "restricted", ""), finding("a.b", rule.Life, rule.Unassessed), false, `"restricted" is not enough`},
		{"unassessed, life, measured", accepted("a.b", "thing", "measured", recorded), finding("a.b", rule.Life, rule.Unassessed), true, ""},
		{"unassessed, life, measured elsewhere", accepted("a.b", "other", "measured", recorded), finding("a.b", rule.Life, rule.Unassessed), false, "only a recorded measurement"},

		{"fails, equipment", "", finding("a.b", rule.Equipment, rule.Fails), false, "it fails, and no [[accepted]]"},
		{"fails, equipment, accepted", accepted("a.b", "thing", "accepted", ""), finding("a.b", rule.Equipment, rule.Fails), true, ""},
		{"fails, equipment, accepted without subject", accepted("a.b", "", "accepted", ""), finding("a.b", rule.Equipment, rule.Fails), true, ""},
		{"unassessed, performance", "", finding("a.b", rule.Performance, rule.Unassessed), false, "it is unassessed, and no [[accepted]]"},
		{"unassessed, performance, restricted", accepted("a.b", "thing", "restricted", ""), finding("a.b", rule.Performance, rule.Unassessed), true, ""},
	} {
		d := decide(t, whole+c.accepted, rule.Concerns, c.finding)
		why := ""
		for _, p := range d.Points {
			why += p.Against
		}
		if d.Issued() != c.issued || !strings.Contains(why, c.says) || (c.says == "") != (why == "") {
			t.Errorf("%s: issued %t, %q", c.name, d.Issued(), why)
		}
	}
}

func TestConcernsThatAreNotRequired(t *testing.T) {
	open := finding("a.b", rule.Performance, rule.Fails)
	if d := decide(t, whole, []rule.Concern{rule.Life, rule.Equipment}, open); !d.Issued() || len(d.Points) != 1 || d.Points[0].Required {
		t.Errorf("%+v", d)
	}
	if d := decide(t, whole, []rule.Concern{rule.Performance}, finding("a.b", rule.Life, rule.Fails)); d.Issued() || !strings.Contains(d.Against[0], "every sheet requires it") {
		t.Errorf("without life: %+v", d)
	}
}

func TestASheetIsForAWholeChain(t *testing.T) {
	d := decide(t, "format = 1\n[[spacing]]\nname = \"gap\"\nmedium = \"air\"\nvoltage = \"2 kV\"\n", rule.Concerns)
	if d.Issued() || !strings.Contains(d.Against[0], "whole chain") {
		t.Errorf("%+v", d)
	}
}

func TestDispositionsWithoutEffectAreTold(t *testing.T) {
	text := whole + accepted("a.b", "", "accepted", "") + accepted("c.d", "thinf", "accepted", "") + accepted("e.f", "thing", "accepted", "") + accepted("g.h", "", "accepted", "")
	several := finding("a.b", rule.Performance, rule.Unassessed)
	several.Subject = "other"
	d := decide(t, text, rule.Concerns, finding("a.b", rule.Performance, rule.Unassessed), several, finding("c.d", rule.Performance, rule.Fails), finding("e.f", rule.Life, rule.Meets))
	var told []string
	for _, i := range d.Idle {
		told = append(told, i.Rule+": "+i.Because)
	}
	want := []string{"a.b: the rule judges 2 things: name the subject", `c.d: the rule judges nothing of this name; was "thing" meant?`, "e.f: the rule is met there", "g.h: the rule judges nothing here"}
	if strings.Join(told, "\n") != strings.Join(want, "\n") {
		t.Errorf("%s", strings.Join(told, "\n"))
	}
}

func TestPointsStandGravestFirst(t *testing.T) {
	d := decide(t, whole, rule.Concerns, finding("a", rule.Performance, rule.Fails), finding("b", rule.Equipment, rule.Marginal), finding("c", rule.Life, rule.Unassessed), finding("d", rule.Life, rule.Fails), finding("e", rule.Life, rule.Meets))
	order := ""
	for _, p := range d.Points {
		order += p.Finding.Rule
	}
	if order != "dcba" {
		t.Error(order)
	}
}

func TestADispositionOfNoRuleIsAFault(t *testing.T) {
	c, _ := chain.Read([]byte(whole + accepted("spacing.korona", "", "accepted", "")))
	faults := signoff.Faults(c, []string{"spacing.corona"})
	if len(faults) != 1 || faults[0].Line != 11 || !strings.Contains(faults[0].Error(), `was "spacing.corona" meant?`) {
		t.Error(faults)
	}
}
