package network

import (
	"math"
	"strings"
	"testing"
)

// A load taken off a single stage behind a filter of a long time constant: the output
// then goes to the voltage without load with R C of the filter, 95 % of the way in ln 20
// time constants; the ladder itself is a thousand times as quick.
func TestChangeWithTheTimeConstantOfAFilter(t *testing.T) {
	l := ladder{stages: 1, frequency: 50e3, peak: 1000, capacitance: 100e-9, current: 1e-4, on: 1}
	text := strings.Replace(l.describe(), `at = "multiplier"`, `at = "output"`, 1) + "[[filter]]\nresistor = { value = \"1 Mohm\" }\ncapacitor = { value = \"1 nF\" }\nbypass_capacitance = \"0 F\"\n"
	loaded := steady(t, build(t, text))
	free := steady(t, build(t, strings.Replace(text, "0.0001 A", "0 A", 1)))
	out := node(t, free.Circuit, "output")
	c, err := Change(loaded, free, ChangeOptions{Node: out})
	if err != nil {
		t.Fatal(err)
	}
	near(t, "before", float64(c.Before), 1900, 1e-2)
	near(t, "after", float64(c.After), 2000, 1e-2)
	if want := 1e-3 * math.Log(20); math.Abs(float64(c.Settled)/want-1) > 0.01 {
		t.Errorf("settled after %g s, want %g s", float64(c.Settled), want)
	}
	if c.Work.Periods > 40 {
		t.Errorf("%d periods walked", c.Work.Periods)
	}
	if _, err := Change(free, free, ChangeOptions{Node: out}); err == nil {
		t.Error("no change is followed")
	}
}
