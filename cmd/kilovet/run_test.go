package main

import (
	"bytes"
	_ "embed"
	"errors"
	"math"
	"runtime/debug"
	"strings"
	"testing"

	"kilovet/rules"
	"kilovet/rules/figure"
	"kilovet/rules/rule"
)

// try carries out a command line in this process.
func try(in string, columns int, env map[string]string, args ...string) (status int, stdout, stderr string) {
	var out, errs bytes.Buffer
	status = run(world{args: args, in: strings.NewReader(in), out: &out, err: &errs,
		env: func(k string) string { return env[k] }, columns: func() int { return columns }})
	return status, out.String(), errs.String()
}

//go:embed testdata/gap.toml
var gap string

func TestColourNeedsATerminalThatWantsIt(t *testing.T) {
	if testing.Short() {
		t.Skip("whole reviews; the ordinary run has them")
	}
	for _, c := range []struct {
		columns int
		env     map[string]string
		want    bool
	}{
		{0, nil, false}, {80, nil, true}, {80, map[string]string{"NO_COLOR": "1"}, false}, {80, map[string]string{"NO_COLOR": ""}, true},
	} {
		_, out, _ := try(gap, c.columns, c.env, "review", "-")
		if got := strings.Contains(out, "\x1b["); got != c.want {
			t.Errorf("%d columns, %v: colour %t, want %t", c.columns, c.env, got, c.want)
		}
	}
}

func TestEveryRuleHasAPageThatNamesASource(t *testing.T) {
	for _, r := range rules.All() {
		status, out, _ := try("", 0, nil, "basis", r.ID)
		if status != sound || !strings.Contains(out, "\nsource ") || !strings.Contains(out, r.Title) {
			t.Errorf("%s: status %d: %s", r.ID, status, out)
		}
	}
}

type broken struct{}

func (broken) Write([]byte) (int, error) { return 0, errors.New("no room") }
func (broken) Read([]byte) (int, error)  { return 0, errors.New("no line") }

func TestBrokenStreamsAreFileFaults(t *testing.T) {
	if testing.Short() {
		t.Skip("whole reviews; the ordinary run has them")
	}
	for _, args := range [][]string{{"review"}, {"basis"}, {"draft"}, {"review", "-"}} {
		var errs bytes.Buffer
		w := world{args: args, in: broken{}, out: broken{}, err: &errs, env: func(string) string { return "" }, columns: func() int { return 0 }}
		if got := run(w); got != files {
			t.Errorf("%v: status %d, want %d: %s", args, got, files, errs.String())
		}
	}
}

func TestExitStatusDependsOnTheRequiredConcerns(t *testing.T) {
	if testing.Short() {
		t.Skip("whole reviews; the ordinary run has them")
	}
	review := func(v rule.Verdict, c rule.Concern) *rules.Review {
		return &rules.Review{Findings: []rule.Finding{{Verdict: rule.Meets, Concern: rule.Life}, {Verdict: v, Concern: c}}}
	}
	life := []rule.Concern{rule.Life}
	for _, c := range []struct {
		review *rules.Review
		need   []rule.Concern
		want   int
	}{
		{review(rule.Meets, rule.Equipment), rule.Concerns, sound},
		{review(rule.Marginal, rule.Equipment), rule.Concerns, sound},
		{review(rule.Fails, rule.Performance), rule.Concerns, unsound},
		{review(rule.Unassessed, rule.Performance), rule.Concerns, unsound},
		{review(rule.Fails, rule.Performance), life, sound},
		{review(rule.Unassessed, rule.Life), life, unsound},
		{review("unheard of", rule.Life), life, unsound},
		{&rules.Review{}, rule.Concerns, unsound},
		{review(rule.Meets, rule.Life), []rule.Concern{rule.Equipment}, unsound},
	} {
		if got := statusOf(verdict(c.review, c.need)); got != c.want {
			t.Errorf("%v for %v: status %d, want %d", c.review.Findings, c.need, got, c.want)
		}
	}
}

// A defect of the program is neither a verdict nor a fault of the user.
func TestADefectHasAStatusOfItsOwn(t *testing.T) {
	var errs bytes.Buffer
	w := world{args: []string{"basis"}, out: &errs, err: &errs, env: func(string) string { return "" }, columns: func() int { panic("out of thought") }}
	if got := run(w); got != failed || !strings.Contains(errs.String(), "the program itself failed: out of thought (kilovet/cmd/kilovet.TestADefect") {
		t.Errorf("status %d: %s", got, errs.String())
	}
	r := &reviewing{world: w}
	if _, _, err := r.render(&rules.Review{Figures: []figure.Figure{{ID: "potential", Value: math.NaN()}}}, ""); statusOf(err) != failed {
		t.Errorf("a figure that is no number: %v", err)
	}
}

func TestWhatWasNotReadIsSaid(t *testing.T) {
	for _, c := range []struct {
		piped bool
		args  []string
		want  bool
	}{
		{true, []string{"review", "--json", "-"}, true},
		{false, []string{"review", "--json", "-"}, false},
		{true, []string{"review", "--json", "-", "-"}, false},
	} {
		var out, errs bytes.Buffer
		run(world{args: c.args, in: strings.NewReader(gap), out: &out, err: &errs, env: func(string) string { return "" }, columns: func() int { return 0 }, piped: c.piped})
		if got := strings.Contains(errs.String(), "standard input was not read; to review it: kilovet review -"); got != c.want || out.Len() == 0 {
			t.Errorf("%v, piped %t: %q", c.args, c.piped, errs.String())
		}
	}
}

func statusOf(err error) int {
	var e exit
	if errors.As(err, &e) {
		return e.status
	}
	return sound
}

func TestCommitStandsInTheVersion(t *testing.T) {
	for _, c := range []struct {
		settings []debug.BuildSetting
		want     string
	}{
		{nil, ""},
		{[]debug.BuildSetting{{Key: "vcs.revision", Value: "0123456789abcdef"}, {Key: "vcs.modified", Value: "false"}}, "+0123456789ab"},
		{[]debug.BuildSetting{{Key: "vcs.revision", Value: "0123"}, {Key: "vcs.modified", Value: "true"}}, "+0123.modified"},
	} {
		if got := commit(c.settings); got != c.want {
			t.Errorf("got %q, want %q", got, c.want)
		}
	}
}

func TestTooLargeADescriptionIsAFaultOfIt(t *testing.T) {
	status, _, stderr := try(strings.Repeat("#", 1<<20+1), 0, nil, "review", "-")
	if status != unusable || !strings.Contains(stderr, "standard input:1:1: the file has") {
		t.Errorf("status %d: %s", status, stderr)
	}
}

// The review must come to its end whatever it is given.
//
//	go test -fuzz FuzzReview ./cmd/kilovet
func FuzzReview(f *testing.F) {
	f.Add("format = 1\n[drive]\nfrequency = \"38 kHz\"\npeak = \"1 kV\"\n")
	f.Add("format = 1\n[[spacing]]\nname = \"a\"\nvoltage = \"2 kV\"\nclearance = \"1 mm\"\n")
	f.Fuzz(func(t *testing.T, description string) {
		status, stdout, stderr := try(description, 0, nil, "review", "--json", "-", "-")
		if status == files || status == failed || (status == unusable) != (stdout == "") || (status != sound && status != unsound && stderr == "") {
			t.Errorf("status %d, stdout %q, stderr %q", status, stdout, stderr)
		}
	})
}
