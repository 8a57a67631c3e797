package steady

import (
	"fmt"
	"math"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chain"
	"kilovet/hv/chance"
	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
)

// randomStores is a net of capacitors, resistors and diodes with some initial potentials.
func randomStores(r *rapid.T) (*circuit.Circuit, Voltages) {
	names := []string{"ground"}
	described := &chain.Chain{}
	add := func(kind, value, from, to string) {
		p := part(fmt.Sprint(kind[:1], len(described.Parts)), kind, from, to, value)
		if kind == "diode" {
			p = diode(fmt.Sprint("d", len(described.Parts)), from, to, 5, 10)
		}
		described.Parts = append(described.Parts, p)
	}
	farads := rapid.SampledFrom([]string{"1 pF", "47 pF", "1 nF", "100 nF"})
	ohms := rapid.SampledFrom([]string{"22 ohm", "47 kohm", "10 Mohm", "4 Gohm"})
	for i := range rapid.IntRange(1, 7).Draw(r, "nodes") {
		name := fmt.Sprint("n", i)
		add("capacitor", farads.Draw(r, "farads"), name, rapid.SampledFrom(names).Draw(r, "to"))
		names = append(names, name)
	}
	for range rapid.IntRange(0, 8).Draw(r, "more") {
		from, to := rapid.SampledFrom(names).Draw(r, "from"), rapid.SampledFrom(names).Draw(r, "to")
		if rapid.Bool().Draw(r, "diode") {
			add("diode", "", from, to)
		} else {
			add("resistor", ohms.Draw(r, "ohms"), from, to)
		}
	}
	c := build(described)
	v := make(Voltages, c.Nodes())
	for _, name := range names[1:] {
		n, _ := c.Node(name)
		v[n] = quantity.Voltage(rapid.Float64Range(-20e3, 20e3).Draw(r, "v"))
	}
	return c, v
}

// A net left to itself loses energy or keeps it, comes to rest, and at rest no diode
// has forward voltage and no resistor any.
func TestRundownComesToRest(t *testing.T) {
	chance.Check(t, func(r *rapid.T) {
		c, from := randomStores(r)
		d := must(Discharge(c, from, volts60))
		before := float64(must(Energy(c, from)))
		last := d.history[len(d.history)-1]
		if after := float64(must(Energy(c, last))); after > before*(1+1e-9) {
			r.Fatalf("%g J became %g J", before, after)
		}
		for _, e := range c.Elements {
			v := float64(last.across(&e))
			if e.Kind == circuit.Resistor && math.Abs(v) > 1 || e.Kind == circuit.Diode && v > 1 {
				r.Fatalf("%s is left with %g V", e.Name, v)
			}
		}
		if d.Work.Steps > 3000 {
			r.Fatalf("%+v", d.Work)
		}
	})
}

// A short never delivers more energy than is stored, and what it leaves is at rest.
func TestShortDeliversWhatIsThere(t *testing.T) {
	chance.Check(t, func(r *rapid.T) {
		c, from := randomStores(r)
		stored := float64(must(Energy(c, from)))
		for n := 1; n < c.Nodes(); n++ {
			d := must(Short(c, from, c.Labels(circuit.Node(n))[0]))
			if e := float64(d.Energy); e < -1e-7*stored || e > stored*(1+1e-7) {
				r.Fatalf("%g J of %g J", e, stored)
			}
		}
	})
}
