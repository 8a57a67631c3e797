package rules_test

import (
	"strings"
	"testing"

	"kilovet/hv/chain"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
)

// TestCornerBySign: a tap of 10 Mohm over 10 kohm, both good to 10 %, on a stiff 5 kV is
// highest with the upper arm low and the lower arm high, 5 kV · 11/9011 = 6.104 V; with all
// high or all low it stays at 4.995 V. The capacitors of the stiff stage do not matter.
func TestCornerBySign(t *testing.T) {
	c, faults := chain.Read([]byte(strings.ReplaceAll(stiff, `value = "1 uF"`, `value = "1 uF", tolerance = "1 %"`) + `
[divider]
senses = "output"
upper = { value = "10 Mohm", tolerance = "10 %" }
lower = { value = "10 kohm", tolerance = "10 %" }
`))
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	tap := func(e *evidence.Evidence, n string) (quantity.Voltage, error) { return e.Between(n, "ground") }
	e := evidence.New(c)
	same, err := evidence.Largest(e, evidence.Ratings(), []string{"divider.tap"}, tap)
	if err != nil {
		t.Fatal(err)
	}
	within(t, "all high or low", float64(same.Value), 5000*10./10010, 1e-3)
	worst, err := evidence.Worst(e, []string{"divider.tap"}, tap)
	if err != nil {
		t.Fatal(err)
	}
	within(t, "by sign", float64(worst.Value), 5000*11./9011, 1e-3)
	if text := worst.Under.Text(); !strings.Contains(text, "low divider.upper") {
		t.Errorf("judged under %q", text)
	}
}

// TestCornerBySignIsNeverBelowTheOthers: for every node of the column, and never far above
// them, since its tolerances are some per cent.
func TestCornerBySignIsNeverBelowTheOthers(t *testing.T) {
	c, _ := chain.Read(described(t, "column"))
	e := evidence.New(c)
	between := func(e *evidence.Evidence, n string) (quantity.Voltage, error) { return e.Between(n, "ground") }
	for _, node := range []string{"stage.1", "stage.6", "output", "cathode"} {
		same, err := evidence.Largest(e, evidence.Ratings(), []string{node}, between)
		if err != nil {
			t.Fatal(err)
		}
		worst, err := evidence.Worst(e, []string{node}, between)
		if err != nil {
			t.Fatal(err)
		}
		if worst.Value < same.Value || worst.Value > 1.05*same.Value {
			t.Errorf("%s: %v by sign, %v otherwise", node, worst.Value, same.Value)
		}
	}
}

// TestResistorJudgedInTheCornerBySign: a divider's upper arm near its rating is judged
// with itself high and the lower arm low, which all high and all low both miss.
func TestResistorJudgedInTheCornerBySign(t *testing.T) {
	r := reviewed(t, []byte(stiff+`
[divider]
senses = "output"
upper = { value = "1 Mohm", tolerance = "10 %", rated_voltage = "3.3 kV" }
lower = { value = "1 Mohm", tolerance = "10 %", rated_voltage = "3.3 kV" }
`))
	for _, f := range r.Findings {
		if f.Rule == "resistor.voltage" && f.Subject == "divider.upper" {
			// 5 kV · 1.1/(1.1 + 0.9) = 2.75 kV of 3.3 kV; with equal ends 2.5 kV.
			within(t, "upper arm", f.Provided.Value, 2750, 2e-3)
			if !strings.Contains(f.Under, "divider.lower") {
				t.Errorf("judged under %q", f.Under)
			}
			return
		}
	}
	t.Error("the upper arm is not judged")
}
