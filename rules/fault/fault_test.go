package fault_test

import (
	"os"
	"slices"
	"strings"
	"testing"

	"kilovet/hv/chain"
	"kilovet/hv/circuit"
	"kilovet/rules/evidence"
	"kilovet/rules/fault"
)

// builtIn is the evidence for one of the descriptions that come with the project.
func builtIn(t testing.TB, name string) *evidence.Evidence {
	t.Helper()
	data, err := os.ReadFile("../../testdata/chains/" + name + ".toml")
	if err != nil {
		t.Fatal(err)
	}
	return evidence.New(read(t, string(data)))
}

func read(t testing.TB, text string) *chain.Chain {
	t.Helper()
	c, faults := chain.Read([]byte(text))
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	return c
}

// Every fault changes the circuit into one that can be computed with, under a name of
// its own, and says what helps.
func TestEveryFaultBuilds(t *testing.T) {
	for _, name := range []string{"column", "positive", "faulty"} {
		e := builtIn(t, name)
		seen := map[string]bool{}
		all := fault.Of(e)
		if len(all) < 100 && name == "column" {
			t.Errorf("%s: %d faults, over a hundred are wanted", name, len(all))
		}
		for _, f := range all {
			if seen[f.Name] || f.Name == "" || f.Class == "" || f.Part == "" || f.Kind == "" {
				t.Errorf("%s: %+v is not whole, or twice", name, f)
			}
			seen[f.Name] = true
			change := f.Change()
			if change.Loop == evidence.Held {
				t.Errorf("%s: %s is a thought, not a failure", name, f.Name)
			}
			if change.Edit == nil {
				if change.Loop != evidence.RunsAway {
					t.Errorf("%s: %s changes nothing", name, f.Name)
				}
				continue
			}
			c := change.Edit(e.Layout())
			if err := c.Sane(); err != nil {
				t.Errorf("%s: %s: %v", name, f.Name, err)
			}
			for _, node := range f.Lifts {
				if n, ok := c.Node(node); !ok || n == circuit.Ground {
					t.Errorf("%s: %s does not lift %s", name, f.Name, node)
				}
			}
		}
	}
}

// What must be in the library, by name; the built-in column has each of them.
func TestTheLibraryIsWhole(t *testing.T) {
	var names []string
	for _, f := range fault.Of(builtIn(t, "column")) {
		names = append(names, f.Name)
	}
	for _, want := range []string{
		"multiplier.diode.1 open", "multiplier.diode.12 shorted", "multiplier.diode.7 reversed",
		"multiplier.coupling_capacitor.1 shorted", "multiplier.smoothing_capacitor.6 open",
		"filter.1.resistor open", "filter.1.resistor shorted", "filter.1.resistor: one element shorted", "filter.1.capacitor shorted",
		"cable screen open", "cable shorted", "cable.gun_end_resistor open",
		"divider.upper open", "divider.upper shorted", "divider.upper: one element shorted", "divider.lower open", "divider.lower: one string open", "divider.lower shorted",
		"divider.meter open", "divider.meter shorted", "divider.clamp open", "divider.clamp shorted",
		"bleeder.1 open", "bleeder.1: one string open", "bias.resistor open", "bias.resistor shorted", "bias.bypass shorted", "bias.bypass open",
		"filament open", "heater feed breakdown", "regulation lost", "feedback lost", "arc at output", "arc at cathode", "pressure rise",
		"earth link open", "multiplier return open", "whole ladder reversed",
		"multiplier.coupling_capacitor.3 10 times its value", "multiplier.smoothing_capacitor.3 0.1 times its value",
		"divider.upper: one element 10 times its value", "divider.lower: one element 0.1 times its value",
	} {
		if !slices.Contains(names, want) {
			t.Errorf("%s is missing", want)
		}
	}
	halves := 0
	for _, f := range fault.Of(builtIn(t, "positive")) {
		if f.Name == "halves in phase" || strings.HasPrefix(f.Part, "multiplier.diode.b.") {
			halves++
		}
	}
	if halves != 1+3*6 {
		t.Errorf("%d faults of the second half", halves)
	}
}
