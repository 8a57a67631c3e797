package phasor

import (
	"fmt"
	"math"
	"math/cmplx"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chain"
	"kilovet/hv/chance"
	"kilovet/hv/circuit"
	"kilovet/hv/document"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// given is a leaf as if it stood in a description.
func given[T any](key string, v T) document.Given[T] {
	return document.Given[T]{V: v, Place: document.Place{Key: key, Line: 1, Column: 1}}
}

func resistor(ohms quantity.Resistance) *chain.Resistor {
	return &chain.Resistor{Value: given("value", ohms)}
}

func capacitor(farads quantity.Capacitance) *chain.Capacitor {
	return &chain.Capacitor{Value: given("value", []quantity.Capacitance{farads})}
}

func part(name, kind, from, to, value string) chain.Part {
	return chain.Part{Name: given("name", name), Kind: given("kind", kind), From: given("from", from), To: given("to", to), Value: given("value", value)}
}

func supply(stages int) *chain.Chain {
	return &chain.Chain{
		Site:  &chain.Site{MainsFrequency: given("mains_frequency", quantity.Frequency(50))},
		Drive: &chain.Drive{Frequency: given("frequency", quantity.Frequency(40e3)), Peak: given("peak", quantity.Voltage(1000))},
		Multiplier: &chain.Multiplier{Polarity: given("polarity", "negative"), Stages: given("stages", stages),
			CouplingCapacitor: capacitor(1e-9), SmoothingCapacitor: capacitor(1e-9)},
	}
}

func section(r quantity.Resistance, c quantity.Capacitance, bypass quantity.Capacitance) chain.Filter {
	return chain.Filter{Resistor: resistor(r), Capacitor: capacitor(c), BypassCapacitance: given("bypass_capacitance", bypass)}
}

func build(c *chain.Chain) *circuit.Circuit { return circuit.Build(c, circuit.Setting{Peak: 1000}) }

// size is the magnitude at a node with the multiplier's top driven by 1 V and the
// coupling column held still, so that nothing is picked up from it.
func size(t *testing.T, c *circuit.Circuit, f quantity.Frequency, node string, x Excitation) float64 {
	t.Helper()
	r, err := Solve(c, f, x)
	if err != nil {
		t.Fatal(err)
	}
	v, err := r.At(node)
	if err != nil {
		t.Fatal(err)
	}
	return cmplx.Abs(complex128(v))
}

func topAlone(stages int) Excitation {
	return Excitation{Nodes: []Driven{{"multiplier", 1}, {fmt.Sprint("coupling.", stages), 0}}}
}

func near(t *testing.T, what string, got, want, relative float64) {
	t.Helper()
	if !(math.Abs(got-want) <= relative*math.Abs(want)) {
		t.Errorf("%s = %.10g, want %.10g within %g", what, got, want, relative)
	}
}

// A section of 100 kohm and 500 pF leaves 7.93 % of a ripple at 40 kHz (derived).
func ExampleSolve() {
	c := &chain.Chain{Filters: []chain.Filter{section(100e3, 500e-12, 0)}}
	r, err := Solve(circuit.Build(c, circuit.Setting{}), 40e3, Excitation{Nodes: []Driven{{"multiplier", 1}}})
	if err != nil {
		fmt.Println(err)
		return
	}
	v, _ := r.At("output")
	fmt.Printf("%.4f\n", cmplx.Abs(complex128(v)))
	// Output: 0.0793
}

// One section divides by √(1 + (2π f R C)²).
func TestSectionClosedForm(t *testing.T) {
	cases := []struct {
		what string
		r    quantity.Resistance
		c    quantity.Capacitance
		f    quantity.Frequency
		want float64
		tol  float64
	}{
		{"derived: 100 kohm, 500 pF, 40 kHz", 100e3, 500e-12, 40e3, 0.0793267, 1e-6},
		{"derived: the same at 100 Hz", 100e3, 500e-12, 100, 0.9995069, 1e-7},
		{"design notes of a photomultiplier supply, section 5: -78 dB", 100e3, 50e-9, 252e3, math.Pow(10, -78.0/20), 5e-3},
	}
	for _, c := range cases {
		net := build(&chain.Chain{Filters: []chain.Filter{section(c.r, c.c, 0)}})
		near(t, c.what, size(t, net, c.f, "output", Excitation{Nodes: []Driven{{"multiplier", 1}}}), c.want, c.tol)
	}
}

// Far above its corner a section ends at its bypass over its capacitor, and a second
// section at the square of that, each falling no further.
func TestBypassSetsTheFloor(t *testing.T) {
	s := supply(2)
	s.Filters = []chain.Filter{section(1e6, 470e-12, 0.5e-12)}
	s.Multiplier.PickupToOutput = given("pickup_to_output", quantity.Capacitance(0))
	near(t, "floor", size(t, build(s), 100e6, "output", topAlone(2)), 0.5/470.5, 1e-4)
	near(t, "below", size(t, build(s), 1e3, "output", topAlone(2)), 1/math.Hypot(1, 2*math.Pi*1e3*1e6*470.5e-12), 1e-2)
}

// What the coupling column swings reaches the output past the filter as pickup over
// capacitance.
func TestPickupSetsTheFloor(t *testing.T) {
	s := supply(3)
	s.Filters = []chain.Filter{section(100e6, 470e-12, 0)}
	s.Multiplier.PickupToOutput = given("pickup_to_output", quantity.Capacitance(0.1e-12))
	x := Excitation{Nodes: []Driven{{"multiplier", 0}, {"coupling.3", 1750}}}
	near(t, "pickup", size(t, build(s), 40e3, "output", x), 1750*0.1/470.1, 1e-6)
}

// An unbypassed bias of 2 Mohm against a deck stray of 50 pF: nearly all the ripple
// of 40 kHz stands across the bias (derived: 99.9 %); 10 nF leave 0.5 % of it.
func TestBiasPath(t *testing.T) {
	s := supply(1)
	s.Bias = &chain.Bias{Kind: given("kind", "self"), Resistor: resistor(2e6)}
	s.Heater = &chain.Heater{CapacitanceToGround: given("capacitance_to_ground", quantity.Capacitance(50e-12))}
	across := func() float64 {
		r, err := Solve(build(s), 40e3, topAlone(1))
		if err != nil {
			t.Fatal(err)
		}
		v, err := r.Between("control", "cathode")
		if err != nil {
			t.Fatal(err)
		}
		return cmplx.Abs(complex128(v))
	}
	const w = 2 * math.Pi * 40e3 * 2e6
	near(t, "unbypassed", across(), w*50e-12/math.Hypot(1, w*50e-12), 1e-9)
	near(t, "unbypassed, as stated", across(), 0.999, 1e-3)
	s.Bias.Bypass = capacitor(10e-9)
	near(t, "bypassed", across(), w*50e-12/math.Hypot(1, w*10050e-12), 1e-9)
	near(t, "bypassed, as stated", across(), 0.005, 1e-2)
}

// An isolation transformer of 50 pF under 115 V rms of common mode at 50 Hz, a deck
// of 1 nF: 5.5 V rms without a resistive path, 1.7 V with 1 Mohm, 0.18 V with
// 100 kohm (derived).
func TestIsolationTransformer(t *testing.T) {
	cases := []struct {
		what  string
		path  []chain.Part
		exact float64
		said  float64
	}{
		{"no path", nil, 115 * 50.0 / 1050, 5.5},
		{"1 Mohm", []chain.Part{part("path", "resistor", "cathode", "ground", "1 Mohm")}, 0, 1.7},
		{"100 kohm", []chain.Part{part("path", "resistor", "cathode", "ground", "100 kohm")}, 0, 0.18},
	}
	const w = 2 * math.Pi * 50
	cases[1].exact = 115 * w * 1e6 * 50e-12 / math.Hypot(1, w*1e6*1050e-12)
	cases[2].exact = 115 * w * 1e5 * 50e-12 / math.Hypot(1, w*1e5*1050e-12)
	for _, c := range cases {
		s := &chain.Chain{Parts: c.path, Site: supply(1).Site}
		s.Heater = &chain.Heater{CapacitanceToGround: given("capacitance_to_ground", quantity.Capacitance(1e-9)),
			Feed: &chain.Feed{Kind: given("kind", "isolation transformer"), Capacitance: given("capacitance", quantity.Capacitance(50e-12)),
				CommonMode: given("common_mode", quantity.Voltage(115))}}
		rms := size(t, build(s), 50, "cathode", Excitation{Source: "mains"}) / math.Sqrt2
		near(t, c.what, rms, c.exact, 1e-9)
		near(t, c.what+", as stated", rms, c.said, 0.02)
		s.Heater.Feed.Screen = given("screen", true)
		near(t, c.what+", screened", size(t, build(s), 50, "cathode", Excitation{Source: "mains"})/math.Sqrt2, c.exact/1000, 1e-9)
	}
}

// Emission that answers the bias divides a disturbance of the bias by 1 + gm·R_b.
func TestEmissionLoadsTheCathode(t *testing.T) {
	s := supply(1)
	s.Bias = &chain.Bias{Kind: given("kind", "self"), Resistor: resistor(2e6)}
	s.Gun = &chain.Gun{}
	const gm = 2 * 100e-6 / 30 // n I/(cutoff − bias)
	for _, extra := range []Transfer{
		Conductance("cathode", "control", gm),
		{From: "cathode", To: "ground", Plus: "cathode", Minus: "control", Conductance: gm},
	} {
		x := topAlone(1)
		// A disturbance of the emission by 1 nA through a very large resistance.
		s.Parts = []chain.Part{part("noise", "resistor", "noise", "cathode", "1000 Tohm")}
		x.Nodes[0].Voltage = 0
		x.Nodes = append(x.Nodes, Driven{"noise", 1e6})
		x.Extra = []Transfer{extra}
		near(t, "cathode", size(t, build(s), 1, "cathode", x), 1e-9*2e6/(1+gm*2e6), 1e-6)
	}
}

// The series circuit of R, L and C is a division of impedances, at and off resonance.
func TestSeriesResonance(t *testing.T) {
	net := build(&chain.Chain{Parts: []chain.Part{part("r", "resistor", "in", "a", "10 ohm"),
		part("l", "inductor", "a", "out", "1 mH"), part("c", "capacitor", "out", "ground", "1 nF")}})
	for _, f := range []quantity.Frequency{1e3, 159154.943, 1e6} {
		w := 2 * math.Pi * float64(f)
		zc := complex(0, -1/(w*1e-9))
		want := cmplx.Abs(zc / (complex(10, w*1e-3) + zc))
		near(t, fmt.Sprint(f), size(t, net, f, "out", Excitation{Nodes: []Driven{{"in", 1}}}), want, 1e-6)
	}
}

// The ladder kept: the top of a quiet smoothing column is C/N to ground, and the
// junctions of its diodes count.
func TestLadderKeptIsAnImpedance(t *testing.T) {
	s := supply(4)
	s.Parts = []chain.Part{part("in", "capacitor", "in", "multiplier", "1 nF")}
	x := Excitation{Ladder: true, Nodes: []Driven{{"in", 1}}}
	near(t, "column", size(t, build(s), 1e3, "multiplier", x), 1/(1+0.25), 1e-9)
	s.Multiplier.Diode = &chain.Diode{Capacitance: given("capacitance", quantity.Capacitance(100e-12))}
	if v := size(t, build(s), 1e3, "multiplier", x); v >= 0.8-1e-3 {
		t.Errorf("junction capacitance leaves the top at %g V", v)
	}
}

// Two columns of C between which diodes of junction capacitance c stand couple as a
// line; with one stage the top is S beside c in series with P (derived).
func TestJunctionCapacitance(t *testing.T) {
	s := supply(1)
	s.Multiplier.Diode = &chain.Diode{Capacitance: given("capacitance", quantity.Capacitance(0.1e-9))}
	s.Parts = []chain.Part{part("in", "capacitor", "in", "multiplier", "1 nF")}
	// coupling.1 to ground: P (drive quiet) beside the first diode; from there the second diode to the top.
	branch := 1 / (1/0.1 + 1/1.1)
	want := 1 / (1 + 1 + branch)
	near(t, "top", size(t, build(s), 1e3, "multiplier", Excitation{Ladder: true, Nodes: []Driven{{"in", 1}}}), want, 1e-9)
}

func whole() *chain.Chain {
	s := supply(3)
	s.Filters = []chain.Filter{section(1e6, 470e-12, 0.5e-12), section(220e3, 1e-9, 0.3e-12)}
	s.Cable = &chain.Cable{Length: given("length", quantity.Length(1.2)), Capacitance: given("capacitance", quantity.LinearCapacitance(110e-12)),
		GunEndResistor: resistor(47e3)}
	s.Bias = &chain.Bias{Kind: given("kind", "self"), Resistor: resistor(2e6), Bypass: capacitor(1e-9)}
	s.Gun = &chain.Gun{}
	s.Heater = &chain.Heater{Supply: given("supply", "dc"), Voltage: given("voltage", quantity.Voltage(2)),
		CentreResistors:     &chain.CentreResistors{Value: given("value", []quantity.Resistance{22, 22})},
		CapacitanceToGround: given("capacitance_to_ground", quantity.Capacitance(60e-12)),
		Feed: &chain.Feed{Kind: given("kind", "isolation transformer"), Capacitance: given("capacitance", quantity.Capacitance(45e-12)),
			CommonMode: given("common_mode", quantity.Voltage(115))}}
	return s
}

// The response to several drives is the sum of the responses to each.
func TestSuperposition(t *testing.T) {
	c := build(whole())
	chance.Check(t, func(r *rapid.T) {
		f := quantity.Frequency(math.Pow(10, rapid.Float64Range(0, 7).Draw(r, "log f")))
		volts := rapid.Float64Range(-1000, 1000)
		a, b := Phasor(complex(volts.Draw(r, "re"), volts.Draw(r, "im"))), Phasor(complex(volts.Draw(r, "re"), volts.Draw(r, "im")))
		drive := func(top, column Phasor, source string) *Response {
			res, err := Solve(c, f, Excitation{Nodes: []Driven{{"multiplier", top}, {"coupling.3", column}}, Source: source})
			if err != nil {
				r.Fatal(err)
			}
			return res
		}
		all, first, second, third := drive(a, b, "mains"), drive(a, 0, ""), drive(0, b, ""), drive(0, 0, "mains")
		for _, node := range []string{"filter.1", "supply", "output", "cathode", "heater.b"} {
			var v [4]complex128
			for i, x := range []*Response{all, first, second, third} {
				p, err := x.At(node)
				if err != nil {
					r.Fatal(err)
				}
				v[i] = complex128(p)
			}
			if gap := cmplx.Abs(v[0] - v[1] - v[2] - v[3]); gap > 1e-9*(cmplx.Abs(v[1])+cmplx.Abs(v[2])+cmplx.Abs(v[3])) {
				r.Fatalf("%s at %g Hz: %v is not %v + %v + %v", node, f, v[0], v[1], v[2], v[3])
			}
		}
	})
}

// What a current at one node does at another is what the other's does at the one.
func TestReciprocity(t *testing.T) {
	s := whole()
	s.Parts = []chain.Part{part("p", "resistor", "p", "supply", "1000 Tohm"), part("q", "resistor", "q", "cathode", "1000 Tohm")}
	c := build(s)
	hold := topAlone(3).Nodes
	hold[0].Voltage = 0
	forward := size(t, c, 1e3, "cathode", Excitation{Nodes: append(hold, Driven{"p", 1e15})})
	back := size(t, c, 1e3, "supply", Excitation{Nodes: append(hold, Driven{"q", 1e15})})
	near(t, "transfer", forward, back, 1e-9)
}

func TestLacks(t *testing.T) {
	doubtful := supply(1)
	doubtful.Filters = []chain.Filter{section(1e6, 1e-9, 0)}
	doubtful.Filters[0].Capacitor.Dielectric = given("dielectric", "X7R")
	doubtful.Filters[0].Capacitor.ValueAtVoltage.Key = "filter.capacitor.value_at_voltage"
	cases := []struct {
		what string
		c    *chain.Chain
		f    quantity.Frequency
		x    Excitation
		kind lack.Kind
		keys []string
	}{
		{"no frequency", supply(1), 0, Excitation{}, lack.Outside, nil},
		{"unknown node", supply(1), 50, Excitation{Nodes: []Driven{{"nowhere", 1}}}, lack.NotReached, nil},
		{"unknown source", supply(1), 50, Excitation{Source: "nothing"}, lack.NotReached, nil},
		{"driven two ways", supply(1), 50, Excitation{Nodes: []Driven{{"multiplier", 1}, {"stage.1", 2}}}, lack.NotReached, nil},
		{"unknown end", supply(1), 50, Excitation{Extra: []Transfer{Conductance("output", "nowhere", 1)}}, lack.NotReached, nil},
		{"class 2", doubtful, 50, Excitation{Nodes: []Driven{{"multiplier", 1}}}, lack.Missing, []string{"filter.capacitor.value_at_voltage"}},
	}
	for _, c := range cases {
		_, err := Solve(build(c.c), c.f, c.x)
		l := lack.Of(err)
		if l == nil || l.Kind != c.kind || fmt.Sprint(l.Keys) != fmt.Sprint(c.keys) {
			t.Errorf("%s: %v (%+v)", c.what, err, l)
		}
	}
}

func TestFloatingNodesAreWanting(t *testing.T) {
	r, err := Solve(build(supply(2)), 50, Excitation{Nodes: []Driven{{"multiplier", 1}}})
	if err != nil {
		t.Fatal(err)
	}
	for _, node := range []string{"coupling.1", "nowhere"} {
		if _, err := r.At(node); lack.Of(err) == nil {
			t.Errorf("%s: %v, want a lack", node, err)
		}
	}
}

// A loop of L and C without loss has no answer at its resonance.
func TestLosslessResonance(t *testing.T) {
	f := quantity.Frequency(1 / (2 * math.Pi * math.Sqrt(1e-3*1e-9)))
	net := build(&chain.Chain{Parts: []chain.Part{part("l", "inductor", "a", "ground", "1 mH"), part("c", "capacitor", "a", "ground", "1 nF"),
		part("far", "capacitor", "b", "ground", "1 nF")}})
	if _, err := Solve(net, f, Excitation{Nodes: []Driven{{"b", 1}}}); lack.Of(err) == nil {
		t.Errorf("error %v, want a lack", err)
	}
}
