package readings

import (
	"math"
	"math/rand/v2"
	"slices"
	"strings"
	"testing"

	"kilovet/hv/circuit"
	"kilovet/rules/evidence"
)

// anyWrong is a part of the built-in chain that is off by a size between those that are tried.
func anyWrong(c *circuit.Circuit, chance *rand.Rand) (part string, wrong func(*circuit.Circuit) *circuit.Circuit) {
	between := func(low, high float64) float64 {
		return low * math.Exp(chance.Float64()*math.Log(high/low))
	}
	for {
		el := c.Elements[chance.IntN(len(c.Elements))]
		switch {
		case el.Kind == circuit.Diode && el.Role == circuit.Ladder:
			return el.Name, conducting(el.Name, 1/between(10e3, 3e6))
		case el.Kind == circuit.Capacitor && el.CapacitorPart != nil:
			return el.Name, capacitance(el.Name, between(0.01, 0.6))
		case el.Kind == circuit.Resistor && el.ResistorPart != nil && strings.Contains("bleeder.1 divider.upper divider.lower filter.1.resistor", el.Name):
			if chance.IntN(2) == 0 {
				return el.Name, resistance(el.Name, between(0.02, 0.8))
			}
			return el.Name, resistance(el.Name, between(1.3, 12))
		}
	}
}

// foundIn reports whether a part is among the first three suspects or, where there are none,
// in the class of what cannot be told from a healthy chain.
func foundIn(c *Comparison, part string) bool {
	if len(c.Suspects) > 0 {
		return named(c, part)
	}
	return slices.ContainsFunc(c.Hidden, func(n string) bool { return strings.HasPrefix(n, part) })
}

// Of specimens with anything off by any size, every one whose readings deviate has the part
// that is off among its first three suspects; where nothing explains them better than a
// healthy chain, in one class with it.
func TestAnythingOffByAnySize(t *testing.T) {
	ordinary(t)
	w := newWorkbench(t)
	chance := rand.New(rand.NewPCG(20, 26))
	deviating, missed := 0, 0
	for seed := uint64(0); deviating < 40 && seed < 400; seed++ {
		part, wrong := anyWrong(w.e.Layout(), chance)
		said, ok := w.attempted(specimen{evidence.Fault{Edit: wrong}, 5000 + seed})
		if !ok || said.Sound {
			continue
		}
		deviating++
		if !foundIn(said, part) {
			missed++
			t.Logf("%s: healthy %.2f, bent %t, %s", part, said.Healthy, said.Bent, told(said))
		}
	}
	if deviating < 40 || missed > 0 {
		t.Errorf("of %d specimens that deviate %d were not found", deviating, missed)
	}
}
