package readings

import (
	"fmt"
	"math"
	"math/rand/v2"
	"os"
	"slices"
	"strings"
	"testing"

	"kilovet/hv/chain"
	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/fault"
	"kilovet/rules/plan"
)

const instruments = `
[[instrument]]
name = "bench probe"
at = "multiplier"
resistance = "10 Gohm"
accuracy = "2 %"
[[instrument]]
name = "return ammeter"
reads = "return current"
accuracy = "1 %"
`

func column(t testing.TB) *chain.Chain {
	t.Helper()
	data, err := os.ReadFile("../../testdata/chains/column.toml")
	if err != nil {
		t.Fatal(err)
	}
	c, faults := chain.Read(append(data, instruments...))
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	return c
}

// specimen is a chain as it was really built: every part somewhere in its tolerance, a
// drive that is off, and perhaps something wrong with it.
type specimen struct {
	wrong evidence.Fault
	seed  uint64
}

// built is the specimen as a change of the described circuit.
func (s specimen) built() evidence.Fault {
	return evidence.Fault{Name: fmt.Sprint("specimen ", s.seed), Loop: s.wrong.Loop, Edit: func(c *circuit.Circuit) *circuit.Circuit {
		chance := rand.New(rand.NewPCG(s.seed, 1))
		c = c.Each(func(el *circuit.Element) bool {
			k := 2*chance.Float64() - 1
			switch {
			case el.ResistorPart != nil:
				el.Resistance *= quantity.Resistance(1 + k*float64(el.ResistorPart.Tolerance.V))
			case el.CapacitorPart != nil:
				el.Capacitance *= quantity.Capacitance(1 + k*float64(el.CapacitorPart.Tolerance.V))
			}
			return true
		})
		if s.wrong.Edit != nil {
			c = s.wrong.Edit(c)
		}
		return c
	}}
}

// drive is how far the drive is off: up to 1.5 %.
func (s specimen) drive() float64 {
	return 1 + 0.015*(2*rand.New(rand.NewPCG(s.seed, 3)).Float64()-1)
}

// read fills in the form for a specimen: the drive up to 1.5 % off, every instrument up
// to its accuracy, every reading up to 0.3 %, four digits.
func (s specimen) read(t testing.TB, e *evidence.Evidence, p *plan.Plan, steps int) *File {
	t.Helper()
	chance := rand.New(rand.NewPCG(s.seed, 2))
	spread := func(share float64) float64 { return 1 + share*(2*chance.Float64()-1) }
	drive := s.drive()
	gain := []float64{spread(0.015), spread(0.02), spread(0.01)}
	f := &File{}
	for _, planned := range p.Steps[:steps] {
		at := planned.Condition
		at.Peak *= quantity.Voltage(drive)
		at.Fault = both(s.built(), at.Fault)
		values, err := plan.Values(e, at)
		if err != nil {
			t.Fatalf("seed %d: %v", s.seed, err)
		}
		step := Step{}
		step.Name.V, step.Drive.V = planned.Name, planned.Peak
		for i, v := range values {
			r := Reading{}
			r.Instrument.V = planned.Readings[i].Instrument
			r.Value.V = fmt.Sprintf("%.3e %s", v*gain[i]*spread(0.003), planned.Readings[i].Unit)
			r.Value.Line = 1
			step.Readings = append(step.Readings, r)
		}
		f.Steps = append(f.Steps, step)
	}
	return f
}

// workbench is a chain with its plan; what was computed for one specimen serves the
// next.
type workbench struct {
	testing.TB
	e *evidence.Evidence
	p *plan.Plan
}

func newWorkbench(t testing.TB) workbench {
	t.Helper()
	e := evidence.New(column(t))
	p, err := plan.Of(e)
	if err != nil {
		t.Fatal(err)
	}
	return workbench{t, e, p}
}

// compared takes the readings of the first four steps and compares them.
func (w workbench) compared(s specimen) *Comparison {
	w.Helper()
	c, err := Of(w.e, w.p, s.read(w, w.e, w.p, 4))
	if err != nil {
		w.Fatal(err)
	}
	return c
}

// A chain within its tolerances lies within the bounds, and nothing is named.
func TestAHealthyChainNamesNothing(t *testing.T) {
	w := newWorkbench(t)
	for seed := range uint64(40) {
		if c := w.compared(specimen{seed: seed}); !c.Sound || len(c.Suspects) > 0 {
			t.Errorf("seed %d: %+v", seed, c.Rows)
		}
	}
}

// ordinary leaves what solves hundreds of circuits to the ordinary run.
func ordinary(t *testing.T) {
	if testing.Short() {
		t.Skip("hundreds of circuits; the ordinary run has them")
	}
}

// conducting is a diode of the ladder that leaks.
func conducting(name string, siemens float64) func(*circuit.Circuit) *circuit.Circuit {
	return func(c *circuit.Circuit) *circuit.Circuit {
		return c.With(name, func(el *circuit.Element) { el.Rectifier.Leakage = siemens })
	}
}

func resistance(name string, times float64) func(*circuit.Circuit) *circuit.Circuit {
	return func(c *circuit.Circuit) *circuit.Circuit {
		return c.With(name, func(el *circuit.Element) { el.Resistance *= quantity.Resistance(times) })
	}
}

// Faults that the library does not hold exactly: the part itself is among the first
// three suspects.
func TestFaultsBetweenTheHypotheses(t *testing.T) {
	ordinary(t)
	cases := []struct {
		part  string
		wrong func(*circuit.Circuit) *circuit.Circuit
	}{
		{"multiplier.diode.4", conducting("multiplier.diode.4", 1/35e3)},
		{"multiplier.smoothing_capacitor.2", capacitance("multiplier.smoothing_capacitor.2", 0.02)},
		{"bleeder.1", resistance("bleeder.1", 0.42)},
		{"divider.lower", resistance("divider.lower", 2.2)},
		{"divider.upper", resistance("divider.upper", 0.45)},
		{"filter.1.resistor", resistance("filter.1.resistor", 40)},
	}
	w := newWorkbench(t)
	for i, c := range cases {
		said := w.compared(specimen{evidence.Fault{Edit: c.wrong}, uint64(100 + i)})
		if !named(said, c.part) {
			t.Errorf("%s is not among the first three: healthy %.2f, %s", c.part, said.Healthy, told(said))
		}
	}
}

// Every fault of the library that these readings can show is found again, or named as
// not computed, and those are few.
func TestFaultsOfTheLibrary(t *testing.T) {
	ordinary(t)
	w := newWorkbench(t)
	shown, missed, open := 0, 0, 0
	for i, f := range fault.Of(w.e) {
		change := f.Change()
		if change.Edit == nil {
			continue
		}
		said, ok := w.attempted(specimen{change, uint64(1000 + i)})
		if !ok || said.Sound {
			continue
		}
		shown++
		if slices.ContainsFunc(said.Open, func(o string) bool { return strings.HasPrefix(o, f.Name+": ") }) {
			open++
			continue
		}
		if !slices.ContainsFunc(first(said), func(s Suspect) bool { return slices.Contains(s.Names, f.Name) }) {
			missed++
			t.Logf("%s: %s; not computed: %v", f.Name, told(said), said.Open)
		}
	}
	if shown == 0 || missed > 0 || 20*open > shown {
		t.Errorf("of %d faults that show, %d were not among the first three, %d not computed", shown, missed, open)
	}
}

// attempted is a comparison of a specimen whose state can be computed.
func (w workbench) attempted(s specimen) (*Comparison, bool) {
	for _, step := range w.p.Steps[:4] {
		at := step.Condition
		at.Peak *= quantity.Voltage(s.drive())
		at.Fault = both(s.built(), at.Fault)
		if _, err := plan.Values(w.e, at); err != nil {
			w.Logf("seed %d: %v", s.seed, err)
			return nil, false
		}
	}
	return w.compared(s), true
}

func first(c *Comparison) []Suspect { return c.Suspects[:min(3, len(c.Suspects))] }

func named(c *Comparison, part string) bool {
	return slices.ContainsFunc(first(c), func(s Suspect) bool {
		return slices.ContainsFunc(s.Names, func(n string) bool { return strings.HasPrefix(n, part) })
	})
}

func told(c *Comparison) string {
	var all []string
	for _, s := range c.Suspects {
		all = append(all, fmt.Sprintf("%.2f %v", s.Fit, s.Names))
	}
	return strings.Join(all, "; ")
}

// What is too little to show is not named: a diode with ten times its leakage, a
// capacitor at 60 % change nothing that these instruments can tell from tolerances.
func TestWhatDoesNotShowIsNotNamed(t *testing.T) {
	ordinary(t)
	w := newWorkbench(t)
	for i, wrong := range []func(*circuit.Circuit) *circuit.Circuit{
		conducting("multiplier.diode.4", 10*50e-9/8e3), capacitance("multiplier.smoothing_capacitor.3", 0.6), capacitance("multiplier.coupling_capacitor.1", 0.6),
	} {
		if said := w.compared(specimen{evidence.Fault{Edit: wrong}, uint64(200 + i)}); !said.Sound && !healthyLike(said) {
			t.Errorf("case %d: %s", i, told(said))
		}
	}
}

// healthyLike reports whether nothing is named.
func healthyLike(c *Comparison) bool { return len(c.Suspects) == 0 }

func capacitance(name string, times float64) func(*circuit.Circuit) *circuit.Circuit {
	return func(c *circuit.Circuit) *circuit.Circuit {
		return c.With(name, func(el *circuit.Element) { el.Capacitance *= quantity.Capacitance(times) })
	}
}

// A form of which nothing was filled in says nothing, and is not sound.
func TestNothingReadIsNotSound(t *testing.T) {
	w := newWorkbench(t)
	c, err := Of(w.e, w.p, &File{})
	if err != nil || c.Sound || math.IsNaN(c.Healthy) {
		t.Errorf("%+v, %v", c, err)
	}
}
