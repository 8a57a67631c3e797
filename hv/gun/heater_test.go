package gun_test

import (
	"math"
	"testing"

	"kilovet/hv/gun"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Derived: 2 V rms, 100 and 101 ohm leave 4.975 mV; one leg as return leaves 1 V
// rms, 2.83 V peak to peak.
func TestTipSwing(t *testing.T) {
	v, err := gun.TipSwing(2, 100, 101)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "1 % apart", float64(v), 4.975124e-3, 1e-6)
	v, _ = gun.TipSwing(2, 100, 100)
	if v != 0 {
		t.Errorf("equal resistors leave nothing, got %v", v)
	}
	near(t, "pp with one leg as return", float64(gun.TipSwingReturn(2))*2*math.Sqrt2, 2.828427, 1e-6)
	v, _ = gun.TipSwing(2, 1e-6, 100)
	near(t, "one resistor shorted is a return", float64(v), 1, 1e-6)
	v, _ = gun.TipSwingTolerance(2, 100, 100, 0.01)
	near(t, "tolerance of 1 % on both", float64(v), 10e-3, 1e-9)
	_, err = gun.TipSwing(2, 0, 100)
	lacking(t, "no resistor", err, lack.Outside)
	_, err = gun.TipSwingTolerance(2, 100, 100, 1)
	lacking(t, "100 % tolerance", err, lack.Outside)
}

// tungsten is a wire at 2700 K.
func tungsten(t *testing.T, diameter quantity.Length) gun.Wire {
	t.Helper()
	w, err := gun.TungstenWire(diameter, 2700)
	if err != nil {
		t.Fatal(err)
	}
	return w
}

// Derived with material data from memory: 1.70 A for 100 µm and 2.38 A for 125 µm
// at 2700 K. The published 2.7 A for a 100 µm hairpin (TESCAN, read) is for legs
// that cool: the long-wire law must stay a third below it.
func TestLongWire(t *testing.T) {
	i, err := tungsten(t, 100e-6).Current()
	if err != nil {
		t.Fatal(err)
	}
	near(t, "100 um", float64(i), 1.70, 0.01)
	if float64(i) > 0.7*2.7 {
		t.Errorf("%v A: a long wire needs less than the hairpin it is not", i)
	}
	thick, _ := tungsten(t, 125e-6).Current()
	near(t, "125 um", float64(thick), 2.38, 0.01)
	near(t, "the 3/2 power of the diameter", float64(thick/i), math.Pow(1.25, 1.5), 1e-9)
	_, err = gun.Wire{}.Current()
	lacking(t, "no wire", err, lack.Outside)
}

// Emissivities read on a topic page of ultrafine tungsten filaments: 0.23 at
// 1700 K, 0.31 at 2500 K; d ln I/d ln T of the long wire is 1.63 (derived).
func TestTungstenWire(t *testing.T) {
	for kelvin, want := range map[quantity.Temperature]float64{1700: 0.23, 2500: 0.31} {
		w, err := gun.TungstenWire(1e-4, kelvin)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "emissivity", w.Emissivity, want, 0.05)
	}
	hot, _ := gun.TungstenWire(1e-4, 2750)
	cool, _ := gun.TungstenWire(1e-4, 2650)
	up, _ := hot.Current()
	down, _ := cool.Current()
	near(t, "d ln I/d ln T", math.Log(float64(up/down))/math.Log(2750.0/2650), 1.63, 0.06)
	for _, kelvin := range []quantity.Temperature{1499, 3001} {
		_, err := gun.TungstenWire(1e-4, kelvin)
		lacking(t, "beyond the table", err, lack.Outside)
	}
}

// Derived: ±12.96 K at 50 Hz and 0.0324 K at 20 kHz for 125 µm at 2700 K; with the
// emitter's 21 that is ±10 % of a temperature-limited emission.
func TestTemperatureSwing(t *testing.T) {
	w := tungsten(t, 125e-6)
	slow, err := w.TemperatureSwing(50)
	if err != nil {
		t.Fatal(err)
	}
	fast, _ := w.TemperatureSwing(20e3)
	near(t, "50 Hz", float64(slow), 12.9575, 0.01)
	near(t, "20 kHz", float64(fast), 0.0324, 0.01)
	s, _ := gun.Tungsten().Sensitivity(2700)
	near(t, "of the emission", float64(slow)/2700*s, 0.1024, 0.01)
	_, err = w.TemperatureSwing(0)
	lacking(t, "direct current has no swing to ask for", err, lack.Outside)
	s, _ = gun.Tungsten().ToHeaterCurrent(2700)
	near(t, "to the heating current (derived)", s, 13, 0.02)
}

// Thermal noise across a capacitance is kT/C whatever the resistor; feedback
// cools it.
func TestNoiseAcrossTheBias(t *testing.T) {
	law, _ := gun.Through(230, 2, 200, 100e-6)
	p, _ := law.SelfBias(2e6)
	gain := p.LoopGain()
	v, err := p.ResistorNoise(1e-9, 300)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "resistor", float64(v), math.Sqrt(1.380649e-23*300/1e-9/(1+gain)), 1e-9)
	shot, err := p.ShotNoise(1e-9)
	if err != nil {
		t.Fatal(err)
	}
	// Against the spectrum summed by hand: 2eI |Z'|², Z' = R'/(1 + jωR'C).
	r, sum := 2e6/(1+gain), 0.0
	for df, f := 0.5, 0.25; f < 4e6; f += df {
		w := 2 * math.Pi * f * r * 1e-9
		sum += 2 * gun.ElementaryCharge * 100e-6 * r * r / (1 + w*w) * df
	}
	near(t, "shot", float64(shot), math.Sqrt(sum), 1e-3)
	_, err = p.ShotNoise(0)
	lacking(t, "no capacitance", err, lack.Missing)
	_, err = p.AtFixedBias().ResistorNoise(1e-9, 300)
	lacking(t, "no resistor", err, lack.Missing)
	_, err = p.ResistorNoise(1e-9, 0)
	lacking(t, "0 K", err, lack.Outside)
}

// 1.9 V and 2.4 A (derived).
func TestHotResistance(t *testing.T) {
	near(t, "V/I", float64(gun.HotResistance(1.9, 2.4)), 0.7916667, 1e-6)
}
