package json_test

import (
	"bytes"
	"encoding/json"
	"flag"
	"math"
	"os"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"
	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/reports/internal/sample"
	kilojson "kilovet/reports/json"
	"kilovet/rules"
	"kilovet/rules/figure"
	"kilovet/rules/rule"
)

var update = flag.Bool("update", false, "rewrite the golden files")

func render(t testing.TB, r *rules.Review) []byte {
	t.Helper()
	out, err := kilojson.Render(r)
	if err != nil {
		t.Fatal(err)
	}
	return out
}

func TestContractIsKept(t *testing.T) {
	var got bytes.Buffer
	if err := json.Indent(&got, render(t, sample.Failing()), "", "  "); err != nil {
		t.Fatal(err)
	}
	const golden = "testdata/failing.json"
	if *update {
		if err := os.WriteFile(golden, got.Bytes(), 0o644); err != nil {
			t.Fatal(err)
		}
	}
	want, err := os.ReadFile(golden)
	if err != nil {
		t.Fatal(err)
	}
	if diff := cmp.Diff(string(want), got.String()); diff != "" {
		t.Error(diff)
	}
}

// The keys of the contract in its order; additions may follow, nothing may move.
func TestKeysComeInTheOrderOfTheContract(t *testing.T) {
	out := string(render(t, sample.Failing()))
	for _, keys := range [][]string{
		{`{"contract":1,`, `"program":{"name":"kilovet","version":`, `"inputs":[{"role":"description","name":"chain.toml","sha256":`, `"title":`, `"document":`, `"revision":`, `"verdict":"fails"`, `"counts":{"meets":2,"marginal":1,"fails":1,"unassessed":1}`, `"figures":[`, `"findings":[`, `"cautions":[`, `"passed_over":[`},
		{`{"id":"potential"`, `"subject":"cathode"`, `"state":"working"`, `"what":`, `"value":-19612.4`, `"unit":"V"`, `"basis":`},
		{`{"rule":"spacing.creepage"`, `"subject":`, `"verdict":`, `"concern":"life"`, `"relation":"at_least"`, `"needed":{"value":0.125,"unit":"m"}`, `"provided":{"value":0.11,"unit":"m"}`, `"margin":-0.12`, `"under":`, `"because":`, `"remedy":`, `"missing":[]`, `"sources":[{"text":`, `"mark":"read","governs":true}`, `"key":"spacing.creepage","line":97,"column":14}`},
	} {
		rest := out
		for _, k := range keys {
			at := strings.Index(rest, k)
			if at < 0 {
				t.Errorf("%s is missing or out of order", k)
				continue
			}
			rest = rest[at:]
		}
	}
}

func TestNoListIsNull(t *testing.T) {
	for _, r := range []*rules.Review{sample.Empty(), sample.Failing(), {}, {Findings: []rule.Finding{{}}}} {
		if out := render(t, r); bytes.Contains(out, []byte("null")) {
			t.Errorf("null in %s", out)
		}
	}
}

func TestRuleOfPresenceHasNoAmounts(t *testing.T) {
	out := render(t, &rules.Review{Findings: []rule.Finding{{Relation: rule.Presence}}})
	for _, key := range []string{"needed", "provided", "margin"} {
		if bytes.Contains(out, []byte(`"`+key+`"`)) {
			t.Errorf("%s stands in %s", key, out)
		}
	}
}

func TestValuesReadBackExactly(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		v := rapid.Float64().Filter(func(v float64) bool { return !math.IsInf(v, 0) && !math.IsNaN(v) }).Draw(t, "value")
		out, err := kilojson.Render(&rules.Review{Figures: []figure.Figure{{Value: v}}})
		if err != nil {
			t.Fatal(err)
		}
		var back struct{ Figures []struct{ Value float64 } }
		if err := json.Unmarshal(out, &back); err != nil {
			t.Fatal(err)
		}
		if got := back.Figures[0].Value; math.Float64bits(got) != math.Float64bits(v) {
			t.Fatalf("%g came back as %g", v, got)
		}
	})
}

func TestWhatIsNotANumberIsRefused(t *testing.T) {
	for _, v := range []float64{math.NaN(), math.Inf(1), math.Inf(-1)} {
		a := &rule.Amount{Value: v}
		for _, r := range []*rules.Review{
			{Figures: []figure.Figure{{ID: "output.mean", Value: v}}},
			{Findings: []rule.Finding{{Rule: "output.mean", Needed: a}}},
			{Findings: []rule.Finding{{Rule: "output.mean", Provided: a}}},
		} {
			if _, err := kilojson.Render(r); err == nil || !strings.Contains(err.Error(), "output.mean") {
				t.Errorf("%g: got %v, want an error that names it", v, err)
			}
		}
	}
}

func TestInfiniteMarginIsLeftOut(t *testing.T) {
	m := math.Inf(1)
	if out := render(t, &rules.Review{Findings: []rule.Finding{{Margin: &m}}}); bytes.Contains(out, []byte(`"margin"`)) {
		t.Errorf("margin stands in %s", out)
	}
}

func TestForeignTextStaysValid(t *testing.T) {
	if out := render(t, sample.Hard()); !json.Valid(out) {
		t.Error("not JSON")
	}
}

func TestConcernsAddUpToTheCounts(t *testing.T) {
	var back struct {
		Counts   map[string]int
		Concerns []struct {
			Concern string
			Counts  map[string]int
		}
	}
	if err := json.Unmarshal(render(t, sample.Failing()), &back); err != nil {
		t.Fatal(err)
	}
	sum := map[string]int{}
	for _, c := range back.Concerns {
		for v, n := range c.Counts {
			sum[v] += n
		}
	}
	if diff := cmp.Diff(back.Counts, sum); diff != "" {
		t.Error(diff)
	}
}
