package compare_test

import (
	"math"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"
	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/hv/document"
	"kilovet/rules/compare"
	"kilovet/rules/figure"
	"kilovet/rules/rule"
)

func described(text string) compare.Side { return compare.Side{Inputs: document.List([]byte(text))} }

func TestInputs(t *testing.T) {
	for _, c := range []struct{ name, old, new, want string }{
		{"the same", "title = \"a\"\n", "title   = \"a\" # said\n", ""},
		{"a text", "title = \"a\"\n", "title = \"b\"\n", `title "a" "b" false`},
		{"another unit", "drive.peak = \"1.75 kV\"\n", "drive.peak = \"1750 V\"\n", `drive.peak "1.75 kV" "1750 V" true`},
		{"another value", "drive.peak = \"1.75 kV\"\n", "drive.peak = \"1.76 kV\"\n", `drive.peak "1.75 kV" "1.76 kV" false`},
		{"a number", "gun.exponent = 2\n", "gun.exponent = 2.0\n", `gun.exponent 2 2.0 true`},
		{"a word is no number", "drive.waveform = \"sine\"\n", "drive.waveform = 'sine'\n", `drive.waveform "sine" 'sine' false`},
		{"added", "", "multiplier.stages = 6\n", `multiplier.stages  6 false`},
		{"taken out", "multiplier.stages = 6\n", "", `multiplier.stages 6  false`},
		{"moved", "[[spacing]]\nname = \"a\"\ncreepage = \"1 m\"\n[[spacing]]\nname = \"b\"\n", "[[spacing]]\nname = \"b\"\n[[spacing]]\nname = \"a\"\ncreepage = \"1 m\"\n", ""},
		{"renamed", "[[spacing]]\nname = \"a\"\ncreepage = \"1 m\"\n[[spacing]]\nname = \"b\"\n", "[[spacing]]\nname = \"b\"\n[[spacing]]\nname = \"c\"\ncreepage = \"1 m\"\n", `spacing "c".name "a" "c" false renamed`},
		{"renamed, with tables of its own", "[[field]]\nname = \"a\"\nmedium = \"air\"\n[[field.electrodes]]\nname = \"x\"\n", "[[field]]\nname = 'the.name'\nmedium = \"air\"\n[[field.electrodes]]\nname = \"x\"\n", `field "the.name".name "a" 'the.name' false renamed`},
		{"renamed and changed", "[[part]]\nname = \"a\"\nvalue = 1\n", "[[part]]\nname = \"b\"\nvalue = 2\n", "part \"b\".name  \"b\" false\npart \"b\".value  2 false\npart \"a\".name \"a\"  false\npart \"a\".value 1  false"},
		{"of another kind", "[[part]]\nname = \"a\"\nvalue = 1\n", "[[load]]\nname = \"b\"\nvalue = 1\n", "load \"b\".name  \"b\" false\nload \"b\".value  1 false\npart \"a\".name \"a\"  false\npart \"a\".value 1  false"},
		{"two names changed places", "[[part]]\nname = \"a\"\nvalue = 1\n[[part]]\nname = \"b\"\nvalue = 2\n", "[[part]]\nname = \"b\"\nvalue = 1\n[[part]]\nname = \"a\"\nvalue = 2\n", "part \"b\".value 2 1 false\npart \"a\".value 1 2 false"},
		{"one of several", "[[spacing]]\nname = \"a\"\ncreepage = \"1 m\"\n", "[[spacing]]\nname = \"a\"\ncreepage = \"2 m\"\n", `spacing "a".creepage "1 m" "2 m" false`},
	} {
		var lines []string
		for _, in := range compare.Of(described(c.old), described(c.new)).Inputs {
			lines = append(lines, strings.Join([]string{in.At, in.Old, in.New, map[bool]string{true: "true", false: "false"}[in.Rewritten]}, " ")+map[bool]string{true: " renamed"}[in.Renamed])
		}
		if got := strings.Join(lines, "\n"); got != c.want {
			t.Errorf("%s: got %q, want %q", c.name, got, c.want)
		}
	}
}

func numbers(values ...float64) compare.Side {
	var s compare.Side
	for i, v := range values {
		s.Figures = append(s.Figures, figure.Figure{ID: "potential", Subject: string(rune('a' + i)), State: "cold", Unit: "V", Value: v})
	}
	return s
}

func TestFiguresMoveBeyondAMillionth(t *testing.T) {
	for _, c := range []struct {
		old, new float64
		moved    bool
		change   float64
	}{
		{1000, 1000.0009, false, 0}, {1000, 1000.0011, true, 1.1e-6}, {-20000, -21000, true, -0.05}, {2e-12, 3e-12, true, 0.5}, {0, 0, false, 0},
	} {
		moved := compare.Of(numbers(c.old), numbers(c.new)).Figures
		if len(moved) > 0 != c.moved {
			t.Errorf("%v to %v: %v", c.old, c.new, moved)
		} else if c.moved && (*moved[0].Old != c.old || *moved[0].New != c.new || math.Abs(*moved[0].Change-c.change) > 1e-6*math.Abs(c.change)) {
			t.Errorf("%v to %v: change %v, want %v", c.old, c.new, *moved[0].Change, c.change)
		}
	}
}

// A residue of arithmetic beside large figures of its kind has not moved.
func TestResiduesDoNotMove(t *testing.T) {
	if moved := compare.Of(numbers(300, 8e-9, 1e-6), numbers(300, -2e-9, 2e-6)).Figures; len(moved) != 1 || moved[0].Subject != "c" {
		t.Errorf("%v", moved)
	}
}

func TestFiguresWithoutAChange(t *testing.T) {
	from := compare.Of(numbers(0), numbers(3)).Figures
	gone := compare.Of(numbers(1, 2), numbers(1)).Figures
	came := compare.Of(numbers(1), numbers(1, 2)).Figures
	if len(from) != 1 || from[0].Change != nil || len(gone) != 1 || gone[0].New != nil || gone[0].Change != nil || len(came) != 1 || came[0].Old != nil {
		t.Errorf("%v, %v, %v", from, gone, came)
	}
}

func judged(verdicts ...rule.Verdict) compare.Side {
	var s compare.Side
	for i, v := range verdicts {
		if v != "" {
			s.Findings = append(s.Findings, rule.Finding{Rule: "spacing.creepage", Subject: string(rune('a' + i)), Verdict: v})
		}
	}
	s.Verdict = rule.Worst(s.Findings)
	return s
}

func TestWorse(t *testing.T) {
	for _, c := range []struct {
		old, new rule.Verdict
		changed  int
		worse    bool
	}{
		{rule.Meets, rule.Meets, 0, false}, {rule.Fails, rule.Fails, 0, false},
		{rule.Meets, rule.Marginal, 1, true}, {rule.Marginal, rule.Unassessed, 1, true}, {rule.Unassessed, rule.Fails, 1, true},
		{rule.Fails, rule.Unassessed, 1, false}, {rule.Fails, rule.Meets, 1, false},
		{"", rule.Meets, 1, false}, {"", rule.Marginal, 1, false}, {"", rule.Unassessed, 1, true}, {"", rule.Fails, 1, true},
		{rule.Fails, "", 1, false}, {rule.Marginal, "", 1, false}, {rule.Meets, "", 1, true},
	} {
		// A finding that fails on both sides keeps the verdict of the whole out of it.
		d := compare.Of(judged(rule.Fails, c.old), judged(rule.Fails, c.new))
		if len(d.Findings) != c.changed || d.Worse != c.worse {
			t.Errorf("%q to %q: %d changed, worse %t", c.old, c.new, len(d.Findings), d.Worse)
		}
	}
}

// A subject that bears another name is judged as it was.
func TestARenamedSubjectIsNotWorse(t *testing.T) {
	if d := compare.Of(judged(rule.Fails, rule.Meets), judged(rule.Fails, "", rule.Meets)); len(d.Findings) != 2 || d.Worse {
		t.Errorf("%+v", d)
	}
}

// What is said of a table under its new name is compared with what was said under the old
// one; where another bears either name, nobody can tell which is spoken of.
func TestWhatIsSaidOfARenamedTable(t *testing.T) {
	side := func(kind, name string, value float64, v rule.Verdict) compare.Side {
		s := described("[[spacing]]\nname = \"" + name + "\"\ncreepage = 1\n" + kind)
		s.Figures = []figure.Figure{{ID: "spacing.voltage", Subject: name, Value: value}, {ID: "field.peak", Subject: name + "/lid", Value: value}}
		s.Findings = []rule.Finding{{Rule: "spacing.creepage", Subject: name, Verdict: v}}
		return s
	}
	if d := compare.Of(side("", "a", 1, rule.Meets), side("", "b", 1, rule.Meets)); len(d.Inputs) != 1 || len(d.Figures)+len(d.Findings) != 0 {
		t.Errorf("%+v", d)
	}
	d := compare.Of(side("", "a", 1, rule.Meets), side("", "b", 2, rule.Fails))
	if len(d.Figures) != 2 || d.Figures[0].Subject != "b" || *d.Figures[1].Old != 1 || len(d.Findings) != 1 || d.Findings[0].Old == nil || !d.Worse {
		t.Errorf("%+v", d)
	}
	other := "[[part]]\nname = \"a\"\nvalue = 7\n"
	if d := compare.Of(side(other, "a", 1, rule.Meets), side(other, "b", 1, rule.Meets)); len(d.Inputs) != 1 || len(d.Figures) != 4 || len(d.Findings) != 2 {
		t.Errorf("%+v", d)
	}
}

// Nothing judged any more is unassessed, and that is worse than what was met.
func TestNothingJudgedIsWorse(t *testing.T) {
	if d := compare.Of(judged(rule.Meets), judged()); !d.Worse || d.Is != rule.Unassessed {
		t.Errorf("%+v", d)
	}
}

func sides(t *rapid.T, label string) compare.Side {
	verdicts := append([]rule.Verdict{""}, rule.Verdicts...)
	s := judged(rapid.SliceOfN(rapid.SampledFrom(verdicts), 0, 4).Draw(t, label)...)
	s.Figures = numbers(rapid.SliceOfN(rapid.Float64Range(-9, 9), 0, 4).Draw(t, label)...).Figures
	s.Inputs = described(rapid.SampledFrom([]string{"", "title = 1", "title = 2", "format = 1\ntitle = 2"}).Draw(t, label)).Inputs
	return s
}

func TestASideDoesNotDifferFromItself(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		s := sides(t, "side")
		if d := compare.Of(s, s); !d.Nothing() || d.Worse {
			t.Errorf("%+v", d)
		}
	})
}

// Seen from the other side the same things have changed, and what got worse one way
// is not worse the other way.
func TestTheOtherWayRound(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		old, new := sides(t, "old"), sides(t, "new")
		there, back := compare.Of(old, new), compare.Of(new, old)
		if diff := cmp.Diff(sizes(there), sizes(back)); diff != "" {
			t.Error(diff)
		}
		for _, f := range there.Findings {
			for _, g := range back.Findings {
				if f.Subject == g.Subject && f.Worse && g.Worse {
					t.Errorf("%s is worse both ways", f.Subject)
				}
			}
		}
	})
}

func sizes(d compare.Difference) [3]int {
	return [3]int{len(d.Inputs), len(d.Figures), len(d.Findings)}
}
