package plan_test

import (
	"math"
	"os"
	"strings"
	"testing"

	"kilovet/hv/chain"
	"kilovet/hv/lack"
	"kilovet/rules/evidence"
	"kilovet/rules/plan"
)

const instruments = `
[[instrument]]
name = "bench probe"
at = "output"
resistance = "1 Gohm"
accuracy = "2 %"
[[instrument]]
name = "return ammeter"
reads = "return current"
accuracy = "1 %"
`

func described(t testing.TB, name, more string) *evidence.Evidence {
	t.Helper()
	data, err := os.ReadFile("../../testdata/chains/" + name + ".toml")
	if err != nil {
		t.Fatal(err)
	}
	c, faults := chain.Read(append(data, more...))
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	return evidence.New(c)
}

func planned(t testing.TB, e *evidence.Evidence) *plan.Plan {
	t.Helper()
	p, err := plan.Of(e)
	if err != nil {
		t.Fatal(err)
	}
	return p
}

func near(t *testing.T, what string, got, want, share float64) {
	t.Helper()
	if math.Abs(got-want) > share*math.Abs(want) {
		t.Errorf("%s: %g, want %g", what, got, want)
	}
}

// What the instruments show by hand, at full drive without the gun: the meter stands
// on 100 kohm ∥ 10 Mohm ∥ 90 Gohm (the clamp's leakage) below 2000 Mohm; the return
// carries what bleeder (1 Gohm at the supply end of 94 kohm), divider and probe draw.
func TestReadingsByHand(t *testing.T) {
	p := planned(t, described(t, "column", instruments))
	s := p.Steps[4]
	if s.Share != 1 || s.Gun != plan.Apart {
		t.Fatalf("step 5 is %s", s.Name)
	}
	volts := -float64(s.Output)
	lower := 1 / (1/100e3 + 1/10e6 + 1/90e9)
	near(t, "meter", s.Readings[0].Value, volts*lower/(2000e6+lower), 1e-9)
	near(t, "probe", s.Readings[1].Value, volts, 1e-9)
	through := volts/(2000e6+lower) + volts/1e9
	supply := volts + through*94e3
	near(t, "return", s.Readings[2].Value, through+supply/1e9, 1e-6)
}

// The probe loads: of its 20 µA the 4.094 Mohm before it make 81 V, the ladder the rest.
func TestInstrumentsLoadTheChain(t *testing.T) {
	bare, loaded := planned(t, described(t, "column", "")), planned(t, described(t, "column", instruments))
	less := math.Abs(float64(bare.Steps[4].Output)) - math.Abs(float64(loaded.Steps[4].Output))
	if series := float64(loaded.Steps[4].Output) / -1e9 * 4.094e6; less < series || less > 2*series {
		t.Errorf("the probe costs %g V, the series resistors alone %g V", less, series)
	}
}

// Every band holds its own value and the corners it was made of.
func TestBandsHoldTheirValues(t *testing.T) {
	for _, s := range planned(t, described(t, "column", instruments)).Steps {
		for _, r := range s.Readings {
			if !r.Holds(r.Value) || r.Holds(0.9*r.Low) || r.Holds(1.1*r.High) {
				t.Errorf("%s, %s: %+v", s.Name, r.Instrument, r.Band)
			}
		}
	}
}

// The drive goes up step by step and no step is above what the chain works with.
func TestStepsClimb(t *testing.T) {
	e := described(t, "column", "")
	p := planned(t, e)
	top, err := e.Peak()
	if err != nil {
		t.Fatal(err)
	}
	last := p.Steps[len(p.Steps)-1]
	if last.Gun != plan.Lit || last.Peak != top {
		t.Errorf("the last step is %s at %g V, want the gun lit at %g V", last.Name, last.Peak, top)
	}
	for i, s := range p.Steps[:5] {
		if i > 0 && s.Peak <= p.Steps[i-1].Peak || s.Peak > top || s.Gun != plan.Apart {
			t.Errorf("%s at %g V", s.Name, s.Peak)
		}
	}
}

// What is not described is left open and said, never planned on a guess.
func TestWhatIsOpenIsSaid(t *testing.T) {
	c, faults := chain.Read([]byte(`format = 1
[drive]
frequency = "30 kHz"
peak = "1 kV"
[multiplier]
polarity = "positive"
stages = 2
coupling_capacitor = { value = "1 nF" }
smoothing_capacitor = { value = "1 nF" }
[[load]]
name = "detector"
at = "output"
current = "5 uA"
`))
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	p := planned(t, evidence.New(c))
	open := strings.Join(p.Open, "\n")
	for _, want := range []string{"earth bonds", "readings", "trips"} {
		if !strings.Contains(open, want+":") {
			t.Errorf("%s is not said to be open in %q", want, open)
		}
	}
	if len(p.Steps) != 5 || p.Steps[0].Gun != plan.None {
		t.Errorf("%d steps", len(p.Steps))
	}
	if _, err := plan.Of(described(t, "plate", "")); lack.Of(err) == nil {
		t.Errorf("a plan without a supply: %v", err)
	}
}

// An insulation test takes the highest voltage that the part bears; what an ohmmeter
// reads is left to the ohmmeter.
func TestVoltagesOfColdTests(t *testing.T) {
	for rating, want := range map[string]string{"5 kV": "insulation tester at 5 kV", "60 V": "insulation tester at 500 V"} {
		e := rated(t, rating)
		for _, c := range planned(t, e).Cold {
			switch {
			case c.What == "divider.upper" && !strings.HasPrefix(c.With, want):
				t.Errorf("ten elements of %s are measured with %s, want %s", rating, c.With, want)
			case c.What == "bias.resistor" && c.With != "ohmmeter":
				t.Errorf("the bias resistor is measured with %s", c.With)
			}
		}
	}
}

// rated is the built-in example with another rating of the divider's upper elements.
func rated(t *testing.T, rating string) *evidence.Evidence {
	t.Helper()
	data, err := os.ReadFile("../../testdata/chains/column.toml")
	if err != nil {
		t.Fatal(err)
	}
	const was = `count = 10, rated_voltage = "5 kV"`
	text := strings.Replace(string(data), was, `count = 10, rated_voltage = "`+rating+`"`, 1)
	c, faults := chain.Read([]byte(text))
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	return evidence.New(c)
}

// Nobody waits for less than the description says, nor for less than is computed.
func TestTheWaitIsTheLonger(t *testing.T) {
	for _, c := range []struct{ described, want string }{{"90 s", "Wait the 90 s described"}, {"1 s", "Wait at least "}} {
		data, err := os.ReadFile("../../testdata/chains/column.toml")
		if err != nil {
			t.Fatal(err)
		}
		text := strings.Replace(string(data), `waiting_time    = "90 s"`, `waiting_time    = "`+c.described+`"`, 1)
		chain, faults := chain.Read([]byte(text))
		if len(faults) > 0 {
			t.Fatal(faults)
		}
		if after := strings.Join(planned(t, evidence.New(chain)).After, "\n"); !strings.Contains(after, c.want) {
			t.Errorf("with %s: %s", c.described, after)
		}
	}
}

// What is not there is not spoken of: no gun, no meter; and what is not known is no value.
func TestAPlanSpeaksOfWhatIsThere(t *testing.T) {
	const bare = `format = 1
[drive]
frequency = "30 kHz"
peak = "1 kV"
[multiplier]
polarity = "positive"
stages = 2
coupling_capacitor = { value = "1 nF" }
smoothing_capacitor = { value = "1 nF" }
[protection]
over_voltage = { trip = "4.5 kV", senses = "second divider", acts_on = "drive supply" }
`
	for text, wants := range map[string][]string{
		bare: {"No meter is described that would show the fall"},
		strings.Replace(bare, `coupling_capacitor = { value = "1 nF" }`, `coupling_capacitor = { value = "1 nF", dielectric = "X7R" }`, 1): {"what is not known: X7R"},
	} {
		c, faults := chain.Read([]byte(text))
		if len(faults) > 0 {
			t.Fatal(faults)
		}
		p := planned(t, evidence.New(c))
		said := strings.Join(append(append(p.Takes, p.Stops...), p.After...), "\n") + p.Trips[0].Working
		for _, want := range wants {
			if !strings.Contains(said, want) {
				t.Errorf("%q is not said in %s", want, said)
			}
		}
		for _, not := range []string{"disconnected gun", "pressure above"} {
			if strings.Contains(said, not) {
				t.Errorf("%q is said", not)
			}
		}
	}
}
