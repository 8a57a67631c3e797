package network

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
)

// Any loaded ladder found swiftly from the state of one whose values are up to a tenth other,
// the last slight correction carried through the period, is the same as where the period is
// walked again or, where those two differ, as the state found with no haste, which is the truth
// of the three: potentials to a part in fifty thousand of the largest, means of
// the diodes' currents to a thousandth of the largest and what the part in a million to which a
// swift state is known would carry, peaks to a hundredth of their own and, for what hardly
// conducts, a ten-thousandth of the largest.
func TestAnyCarriedThroughIsAsWalkedOn(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		whole, err := Steady(buildFor(t, drawLadder(t)), Options{Most: 5000})
		if err != nil {
			return
		}
		other := times(whole.Circuit, func(_ int, name string) float64 { return rapid.Float64Range(0.9, 1.1).Draw(t, name) })
		carried, err := foundSwiftly(t, other, whole, slight)
		walked, err2 := foundSwiftly(t, other, whole, 0)
		if err2 != nil {
			return
		}
		if err != nil {
			t.Fatalf("not reached where it is carried through: %v", err)
		}
		beside := carried.beside(walked)
		if len(beside) == 0 {
			return
		}
		exact, err := Steady(other, Options{})
		if err != nil || len(carried.beside(exact)) > 0 {
			t.Errorf("%s", strings.Join(beside, "\n"))
		}
	})
}

// times is a circuit whose elements have so many times their values; they are counted from zero.
func times(c *circuit.Circuit, factor func(n int, name string) float64) *circuit.Circuit {
	n := 0
	return c.Each(func(e *circuit.Element) bool {
		f := factor(n, e.Name)
		n++
		e.Capacitance *= quantity.Capacitance(f)
		e.Resistance *= quantity.Resistance(f)
		e.Current *= quantity.Current(f)
		return true
	})
}

func foundSwiftly(t interface{ Fatal(...any) }, c *circuit.Circuit, near *Periodic, slight float64) (*Periodic, error) {
	o := Options{From: near, Swift: true}
	s, err := compile(c, &o)
	if err != nil {
		t.Fatal(err)
	}
	h := o.search(s)
	h.slight = slight
	return h.solve(o.similar())
}

// beside is where a state is beside another.
func (p *Periodic) beside(other *Periodic) (list []string) {
	volts, amps, peak := extents(other)
	known := 0.0
	for _, c := range other.track.capacitors {
		known = math.Max(known, 1e-6*volts*c.value/other.track.period)
		if amps*other.track.period < 1e-5*c.value*volts {
			return nil // it hangs on next to nothing
		}
	}
	for n := range other.Circuit.Nodes() {
		a, err := other.At(circuit.Node(n))
		if err != nil {
			continue
		}
		b, _ := p.At(circuit.Node(n))
		if off := max(b.Mean-a.Mean, a.Mean-b.Mean, b.PeakToPeak()-a.PeakToPeak(), a.PeakToPeak()-b.PeakToPeak()); off > quantity.Voltage(2e-5*volts)+p.Uncertainty {
			list = append(list, fmt.Sprintf("%v: %v, not %v", other.Circuit.Labels(circuit.Node(n)), b, a))
		}
	}
	for i := range other.Circuit.Elements {
		e := &other.Circuit.Elements[i]
		if _, impulse := other.Through(e.Name); e.Kind != circuit.Diode || impulse != nil {
			continue
		}
		a, b := other.Diode(e.Name), p.Diode(e.Name)
		if math.Abs(float64(b.Mean-a.Mean)) > 1e-3*amps+known || math.Abs(float64(b.Peak-a.Peak)) > 0.01*float64(a.Peak)+1e-3*amps+1e-4*peak {
			list = append(list, fmt.Sprintf("%s: %v, not %v (%v)", e.Name, b, a, p.Work))
		}
	}
	return list
}

// extents are the largest potential, and the largest mean current and peak of a diode.
func extents(p *Periodic) (volts, amps, peak float64) {
	for n := range p.Circuit.Nodes() {
		if s, err := p.At(circuit.Node(n)); err == nil {
			volts = math.Max(volts, float64(s.Peak()))
		}
	}
	for i := range p.Circuit.Elements {
		if e := &p.Circuit.Elements[i]; e.Kind == circuit.Diode {
			d := p.Diode(e.Name)
			amps, peak = math.Max(amps, float64(d.Mean)), math.Max(peak, float64(d.Peak))
		}
	}
	return volts, amps, peak
}
