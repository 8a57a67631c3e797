package network

import (
	"math"
	"testing"

	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
)

// parts describes loose parts beside a ladder that stays off.
const ladderAside = `
format = 1
[drive]
waveform = "sine"
frequency = "50 kHz"
peak = "1 V"
[multiplier]
polarity = "positive"
stages = 1
coupling_capacitor = { value = "1 nF" }
smoothing_capacitor = { value = "1 nF" }
pickup_to_output = "0 F"
[[load]]
name = "load"
at = "output"
resistance = "1 Mohm"
`

func off(c *circuit.Circuit) *circuit.Circuit {
	return c.Each(func(e *circuit.Element) bool {
		if e.Kind == circuit.Source && e.Wave.Form != circuit.Direct {
			e.Wave.Amplitude = 0
		}
		return e.Kind != circuit.Sink
	})
}

// A capacitor through a resistor: V e^{−t/RC}, down to a limit after R C ln(V/limit).
func TestDecayOfOneCapacitor(t *testing.T) {
	for _, r := range []struct {
		resistor string
		ohms     float64
	}{{"1 kohm", 1e3}, {"1 Mohm", 1e6}, {"100 Tohm", 1e14}} {
		c := off(build(t, ladderAside+`
[[part]]
name = "c"
kind = "capacitor"
from = "x"
to = "ground"
value = "1 nF"
[[part]]
name = "r"
kind = "resistor"
from = "x"
to = "ground"
value = "`+r.resistor+`"
`))
		falls, err := Decay(c, State{volts: map[string]float64{"part.c": -20e3}}, DecayOptions{Nodes: []circuit.Node{node(t, c, "x")}, Below: 60})
		if err != nil {
			t.Fatal(err)
		}
		near(t, r.resistor, float64(falls[0].After), r.ohms*1e-9*math.Log(20e3/60), 1e-5)
		for _, x := range falls[0].Points {
			if x.Time < 10*quantity.Time(r.ohms*1e-9) {
				near(t, r.resistor+" on the way", float64(x.Voltage), -20e3*math.Exp(-float64(x.Time)/(r.ohms*1e-9)), 1e-3)
			}
		}
	}
}

// What nothing discharges is a lack with its voltage.
func TestDecayThatStays(t *testing.T) {
	c := off(build(t, ladderAside+"[[part]]\nname = \"c\"\nkind = \"capacitor\"\nfrom = \"x\"\nto = \"ground\"\nvalue = \"1 nF\"\n"))
	falls, err := Decay(c, State{volts: map[string]float64{"part.c": 5000}}, DecayOptions{Nodes: []circuit.Node{node(t, c, "x"), node(t, c, "multiplier")}, Below: 60})
	if err != nil {
		t.Fatal(err)
	}
	if falls[0].Lack == nil || falls[1].Lack != nil {
		t.Errorf("%v, %v", falls[0].Lack, falls[1].Lack)
	}
}

// Two capacitors through a resistor into an arc: peak V/(R + arc), all charge and energy.
func TestArcOfOneCapacitor(t *testing.T) {
	c := off(build(t, ladderAside+`
[[part]]
name = "c"
kind = "capacitor"
from = "x"
to = "ground"
value = "1 nF"
[[part]]
name = "r"
kind = "resistor"
from = "x"
to = "y"
value = "900 ohm"
`))
	d, err := Arc(c, State{volts: map[string]float64{"part.c": 10e3}}, ArcOptions{From: node(t, c, "y"), Resistance: 100, Hold: 10e-3})
	if err != nil {
		t.Fatal(err)
	}
	peak, err := d.Peak()
	if err != nil {
		t.Fatal(err)
	}
	near(t, "peak", float64(peak), 10, 1e-4)
	near(t, "charge", float64(d.Charge), 10e-6, 1e-4)
	near(t, "energy in the arc", float64(d.Energy), 5e-3, 1e-3)
	near(t, "energy in the resistor", float64(d.Of("part.r").Energy), 45e-3, 1e-3)
	near(t, "time", float64(d.Ceased), 1e-6*math.Log(1000), 0.1)
}

// An ideal short across a capacitor: its charge and energy at once, no peak.
func TestIdealShort(t *testing.T) {
	c := off(build(t, ladderAside+"[[part]]\nname = \"c\"\nkind = \"capacitor\"\nfrom = \"x\"\nto = \"ground\"\nvalue = \"1 nF\"\n"))
	d, err := Arc(c, State{volts: map[string]float64{"part.c": 10e3}}, ArcOptions{From: node(t, c, "x")})
	if err != nil {
		t.Fatal(err)
	}
	near(t, "charge", float64(d.Charge), 10e-6, 1e-9)
	near(t, "energy", float64(d.Energy), 50e-3, 1e-9)
	if _, err := d.Peak(); err == nil {
		t.Error("an ideal short has a peak")
	}
}

// A coil and a capacitor ring at 1/√(LC) and lose their energy in the arc.
func TestArcThroughACoil(t *testing.T) {
	c := off(build(t, ladderAside+`
[[part]]
name = "c"
kind = "capacitor"
from = "x"
to = "ground"
value = "1 nF"
[[part]]
name = "l"
kind = "inductor"
from = "x"
to = "y"
value = "1 mH"
`))
	d, err := Arc(c, State{volts: map[string]float64{"part.c": 10e3}}, ArcOptions{From: node(t, c, "y"), Resistance: 100})
	if err != nil {
		t.Fatal(err)
	}
	// i = V/(ω L) e^{−αt} sin ωt, greatest at tan ωt = ω/α (any book on circuits).
	alpha := 100 / 2e-3
	omega := math.Sqrt(1/(1e-3*1e-9) - alpha*alpha)
	at := math.Atan(omega/alpha) / omega
	peak, _ := d.Peak()
	near(t, "peak", float64(peak), 10e3/(omega*1e-3)*math.Exp(-alpha*at)*math.Sin(omega*at), 1e-4)
	near(t, "energy", float64(d.Energy), 50e-3, 1e-3)
}

// An arc at the cathode of a whole chain, drive on and off: what was stored and what
// the sources give is what the elements take and what is left.
func TestArcBalances(t *testing.T) {
	c := build(t, examples()["6 stages with filter and bias"])
	p := steady(t, c)
	cathode := node(t, c, "cathode")
	at, err := p.Highest(cathode, circuit.Ground)
	if err != nil {
		t.Fatal(err)
	}
	from := p.State(at)
	for _, on := range []bool{true, false} {
		with := c
		if !on {
			with = off(c)
		}
		d, err := Arc(with, from, ArcOptions{From: cathode, Resistance: 10})
		if err != nil {
			t.Fatal(err)
		}
		taken := 0.0
		for i := range d.Circuit.Elements {
			if e := &d.Circuit.Elements[i]; e.Kind != circuit.Capacitor && e.Kind != circuit.Inductor {
				taken += float64(d.Of(e.Name).Energy)
			}
		}
		near(t, "energy given up", float64(d.Held-d.Left), taken, 2e-3)
		if r := d.Of("cable.gun_end_resistor"); float64(r.Peak) < 0.9*20e3/47e3/1.2 {
			t.Errorf("drive on %t: gun-end resistor sees %v", on, r.Peak)
		}
		if d.Burning != on {
			t.Errorf("drive on %t: burning %t after %v", on, d.Burning, d.Ceased)
		}
	}
}

// Flying on from the periodic state without an arc changes nothing.
func TestFlightKeepsThePeriodicState(t *testing.T) {
	for _, r := range references(t) {
		c := build(t, r.describe())
		p := steady(t, c)
		for _, at := range []float64{0, 0.3, 0.77} {
			f, err := newFlight(c, p.State(quantity.Time(at)*p.Period()))
			if err != nil {
				t.Fatal(err)
			}
			if err := f.run(5*float64(p.Period()), func() bool { return false }); err != nil {
				t.Fatal(err)
			}
			want := p.Across("multiplier.smoothing_capacitor.1")
			got := f.ledger.Of("multiplier.smoothing_capacitor.1")
			near(t, r.ID+" least", float64(got.Least), float64(want.Least), 2e-5)
			near(t, r.ID+" greatest", float64(got.Greatest), float64(want.Greatest), 2e-5)
		}
	}
}
