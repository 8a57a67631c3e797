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

const volts60 = 60

// noLoad are the potentials of an ideal ladder without load: coupling k at 2k−1 and
// stage k at 2k times the drive's peak, all else at the top.
func noLoad(c *circuit.Circuit, stages int, peak quantity.Voltage) Voltages {
	if c.Negative {
		peak = -peak
	}
	v := make(Voltages, c.Nodes())
	set := func(name string, u quantity.Voltage) {
		if n, there := c.Node(name); there {
			v[n] = u
		}
	}
	for _, name := range []string{"filter.1", "filter.2", "supply", "output", "control", "cathode", "heater.a", "heater.b"} {
		set(name, quantity.Voltage(2*stages)*peak)
	}
	for k := 1; k <= stages; k++ {
		set(fmt.Sprint("coupling.", k), quantity.Voltage(2*k-1)*peak)
		set(fmt.Sprint("coupling.a.", k), quantity.Voltage(2*k-1)*peak)
		set(fmt.Sprint("coupling.b.", k), quantity.Voltage(2*k-1)*peak)
		set(fmt.Sprint("stage.", k), quantity.Voltage(2*k)*peak)
	}
	return v
}

func bleeder(at string, ohms quantity.Resistance) chain.Bleeder {
	return chain.Bleeder{At: given("at", at), Resistor: resistor("bleeder.resistor", ohms), Permanent: given("permanent", true)}
}

// store is one capacitor with a bleeder.
func storeWith(c string, ohms quantity.Resistance) *circuit.Circuit {
	return build(&chain.Chain{Parts: []chain.Part{part("c", "capacitor", "output", "ground", c)}, Bleeders: []chain.Bleeder{bleeder("output", ohms)}})
}

func standing(c *circuit.Circuit, u quantity.Voltage) Voltages {
	v := make(Voltages, c.Nodes())
	n, _ := c.Node("output")
	v[n] = u
	return v
}

// t = R C ln(U0/60 V): 10 nF and 1 Gohm from 20 kV take 58 s.
func ExampleDischarge() {
	c := storeWith("10 nF", 1e9)
	d, err := Discharge(c, standing(c, 20e3), 60)
	if err != nil {
		fmt.Println(err)
		return
	}
	t, _ := d.Slowest().Lasts()
	fmt.Printf("%.1f s\n", t)
	// Output: 58.1 s
}

func TestDecayOfOneCapacitor(t *testing.T) {
	for _, u0 := range []quantity.Voltage{61, 100, 5e3, -10e3, 30e3, 50e3, 100e3} {
		for _, c := range []struct {
			name  string
			value float64
		}{{"10 pF", 10e-12}, {"2.2 nF", 2.2e-9}, {"85 uF", 85e-6}} {
			net := storeWith(c.name, 260e3)
			d := must(Discharge(net, standing(net, u0), volts60))
			near(t, fmt.Sprint(u0, " V on ", c.name), float64(must(d.Slowest().Lasts())), 260e3*c.value*math.Log(math.Abs(float64(u0))/60), 1e-3)
		}
	}
}

// A textbook's 260 kohm across 85 µF: down to 0.35 % after 125 s.
func TestPublishedDecay(t *testing.T) {
	net := storeWith("85 uF", 260e3)
	d := must(Discharge(net, standing(net, 1000), 3.5))
	near(t, "time", float64(must(d.Slowest().Lasts())), 125.0, 2e-3)
}

func bledLadder(polarity string, stages int, ohms quantity.Resistance) (*circuit.Circuit, Voltages) {
	described := supplyOf(polarity, stages, 1e-9)
	described.Bleeders = []chain.Bleeder{bleeder("output", ohms)}
	c := build(described)
	return c, noLoad(c, stages, 1000)
}

// A ladder that bleeds at its top, worked out by hand with equal capacitors C: the
// smoothing column falls alone, C/N, until the topmost diode conducts, and so on. One
// stage: C from 2 to 1, then 2 C. Two stages: C/2 from 4 to 3, C from 3 to 1 (now
// coupling.1 is at ground), then 3C/2; all in units of the drive's peak.
func TestDecayOfLadders(t *testing.T) {
	const r, c = 1e9, 1e-9
	last := math.Log(1000.0 / 60)
	cases := []struct {
		stages int
		want   float64
	}{
		{1, r * c * (math.Ln2 + 2*last)},
		{2, r * c * (math.Log(4.0/3)/2 + math.Log(3) + 1.5*last)},
	}
	for _, w := range cases {
		for _, polarity := range []string{"positive", "negative"} {
			net, from := bledLadder(polarity, w.stages, r)
			d := must(Discharge(net, from, volts60))
			near(t, fmt.Sprint(w.stages, " stages, ", polarity), float64(must(d.Slowest().Lasts())), w.want, 1e-3)
			near(t, "output", float64(must(must(d.Node("output")).Lasts())), w.want, 1e-3)
		}
	}
}

// With the upper diode of one stage open the coupling capacitor keeps its charge.
// With that of the second of two open, worked out by hand in units of the peak: the
// smoothing column falls alone until stage.1 is at 1, half way down; then the lower
// coupling capacitor helps and, 2 C against C, stage.1 and coupling.1 stop at 1/3;
// coupling.2 stands 2 above them for ever.
func TestOpenDiodeLeavesCharge(t *testing.T) {
	cases := []struct {
		stages int
		diode  string
		node   string
		rest   float64
		left   string
	}{
		{1, "multiplier.diode.2", "coupling.1", 1000, "multiplier.coupling_capacitor.1"},
		{2, "multiplier.diode.4", "coupling.2", 7000.0 / 3, "multiplier.coupling_capacitor.2"},
	}
	for _, c := range cases {
		net, from := bledLadder("positive", c.stages, 1e9)
		d := must(Discharge(net.Open(c.diode), from, volts60))
		e := must(d.Node(c.node))
		if !e.Never || d.Slowest().Of != c.node {
			t.Errorf("%d stages: %+v; slowest %+v", c.stages, e, d.Slowest())
		}
		near(t, c.node, float64(e.Rest), c.rest, 1e-4)
		if most := d.MostLeft(); most.Of != c.left || !most.Never {
			t.Errorf("most left: %+v", most)
		}
		_, err := e.Lasts()
		wantLack(t, err, lack.NotReached)
		if must(d.Node("output")).Never {
			t.Error("the output is bled all the same")
		}
	}
}

// What is not permanent does not discharge anything.
func TestOnlyPermanentPathsCount(t *testing.T) {
	described := supplyOf("negative", 2, 1e-9)
	described.Bleeders = []chain.Bleeder{bleeder("output", 1e9)}
	described.Bleeders[0].Permanent.V = false
	described.Loads = []chain.Load{load0("x", "output", 1e-6)}
	described.Multiplier.Diode = &chain.Diode{Leakage: given("leakage", quantity.Current(1e-6)), RatedVoltage: given("rated_voltage", quantity.Voltage(8e3))}
	c := build(described)
	d := must(Discharge(c, noLoad(c, 2, 1000), volts60))
	for _, e := range d.Nodes() {
		if want := e.Of != "drive.source"; e.Never != want {
			t.Errorf("%+v", e)
		}
	}
	near(t, "output", float64(must(d.Node("output")).Rest), -4000, 1e-12)
}

// One of two strings open doubles the time, one of one stops it.
func TestOpenStringOfABleeder(t *testing.T) {
	described := &chain.Chain{Parts: []chain.Part{part("c", "capacitor", "output", "ground", "10 nF")}, Bleeders: []chain.Bleeder{bleeder("output", 1e9)}}
	described.Bleeders[0].Resistor.Strings = given("strings", 2)
	c := build(described)
	both := must(must(Discharge(c, standing(c, 10e3), volts60)).Slowest().Lasts())
	one := must(must(Discharge(c.OpenString("bleeder.1"), standing(c, 10e3), volts60)).Slowest().Lasts())
	near(t, "ratio", float64(one/both), 2, 1e-3)
	if !must(Discharge(c.Open("bleeder.1"), standing(c, 10e3), volts60)).Slowest().Never {
		t.Error("discharged without a bleeder")
	}
}

// A fixed bias is off too: cathode and control electrode go down together.
func TestSourcesAreOff(t *testing.T) {
	described := &chain.Chain{Bias: &chain.Bias{Kind: given("kind", "fixed"), Voltage: given("voltage", quantity.Voltage(300))},
		Parts: []chain.Part{part("c", "capacitor", "output", "ground", "1 nF")}, Bleeders: []chain.Bleeder{bleeder("output", 1e9)}}
	c := build(described)
	v := standing(c, -5000)
	n, _ := c.Node("cathode")
	v[n] = -4700
	d := must(Discharge(c, v, volts60))
	near(t, "cathode", float64(must(must(d.Node("cathode")).Lasts())), math.Log(5000.0/60), 1e-3)
}

// Two capacitors against each other: both nodes are discharged, the capacitor
// between them is not.
func TestCapacitorLeftBetweenDischargedNodes(t *testing.T) {
	c := net(part("a", "capacitor", "x", "y", "10 nF"), part("b", "resistor", "x", "ground", "1 Gohm"), part("c", "resistor", "y", "ground", "1 Gohm"))
	v := make(Voltages, c.Nodes())
	x, _ := c.Node("x")
	y, _ := c.Node("y")
	v[x], v[y] = 50, -50
	for _, e := range must(Discharge(c, v, volts60)).Nodes() {
		if e.Time != 0 || e.Never {
			t.Errorf("node %+v", e)
		}
	}
	all := must(Discharge(c, v, volts60)).Capacitors()
	near(t, "capacitor", float64(must(all[0].Lasts())), 20*math.Log(100.0/60), 1e-3)
}

// A tap that nothing permanent leads to holds no charge: it shows nothing.
func TestTapWithoutPathShowsNothing(t *testing.T) {
	described := supplyOf("negative", 2, 1e-9)
	described.Bleeders = []chain.Bleeder{bleeder("output", 1e9)}
	described.Divider = dividerOf(1e9, 100e3, 0)
	c := build(described)
	from := noLoad(c, 2, 1000)
	n, _ := c.Node("divider.tap")
	from[n] = -0.4
	if e := must(must(Discharge(c, from, volts60)).Node("divider.tap")); e.Start != -0.4 || e.Rest != 0 {
		t.Errorf("%+v", e)
	}
}

// A node can rise again: what counts is the last time it is above the limit. Here the
// filter capacitor is empty at first and is filled through its resistor.
func TestLastTimeCounts(t *testing.T) {
	c := net(part("a", "capacitor", "output", "ground", "10 nF"), part("r", "resistor", "output", "x", "100 Mohm"),
		part("b", "capacitor", "x", "ground", "1 nF"), part("d", "resistor", "x", "ground", "1 Gohm"))
	e := must(must(Discharge(c, standing(c, 10e3), volts60)).Node("x"))
	if e.Start != 0 || e.Time < 10 {
		t.Errorf("%+v", e)
	}
}

// Times scale with resistance and with capacitance.
func TestDecayScales(t *testing.T) {
	base, from := bledLadder("negative", 6, 1e9)
	one := must(must(Discharge(base, from, volts60)).Slowest().Lasts())
	ten, _ := bledLadder("negative", 6, 1e10)
	near(t, "ten times R", float64(must(must(Discharge(ten, from, volts60)).Slowest().Lasts())/one), 10, 1e-3)
	bigger := base.Each(func(e *circuit.Element) bool { e.Capacitance *= 100; return true })
	near(t, "100 times C", float64(must(must(Discharge(bigger, from, volts60)).Slowest().Lasts())/one), 100, 1e-3)
}

func TestHistoryForPlots(t *testing.T) {
	c := storeWith("10 nF", 1e9)
	d := must(Discharge(c, standing(c, 20e3), volts60))
	v := must(d.At("output"))
	if len(v) != len(d.Times) || v[0] != 20e3 {
		t.Fatalf("%d voltages at %d times", len(v), len(d.Times))
	}
	for i, at := range d.Times {
		want := 20e3 * math.Exp(-float64(at)/10)
		if math.Abs(float64(v[i])-want) > 1e-3*want+0.06 {
			t.Errorf("%g s: %g V, want %g", at, v[i], want)
		}
	}
}

func TestDischargeFailsClosed(t *testing.T) {
	described := supplyOf("positive", 2, 1e-9)
	described.Multiplier.SmoothingCapacitor.Dielectric = given("dielectric", "X7R")
	described.Multiplier.SmoothingCapacitor.ValueAtVoltage.Key = "multiplier.smoothing_capacitor.value_at_voltage"
	c := build(described)
	_, err := Discharge(c, noLoad(c, 2, 1000), volts60)
	wantLack(t, err, lack.Missing, "multiplier.smoothing_capacitor.value_at_voltage")
	_, err = Short(c, noLoad(c, 2, 1000), "output")
	wantLack(t, err, lack.Missing, "multiplier.smoothing_capacitor.value_at_voltage")
	_, err = Energy(c, noLoad(c, 2, 1000))
	wantLack(t, err, lack.Missing, "multiplier.smoothing_capacitor.value_at_voltage")
}

// The work of a decay grows little with the number of stages.
func TestWorkOfADecay(t *testing.T) {
	for _, stages := range []int{6, 12, 60} {
		c, from := bledLadder("negative", stages, 1e9)
		d := must(Discharge(c, from, volts60))
		if d.Work.Steps > 400+20*stages || d.Work.Factorisations > 8*d.Work.Steps {
			t.Errorf("%d stages: %+v", stages, d.Work)
		}
		t.Logf("%d stages: %+v", stages, d.Work)
	}
}

func BenchmarkDischarge(b *testing.B) {
	for _, stages := range []int{6, 12, 60} {
		c, from := bledLadder("negative", stages, 1e9)
		b.Run(fmt.Sprint(stages), func(b *testing.B) {
			for range b.N {
				must(Discharge(c, from, volts60))
			}
		})
	}
}
