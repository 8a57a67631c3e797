package procedure_test

import (
	"strings"
	"testing"
	"unicode/utf8"

	"kilovet/hv/chain"
	"kilovet/reports/procedure"
	"kilovet/rules/evidence"
	"kilovet/rules/plan"
	"kilovet/rules/readings"
)

const described = `format = 1
title = "Bench"
[drive]
frequency = "30 kHz"
peak = "1 kV"
[multiplier]
polarity = "positive"
stages = 2
coupling_capacitor = { value = "1 nF" }
smoothing_capacitor = { value = "1 nF" }
[[instrument]]
name = 'bench "probe"'
at = "output"
resistance = "1 Gohm"
accuracy = "2 %"
`

func planned(t *testing.T) (*evidence.Evidence, *plan.Plan) {
	t.Helper()
	c, faults := chain.Read([]byte(described))
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	e := evidence.New(c)
	p, err := plan.Of(e)
	if err != nil {
		t.Fatal(err)
	}
	return e, p
}

// The form reads back without faults, step by step, whatever the names are; filled in
// with what is expected it is sound.
func TestFormReadsBack(t *testing.T) {
	e, p := planned(t)
	form := string(procedure.Form(p, procedure.Heading{SHA256: "00"}))
	f, faults := readings.Read([]byte(form), p)
	if len(faults) > 0 || len(f.Steps) != len(p.Steps) {
		t.Fatalf("%d steps, faults %v", len(f.Steps), faults)
	}
	var filled []string
	for _, line := range strings.Split(form, "\n") {
		if _, expected, found := strings.Cut(line, "# expected "); found {
			value, _, _ := strings.Cut(expected, " (")
			key, _, _ := strings.Cut(strings.TrimPrefix(line, "# "), " ")
			line = key + ` = "` + value + `" `
		}
		filled = append(filled, line)
	}
	f, faults = readings.Read([]byte(strings.Join(filled, "\n")), p)
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	c, err := readings.Of(e, p, f)
	if err != nil || !c.Sound || c.Sign != readings.Proved || len(c.Rows) != len(p.Steps) {
		t.Errorf("%+v, %v", c, err)
	}
}

// No line is wider than asked for, at any width.
func TestLinesFit(t *testing.T) {
	_, p := planned(t)
	for _, width := range []int{40, 60, 80, 100} {
		for _, line := range strings.Split(string(procedure.Text(p, procedure.Options{Width: width, Title: strings.Repeat("long ", 40)})), "\n") {
			if utf8.RuneCountInString(line) > width {
				t.Errorf("%d wide: %q", width, line)
			}
		}
	}
}

// Both texts defer to those who must be asked, and say what was not planned.
func TestCautionsStand(t *testing.T) {
	_, p := planned(t)
	text := strings.Join(strings.Fields(string(procedure.Text(p, procedure.Options{}))), " ")
	for _, want := range []string{"Local electrical codes and the judgement of licensed persons come first", "NOT PLANNED", "trips: no [protection] is described", "never trust a meter alone"} {
		if !strings.Contains(text, want) {
			t.Errorf("%q is not said", want)
		}
	}
	said := string(procedure.Readings(&readings.Comparison{}, procedure.Options{}))
	if !strings.Contains(said, "Nothing was read: nothing is known.") {
		t.Error(said)
	}
}
