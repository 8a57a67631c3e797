package cascade

import (
	"math"
	"math/cmplx"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/hv/quantity"
)

// An independent Fourier integral, over pieces between the pulses by the midpoint
// rule, must give the closed coefficients.
func TestHarmonicsAgainstNumericalIntegral(t *testing.T) {
	for _, kind := range kinds {
		c := unit(4)
		c.Symmetrical, c.Square = kind.symmetrical, kind.square
		w := c.climb(1).Ripple
		for k := 1; k <= 6; k++ {
			const points = 20000
			var sum complex128
			for i := range points {
				x := (float64(i) + 0.5) / points
				sum += complex(float64(w.At(quantity.Time(x))), 0) * cmplx.Exp(complex(0, -2*math.Pi*float64(k)*x))
			}
			want := 2 * sum / points
			if d := cmplx.Abs(w.Harmonic(k) - want); d > 2e-6*float64(w.PeakToPeak()) {
				t.Errorf("%s, harmonic %d: %g, want %g", kind.name, k, w.Harmonic(k), want)
			}
		}
	}
}

// Summing the harmonics gives the wave-form back, away from the jumps.
func TestHarmonicsResynthesise(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		c := anyCascade(t)
		w := c.climb(anyLoad(t, c)).Ripple
		const count = 4000
		list := w.Harmonics(count)
		x := rapid.SampledFrom([]float64{0.06, 0.25, 0.41, 0.58, 0.75, 0.93}).Draw(t, "part of a period")
		var sum float64
		for k, p := range list {
			sum += real(p * cmplx.Exp(complex(0, 2*math.Pi*float64(k+1)*x)))
		}
		if want := float64(w.At(quantity.Time(x) * w.Period)); math.Abs(sum-want) > 1e-3*float64(w.PeakToPeak()) {
			t.Errorf("%g, want %g", sum, want)
		}
	})
}

// Parseval: the squares of the harmonics sum to the mean square, which for straight
// pieces is (a² + ab + b²)/3 each.
func TestHarmonicsHoldThePower(t *testing.T) {
	for _, kind := range kinds {
		c := unit(5)
		c.Symmetrical, c.Square = kind.symmetrical, kind.square
		w := c.climb(1).Ripple
		var sum float64
		for k := 1; k <= 20000; k++ {
			a := float64(w.Amplitude(k))
			sum += a * a / 2
		}
		p, q, r, s := w.corners()
		m := w.mean()
		square := func(a, b quantity.Voltage) float64 { return float64(a*a+a*b+b*b) / 6 }
		near(t, kind.name, sum, square(p-m, q-m)+square(r-m, s-m), 1e-4)
	}
}

// Equal capacitors, sine drive: fundamental n² q/(π C), second harmonic n q/(2π C);
// symmetrical: nothing at f, n q/(2 π C) at 2f.
func TestFundamentalAndSecondHarmonic(t *testing.T) {
	for n := 1; n <= 12; n++ {
		c, x := unit(n), float64(n)
		w := c.climb(1).Ripple
		near(t, "fundamental", float64(w.Amplitude(1)), x*x/math.Pi, 1e-12)
		near(t, "second", float64(w.Amplitude(2)), x/(2*math.Pi), 1e-9)
		c.Symmetrical = true
		w = c.climb(1).Ripple
		if a := w.Amplitude(1); a > 1e-12 {
			t.Errorf("symmetrical: %g at the drive frequency", a)
		}
		near(t, "symmetrical, second", float64(w.Amplitude(2)), x/2/math.Pi, 1e-12)
	}
}

// The wave-form jumps up at the positive peak of the drive, so that its fundamental
// follows the drive by a quarter period.
func TestPhaseReference(t *testing.T) {
	w := unit(1).climb(1).Ripple
	near(t, "phase", cmplx.Phase(w.Harmonic(1)), -math.Pi/2, 1e-12)
	near(t, "just after the pulse", float64(w.At(0)), float64(w.PeakToPeak())/2, 1e-12)
	near(t, "a period later", float64(w.At(1)), float64(w.At(0)), 1e-12)
	near(t, "before the first", float64(w.At(-0.25)), float64(w.At(0.75)), 1e-12)
}

func TestHarmonicZeroIsAMistake(t *testing.T) {
	defer func() {
		if recover() == nil {
			t.Error("no panic")
		}
	}()
	Waveform{}.Harmonic(0)
}
