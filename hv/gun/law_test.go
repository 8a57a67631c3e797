package gun_test

import (
	"fmt"
	"math"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/hv/gun"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// reporter is what a test and a property share.
type reporter interface {
	Helper()
	Errorf(format string, args ...any)
}

// near fails unless got is within a relative tolerance of want.
func near[Q ~float64](t reporter, what string, got, want Q, tolerance float64) {
	t.Helper()
	if !(math.Abs(float64(got-want)) <= tolerance*math.Abs(float64(want))) {
		t.Errorf("%s: got %.9g, want %.9g within %g", what, got, want, tolerance)
	}
}

// lacking fails unless err is a lack of the kind.
func lacking(t reporter, what string, err error, kind lack.Kind) {
	t.Helper()
	if l := lack.Of(err); l == nil || l.Kind != kind {
		t.Errorf("%s: got %v, want a lack of kind %d", what, err, kind)
	}
}

func ExampleLaw_SelfBias() {
	law, _ := gun.New(420, 2, 900e-6)
	point, _ := law.SelfBias(4.7e6)
	fmt.Printf("%s of bias, %s of emission, loop gain %.1f\n", quantity.Text(point.Bias), quantity.Text(point.Emission), point.LoopGain())
	// Output: 306.9 V of bias, 65.29 µA of emission, loop gain 5.4
}

func TestLawAtItsEnds(t *testing.T) {
	law, err := gun.New(420, 2, 900e-6)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "no bias", law.At(0), 900e-6, 1e-12)
	near(t, "half the cutoff", law.At(210), 225e-6, 1e-12)
	for _, bias := range []quantity.Voltage{420, 421, 1e5} {
		if i := law.At(bias); i != 0 {
			t.Errorf("at %v V, at or past cutoff: %v A", bias, i)
		}
	}
	if i := law.At(420 * (1 - 1e-9)); !(i > 0 && i < 1e-20) {
		t.Errorf("just below cutoff the emission must be nearly gone, got %v", i)
	}
}

func TestLawRefusesWhatItDoesNotKnow(t *testing.T) {
	nan := quantity.Voltage(math.NaN())
	for what, make := range map[string]func() error{
		"no cutoff":             func() error { _, err := gun.New(0, 2, 1e-4); return err },
		"NaN":                   func() error { _, err := gun.New(nan, 2, 1e-4); return err },
		"exponent below 1":      func() error { _, err := gun.New(420, 0.5, 1e-4); return err },
		"no emission":           func() error { _, err := gun.New(420, 2, 0); return err },
		"reading at cutoff":     func() error { _, err := gun.Through(420, 2, 420, 1e-5); return err },
		"reading past cutoff":   func() error { _, err := gun.Through(420, 2, 500, 1e-5); return err },
		"negative bias":         func() error { _, err := gun.Through(420, 2, -1, 1e-5); return err },
		"more than the cathode": func() error { _, err := gun.ThroughLimited(420, 2, 300, 1e-4, 1e-4); return err },
	} {
		lacking(t, what, make(), lack.Outside)
	}
}

// A law made through a reading gives the reading back, limit or not.
func TestThroughAReading(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		cutoff := rapid.Float64Range(1, 1e4).Draw(t, "cutoff")
		exponent := rapid.Float64Range(1, 4).Draw(t, "exponent")
		bias := quantity.Voltage(cutoff * rapid.Float64Range(0, 0.999).Draw(t, "bias"))
		emission := quantity.Current(rapid.Float64Range(1e-9, 1e-2).Draw(t, "emission"))
		limit := emission * quantity.Current(rapid.Float64Range(1.001, 100).Draw(t, "limit"))
		law, err := gun.ThroughLimited(quantity.Voltage(cutoff), exponent, bias, emission, limit)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "emission at the reading's bias", law.At(bias), emission, 1e-9)
		ratio, err := law.Ratio(bias, emission)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "ratio", ratio, 1, 1e-9)
	})
}

// The cathode's limit caps: never above either law, 0.933 where they are equal,
// and no trace of it well below.
func TestLimitOfTheCathode(t *testing.T) {
	free, _ := gun.New(420, 2, 1e-3)
	for _, c := range []struct {
		limit quantity.Current
		share float64 // of the lesser of the two
		to    float64
	}{{4e-3, 1, 1e-6}, {1e-3, math.Pow(2, -0.1), 1e-12}, {2.5e-4, 1, 1e-6}} {
		law, err := free.Limited(c.limit)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "capped", law.ZeroBias(), min(c.limit, 1e-3)*quantity.Current(c.share), c.to)
		if i := law.ZeroBias(); i > c.limit || i > 1e-3 {
			t.Errorf("%v A passes both limits", i)
		}
	}
	_, err := free.Limited(0)
	lacking(t, "a cold cathode", err, lack.Outside)
}

// Both laws hold at the operating point, whatever the gun.
func TestSelfBiasHoldsBothLaws(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		law, err := gun.New(
			quantity.Voltage(math.Pow(10, rapid.Float64Range(0, 4).Draw(t, "log cutoff"))),
			rapid.Float64Range(1, 5).Draw(t, "exponent"),
			quantity.Current(math.Pow(10, rapid.Float64Range(-8, 0).Draw(t, "log emission"))))
		if err != nil {
			t.Fatal(err)
		}
		limit := quantity.Current(math.Inf(1))
		if rapid.Bool().Draw(t, "limited") {
			limit = quantity.Current(math.Pow(10, rapid.Float64Range(-9, 1).Draw(t, "log limit")))
			law, _ = law.Limited(limit)
		}
		resistor := quantity.Resistance(math.Pow(10, rapid.Float64Range(0, 13).Draw(t, "log resistor")))
		p, err := law.SelfBias(resistor)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "load line", float64(p.Bias), float64(resistor)*float64(p.Emission), 1e-9)
		near(t, "bias and headroom", p.Bias+p.Headroom, law.Cutoff(), 1e-9)
		if p.Headroom > 1e-3*law.Cutoff() { // nearer to cutoff Vc − Vb loses its digits in the difference
			near(t, "emission law", p.Emission, law.At(p.Bias), 1e-9)
		}
		if p.Bias > 1e-3*law.Cutoff() && p.Emission < 0.9*limit {
			back, err := law.ResistorFor(p.Emission)
			if err != nil {
				t.Fatal(err)
			}
			near(t, "the resistor back", back, resistor, 1e-6)
		}
	})
}

// The exact solution for n = 1 is a divider, for n = 2 a quadratic.
func TestSelfBiasAgainstClosedForms(t *testing.T) {
	const cutoff, i0 = 400.0, 1e-3
	for _, r := range []float64{1, 1e3, 1e5, 4e6, 1e9, 1e12} {
		line, _ := gun.New(cutoff, 1, i0)
		p, err := line.SelfBias(quantity.Resistance(r))
		if err != nil {
			t.Fatal(err)
		}
		near(t, "n = 1", float64(p.Emission), 1/(1/i0+r/cutoff), 1e-11)
		square, _ := gun.New(cutoff, 2, i0)
		if p, err = square.SelfBias(quantity.Resistance(r)); err != nil {
			t.Fatal(err)
		}
		k := r * i0 / cutoff // k u² + u − 1 = 0 with u = 1 − Vb/Vc
		u := 2 / (1 + math.Sqrt(1+4*k))
		near(t, "n = 2", float64(p.Emission), i0*u*u, 1e-11)
		near(t, "headroom", float64(p.Headroom), cutoff*u, 1e-11)
	}
}

func TestMoreResistorLessEmission(t *testing.T) {
	law, _ := gun.New(420, 1.5, 900e-6)
	law, _ = law.Limited(300e-6)
	last, _ := law.SelfBias(0)
	near(t, "no resistor, no bias", last.Emission, law.ZeroBias(), 1e-12)
	for r := 1e2; r < 1e16; r *= 3 {
		p, err := law.SelfBias(quantity.Resistance(r))
		if err != nil {
			t.Fatal(err)
		}
		if !(p.Emission < last.Emission && p.Emission > 0 && p.Bias > last.Bias && p.Bias <= law.Cutoff()) {
			t.Fatalf("at %g ohm: %v after %v", r, p, last)
		}
		last = p
	}
	_, err := law.SelfBias(-1)
	lacking(t, "a negative resistor", err, lack.Outside)
}

func TestWhatTheGunCannotGive(t *testing.T) {
	law, _ := gun.New(420, 2, 900e-6)
	for _, i := range []quantity.Current{0, -1e-6, 901e-6, quantity.Current(math.NaN())} {
		_, err := law.ResistorFor(i)
		lacking(t, fmt.Sprint(i), err, lack.Outside)
	}
	bias, err := law.BiasFor(900e-6)
	if err != nil || bias != 0 {
		t.Errorf("the zero-bias emission is reached without bias: %v, %v", bias, err)
	}
}

// The cutoff is a fixed share of the working voltage and K stays, so that the
// emission at a proportional bias goes with the n-th power.
func TestCutoffGoesWithVoltage(t *testing.T) {
	law, _ := gun.New(420, 1.5, 900e-6)
	up, err := law.AtVoltage(1.5)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "cutoff", up.Cutoff(), 630, 1e-12)
	near(t, "emission", up.At(450), law.At(300)*quantity.Current(math.Pow(1.5, 1.5)), 1e-12)
	_, err = law.AtVoltage(0)
	lacking(t, "no voltage", err, lack.Outside)
}
