package network

import (
	"fmt"
	"math"
	"testing"

	"kilovet/hv/circuit"
)

// ladder describes a half-wave ladder of equal capacitors with a constant current.
type ladder struct {
	stages               int
	topology, drive      string
	polarity             string
	frequency, peak      float64
	resistance, inductor float64
	capacitance, current float64
	drop, on, junction   float64
	leakage, more        string
}

func (l ladder) describe() string {
	if l.topology == "" {
		l.topology = "half-wave"
	}
	if l.drive == "" {
		l.drive = "sine"
	}
	if l.leakage == "" {
		l.leakage = "0 A"
	}
	if l.polarity == "" {
		l.polarity = "positive"
	}
	text := fmt.Sprintf("format = 1\n[drive]\nwaveform = %q\nfrequency = \"%g Hz\"\npeak = \"%g V\"\nresistance = \"%g ohm\"\ninductance = \"%g H\"\n", l.drive, l.frequency, l.peak, l.resistance, l.inductor)
	text += fmt.Sprintf("[multiplier]\ntopology = %q\npolarity = %q\nstages = %d\ncoupling_capacitor = { value = \"%g F\" }\nsmoothing_capacitor = { value = \"%g F\" }\n", l.topology, l.polarity, l.stages, l.capacitance, l.capacitance)
	text += fmt.Sprintf("diode = { forward_drop = \"%g V\", resistance = \"%g ohm\", capacitance = \"%g F\", leakage = %q, rated_voltage = \"1 kV\" }\npickup_to_output = \"0 F\"\n", l.drop, l.on, l.junction, l.leakage)
	if l.current > 0 {
		text += fmt.Sprintf("[[load]]\nname = \"load\"\nat = \"multiplier\"\ncurrent = \"%g A\"\n", l.current)
	} else if l.more == "" {
		text += "[[load]]\nname = \"load\"\nat = \"multiplier\"\nresistance = \"100 Tohm\"\n"
	}
	return text + l.more
}

// In the limit of narrow pulses the network is the charge balance: drop of the mean
// 2n³/3 + n²/2 + n/3 and ripple n(n+1)/2 times I/(fC) (half-wave), n³/6 + n²/4 + n/3
// and n/2 (symmetrical). Derived; the mean drop is that of Abdel-Salam's doubler for
// n = 1. The conduction angle, and with it the difference, shrinks as the root of
// the load, so from one load to a hundredth it falls to a tenth.
func TestNarrowPulses(t *testing.T) {
	for _, topology := range []string{"half-wave", "symmetrical"} {
		for n := 1; n <= 12; n++ {
			drop, ripple := 2*math.Pow(float64(n), 3)/3+float64(n*n)/2+float64(n)/3, float64(n*(n+1))/2
			if topology == "symmetrical" {
				drop, ripple = math.Pow(float64(n), 3)/6+float64(n*n)/4+float64(n)/3, float64(n)/2
			}
			var last float64
			for k, q := range []float64{1e-3, 1e-5} { // I/(fC) over the peak
				l := ladder{stages: n, topology: topology, frequency: 50e3, peak: 1000, capacitance: 1e-9, current: q * 1000 * 50e3 * 1e-9, on: 1e-3}
				p, err := Steady(build(t, l.describe()), Options{})
				if err != nil {
					t.Errorf("%s, %d stages, q/C = %g of the peak: %v", topology, n, q, err)
					continue
				}
				s, err := p.At(node(t, p.Circuit, "multiplier"))
				if err != nil {
					t.Fatal(err)
				}
				unit := q * 1000
				off := math.Abs((2000*float64(n)-float64(s.Mean))/unit/drop - 1)
				off = math.Max(off, math.Abs(float64(s.PeakToPeak())/unit/ripple-1))
				if off > []float64{0.1, 0.01}[k] || k == 1 && off > last/5 {
					t.Errorf("%s, %d stages: off the narrow-pulse limit by %.3g at q/C = %g of the peak (before %.3g)", topology, n, off, q, last)
				}
				last = off
			}
		}
	}
}

// Every diode passes the charge of the load, and what the sources give is what the
// elements take.
func TestBalances(t *testing.T) {
	for _, r := range references(t) {
		p := steady(t, build(t, r.describe()))
		var load, all, in float64
		for _, l := range p.Losses() {
			all += float64(l.Power)
			if l.Element.Role == circuit.Load {
				load = float64(l.Power)
			}
		}
		in = float64(p.InputPower())
		if math.Abs(all-in) > 1e-6*in || load <= 0 {
			t.Errorf("%s: %.9g W in, %.9g W taken (%.2g)", r.ID, in, all, all/in-1)
		}
		for i := range p.Circuit.Elements {
			e := &p.Circuit.Elements[i]
			if f, err := p.Through(e.Name); e.Kind == circuit.Capacitor && (err != nil || math.Abs(float64(f.Mean)) > 1e-7*float64(f.RMS)) {
				t.Errorf("%s: %s carries a mean current of %g A (%v)", r.ID, e.Name, f.Mean, err)
			}
		}
	}
}

// A diode that hangs on an ideal source alone still passes only what its other end
// takes: a coupling capacitor shorted, and nothing in series with the source.
func TestDiodeOnTheSource(t *testing.T) {
	for _, drive := range []string{"sine", "square"} {
		l := ladder{stages: 1, drive: drive, frequency: 10, peak: 100, capacitance: 1e-6, current: 1e-4, drop: 5, on: 1e3}
		c := build(t, l.describe()).Short("multiplier.coupling_capacitor.1")
		p := steady(t, c)
		near(t, drive+" mean current of the diode", float64(p.Diode("multiplier.diode.2").Mean), 1e-4, 1e-6)
		s, err := p.At(node(t, c, "multiplier"))
		if err != nil || s.Mean < 70 || s.Greatest > 95 {
			t.Errorf("%s: a rectifier at 100 V less 5 V gives %+v (%v)", drive, s, err)
		}
		taken, given := 0.0, 0.0
		for i := range c.Elements {
			w := float64(p.Power(c.Elements[i].Name))
			taken, given = taken+w, given+math.Abs(w)
		}
		if math.Abs(taken) > 1e-6*given {
			t.Errorf("%s: %g W of %g W left", drive, taken, given)
		}
	}
}
