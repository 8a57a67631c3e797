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

// Charge and energy of single capacitors as published, stored and through a short.
func TestPublishedCapacitors(t *testing.T) {
	cases := []struct {
		source         string
		c              string
		u              quantity.Voltage
		charge, energy float64
		tolerance      float64
	}{
		{"university physics worked example 17-9, a defibrillator", "80 uF", 2500, 0.2, 250, 1e-9},
		{"physics textbook, question 63", "10 uF", 9000, 0.09, 405, 1e-9},
		{"physics textbook problem, 40 J on 8 µF", "8 uF", 3160, 25.3e-3, 40, 2e-3},
		{"account of a 20 kV pulse bank", "20 nF", 20e3, 400e-6, 4, 1e-9},
		{"Mitolo, Electrical Safety of Low-Voltage Systems, p. 221", "1 uF", 10e3, 10e-3, 50, 1e-9},
		{"product-safety list, 2013, on IEC 61010-1", "4.4 uF", 80, 352e-6, 14.08e-3, 1e-9},
		{"IEC 60335-1 8.1.4, 0.1 µF at 450 V is 45 µC", "0.1 uF", 450, 45e-6, 10.125e-3, 1e-9},
	}
	for _, c := range cases {
		net := storeWith(c.c, 1e9)
		near(t, c.source+": stored", float64(must(Energy(net, standing(net, c.u)))), c.energy, c.tolerance)
		d := must(Short(net, standing(net, -c.u), "output"))
		near(t, c.source+": charge", float64(d.Charge), c.charge, c.tolerance)
		near(t, c.source+": energy", float64(d.Energy), c.energy, c.tolerance)
	}
}

// A ladder of N stages with equal capacitors at no load holds C Vp² (4N − 3/2)
// (derived); a short at its top lets all of it out.
func TestLadderEnergy(t *testing.T) {
	for _, polarity := range []string{"positive", "negative"} {
		for _, n := range []int{1, 2, 3, 6, 12} {
			c := build(supplyOf(polarity, n, 1e-9))
			from := noLoad(c, n, 1000)
			want := 1e-9 * 1e6 * (4*float64(n) - 1.5)
			near(t, fmt.Sprint(n, " stages stored"), float64(must(Energy(c, from))), want, 1e-12)
			near(t, fmt.Sprint(n, " stages released"), float64(must(Short(c, from, "output")).Energy), want, 1e-6)
		}
	}
}

// One stage, by hand: at the top S at 2 Vp and, through the upper diode, P at Vp; at
// the coupling node P alone, the upper diode blocking; at the drive nothing.
func TestShortsOfOneStage(t *testing.T) {
	c := build(supplyOf("negative", 1, 1e-9))
	from := noLoad(c, 1, 1000)
	for node, want := range map[string][2]float64{"output": {3e-6, 2.5e-3}, "coupling.1": {1e-6, 0.5e-3}, "drive": {0, 0}, "ground": {0, 0}} {
		d := must(Short(c, from, node))
		near(t, node+": charge", float64(d.Charge), want[0], 1e-6)
		near(t, node+": energy", float64(d.Energy), want[1], 1e-6)
	}
}

// Two stages, shorted at stage.1, by hand in units of C, Vp and the diodes' common
// resistance. stage.1 falls from 2 to 0 and takes stage.2 from 4 to 2 with it. Then
// x, the potential of coupling.1, drives diode 2 and y, that of coupling.2 above
// stage.2, drives diode 4: x' = −x − y, y' = −x − 3y from 1 and 1, with the rates
// 2 ± √2, until y is 0. The charge diode 4 has passed by then stays in stage.2.
func TestShortInsideALadder(t *testing.T) {
	fast, slow := 2+math.Sqrt2, 2-math.Sqrt2
	a := fast / (2 * math.Sqrt2)
	until := math.Log(a/(a-1)) / (fast - slow)
	passed := a*(1-math.Exp(-fast*until))/fast + (1-a)*(1-math.Exp(-slow*until))/slow
	left := ((2+passed)*(2+passed) + (2-passed)*(2-passed)) / 2
	c := build(supplyOf("positive", 2, 1e-9))
	d := must(Short(c, noLoad(c, 2, 1000), "stage.1"))
	// S1 brings 2, diode 2 the 1 of P1 less what diode 4 passed, and S2 that again.
	near(t, "energy", float64(d.Energy), 1e-3*(6.5-left), 1e-4)
	near(t, "charge", float64(d.Charge), 3e-6, 1e-4)
}

// Through a filter all gets out, through resistors or not: charge is what stood to
// ground, loads take nothing, the supply's capacitor too.
func TestShortThroughAFilter(t *testing.T) {
	described := &chain.Chain{Parts: []chain.Part{part("c", "capacitor", "multiplier", "ground", "2 nF")}, Bleeders: []chain.Bleeder{bleeder("output", 1e3)},
		Filters: []chain.Filter{{Resistor: resistor("r", 1e6), Capacitor: capacitor(1e-9), BypassCapacitance: given("b", quantity.Capacitance(0.5e-12))}},
		Cable:   &chain.Cable{Length: given("l", quantity.Length(1)), Capacitance: given("c", quantity.LinearCapacitance(100e-12)), GunEndResistor: resistor("g", 47e3)}}
	c := build(described)
	v := make(Voltages, c.Nodes())
	for _, name := range []string{"multiplier", "supply", "output"} {
		n, _ := c.Node(name)
		v[n] = 10e3
	}
	for _, node := range []string{"multiplier", "supply", "output"} {
		d := must(Short(c, v, node))
		near(t, node+": charge", float64(d.Charge), 3.1e-9*10e3, 1e-6)
		near(t, node+": energy", float64(d.Energy), 3.1e-9*1e8/2, 1e-6)
	}
}

// A fixed bias stays: shorted at the cathode, the control electrode still stands
// 300 V below it, and its capacitance stays charged.
func TestFixedBiasIsKeptInAShort(t *testing.T) {
	described := &chain.Chain{Bias: &chain.Bias{Kind: given("kind", "fixed"), Voltage: given("voltage", quantity.Voltage(300))},
		Parts: []chain.Part{part("c", "capacitor", "output", "ground", "1 nF")}}
	c := build(described)
	v := standing(c, -5000)
	n, _ := c.Node("cathode")
	v[n] = -4700
	d := must(Short(c, v, "cathode"))
	near(t, "charge", float64(d.Charge), 4.7e-6, 1e-9)
	near(t, "energy", float64(d.Energy), 1e-9*(25e6-0.09e6)/2, 1e-9)
}

// With the loads off the tap of a divider hangs on nothing.
func TestShortOfATap(t *testing.T) {
	described := supplyOf("negative", 1, 1e-9)
	described.Divider = dividerOf(1e9, 100e3, 0)
	c := build(described)
	if d := must(Short(c, noLoad(c, 1, 1000), "divider.tap")); d.Charge != 0 || d.Energy != 0 {
		t.Errorf("%+v", d)
	}
}

// Voltages scale: charge in proportion, energy as the square.
func TestShortsScale(t *testing.T) {
	c := build(supplyOf("positive", 4, 1e-9))
	for _, node := range []string{"stage.2", "coupling.3", "output"} {
		one, ten := must(Short(c, noLoad(c, 4, 1000), node)), must(Short(c, noLoad(c, 4, 10e3), node))
		near(t, node+": charge", float64(ten.Charge/one.Charge), 10, 1e-4)
		near(t, node+": energy", float64(ten.Energy/one.Energy), 100, 1e-4)
	}
}

// What a short delivers does not rest on how quick the chain is: with resistances a
// thousandth as large, those of the diodes among them, all happens a thousand times as fast
// and the same charge passes (derived), though stray capacitors then share theirs in less
// than the shortest step that ideal diodes ask for.
func TestShortsOfAQuickChain(t *testing.T) {
	of := func(ohms quantity.Resistance, node string) Delivered {
		described := supplyOf("positive", 6, 20e-12)
		described.Multiplier.StrayToGround = given("s", quantity.Capacitance(1e-12))
		described.Filters = []chain.Filter{{Resistor: resistor("r", ohms), Capacitor: capacitor(10e-12)}}
		c := build(described)
		return must(Short(c, noLoad(c, 6, 1000), node))
	}
	for _, node := range []string{"coupling.1", "coupling.3", "stage.2", "output"} {
		slow, quick := of(1000, node), of(1, node)
		near(t, node+": charge", float64(quick.Charge), float64(slow.Charge), 5e-4)
		near(t, node+": energy", float64(quick.Energy), float64(slow.Energy), 5e-4)
	}
}

func TestStoresNameTheirParts(t *testing.T) {
	c := build(supplyOf("negative", 2, 1e-9))
	stores := Stores(c, noLoad(c, 2, 1000))
	if len(stores) != 4 || stores[0].Element != "multiplier.coupling_capacitor.1" {
		t.Fatalf("%+v", stores)
	}
	near(t, "coupling 1", float64(stores[0].Energy), 0.5e-3, 1e-12)
	near(t, "coupling 2", float64(stores[1].Voltage), -2000, 1e-12)
}

// Potentials stay with their names when an edit numbers the nodes anew.
func TestCarry(t *testing.T) {
	c := build(supplyOf("negative", 2, 1e-9))
	v := noLoad(c, 2, 1000)
	edited := c.Short("multiplier.diode.1").Join("new", "output", "elsewhere")
	carried := v.Carry(c, edited)
	for name, want := range map[string]quantity.Voltage{"coupling.2": -3000, "stage.1": -2000, "elsewhere": -4000, "ground": 0} {
		n, there := edited.Node(name)
		if !there || carried[n] != want {
			t.Errorf("%s: %g V, want %g", name, carried[n], want)
		}
	}
}

func TestShortOfAnUnknownNode(t *testing.T) {
	c := build(supplyOf("negative", 2, 1e-9))
	_, err := Short(c, noLoad(c, 2, 1000), "nowhere")
	wantLack(t, err, lack.NotReached)
}

func TestResidue(t *testing.T) {
	m := supplyOf("negative", 6, 1e-9).Multiplier
	_, err := Residue(m)
	wantLack(t, err, lack.Missing, "multiplier.diode.forward_drop")
	m.Diode = &chain.Diode{ForwardDrop: given("multiplier.diode.forward_drop", quantity.Voltage(12))}
	near(t, "six stages of 12 V", float64(must(Residue(m))), 132, 1e-12)
	_, err = Residue(nil)
	wantLack(t, err, lack.Missing, "multiplier")
}

func BenchmarkShort(b *testing.B) {
	c := circuit.Build(supplyOf("negative", 6, 1e-9), circuit.Setting{})
	from := noLoad(c, 6, 1000)
	for range b.N {
		must(Short(c, from, "output"))
	}
}

// A ladder of either polarity or topology delivers the same at its mirrored nodes,
// never more energy than it holds, and at most all of its charge.
func TestShortsOfAnyLadder(t *testing.T) {
	for _, topology := range []string{"half-wave", "symmetrical"} {
		described := supplyOf("positive", 3, 1e-9)
		described.Multiplier.Topology = given("topology", topology)
		described.Drive.Resistance = given("resistance", quantity.Resistance(900))
		described.Drive.Inductance = given("inductance", quantity.Inductance(1e-3))
		up := build(described)
		described.Multiplier.Polarity = given("polarity", "negative")
		down := build(described)
		held := float64(must(Energy(up, noLoad(up, 3, 1000))))
		for n := 1; n < up.Nodes(); n++ {
			node := up.Labels(circuit.Node(n))[0]
			one, other := must(Short(up, noLoad(up, 3, 1000), node)), must(Short(down, noLoad(down, 3, 1000), node))
			if one.Charge != 0 || other.Charge != 0 {
				near(t, topology+" "+node+": charge", float64(other.Charge), float64(one.Charge), 1e-9)
				near(t, topology+" "+node+": energy", float64(other.Energy), float64(one.Energy), 1e-9)
			}
			if one.Energy < 0 || float64(one.Energy) > held*(1+1e-9) {
				t.Errorf("%s %s releases %g J of %g J", topology, node, one.Energy, held)
			}
		}
	}
}
