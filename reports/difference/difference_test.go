package difference_test

import (
	"encoding/json"
	"flag"
	"math"
	"os"
	"strings"
	"testing"
	"unicode"
	"unicode/utf8"

	"github.com/google/go-cmp/cmp"

	"kilovet/reports/difference"
	"kilovet/reports/internal/sample"
	"kilovet/rules/compare"
	"kilovet/rules/rule"
)

var update = flag.Bool("update", false, "rewrite the golden files")

func number(v float64) *float64 { return &v }

// changed is a difference of every kind.
func changed() *difference.Report {
	failing := sample.Failing().Findings
	was := failing[1]
	was.Verdict = rule.Marginal
	now := failing[0]
	now.Verdict = rule.Meets
	r := &difference.Report{
		Old: difference.Side{Name: "old.toml", SHA256: sample.SHA, Title: "Thin-film bench, 20 kV diffraction column"},
		New: difference.Side{Name: "new.toml", SHA256: sample.SHA, Title: "Thin-film bench, 20 kV diffraction column"},
		Difference: compare.Difference{Was: rule.Marginal, Is: rule.Fails, Worse: true,
			Inputs: []compare.Input{
				{Key: "drive.peak", At: "drive.peak", Old: `"1.75 kV"`, New: `"1750 V"`, Rewritten: true},
				{Key: "spacing.creepage", At: `spacing "gun feedthrough, air side".creepage`, Old: `"150 mm"`, New: `"110 mm"`},
				{Key: "part.name", At: `part "arc limiter".name`, Old: `"limiter"`, New: `"arc limiter"`, Renamed: true},
				{Key: "access.waiting_time", At: "access.waiting_time", New: `"60 s"`},
				{Key: "multiplier.coupling_capacitor.value", At: "multiplier.coupling_capacitor.value", Old: `["2.2 nF", "2.2 nF"]`},
			},
			Figures: []compare.Figure{
				{ID: "potential", Subject: "cathode", State: "working", What: "mean over a drive period, to ground", Unit: "V", Old: number(-19612.4), New: number(-19600), Change: number(0.0006)},
				{ID: "potential", Subject: "control", State: "working", What: "mean over a drive period, to ground", Unit: "V", Old: number(-20000), New: number(-21000), Change: number(-0.05)},
				{ID: "divider.ratio", What: "sensed node to tap, meter connected", Unit: "1", Old: number(1010.1), New: number(1200), Change: number(0.188)},
				{ID: "stored.residue", What: "what an intact ladder keeps", Unit: "V", New: number(132)},
			},
			Findings: []compare.Finding{
				{Rule: was.Rule, Subject: was.Subject, Old: &was, New: &failing[1], Worse: true},
				{Rule: now.Rule, Old: &failing[0], New: &now},
				{Rule: "rating.cable", Subject: "cable", New: &failing[2], Worse: true},
				{Rule: "access.enclosure", Old: &failing[3]},
				{Rule: "beam.blur", Subject: "specimen", New: &failing[4]},
				{Rule: "beam.blur", Subject: "screen", New: &failing[4]},
			},
		},
	}
	r.Program.Name, r.Program.Version = "kilovet", "0.1.0"
	return r
}

func TestGolden(t *testing.T) {
	data, err := difference.JSON(changed())
	if err != nil {
		t.Fatal(err)
	}
	for name, got := range map[string][]byte{
		"changed.txt": difference.Text(changed(), difference.Options{}), "changed_all.txt": difference.Text(changed(), difference.Options{All: true, Width: 60}), "changed.json": data,
	} {
		golden := "testdata/" + name
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

func TestSentence(t *testing.T) {
	worse := compare.Finding{New: &rule.Finding{}, Worse: true}
	lost := compare.Finding{Old: &rule.Finding{}, Worse: true}
	for want, d := range map[string]compare.Difference{
		"Nothing differs.":                            {},
		"No verdict is worse.":                        {Inputs: []compare.Input{{At: "title"}}},
		"1 finding is worse.":                         {Worse: true, Findings: []compare.Finding{worse, {}}},
		"2 findings are worse.":                       {Worse: true, Findings: []compare.Finding{worse, worse}},
		"1 finding that was met is judged no longer.": {Worse: true, Findings: []compare.Finding{lost, {}}},
		"1 finding is worse; 2 findings that were met are judged no longer.": {Worse: true, Findings: []compare.Finding{lost, worse, lost}},
		"The whole is worse.": {Worse: true, Is: rule.Unassessed},
	} {
		got := string(difference.Text(&difference.Report{Difference: d}, difference.Options{}))
		if !strings.Contains(got, "\n"+want+"\n") {
			t.Errorf("%q is missing in %s", want, got)
		}
	}
}

func TestLinesKeepTheirWidthAndHoldNoControls(t *testing.T) {
	r := changed()
	r.Inputs[0].At, r.Inputs[0].New, r.Findings[0].Subject, r.New.Title = sample.LongName+sample.LongName, sample.Foreign, sample.LongName+" "+sample.Foreign, sample.Foreign
	for _, width := range []int{0, 40, 57, 100} {
		for _, line := range strings.Split(string(difference.Text(r, difference.Options{All: true, Width: width})), "\n") {
			if n := utf8.RuneCountInString(line); n > max(width, 40) && width != 0 || n > 100 {
				t.Errorf("%d columns: %d in %q", width, n, line)
			}
			if strings.ContainsFunc(line, unicode.IsControl) || !utf8.ValidString(line) {
				t.Errorf("control characters in %q", line)
			}
		}
	}
}

func TestJSONHasNoNullsAndRefusesWhatIsNotANumber(t *testing.T) {
	data, err := difference.JSON(&difference.Report{})
	if err != nil || strings.Contains(string(data), "null") || !json.Valid(data) {
		t.Errorf("%s: %v", data, err)
	}
	r := changed()
	r.Figures[0].New = number(math.NaN())
	if _, err := difference.JSON(r); err == nil {
		t.Error("a figure that is not a number was written")
	}
}
