package steady

import (
	"fmt"
	"math"
	"testing"

	"gonum.org/v1/gonum/mat"

	"kilovet/hv/chain"
	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
)

// brute is a second, plain way to let a circuit run down: every node's potential
// followed by explicit Euler steps, v' = −C⁻¹ (G v + diodes), with diodes of a small
// resistance. It needs capacitance at every node and very many steps.
type brute struct {
	c       *circuit.Circuit
	inverse [][]float64 // of the nodal capacitances
	diode   float64     // ohm
	pinned  circuit.Node
	v, i    []float64
	charge  float64 // through the pinned node to ground, capacitors apart
}

func bruteOf(c *circuit.Circuit, from Voltages, pinned circuit.Node, diode float64) *brute {
	b := &brute{c: c, pinned: pinned, diode: diode, v: make([]float64, c.Nodes()), i: make([]float64, c.Nodes())}
	m := mat.NewDense(c.Nodes(), c.Nodes(), nil)
	for n := range from {
		b.v[n] = float64(from[n])
		if b.held(circuit.Node(n)) {
			m.Set(n, n, 1)
		}
	}
	for _, e := range c.Elements {
		if e.Kind == circuit.Capacitor {
			for _, end := range [][2]circuit.Node{{e.From, e.To}, {e.To, e.From}} {
				if !b.held(end[0]) {
					m.Set(int(end[0]), int(end[0]), m.At(int(end[0]), int(end[0]))+float64(e.Capacitance))
					m.Set(int(end[0]), int(end[1]), m.At(int(end[0]), int(end[1]))-float64(e.Capacitance))
				}
			}
		}
	}
	var inverse mat.Dense
	if err := inverse.Inverse(m); err != nil {
		panic(err)
	}
	for n := range from {
		b.inverse = append(b.inverse, mat.Row(nil, n, &inverse))
		for k := range from {
			if b.held(circuit.Node(n)) || b.held(circuit.Node(k)) {
				b.inverse[n][k] = 0
			}
		}
	}
	return b
}

func (b *brute) held(n circuit.Node) bool {
	drive, _ := b.c.Node("drive")
	return n == 0 || n == drive || n == b.pinned
}

// step moves on by h.
func (b *brute) step(h float64) {
	clear(b.i)
	for k := range b.c.Elements {
		e := &b.c.Elements[k]
		v, g := b.v[e.From]-b.v[e.To], 0.0
		if e.Kind == circuit.Resistor {
			g = 1 / float64(e.Resistance)
		}
		if e.Kind == circuit.Diode && v > 0 {
			g = 1 / b.diode
		}
		b.i[e.From] -= g * v
		b.i[e.To] += g * v
	}
	b.charge += h * b.i[b.pinned]
	for n, row := range b.inverse {
		for k, i := range b.i {
			b.v[n] += h * row[k] * i
		}
	}
}

func (b *brute) stored(at circuit.Node) (energy, charge float64) {
	for _, e := range b.c.Elements {
		u := b.v[e.From] - b.v[e.To]
		if e.Kind != circuit.Capacitor {
			continue
		}
		energy += float64(e.Capacitance) * u * u / 2
		if e.From == at {
			charge += float64(e.Capacitance) * u
		}
		if e.To == at {
			charge -= float64(e.Capacitance) * u
		}
	}
	return energy, charge
}

// uneven is a ladder of unequal capacitors with strays and a filter.
func uneven(polarity string) (*circuit.Circuit, Voltages) {
	c := supplyOf(polarity, 3, 1e-9)
	c.Multiplier.CouplingCapacitor = &chain.Capacitor{Value: given("v", []quantity.Capacitance{1.3e-9, 0.7e-9, 2.1e-9})}
	c.Multiplier.SmoothingCapacitor = &chain.Capacitor{Value: given("v", []quantity.Capacitance{0.9e-9, 1.7e-9, 0.6e-9})}
	c.Multiplier.StrayBetweenColumns = given("s", quantity.Capacitance(20e-12))
	c.Multiplier.StrayToGround = given("s", quantity.Capacitance(30e-12))
	c.Filters = []chain.Filter{{Resistor: resistor("r", 100e3), Capacitor: capacitor(400e-12), BypassCapacitance: given("b", quantity.Capacitance(5e-12))}}
	c.Bleeders = []chain.Bleeder{bleeder("output", 1e6)}
	net := build(c)
	return net, noLoad(net, 3, 1000)
}

// Every node of an uneven ladder shorted in turn: charge and energy as by brute force.
func TestShortsAgainstBruteForce(t *testing.T) {
	net, from := uneven("positive")
	unloaded := net.Each(func(e *circuit.Element) bool { return e.Role != circuit.Load })
	for _, node := range []string{"coupling.1", "coupling.2", "coupling.3", "stage.1", "stage.2", "stage.3", "output"} {
		n, _ := net.Node(node)
		got := must(Short(net, from, node))
		before, standing := bruteOf(unloaded, from, n, 500).stored(n)
		b := bruteOf(unloaded, redistributed(unloaded, from, n), n, 500)
		for step := range 30000 {
			b.step(math.Min(5e-9+2e-11*float64(step), 150e-9))
		}
		after, left := b.stored(n)
		near(t, node+": energy", float64(got.Energy), before-after, 3e-3)
		near(t, node+": charge", float64(got.Charge), math.Abs(standing-left+b.charge), 3e-3)
	}
}

// redistributed are the potentials right after a node is pinned to ground, when only
// capacitors have carried charge: C v is kept at every other node.
func redistributed(c *circuit.Circuit, from Voltages, pinned circuit.Node) Voltages {
	b := bruteOf(c, from, pinned, 1)
	charge := make([]float64, c.Nodes())
	for n := range charge {
		if !b.held(circuit.Node(n)) {
			_, charge[n] = b.stored(circuit.Node(n))
		}
	}
	after := make(Voltages, c.Nodes())
	for n := range after {
		for k := range charge {
			after[n] += quantity.Voltage(b.inverse[n][k] * charge[k])
		}
	}
	return after
}

// The decay of the same ladder, whole and with any one diode open: every node's time
// and what stays.
func TestDecaysAgainstBruteForce(t *testing.T) {
	whole, from := uneven("negative")
	for diode := range 7 {
		net, name := whole, "whole"
		if diode > 0 {
			name = fmt.Sprint("multiplier.diode.", diode)
			net = whole.Open(name)
		}
		d := must(Discharge(net, from, volts60))
		b := bruteOf(net, from, 0, 1000)
		lastAbove := make([]float64, net.Nodes())
		const h = 300e-9
		for step := range 80000 {
			b.step(h)
			for n, v := range b.v {
				if math.Abs(v) > volts60 {
					lastAbove[n] = float64(step+1) * h
				}
			}
		}
		for n, e := range d.Nodes() {
			n++
			if e.Never != (math.Abs(b.v[n]) > volts60) || e.Never && math.Abs(float64(e.Rest)-b.v[n]) > 3e-3*math.Abs(b.v[n]) {
				t.Errorf("%s: %+v, by brute force %g V are left", name, e, b.v[n])
			}
			if !e.Never && math.Abs(float64(e.Time)-lastAbove[n]) > 1e-2*lastAbove[n]+1e-5 {
				t.Errorf("%s: %s after %g s, by brute force %g s", name, e.Of, e.Time, lastAbove[n])
			}
		}
	}
}
