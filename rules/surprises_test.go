package rules_test

import (
	"fmt"
	"strings"
	"testing"

	"kilovet/rules"
	"kilovet/rules/rule"
)

func findingOf(t *testing.T, r *rules.Review, id string) rule.Finding {
	t.Helper()
	for _, f := range r.Findings {
		if f.Rule == id {
			return f
		}
	}
	t.Fatalf("%s is not judged", id)
	return rule.Finding{}
}

// TestStraysOfAPicofarad: ten stages of 1 nF at 2.5 kV lose hundreds of volts to a
// picofarad between the columns; what the closed form of the unloaded ladder foretells
// for a description without strays is what the network finds with them.
func TestStraysOfAPicofarad(t *testing.T) {
	ladder := strings.NewReplacer(`"1 uF"`, `"1 nF"`, "stages = 1", "stages = 10\npickup_to_output = \"0 F\"").Replace(stiff) +
		"[[load]]\nname = \"l\"\nat = \"output\"\ncurrent = \"1 uA\"\n"
	without := findingOf(t, reviewed(t, []byte(ladder)), "multiplier.strays")
	if without.Verdict != rule.Marginal || len(without.Assumptions) != 3 || !strings.Contains(without.Because, "a picofarad between the columns at every stage would take") {
		t.Errorf("strays that are not given: %s, %q, %q", without.Verdict, without.Because, without.Assumptions)
	}
	with := strings.Replace(ladder, "stages = 10", "stages = 10\nstray_between_columns = \"1 pF\"\nstray_to_ground = \"0 F\"", 1)
	with = strings.Replace(with, `resistance = "1 ohm"`, `resistance = "1 ohm", capacitance = "0 F"`, 1)
	r := reviewed(t, []byte(with))
	if lost := figureOf(t, r, "multiplier.drop_stray", ""); lost < 200 || lost > 5000 {
		t.Errorf("a picofarad takes %g V", lost)
	}
	within(t, "what a picofarad would take", volts(t, without.Because, "would take "), figureOf(t, r, "multiplier.drop_stray", ""), 0.05)
	if f := findingOf(t, r, "multiplier.strays"); len(f.Assumptions) != 0 {
		t.Errorf("strays that are given are assumed: %q", f.Assumptions)
	}
	short := findingOf(t, reviewed(t, []byte(strings.Replace(with, "stages = 10", "stages = 2", 1))), "multiplier.strays")
	if short.Verdict != rule.Meets {
		t.Errorf("two stages: %s, %s", short.Verdict, short.Because)
	}
}

// volts reads the voltage that follows some words, in volts or kilovolts.
func volts(t *testing.T, text, words string) float64 {
	t.Helper()
	_, rest, there := strings.Cut(text, words)
	if !there {
		t.Fatalf("%q is not in %q", words, text)
	}
	var v float64
	var unit string
	if _, err := fmt.Sscan(rest, &v, &unit); err != nil {
		t.Fatal(err)
	}
	if unit == "kV" {
		v *= 1000
	}
	return v
}

// TestUnbalanceAtLightLoad: with one half of the drive a per cent higher the other never
// charges at light load, and the ripple is that of a half-wave multiplier but for the
// length of its pulses; with equal halves it is far less, and at full load too.
func TestUnbalanceAtLightLoad(t *testing.T) {
	data := string(described(t, "positive"))
	light := strings.NewReplacer(`current = "300 uA"`, `current = "10 uA"`, `unbalance  = "1 %"`, `unbalance  = "2 %"`).Replace(data)
	if f := findingOf(t, reviewed(t, []byte(light)), "multiplier.unbalance"); f.Verdict != rule.Fails || f.Provided.Value < f.Needed.Value || f.Provided.Value > f.Needed.Value/0.9 {
		t.Errorf("light load: %s, %s", f.Verdict, f.Because)
	}
	if f := findingOf(t, reviewed(t, []byte(data)), "multiplier.unbalance"); f.Verdict != rule.Meets {
		t.Errorf("full load: %s, %s", f.Verdict, f.Because)
	}
	r := reviewed(t, []byte(strings.Replace(data, "unbalance  = \"1 %\"\n", "", 1)))
	if f := findingOf(t, r, "multiplier.balance"); f.Verdict != rule.Unassessed {
		t.Errorf("no unbalance given: %s", f.Verdict)
	}
	for _, f := range r.Findings {
		if f.Rule == "multiplier.unbalance" {
			t.Error("an unbalance that is not given is judged")
		}
	}
}

// TestHumThroughTheFeed: without its screen the feed of the column brings a thousand times
// the hum, far above the ripple; a battery brings none.
func TestHumThroughTheFeed(t *testing.T) {
	data := string(described(t, "column"))
	screened := findingOf(t, reviewed(t, []byte(data)), "heater.hum")
	open := findingOf(t, reviewed(t, []byte(strings.Replace(data, "screen = true", "screen = false", 1))), "heater.hum")
	if screened.Verdict != rule.Meets || open.Verdict != rule.Fails {
		t.Errorf("screened %s, open %s: %s", screened.Verdict, open.Verdict, open.Because)
	}
	within(t, "what the screen holds back", open.Provided.Value/screened.Provided.Value, 1000, 1e-2)
	battery := strings.Replace(data, `feed = { kind = "isolation transformer", rated_voltage = "40 kV", capacitance = "45 pF", screen = true, common_mode = "115 V", test_voltage = "50 kV" }`, `feed = { kind = "battery" }`, 1)
	for _, f := range reviewed(t, []byte(battery)).Findings {
		if f.Rule == "heater.hum" {
			t.Error("a battery is judged for hum")
		}
	}
}
