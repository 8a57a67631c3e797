package text_test

import (
	"flag"
	"fmt"
	"os"
	"regexp"
	"strings"
	"testing"
	"unicode"
	"unicode/utf8"

	"github.com/google/go-cmp/cmp"

	"kilovet/reports/digest"
	"kilovet/reports/internal/sample"
	"kilovet/reports/text"
	"kilovet/rules"
	"kilovet/rules/rule"
)

var update = flag.Bool("update", false, "rewrite the golden files")

var samples = map[string]*rules.Review{"failing": sample.Failing(), "sound": sample.Sound(), "empty": sample.Empty(), "hard": sample.Hard(), "nothing": {}}

func TestGolden(t *testing.T) {
	for name, o := range map[string]text.Options{"failing_screen": {}, "failing_all": {All: true}} {
		golden := "testdata/" + name + ".txt"
		got := text.Render(sample.Failing(), o)
		if *update {
			if err := os.WriteFile(golden, got, 0o644); err != nil {
				t.Fatal(err)
			}
		}
		want, err := os.ReadFile(golden)
		if err != nil {
			t.Fatal(err)
		}
		if diff := cmp.Diff(string(want), string(got)); diff != "" {
			t.Errorf("%s: %s", name, diff)
		}
	}
}

func TestNoLineIsWiderThanAskedFor(t *testing.T) {
	for name, r := range samples {
		for _, width := range []int{40, 61, 80, 120} {
			for _, line := range strings.Split(string(text.Render(r, text.Options{All: true, Width: width})), "\n") {
				if n := utf8.RuneCountInString(line); n > width {
					t.Errorf("%s at %d columns: %d in %q", name, width, n, line)
				}
				if strings.HasSuffix(line, " ") {
					t.Errorf("%s: space at the end of %q", name, line)
				}
			}
		}
	}
}

func TestTheFirstScreenIsOneScreen(t *testing.T) {
	for name, most := range map[string]int{"failing": 23, "sound": 23, "empty": 23, "hard": 32} {
		if n := strings.Count(string(text.Render(samples[name], text.Options{})), "\n"); n > most {
			t.Errorf("%s: %d lines", name, n)
		}
	}
}

func TestTheFirstScreenAnswers(t *testing.T) {
	got := unwrapped(text.Render(sample.Failing(), text.Options{}))
	for _, want := range []string{
		"Thin-film bench", "HV-0042 revision B", "held at 20 kV", "0.42 V peak to peak", "9.8 nm of 12 nm",
		"FAILS Do not switch on", "fails 1, unassessed 1, marginal 1, meets 2",
		"life: spacing.creepage: gun feedthrough", "less than the 125 mm", "missing drive.peak_limit", sample.Deference,
	} {
		if !strings.Contains(got, want) {
			t.Errorf("%q is not on the first screen", want)
		}
	}
}

func TestAllHoldsEverything(t *testing.T) {
	for name, r := range samples {
		got := unwrapped(text.Render(r, text.Options{All: true, Width: 400}))
		for _, want := range contents(r) {
			if !strings.Contains(got, unwrapped([]byte(digest.Clean(want)))) {
				t.Errorf("%s: %q is missing", name, want)
			}
		}
	}
}

// contents is every text a review holds, as the terminal is to show it.
func contents(r *rules.Review) []string {
	all := []string{r.Deference, r.Program.Version}
	for _, f := range r.Figures {
		all = append(all, f.ID, f.Subject, f.State, f.What, f.Basis)
	}
	for _, f := range r.Findings {
		all = append(all, f.Rule, f.Subject, string(f.Verdict), string(f.Concern), f.Because, f.Remedy, f.Under,
			digest.Needed(f), digest.Provided(f), digest.Margin(f), digest.Place(r, f))
		all = append(all, f.Missing...)
		all = append(all, f.Assumptions...)
		for _, s := range f.Sources {
			all = append(all, digest.Source(s))
		}
	}
	for _, c := range r.Cautions {
		all = append(all, c.Subject, c.Text)
	}
	for _, p := range r.PassedOver {
		all = append(all, p.Rule, p.Because)
	}
	for _, in := range r.Inputs {
		all = append(all, in.Role, in.Name, in.SHA256)
	}
	return append(all, r.Assumptions...)
}

func unwrapped(b []byte) string { return strings.Join(strings.Fields(string(b)), " ") }

var colours = regexp.MustCompile("\x1b\\[[0-9;]*m")

func TestColourStandsOnlyBesideWords(t *testing.T) {
	for name, r := range samples {
		plain := string(text.Render(r, text.Options{All: true}))
		coloured := string(text.Render(r, text.Options{All: true, Colour: true}))
		if diff := cmp.Diff(plain, colours.ReplaceAllString(coloured, "")); diff != "" {
			t.Errorf("%s: colour changed the words: %s", name, diff)
		}
		if strings.ContainsFunc(plain, func(r rune) bool { return r != '\n' && unicode.IsControl(r) }) {
			t.Errorf("%s: control characters without colour", name)
		}
		if len(r.Findings) > 0 && coloured == plain {
			t.Errorf("%s: no colour where asked for", name)
		}
	}
}

// The deference may never be cut, whatever stands before it and however narrow the
// terminal is.
func TestTheDeferenceStandsWholeOnTheFirstScreen(t *testing.T) {
	long := strings.Repeat("Local electrical codes and licensed persons come before this review. ", 6)
	for _, width := range []int{40, 80, 120} {
		r := sample.Hard()
		r.Deference = long + "The end."
		if got := unwrapped(text.Render(r, text.Options{Width: width})); !strings.Contains(got, r.Deference) {
			t.Errorf("at %d columns: %s", width, got)
		}
	}
}

func TestTheNoteStandsFirst(t *testing.T) {
	got := string(text.Render(sample.Failing(), text.Options{Note: "Built-in example: no file was named"}))
	if !strings.HasPrefix(got, "Built-in example: no file was named\nThin-film bench") {
		t.Error(got)
	}
}

// narrow is a review in which n rules are met with little in hand.
func narrow(n int) *rules.Review {
	r := sample.Sound()
	r.Verdict = rule.Marginal
	r.Summary = append(r.Summary, rules.Line{Label: "energy", Text: "0.4 J"})
	for i := range n {
		r.Findings = append(r.Findings, rule.Finding{Rule: fmt.Sprintf("rating.%d", i), Verdict: rule.Marginal, Concern: rule.Equipment, Because: fmt.Sprintf("Reason %d.", i)})
	}
	r.Counts = map[rule.Verdict]int{rule.Marginal: n, rule.Meets: 2}
	return r
}

func TestLittleInHandIsOnTheFirstScreenAsFarAsItFits(t *testing.T) {
	for _, n := range []int{1, 4, 6, 30} {
		out := string(text.Render(narrow(n), text.Options{}))
		shown := strings.Count(out, "rating.")
		rest := 0
		if _, after, found := strings.Cut(out, "and "+fmt.Sprint(n-shown)+" rule"); found && after != "" {
			rest = n - shown
		}
		if shown == 0 || shown+rest != n || strings.Count(out, "\n") > 23 || !strings.Contains(out, "Reason 0.") {
			t.Errorf("%d rules, %d shown, %d counted, %d lines:\n%s", n, shown, rest, strings.Count(out, "\n"), out)
		}
	}
}

// Where there are too many for a line each, the gravest stands with its reason and the
// rules of the others are named together, each with how often it was found.
func TestACrowdIsNamed(t *testing.T) {
	r := narrow(12)
	for i := range 12 {
		r.Findings = append(r.Findings, rule.Finding{Rule: fmt.Sprintf("touch.%d", i), Subject: "one", Verdict: rule.Fails, Concern: rule.Life, Because: fmt.Sprintf("Cause %d.", i)},
			rule.Finding{Rule: fmt.Sprintf("touch.%d", i), Subject: "two", Verdict: rule.Fails, Concern: rule.Life})
	}
	r.Verdict, r.Counts = rule.Fails, map[rule.Verdict]int{rule.Fails: 24, rule.Marginal: 12, rule.Meets: 2}
	out := string(text.Render(r, text.Options{}))
	for i := range 12 {
		for _, want := range []string{fmt.Sprintf("touch.%d", i), fmt.Sprintf("rating.%d", i)} {
			if strings.Count(out, want+"(2)")+strings.Count(out, want+",")+strings.Count(out, want+"\n")+strings.Count(out, want+": one; two") != 1 {
				t.Errorf("%s is not named once", want)
			}
		}
	}
	if !strings.Contains(out, "Cause 0.") || !strings.Contains(out, "marginal     equipment: rating.0, rating.1") || strings.Count(out, "\n") > 23 {
		t.Error(out)
	}
}
