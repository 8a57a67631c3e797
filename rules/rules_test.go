package rules_test

import (
	"bytes"
	"fmt"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"sync"
	"testing"

	"github.com/google/go-cmp/cmp"

	"kilovet/hv/chain"
	"kilovet/rules"
	"kilovet/rules/evidence"
	"kilovet/rules/fault"
	"kilovet/rules/figure"
	"kilovet/rules/rule"
)

// described reads one of the descriptions that come with the project.
func described(t *testing.T, name string) []byte {
	t.Helper()
	data, err := os.ReadFile(filepath.Join("..", "testdata", "chains", name+".toml"))
	if err != nil {
		t.Fatal(err)
	}
	return data
}

// reviews remembers what was reviewed: a review is plain data, and nobody changes it.
var reviews sync.Map

// reviewed is the review of a description without its single faults, which take longer
// than all the rest.
func reviewed(t *testing.T, data []byte) *rules.Review {
	t.Helper()
	ordinary(t)
	return review(t, data, "faults")
}

// reviewedWhole is the whole review.
func reviewedWhole(t *testing.T, data []byte) *rules.Review {
	t.Helper()
	ordinary(t)
	return review(t, data)
}

// ordinary leaves whole reviews to the ordinary run.
func ordinary(t *testing.T) {
	if testing.Short() {
		t.Skip("a whole review; the ordinary run has it")
	}
}

func review(t *testing.T, data []byte, families ...string) *rules.Review {
	t.Helper()
	key := strings.Join(families, ",") + "\n" + string(data)
	if known, ok := reviews.Load(key); ok {
		return known.(*rules.Review)
	}
	c, faults := chain.Read(data)
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	r, faults := rules.RunUnder(c, nil, rules.Program{Name: "kilovet"}, rules.Beside{Without: families})
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	reviews.Store(key, r)
	return r
}

func TestRulesAreWhole(t *testing.T) {
	seen := map[string]bool{}
	for _, r := range rules.All() {
		if seen[r.ID] {
			t.Errorf("%s twice", r.ID)
		}
		seen[r.ID] = true
		if r.Title == "" || r.Demands == "" || r.Applies == "" || r.Concern == "" || len(r.Sources) == 0 || r.Judge == nil {
			t.Errorf("%s is not whole", r.ID)
		}
		if len(r.Example.Swaps) == 0 || len(r.Example.Swaps) > 3 || len(r.Example.Changes) == 0 {
			t.Errorf("%s has no example of one to three keys", r.ID)
		}
		for _, s := range r.Sources {
			if s.Text == "" || s.Mark == "" {
				t.Errorf("%s has a source without text or mark", r.ID)
			}
		}
	}
}

func TestFiguresAreDeclaredOnce(t *testing.T) {
	seen := map[string]bool{}
	for _, d := range figure.List {
		if seen[d.ID] || d.What == "" || d.Unit == "" {
			t.Errorf("%s is not declared once and whole", d.ID)
		}
		seen[d.ID] = true
	}
}

// TestExamples applies each rule's example to the description it changes and wants
// the whole set of findings that differ, no more and no less. Single faults are only told
// by the examples of their own rules: nearly every change of a rating shows in them.
func TestExamples(t *testing.T) {
	if testing.Short() {
		t.Skip("forty reviews; the ordinary run has them")
	}
	base := map[string]map[string]rule.Verdict{}
	for _, r := range rules.All() {
		name := r.Example.Of
		if name == "" {
			name = "column"
		}
		data, with := described(t, name), ofFaults(r)
		key := fmt.Sprint(name, with)
		if base[key] == nil {
			base[key] = judged(t, data, with)
		}
		was := base[key]
		t.Run(r.ID, func(t *testing.T) {
			t.Parallel()
			want := map[string]rule.Verdict{}
			for _, c := range r.Example.Changes {
				want[c.Rule+" | "+c.Subject] = c.Verdict
			}
			got := changed(was, judged(t, swapped(t, data, r.Example.Swaps), with))
			if d := cmp.Diff(want, got); d != "" {
				t.Error(d)
			}
		})
	}
}

func swapped(t *testing.T, data []byte, swaps []rule.Swap) []byte {
	for _, s := range swaps {
		if n := bytes.Count(data, []byte(s.Was)); n != 1 {
			t.Fatalf("%q stands %d times in the description", s.Was, n)
		}
		data = bytes.Replace(data, []byte(s.Was), []byte(s.Becomes), 1)
	}
	return data
}

// judged is the verdict of every finding, without the figures and pictures of a whole
// review.
func judged(t *testing.T, data []byte, faults bool) map[string]rule.Verdict {
	t.Helper()
	c, wrong := chain.Read(data)
	if len(wrong) > 0 {
		t.Fatal(wrong)
	}
	e, all := evidence.New(c), map[string]rule.Verdict{}
	for _, r := range rules.All() {
		if ofFaults(r) && !faults {
			continue
		}
		for _, f := range r.Judge(e).Findings {
			all[f.Rule+" | "+f.Subject] = f.Verdict
		}
	}
	return all
}

// ofFaults reports whether a rule is about single faults.
func ofFaults(r rule.Rule) bool {
	return slices.ContainsFunc(fault.Rules(), func(o rule.Rule) bool { return o.ID == r.ID })
}

func changed(was, is map[string]rule.Verdict) map[string]rule.Verdict {
	differs := map[string]rule.Verdict{}
	for k, v := range is {
		if was[k] != v {
			differs[k] = v
		}
	}
	for k := range was {
		if _, ok := is[k]; !ok {
			differs[k] = ""
		}
	}
	return differs
}

func TestSoundChainsPass(t *testing.T) {
	for _, name := range []string{"column", "positive", "spacings"} {
		r := review(t, described(t, name))
		for _, f := range r.Findings {
			if f.Verdict == rule.Fails || f.Verdict == rule.Unassessed {
				t.Errorf("%s: %s %s %s: %s", name, f.Verdict, f.Rule, f.Subject, f.Because)
			}
		}
	}
}

// TestPlantedFaults wants the findings that stand as comments beside the lines
// concerned: "# fails rule.id" or "# unassessed rule.id", and none besides.
func TestPlantedFaults(t *testing.T) {
	data := described(t, "faulty")
	want := planted(string(data))
	if len(want) < 12 {
		t.Fatalf("%d faults are planted, at least twelve are wanted", len(want))
	}
	got := map[finding]bool{}
	for _, f := range reviewedWhole(t, data).Findings {
		if f.Verdict == rule.Fails || f.Verdict == rule.Unassessed {
			got[finding{f.Place.Line, string(f.Verdict), f.Rule}] = true
		}
	}
	if d := cmp.Diff(want, got, cmp.AllowUnexported(finding{})); d != "" {
		t.Error(d)
	}
}

type finding struct {
	line    int
	verdict string
	rule    string
}

func planted(text string) map[finding]bool {
	all := map[finding]bool{}
	for i, line := range strings.Split(text, "\n") {
		_, notes, _ := strings.Cut(line, "# ")
		for _, note := range strings.Split(notes, "; ") {
			words := strings.Fields(note)
			if len(words) == 2 && (words[0] == "fails" || words[0] == "unassessed") {
				all[finding{i + 1, words[0], words[1]}] = true
			}
		}
	}
	return all
}

func TestNoFindingAndNoFigureTwice(t *testing.T) {
	for _, name := range []string{"column", "positive", "spacings", "faulty"} {
		r := reviewedWhole(t, described(t, name))
		seen := map[string]bool{}
		for _, f := range r.Findings {
			key := f.Rule + "|" + f.Subject
			if seen[key] {
				t.Errorf("%s: finding %s twice", name, key)
			}
			seen[key] = true
			if f.Because == "" || f.Relation == "" || f.Concern == "" || f.Verdict != rule.Meets && f.Remedy == "" {
				t.Errorf("%s: %s is not whole: %+v", name, key, f)
			}
		}
		for _, f := range r.Figures {
			key := f.ID + "|" + f.Subject + "|" + f.State
			if seen[key] {
				t.Errorf("%s: figure %s twice", name, key)
			}
			seen[key] = true
			if f.Basis == "" {
				t.Errorf("%s: %s has no basis", name, key)
			}
		}
	}
}
