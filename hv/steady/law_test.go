package steady

import (
	"fmt"
	"math"
	"testing"

	"kilovet/hv/chain"
	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// A self-biased gun: 2 Mohm at 200 µA stands 400 V above its control electrode, so
// that a supply of 5 kV leaves its cathode 4.6 kV below the earthed anode (common
// practice, no source).
func ExamplePotentials() {
	c := supplyOf("negative", 3, 1e-9)
	c.Bias = &chain.Bias{Kind: given("kind", "self"), Resistor: resistor("bias.resistor", 2e6)}
	c.Gun = &chain.Gun{}
	state, err := Potentials(circuit.Build(c, circuit.Setting{Emission: 200e-6}), Linear(5000, 0))
	if err != nil {
		fmt.Println(err)
		return
	}
	bias, _ := state.Across("bias.resistor")
	control, _ := state.Potential("control")
	cathode, _ := state.Potential("cathode")
	fmt.Printf("bias %.0f V, control %.0f V, cathode %.0f V, drawn %.0f µA\n", bias, control, cathode, 1e6*state.Drawn)
	// Output: bias 400 V, control -5000 V, cathode -4600 V, drawn 200 µA
}

func filtered(ohms quantity.Resistance, sections int, load quantity.Current) *circuit.Circuit {
	c := supplyOf("positive", 1, 1e-9)
	for range sections {
		c.Filters = append(c.Filters, chain.Filter{Resistor: resistor("filter.resistor", ohms), Capacitor: capacitor(1e-9)})
	}
	c.Loads = []chain.Load{{Name: given("name", "test"), At: given("at", "output"), Current: given("current", load)}}
	return build(c)
}

func TestSeriesDrop(t *testing.T) {
	cases := []struct {
		what     string
		ohms     quantity.Resistance
		sections int
		load     quantity.Current
		drop     float64
	}{
		{"10 Mohm at 100 µA (common practice, no source)", 10e6, 1, 100e-6, 1000},
		{"three 100 kohm at 194 µA: 58.2 V (design notes of a photomultiplier supply, section 5)", 100e3, 3, 194e-6, 58.2},
		{"100 kohm at 100 µA: 10 V (derived)", 100e3, 1, 100e-6, 10},
	}
	for _, c := range cases {
		s := must(Potentials(filtered(c.ohms, c.sections, c.load), Linear(20e3, 0)))
		near(t, c.what, float64(must(s.Potential("multiplier"))-must(s.Potential("output"))), c.drop, 1e-9)
	}
}

func loaded(ohms quantity.Resistance) *circuit.Circuit {
	c := supplyOf("negative", 2, 1e-9)
	c.Loads = []chain.Load{{Name: given("name", "test"), At: given("at", "multiplier"), Resistance: given("resistance", ohms)}}
	return build(c)
}

func TestLinearLawDividesWithTheLoad(t *testing.T) {
	s := must(Potentials(loaded(99e6), Linear(10e3, 1e6)))
	near(t, "potential", float64(must(s.Potential("multiplier"))), -9900, 1e-12)
	near(t, "drawn", float64(s.Drawn), 100e-6, 1e-12)
}

// V = V0 − k·I² on a load R: I is the positive root of k I² + R I − V0 = 0.
func TestCurvedLawMeetsTheLoadLine(t *testing.T) {
	const v0, k, r = 10e3, 2e11, 50e6
	calls := 0
	law := func(i quantity.Current) (quantity.Voltage, error) {
		calls++
		return quantity.Voltage(v0 - k*float64(i)*float64(i)), nil
	}
	s := must(Potentials(loaded(r), law))
	want := (-r + math.Sqrt(r*r+4*k*v0)) / (2 * k)
	near(t, "drawn", float64(s.Drawn), want, 1e-9)
	if calls > 15 {
		t.Errorf("the law was asked %d times", calls)
	}
}

func TestLawIsAskedFewTimesWhenLinear(t *testing.T) {
	calls := 0
	law := Linear(10e3, 1e6)
	must(Potentials(loaded(99e6), func(i quantity.Current) (quantity.Voltage, error) { calls++; return law(i) }))
	if calls > 5 {
		t.Errorf("the linear law was asked %d times", calls)
	}
}

func TestPotentialsFailClosed(t *testing.T) {
	inside := supplyOf("positive", 3, 1e-9)
	inside.Bleeders = []chain.Bleeder{{At: given("at", "stage.2"), Resistor: resistor("bleeder.resistor", 1e9)}}
	without := &chain.Chain{}
	short := build(supplyOf("positive", 3, 1e-9)).Join("fault", "multiplier", "ground")
	starved := filtered(1e6, 1, 1e-3)
	cases := []struct {
		what    string
		circuit *circuit.Circuit
		law     Law
		kind    lack.Kind
		keys    []string
	}{
		{"no multiplier", build(without), Linear(1e3, 0), lack.Missing, []string{"multiplier"}},
		{"a bleeder inside the ladder", build(inside), Linear(1e3, 0), lack.NotReached, nil},
		{"top shorted", short, Linear(1e3, 0), lack.NotReached, nil},
		{"return open", build(supplyOf("positive", 3, 1e-9)).Open("multiplier return"), Linear(1e3, 0), lack.NotReached, nil},
		{"more current than the multiplier has", starved, Linear(1e3, 2e6), lack.Outside, nil},
		{"the law has no answer", loaded(1e6), func(quantity.Current) (quantity.Voltage, error) { return 0, lack.Key("drive.peak") }, lack.Missing, []string{"drive.peak"}},
	}
	for _, c := range cases {
		t.Run(c.what, func(t *testing.T) {
			_, err := Potentials(c.circuit, c.law)
			wantLack(t, err, c.kind, c.keys...)
		})
	}
}

func TestNoLoadStandsAtTheLaw(t *testing.T) {
	s := must(Potentials(build(supplyOf("negative", 6, 1e-9)), Linear(21e3, 5e6)))
	near(t, "output", float64(must(s.Potential("output"))), -21e3, 1e-12)
	if s.Drawn != 0 {
		t.Errorf("drawn %g A without a load", s.Drawn)
	}
	_, err := s.Potential("coupling.3")
	wantLack(t, err, lack.NotReached)
}
