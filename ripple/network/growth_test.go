package network

import (
	"os"
	"testing"

	"kilovet/hv/chain"
	"kilovet/hv/circuit"
)

// The work of a periodic state and an arc from 6 to 12 and 60 stages, and of a start from
// 6 to 12: at most with the square of the stages in each step. A start of sixty stages
// follows a front from stage to stage and takes more than that.
func TestWorkGrowsNoFasterThanTheSquare(t *testing.T) {
	stages := []int{6, 12, 60}
	cost := map[string][]float64{}
	for _, n := range stages {
		l := ladder{stages: n, frequency: 50e3, peak: 1000, resistance: 100, capacitance: 1e-9, current: 1e-6, drop: 8, on: 50, junction: 1e-12, leakage: "1 nA"}
		p := steady(t, build(t, l.describe()))
		top := node(t, p.Circuit, "multiplier")
		cost["steady"] = append(cost["steady"], p.Work.cost(p.Work.Unknowns))
		if n <= 12 {
			s, err := Start(p, StartOptions{Node: top})
			if err != nil {
				t.Fatal(err)
			}
			cost["start"] = append(cost["start"], s.Work.cost(p.Work.Unknowns))
		}
		at, err := p.Highest(top, circuit.Ground)
		if err != nil {
			t.Fatal(err)
		}
		a, err := Arc(p.Circuit, p.State(at), ArcOptions{From: top, Resistance: 1, Until: 20 * p.Period()})
		if err != nil {
			t.Fatal(err)
		}
		cost["arc"] = append(cost["arc"], a.Work.cost(p.Work.Unknowns))
	}
	for what, c := range cost {
		t.Logf("%s: %.3g", what, c)
		for k := range c[1:] {
			times := float64(stages[k+1]) / float64(stages[k])
			if growth := c[k+1] / c[k]; growth > 1.3*times*times {
				t.Errorf("%s from %d to %d stages: the work grew by %.3g", what, stages[k], stages[k+1], growth)
			}
		}
	}
}

// cost counts the unknowns solved for, one factorisation as one product of a step.
func (w *Work) cost(unknowns int) float64 {
	steps := 0.0
	if w.Periods > 0 {
		steps = float64(w.Steps) / float64(w.Periods)
	}
	return (float64(w.Factorisations) + float64(w.Products)*steps) * float64(unknowns)
}

// Any element of the described column open, shorted or reversed, each from the state of
// the whole one: at most one in fifty is not reached, for a fraction of the work that
// starting anew would take in time.
func TestEveryFaultOfTheColumn(t *testing.T) {
	if testing.Short() {
		t.Skip("long")
	}
	data, err := os.ReadFile("../../testdata/chains/column.toml")
	if err != nil {
		t.Fatal(err)
	}
	described, _ := chain.Read(data)
	c := circuit.Build(described, circuit.Setting{Peak: described.Drive.Peak.V, Emission: described.Gun.Emission.V})
	whole := steady(t, c)
	failed, all, work := 0, 0, Work{}
	for _, name := range names(c) {
		for _, faulty := range []*circuit.Circuit{c.Open(name), c.Short(name), c.Reverse(name)} {
			all++
			p, err := Steady(faulty, Options{From: whole})
			if err != nil {
				failed++
				t.Logf("%s: %v", name, err)
				continue
			}
			work.add(p.Work)
		}
	}
	if failed > all/50 {
		t.Errorf("%d of %d not reached", failed, all)
	}
	if each := work.Factorisations / (all - failed); each > 2000 {
		t.Errorf("%d factorisations each", each)
	}
}
