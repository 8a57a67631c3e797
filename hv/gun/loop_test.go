package gun_test

import (
	"math"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/hv/gun"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Worked out once more outside this package (derived, not published): 200 V across
// 2 Mohm at 100 uA, cutoff 230 V.
func TestLoopOfASelfBiasedGun(t *testing.T) {
	for _, c := range []struct{ n, gm, gain, self, fixed float64 }{
		{1.5, 5.0e-6, 10.0, 1.045454, 11.5},
		{2.0, 6.666667e-6, 13.33333, 1.069767, 15.33333},
		{3.5, 11.66667e-6, 23.33333, 1.10274, 26.83333},
	} {
		law, err := gun.Through(230, c.n, 200, 100e-6)
		if err != nil {
			t.Fatal(err)
		}
		p, err := law.SelfBias(2e6)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "bias", p.Bias, 200, 1e-9)
		near(t, "transconductance", float64(p.Transconductance()), c.gm, 1e-6)
		near(t, "loop gain", p.LoopGain(), c.gain, 1e-6)
		s, _ := p.Sensitivities()
		near(t, "to voltage, self-biased", s.Voltage, c.self, 1e-6)
		near(t, "to the resistor", s.Resistor, -c.gain/(1+c.gain), 1e-6)
		s, _ = p.AtFixedBias().Sensitivities()
		near(t, "to voltage, fixed bias", s.Voltage, c.fixed, 1e-6)
		near(t, "to the bias", s.Bias, -c.gain, 1e-6)
	}
}

// The sensitivities are the slopes of the solved points themselves.
func TestSensitivitiesAreSlopes(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		n := rapid.Float64Range(1, 4).Draw(t, "exponent")
		resistor := quantity.Resistance(math.Pow(10, rapid.Float64Range(4, 8).Draw(t, "log resistor")))
		limit := quantity.Current(math.Pow(10, rapid.Float64Range(-5, -2).Draw(t, "log limit")))
		free, err := gun.New(400, n, 1e-3)
		if err != nil {
			t.Fatal(err)
		}
		at := func(volts, r, lim float64) float64 {
			law, _ := free.AtVoltage(volts)
			law, _ = law.Limited(limit * quantity.Current(lim))
			p, _ := law.SelfBias(resistor * quantity.Resistance(r))
			return math.Log(float64(p.Emission))
		}
		law, _ := free.Limited(limit)
		p, err := law.SelfBias(resistor)
		if err != nil {
			t.Fatal(err)
		}
		s, err := p.Sensitivities()
		if err != nil {
			t.Fatal(err)
		}
		const d = 1e-4
		slope := func(up, down float64) float64 { return (up - down) / (math.Log1p(d) - math.Log1p(-d)) }
		for what, pair := range map[string][2]float64{
			"voltage":  {s.Voltage, slope(at(1+d, 1, 1), at(1-d, 1, 1))},
			"resistor": {s.Resistor, slope(at(1, 1+d, 1), at(1, 1-d, 1))},
			"limit":    {s.Limit, slope(at(1, 1, 1+d), at(1, 1, 1-d))},
		} {
			if math.Abs(pair[0]-pair[1]) > 1e-5*(1+math.Abs(pair[1])) {
				t.Errorf("%s: %.8g, slope %.8g", what, pair[0], pair[1])
			}
		}
	})
}

func TestNoEmissionHasNoSensitivity(t *testing.T) {
	law, _ := gun.New(230, 2, 1e-3)
	p, err := law.FixedBias(230)
	if err != nil || p.Emission != 0 || p.Transconductance() != 0 {
		t.Fatalf("at cutoff: %v, %v", p, err)
	}
	_, err = p.Sensitivities()
	lacking(t, "past cutoff", err, lack.Outside)
	_, err = law.FixedBias(-1)
	lacking(t, "negative bias", err, lack.Outside)
}

// Temperature moves the emission fully where it governs, not at all where space
// charge does, and unknown is not nothing.
func TestEmissionAndTemperature(t *testing.T) {
	free, _ := gun.New(230, 2, 1e-3)
	for _, c := range []struct {
		limit quantity.Current
		want  float64
		to    float64
	}{{1e-1, 0, 1e-9}, {1e-6, 21.34, 0.05}} {
		law, _ := free.Limited(c.limit)
		p, _ := law.SelfBias(1e4)
		got, err := p.ToTemperature(gun.Tungsten(), 2700)
		if err != nil || math.Abs(got-c.want) > c.to {
			t.Errorf("limit %v: %v, %v; want %v", c.limit, got, err, c.want)
		}
	}
	p, _ := free.SelfBias(1e4)
	_, err := p.ToTemperature(gun.Tungsten(), 2700)
	lacking(t, "without a limit", err, lack.Missing)
}

func TestRangeOfRegulation(t *testing.T) {
	free, _ := gun.New(230, 2, 1e-3)
	for _, limit := range []quantity.Current{1, 2e-4, 2e-5} {
		law, _ := free.Limited(limit)
		for _, suppression := range []float64{1.1, 2, 11, 100} {
			emission, resistor, err := law.RegulatesTo(suppression)
			if err != nil {
				t.Fatal(err)
			}
			p, _ := law.SelfBias(resistor)
			near(t, "emission", p.Emission, emission, 1e-8)
			near(t, "suppression", 1+p.LoopGain(), suppression, 1e-6)
			further, _ := law.SelfBias(resistor * 2)
			if further.LoopGain() <= p.LoopGain() {
				t.Error("more resistor must regulate better")
			}
		}
	}
	_, _, err := free.RegulatesTo(1)
	lacking(t, "no suppression", err, lack.Outside)
}

func TestBypassEndsTheLoop(t *testing.T) {
	law, _ := gun.Through(230, 2, 200, 100e-6)
	p, _ := law.SelfBias(2e6)
	whole, none, err := p.RegulatesUpTo(1e-9)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "corner", float64(whole), 1/(2*math.Pi*2e-3), 1e-9)
	near(t, "end", float64(none/whole), 14.33333, 1e-6)
	near(t, "suppression far below", p.Suppression(whole/1e4, 1e-9), 14.33333, 1e-6)
	near(t, "suppression far above", p.Suppression(none*1e4, 1e-9), 1, 1e-6)
	if middle := p.Suppression(whole, 1e-9); !(middle > 9 && middle < 12) {
		t.Errorf("at the corner about (1+L)/√2, got %v", middle)
	}
	_, _, err = p.AtFixedBias().RegulatesUpTo(1e-9)
	lacking(t, "no resistor", err, lack.Missing)
}

func TestFeedingTheGun(t *testing.T) {
	v, err := gun.CathodeVoltage(1000, 200, gun.FedControl)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "200 V of 1 kV", v, 800, 1e-12)
	v, _ = gun.CathodeVoltage(1000, 200, gun.FedCathode)
	near(t, "cathode fed", v, 1000, 1e-12)
	_, err = gun.CathodeVoltage(200, 200, gun.FedControl)
	lacking(t, "nothing left", err, lack.Outside)
	near(t, "2 Mohm and 0.1 uA (derived)", gun.EnergyShift(2e6, 0.1e-6), 0.2, 1e-12)
}
