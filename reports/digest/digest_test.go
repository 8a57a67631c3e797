package digest_test

import (
	"math"
	"slices"
	"strings"
	"testing"
	"unicode"
	"unicode/utf8"

	"github.com/google/go-cmp/cmp"
	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/reports/digest"
	"kilovet/reports/internal/sample"
	"kilovet/rules"
	"kilovet/rules/figure"
	"kilovet/rules/rule"
)

func ids(findings []rule.Finding) []string {
	var all []string
	for _, f := range findings {
		all = append(all, f.Rule)
	}
	return all
}

func TestWorstFindingsComeFirst(t *testing.T) {
	want := []string{"spacing.creepage", "rating.cable", "rating.diode_reverse", "access.enclosure", "beam.blur"}
	if diff := cmp.Diff(want, ids(digest.Sorted(sample.Failing().Findings))); diff != "" {
		t.Error(diff)
	}
}

func TestGravestConcernStandsFirstAgainstSwitchingOn(t *testing.T) {
	r := &rules.Review{Findings: []rule.Finding{
		{Rule: "a", Verdict: rule.Fails, Concern: rule.Performance},
		{Rule: "b", Verdict: rule.Unassessed, Concern: rule.Life},
		{Rule: "c", Verdict: rule.Meets, Concern: rule.Life},
		{Rule: "d", Verdict: rule.Fails, Concern: rule.Life},
		{Rule: "e", Verdict: rule.Marginal, Concern: rule.Equipment},
		{Rule: "f", Verdict: "unheard of", Concern: "unheard of"},
	}}
	if diff := cmp.Diff([]string{"f", "d", "b", "a"}, ids(digest.Against(r))); diff != "" {
		t.Error(diff)
	}
	if r.Findings[0].Rule != "a" {
		t.Error("the review itself was reordered")
	}
}

func TestEntriesCountEveryFinding(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		var findings []rule.Finding
		for range rapid.IntRange(0, 30).Draw(t, "n") {
			findings = append(findings, rule.Finding{
				Rule:    rapid.SampledFrom([]string{"a", "b"}).Draw(t, "rule"),
				Subject: rapid.SampledFrom([]string{"", "x", "y"}).Draw(t, "subject"),
				Verdict: rapid.SampledFrom(rule.Verdicts).Draw(t, "verdict"),
			})
		}
		n := 0
		for _, e := range digest.Entries(findings) {
			n += e.Count
		}
		if n != len(findings) {
			t.Fatalf("%d findings in the entries, %d given", n, len(findings))
		}
	})
}

func TestEntryNamesItsSubjects(t *testing.T) {
	var findings []rule.Finding
	for _, s := range []string{"one", "two", "three", "four"} {
		findings = append(findings, rule.Finding{Rule: "r", Subject: s})
	}
	if got, want := digest.Entries(findings)[0].Text(2), "r: one; two and 2 more"; got != want {
		t.Errorf("got %q, want %q", got, want)
	}
	if got := digest.Entries([]rule.Finding{{Rule: "r"}})[0].Text(2); got != "r" {
		t.Errorf("a rule without subject reads %q", got)
	}
}

func TestMissingKeysAreNamedOnceWithHowManyWantThem(t *testing.T) {
	r := &rules.Review{Findings: []rule.Finding{
		{Verdict: rule.Marginal, Missing: []string{"late"}},
		{Verdict: rule.Unassessed, Missing: []string{"b", "a"}},
		{Verdict: rule.Unassessed, Missing: []string{"a"}},
	}}
	if diff := cmp.Diff([]digest.Key{{"b", 1}, {"a", 2}, {"late", 1}}, digest.Missing(r)); diff != "" {
		t.Error(diff)
	}
	if got, want := digest.MissingText(r, 2), "b, a and 1 more"; got != want {
		t.Errorf("got %q, want %q", got, want)
	}
}

func TestStatesComeInTheirUsualOrder(t *testing.T) {
	got := digest.States([]figure.Figure{{State: "lost"}, {State: "shorted"}, {State: "working"}, {State: ""}})
	if diff := cmp.Diff([]string{"working", "lost", "shorted"}, got); diff != "" {
		t.Error(diff)
	}
}

func TestNoFigureIsLost(t *testing.T) {
	word := rapid.SampledFrom([]string{"", "working", "cold", "lost", "other"})
	chance.Check(t, func(t *rapid.T) {
		var figures []figure.Figure
		for range rapid.IntRange(0, 30).Draw(t, "n") {
			figures = append(figures, figure.Figure{ID: word.Draw(t, "id"), Subject: word.Draw(t, "subject"), State: word.Draw(t, "state"), Value: 1, Unit: "V"})
		}
		shown := values(digest.ByState(figures, digest.States(figures))) + values(digest.Stateless(figures))
		if shown != len(figures) {
			t.Fatalf("%d figures shown, %d given", shown, len(figures))
		}
	})
}

func values(groups []digest.Group) int {
	n := 0
	for _, g := range groups {
		for _, r := range g.Rows {
			n += len(slices.DeleteFunc(slices.Clone(r.Values), func(v string) bool { return v == "" }))
		}
	}
	return n
}

func TestAmounts(t *testing.T) {
	for _, c := range []struct {
		value float64
		unit  string
		want  string
	}{
		{-19612.4, "V", "-19.61 kV"},
		{4.7e6, "ohm", "4.7 MΩ"},
		{0.125, "m", "125 mm"},
		{3e-8, "m2", "0.03 mm2"},
		{0.0213, "1", "2.13 %"},
		{1010.1, "1", "1010"},
		{1, "1", "1"},
		{math.Copysign(0, -1), "V", "0 V"},
		{303.15, "K", "30 °C"},
		{60, "Hz", "60 Hz"},
		{math.NaN(), "V", "no number"},
		{math.Inf(-1), "1", "no number"},
		{12, "furlong", "12 furlong"},
	} {
		if got := digest.Amount(rule.Amount{Value: c.value, Unit: c.unit}); got != c.want {
			t.Errorf("%g %s reads %q, want %q", c.value, c.unit, got, c.want)
		}
	}
}

func TestMargins(t *testing.T) {
	for _, c := range []struct {
		margin float64
		want   string
	}{
		{-0.12, "-12.0 %"}, {0.153, "+15.3 %"}, {0, "0.0 %"}, {-6e-16, "0.0 %"}, {6e-10, "0.0 %"}, {-1e-6, "-0.0001 %"}, {1e-6, "+0.0001 %"}, {math.Inf(1), "tenfold or more"}, {9, "tenfold or more"}, {8.9, "+890.0 %"}, {math.NaN(), ""},
	} {
		if got := digest.Margin(rule.Finding{Margin: &c.margin}); got != c.want {
			t.Errorf("margin %g reads %q, want %q", c.margin, got, c.want)
		}
	}
	if got := digest.Margin(rule.Finding{}); got != "" {
		t.Errorf("no margin reads %q", got)
	}
}

func TestNeededAndProvided(t *testing.T) {
	none, strings, tenth := &rule.Amount{Unit: "1"}, &rule.Amount{Value: 2, Unit: "1"}, &rule.Amount{Value: 0.1, Unit: "1"}
	ten, two := &rule.Amount{Value: 10, Unit: "V"}, &rule.Amount{Value: 2, Unit: "V"}
	for _, c := range []struct {
		finding          rule.Finding
		needed, provided string
	}{
		{rule.Finding{Relation: rule.AtLeast, Needed: ten, Provided: two}, "needed 10 V", "provided 2 V"},
		{rule.Finding{Relation: rule.AtMost, Needed: ten, Provided: two}, "allowed 10 V", "found 2 V"},
		{rule.Finding{Relation: rule.Presence}, "needed ", "provided "},
		{rule.Finding{Relation: rule.AtMost, Needed: ten}, "allowed 10 V", "found "},
		{rule.Finding{Relation: rule.AtLeast, Needed: strings, Provided: none}, "needed 2", "provided 0"},
		{rule.Finding{Relation: rule.AtMost, Needed: tenth, Provided: none}, "allowed 10 %", "found 0 %"},
	} {
		needed, provided := digest.Labels(c.finding)
		if n, p := needed+" "+digest.Needed(c.finding), provided+" "+digest.Provided(c.finding); n != c.needed || p != c.provided {
			t.Errorf("%v reads %q and %q, want %q and %q", c.finding.Relation, n, p, c.needed, c.provided)
		}
	}
}

func TestNarrowIsWhatPeopleAndEquipmentHaveLittleOf(t *testing.T) {
	r := &rules.Review{Findings: []rule.Finding{
		{Rule: "a", Verdict: rule.Marginal, Concern: rule.Equipment},
		{Rule: "b", Verdict: rule.Fails, Concern: rule.Life},
		{Rule: "c", Verdict: rule.Marginal, Concern: rule.Performance},
		{Rule: "d", Verdict: rule.Marginal, Concern: rule.Life},
		{Rule: "e", Verdict: rule.Meets, Concern: rule.Life},
	}}
	if diff := cmp.Diff([]string{"d", "a"}, ids(digest.Narrow(r))); diff != "" {
		t.Error(diff)
	}
}

func TestSilentRowsSayNothingOfAPart(t *testing.T) {
	for _, c := range []struct {
		row  digest.Row
		want bool
	}{
		{digest.Row{Subject: "ground", Values: []string{"0 V", "0 V", ""}}, true},
		{digest.Row{Subject: "gain", Values: []string{"0"}}, true},
		{digest.Row{Subject: "cathode", Values: []string{"0 V", "0.5 V"}}, false},
		{digest.Row{Subject: "shield", Values: []string{"below 1e-6 µGy/h"}}, false},
		{digest.Row{Subject: "whole chain", Values: []string{"0 V"}}, false},
	} {
		if got := c.row.Silent(); got != c.want {
			t.Errorf("%v: %t, want %t", c.row, got, c.want)
		}
	}
}

func TestScopeSaysWhatWasNotJudged(t *testing.T) {
	of := func(ids ...string) *rules.Review {
		r := &rules.Review{}
		for _, id := range ids {
			r.Findings = append(r.Findings, rule.Finding{Rule: id, Verdict: rule.Meets, Concern: rule.Life})
		}
		return r
	}
	for _, c := range []struct {
		review *rules.Review
		want   string
	}{
		{of("spacing.clearance", "field.strength", "spacing.creepage"), "Only spacing, field rules were judged: nothing about people, stored charge or X-rays was."},
		{of("field.strength"), "Only field rules were judged: nothing about people, stored charge or X-rays was."},
		{of(""), "Nothing about people, stored charge or X-rays was judged."},
		{of("spacing.clearance", "touch.voltage"), ""},
		{of("xray.rate"), ""},
	} {
		if got := digest.Scope(c.review); got != c.want {
			t.Errorf("got %q, want %q", got, c.want)
		}
		if got := digest.Sentence(c.review); !strings.HasSuffix(got, strings.TrimSpace("met. "+c.want)) {
			t.Errorf("the sentence %q does not say so", got)
		}
	}
}

func TestSources(t *testing.T) {
	for _, c := range []struct {
		source rule.Source
		want   string
	}{
		{rule.Source{Text: "IEC 60664-1", Mark: rule.Read, Governs: true}, "IEC 60664-1 (read; governs)"},
		{rule.Source{Text: "derating", Mark: rule.Practice}, "derating (common practice, no source)"},
		{rule.Source{Text: "hearsay"}, "hearsay (not marked)"},
	} {
		if got := digest.Source(c.source); got != c.want {
			t.Errorf("got %q, want %q", got, c.want)
		}
	}
}

func TestPlaceNamesTheFileOnlyWhereTheKeyStandsInIt(t *testing.T) {
	r := sample.Failing()
	if got, want := digest.Place(r, r.Findings[1]), "spacing.creepage at chain.toml:97:14"; got != want {
		t.Errorf("got %q, want %q", got, want)
	}
	if got, want := digest.Place(r, r.Findings[2]), "drive.peak_limit"; got != want {
		t.Errorf("got %q, want %q", got, want)
	}
}

func TestSentences(t *testing.T) {
	one := func(v rule.Verdict, c rule.Concern) []rule.Finding { return []rule.Finding{{Verdict: v, Concern: c}} }
	for _, c := range []struct {
		findings []rule.Finding
		want     string
	}{
		{nil, "Nothing was judged"},
		{one(rule.Fails, rule.Life), "Do not switch on: 1 finding about people or equipment fails."},
		{append(one(rule.Fails, rule.Equipment), one(rule.Fails, rule.Life)...), "Do not switch on: 2 findings about people or equipment fail."},
		{one(rule.Unassessed, rule.Equipment), "Do not switch on yet: 1 finding about people or equipment is unassessed."},
		{one(rule.Fails, rule.Performance), "Nothing about people or equipment fails; the performance asked for is not reached"},
		{one(rule.Unassessed, rule.Performance), "Nothing about people or equipment fails; the performance is not fully assessed"},
		{one(rule.Marginal, rule.Life), "Every rule that applies is met, some with little in hand or resting on an assumption."},
		{one(rule.Meets, rule.Life), "Every rule that applies is met."},
	} {
		if got := digest.Sentence(&rules.Review{Findings: c.findings, Verdict: rule.Worst(c.findings)}); !strings.HasPrefix(got, c.want) {
			t.Errorf("got %q, want %q", got, c.want)
		}
	}
}

func TestCleanTextCannotSteerATerminal(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		s := string(rapid.SliceOf(rapid.Byte()).Draw(t, "bytes")) + rapid.String().Draw(t, "text")
		got := digest.Clean(s)
		if !utf8.ValidString(got) || strings.ContainsFunc(got, func(r rune) bool { return unicode.In(r, unicode.Cc, unicode.Cf, unicode.Zl, unicode.Zp) }) {
			t.Fatalf("%q became %q", s, got)
		}
	})
	if got, want := digest.Clean("a\tb\u202ec\x1bµ"), "a b\ufffdc\ufffdµ"; got != want {
		t.Errorf("got %q, want %q", got, want)
	}
}
