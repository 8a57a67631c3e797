package network

import (
	"fmt"
	"math"
	"testing"

	"kilovet/hv/chance"
	"kilovet/hv/circuit"

	"pgregory.net/rapid"
)

// decade draws a value evenly over decades.
func decade(t *rapid.T, name string, low, high float64) float64 {
	return math.Pow(10, rapid.Float64Range(math.Log10(low), math.Log10(high)).Draw(t, name))
}

// drawLadder draws a ladder with anything that a description may hold about it.
func drawLadder(t *rapid.T) string {
	pick := func(name string, words ...string) string { return rapid.SampledFrom(words).Draw(t, name) }
	maybe := func(name string, low, high float64) float64 {
		if rapid.Bool().Draw(t, "no "+name) {
			return 0
		}
		return decade(t, name, low, high)
	}
	f := decade(t, "frequency", 1, 1e7)
	c := decade(t, "capacitance", 1e-11, 1e-6)
	l := ladder{
		stages: rapid.IntRange(1, 4).Draw(t, "stages"), topology: pick("topology", "half-wave", "symmetrical"),
		polarity: pick("polarity", "positive", "negative"), drive: pick("drive", "sine", "square"),
		frequency: f, peak: decade(t, "peak", 100, 1e4), capacitance: c,
		resistance: math.Min(1e9, maybe("source resistance", 1e-4, 1)/(f*c)), inductor: math.Min(1e3, maybe("source inductance", 1e-4, 1)/(f*f*c*40)),
		current: math.Min(99, maybe("load", 1e-6, 1)*f*c*100), drop: maybe("drop", 0.1, 50), on: math.Min(1e9, maybe("on-resistance", 1e-6, 0.1)/(f*c)),
		junction: maybe("junction", 1e-5, 1e-1) * c, leakage: fmt.Sprintf("%g A", math.Min(1, maybe("leakage", 1e-9, 1e-3)*f*c*1000)),
	}
	if rapid.Bool().Draw(t, "filter") {
		l.more = fmt.Sprintf("[[filter]]\nresistor = { value = \"%g ohm\" }\ncapacitor = { value = \"%g F\" }\nbypass_capacitance = \"%g F\"\n",
			decade(t, "filter resistance", 1e3, 1e9), decade(t, "filter capacitance", 1e-12, 1e-7), maybe("bypass", 1e-14, 1e-11))
		l.more += fmt.Sprintf("[[load]]\nname = \"out\"\nat = \"output\"\nresistance = \"%g ohm\"\n", decade(t, "load resistance", 1e6, 1e12))
	}
	return l.describe()
}

// fault draws what may go wrong with one element.
func fault(t *rapid.T, c *circuit.Circuit) *circuit.Circuit {
	name := rapid.SampledFrom(names(c)).Draw(t, "element")
	switch rapid.SampledFrom([]string{"none", "open", "short", "reverse"}).Draw(t, "fault") {
	case "open":
		return c.Open(name)
	case "short":
		return c.Short(name)
	case "reverse":
		return c.Reverse(name)
	}
	return c
}

func names(c *circuit.Circuit) []string {
	var list []string
	for i := range c.Elements {
		list = append(list, c.Elements[i].Name)
	}
	return list
}

// Any ladder with any single fault ends in a balanced state or in a lack, after
// bounded work.
func TestAnyLadder(t *testing.T) {
	chance.Check(t, func(t *rapid.T) { checkAny(t) })
}

// FuzzAnyLadder is the same under the fuzzer: go test -fuzz FuzzAnyLadder ./ripple/network
func FuzzAnyLadder(f *testing.F) {
	f.Fuzz(rapid.MakeFuzz(checkAny))
}

func checkAny(t *rapid.T) {
	c := fault(t, buildFor(t, drawLadder(t)))
	p, err := Steady(c, Options{})
	if err != nil {
		t.Logf("%v", err)
		return
	}
	if p.Work.Periods > 1200 || p.Work.Steps > 60000+ringingPeriods*p.Work.ringing(diodes(c)) {
		t.Errorf("work %+v", p.Work)
	}
	for n := range c.Nodes() {
		if s, err := p.At(circuit.Node(n)); err == nil && !(finite([]float64{float64(s.Mean), float64(s.Least), float64(s.Greatest)}) && s.Least <= s.Mean+1e-6*s.Peak() && s.Mean <= s.Greatest+1e-6*s.Peak()) {
			t.Errorf("%v: %+v", c.Labels(circuit.Node(n)), s)
		}
	}
	taken, given, swings := 0.0, 0.0, 0.0
	for _, name := range names(c) {
		current, err := p.Through(name)
		if err != nil {
			return // impulses
		}
		if open := p.jump(p.branches(p.index(name), true), 0); math.Abs(open) > 1e-6*float64(current.RMS)*float64(p.Period()) {
			return // the end of the period leaves open what this current is
		}
		w := float64(p.Power(name))
		taken, given = taken+w, given+math.Abs(w)
		swings += float64(p.Across(name).Peak()) * float64(current.Peak)
	}
	// Of the energy that swings each step may lose the square of the roughness it is allowed.
	lost := float64(len(p.track.steps)) * math.Pow(fine.bounds().rough, 2)
	if math.Abs(taken) > 1e-4*given+p.rounding()+lost*swings {
		t.Errorf("power %g W left of %g W, %g VA swing (%+v)", taken, given, swings, p.Work)
	}
}

// inRounding is the part of the power that swings to and fro that is lost in resonance.
const inRounding = 1e-12

// A circuit that is all but in resonance, without resistance to speak of, swings kilovolts
// from a source of 100 V: of the voltamperes that swing less than a part in a million
// million is left over.
func TestPowerBalancesInResonance(t *testing.T) {
	const f, c, peak = 100, 0.75e-6, 100
	l := ladder{stages: 1, polarity: "positive", frequency: f, peak: peak, capacitance: c, inductor: 3.32, on: 0.18, junction: c / 10, current: 8.6e-7, leakage: "5 uA",
		more: "[[filter]]\nresistor = { value = \"1 Gohm\" }\ncapacitor = { value = \"1.4 pF\" }\nbypass_capacitance = \"0 F\"\n[[load]]\nname = \"out\"\nat = \"output\"\nresistance = \"1 Mohm\"\n"}
	p, err := Steady(buildFor(t, l.describe()).Short("multiplier.diode.1"), Options{})
	if err != nil {
		t.Fatal(err)
	}
	const omega = 2 * math.Pi * f
	want := peak / math.Abs(1-omega*omega*3.32*c) // of a series circuit without loss: E/(1 − ω²LC)
	got := float64(p.Across("multiplier.coupling_capacitor.1").Peak())
	if math.Abs(got/want-1) > 1e-3 {
		t.Errorf("%g V across the capacitor, want %g V", got, want)
	}
	taken := 0.0
	for _, name := range names(p.Circuit) {
		taken += float64(p.Power(name))
	}
	if swings := got * got * omega * c; math.Abs(taken) > inRounding*swings {
		t.Errorf("%g W left of %g VA", taken, swings)
	}
}

func diodes(c *circuit.Circuit) int {
	n := 0
	for i := range c.Elements {
		if c.Elements[i].Kind == circuit.Diode {
			n++
		}
	}
	return n
}
