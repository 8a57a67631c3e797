package steady

import (
	"fmt"
	"math"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chain"
	"kilovet/hv/chance"
	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// net is a circuit of loose parts alone.
func net(parts ...chain.Part) *circuit.Circuit { return build(&chain.Chain{Parts: parts}) }

func load0(name, at string, i quantity.Current) chain.Load {
	return chain.Load{Name: given("name", name), At: given("at", at), Current: given("current", i)}
}

// randomNet joins every node to an earlier one, so that all hang together, and adds
// a few more resistors and sinks.
func randomNet(r *rapid.T) *chain.Chain {
	ohms := rapid.SampledFrom([]string{"22 ohm", "47 kohm", "1 Mohm", "4.7 Mohm", "200 Mohm", "8 Gohm", "1 Tohm"})
	names := []string{"ground", "output"}
	c := &chain.Chain{}
	join := func(from, to string) {
		if from != to {
			c.Parts = append(c.Parts, part(fmt.Sprint("r", len(c.Parts)), "resistor", from, to, ohms.Draw(r, "ohms")))
		}
	}
	for i := range rapid.IntRange(1, 8).Draw(r, "nodes") {
		name := fmt.Sprint("n", i)
		join(rapid.SampledFrom(names).Draw(r, "to"), name)
		names = append(names, name)
	}
	for range rapid.IntRange(0, 8).Draw(r, "more") {
		join(rapid.SampledFrom(names).Draw(r, "from"), rapid.SampledFrom(names).Draw(r, "to"))
	}
	for i := range rapid.IntRange(0, 3).Draw(r, "sinks") {
		c.Loads = append(c.Loads, load0(fmt.Sprint("s", i), rapid.SampledFrom(names[1:]).Draw(r, "at"), quantity.Current(rapid.Float64Range(0, 1e-6).Draw(r, "i"))))
	}
	return c
}

// At every node but ground and the one held the currents sum to nothing.
func TestKirchhoff(t *testing.T) {
	chance.Check(t, func(r *rapid.T) {
		c := build(randomNet(r))
		s := must(Held(c, Fixed{"output", 20e3}))
		held, _ := c.Node("output")
		rounding := 10 * s.noise()
		sum, gross := make([]float64, c.Nodes()), make([]float64, c.Nodes())
		for _, e := range c.Elements {
			i, err := s.Current(e.Name)
			if err != nil {
				continue
			}
			sum[e.From] -= float64(i)
			sum[e.To] += float64(i)
			noise := 1e-9 * math.Abs(float64(i))
			if e.Kind == circuit.Resistor {
				noise += rounding / float64(e.Resistance)
			}
			gross[e.From] += noise
			gross[e.To] += noise
		}
		for n := 1; n < c.Nodes(); n++ {
			if circuit.Node(n) != held && math.Abs(sum[n]) > gross[n] {
				r.Fatalf("%v: %g A left over, noise %g A", c.Labels(circuit.Node(n)), sum[n], gross[n])
			}
		}
	})
}

// What the held node delivers is what resistors and sinks take.
func TestPowerBalance(t *testing.T) {
	chance.Check(t, func(r *rapid.T) {
		c := build(randomNet(r))
		s := must(Held(c, Fixed{"output", 20e3}))
		held, _ := c.Node("output")
		taken, noise, rounding := 0.0, 0.0, 10*s.noise()
		for _, e := range c.Elements {
			v, err := s.Across(e.Name)
			if err != nil {
				continue
			}
			p := float64(v) * float64(must(s.Current(e.Name)))
			taken, noise = taken+p, noise+1e-9*math.Abs(p)
			if e.Kind == circuit.Resistor {
				noise += rounding * (20e3 + math.Abs(float64(v))) / float64(e.Resistance)
			}
		}
		if delivered := 20e3 * drawnAt(s, held); math.Abs(delivered-taken) > noise {
			r.Fatalf("delivers %g W, elements take %g W", delivered, taken)
		}
	})
}

func drawnAt(s *State, n circuit.Node) float64 {
	sum := 0.0
	for _, e := range s.Circuit.Elements {
		i, err := s.Current(e.Name)
		if err != nil || e.From == e.To {
			continue
		}
		if e.From == n {
			sum += float64(i)
		}
		if e.To == n {
			sum -= float64(i)
		}
	}
	return sum
}

// The response to a held voltage and sinks is the sum of the responses to each alone.
func TestSuperposition(t *testing.T) {
	chance.Check(t, func(r *rapid.T) {
		c := randomNet(r)
		quiet := *c
		quiet.Loads = nil
		both := must(Held(build(c), Fixed{"output", 20e3}))
		sinks := must(Held(build(c), Fixed{"output", 0}))
		held := must(Held(build(&quiet), Fixed{"output", 20e3}))
		for _, name := range both.Circuit.Names() {
			sum, err := both.Potential(name)
			if err != nil {
				continue
			}
			parts := must(sinks.Potential(name)) + must(held.Potential(name))
			if math.Abs(float64(sum-parts)) > 1e-9*(20e3+math.Abs(float64(parts))) {
				r.Fatalf("%s: %g V together, %g V in parts", name, sum, parts)
			}
		}
	})
}

func TestFloatingNodesAreWantingAndOthersNot(t *testing.T) {
	s := must(Held(net(
		part("a", "resistor", "output", "x", "1 Mohm"), part("b", "resistor", "x", "ground", "1 Mohm"),
		part("c", "capacitor", "output", "y", "1 nF"), part("d", "resistor", "y", "z", "1 Mohm"),
	), Fixed{"output", 1000}))
	near(t, "x", float64(must(s.Potential("x"))), 500, 1e-12)
	for _, node := range []string{"y", "z"} {
		_, err := s.Potential(node)
		wantLack(t, err, lack.NotReached)
	}
	_, err := s.Current("part.d")
	wantLack(t, err, lack.NotReached)
}

// A sink that nothing feeds carries nothing, so it does not load its other end.
func TestSinkWithoutPath(t *testing.T) {
	c := &chain.Chain{Parts: []chain.Part{part("a", "capacitor", "output", "y", "1 nF")}, Loads: []chain.Load{load0("s", "y", 1e-3)}}
	s := must(Held(build(c), Fixed{"output", 1000}))
	if i := s.leaving(s.network.mates(circuit.Ground)); i != 0 {
		t.Errorf("%g A flow", i)
	}
	_, err := s.Current("load.s")
	wantLack(t, err, lack.NotReached)
}

func diode(name, from, to string, drop quantity.Voltage, on quantity.Resistance) chain.Part {
	p := part(name, "diode", from, to, "")
	p.Value = missing[string]("value")
	p.ForwardDrop, p.Resistance = given("forward_drop", drop), given("resistance", on)
	return p
}

func TestDiodeConductsOneWay(t *testing.T) {
	forward := net(diode("d", "output", "x", 10, 1e6), part("r", "resistor", "x", "ground", "9 Mohm"))
	s := must(Held(forward, Fixed{"output", 1000}))
	near(t, "forward: x", float64(must(s.Potential("x"))), 990*0.9, 1e-12)
	near(t, "forward: current", float64(must(s.Current("part.d"))), 99e-6, 1e-12)

	s = must(Held(forward, Fixed{"output", -1000}))
	if v := must(s.Potential("x")); v != 0 {
		t.Errorf("reverse: x at %g V", v)
	}
}

// A blocked diode leaks at its conductance, in both directions.
func TestDiodeLeaks(t *testing.T) {
	d := diode("d", "x", "output", 10, 40)
	d.Leakage, d.RatedVoltage = given("leakage", quantity.Current(1e-6)), given("rated_voltage", quantity.Voltage(1000))
	s := must(Held(net(d, part("r", "resistor", "x", "ground", "1 Gohm")), Fixed{"output", 1000}))
	near(t, "x", float64(must(s.Potential("x"))), 500, 1e-12)
}

// A node that only an idle diode could feed is not known.
func TestIdleDiodeIsNoPath(t *testing.T) {
	s := must(Held(net(diode("d", "output", "x", 0, 0), part("c", "capacitor", "x", "ground", "1 nF")), Fixed{"output", 1000}))
	_, err := s.Potential("x")
	wantLack(t, err, lack.NotReached)
}

// A full bridge on DC: two of four diodes conduct, whichever way round.
func TestBridge(t *testing.T) {
	bridge := net(diode("1", "output", "p", 1, 10), diode("2", "n", "output", 1, 10),
		diode("3", "ground", "p", 1, 10), diode("4", "n", "ground", 1, 10), part("r", "resistor", "p", "n", "980 ohm"))
	for _, v := range []quantity.Voltage{102, -102} {
		s := must(Held(bridge, Fixed{"output", v}))
		near(t, "current", float64(must(s.Current("part.r"))), 0.1, 1e-12)
	}
}

func TestContradictionsAreLacks(t *testing.T) {
	c := net(part("l", "inductor", "output", "x", "1 mH"))
	_, err := Held(c, Fixed{"output", 1000}, Fixed{"x", 500})
	wantLack(t, err, lack.NotReached)
	_, err = Held(c, Fixed{"nowhere", 1})
	wantLack(t, err, lack.NotReached)
	s := must(Held(c, Fixed{"output", 1000}, Fixed{"x", 1000}))
	_, err = s.Current("part.l")
	wantLack(t, err, lack.NotReached)
}

func TestStruckNamesTheGap(t *testing.T) {
	c := net(part("g", "spark gap", "output", "ground", "900 V"), part("h", "spark gap", "output", "ground", "1.1 kV"))
	s := must(Held(c, Fixed{"output", -1000}))
	struck := s.Struck()
	if len(struck) != 1 || struck[0] != (Struck{"part.g", 1000}) {
		t.Errorf("struck: %v", struck)
	}
}

func TestHeaterFloatsOnTheCathode(t *testing.T) {
	c := supplyOf("negative", 1, 1e-9)
	c.Heater = &chain.Heater{Supply: given("supply", "dc"), Voltage: given("voltage", quantity.Voltage(2)),
		CentreResistors: &chain.CentreResistors{Value: given("value", []quantity.Resistance{100, 101})}}
	s := must(Potentials(build(c), Linear(1000, 0)))
	near(t, "heater.a", float64(must(s.Potential("heater.a"))), -1000+2*100.0/201, 1e-12)
	near(t, "heater.b", float64(must(s.Potential("heater.b"))), -1000-2*101.0/201, 1e-12)
}
