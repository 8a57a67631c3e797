package beam

import (
	"fmt"
	"math"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

func gaussian(t interface{ Fatal(...any) }, rms float64) Distribution {
	d, err := GaussianFWHM(quantity.ElectronEnergy(rms * 2 * math.Sqrt(2*math.Ln2)))
	if err != nil {
		t.Fatal(err)
	}
	return d
}

// thermal is a hot cathode with kT = 1 eV.
func thermal(t interface{ Fatal(...any) }) Distribution {
	d, err := Thermionic(1 / 8.617333262e-5)
	if err != nil {
		t.Fatal(err)
	}
	return d
}

func unit(w Waveform) Distribution { return Line{Amplitude: 1, Form: w}.Distribution() }

// Widths in closed form. The factors of the thermionic law are confirmed textbook
// values (2.45 kT for the FWHM, from memory); those of the sine follow from its
// density, which was read.
func TestWidthsInClosedForm(t *testing.T) {
	for _, c := range []struct {
		what           string
		d              Distribution
		rms, half, max float64 // max: FWHM
	}{
		{"Gaussian", gaussian(t, 1), 1, 1.3489795, 2.3548200},
		{"thermionic", thermal(t), math.Sqrt2, 1.731356, 2.446386},
		{"sine", unit(Sine()), 0.70710678, 1.41421356, 0},
		{"triangle", unit(Triangle()), 0.57735027, 1, 2},
		{"square", unit(Square()), 1, 2, 0},
	} {
		near(t, c.what+" rms", float64(c.d.RMS()), c.rms, 1e-6)
		near(t, c.what+" FW50", float64(c.d.FW50()), c.half, 1e-5)
		width, err := c.d.FWHM()
		if c.max == 0 {
			lacking(t, c.what+" FWHM", err, lack.Outside)
			continue
		}
		if err != nil {
			t.Fatal(err)
		}
		near(t, c.what+" FWHM", float64(width), c.max, 1e-6)
	}
}

// The mean lies at zero and the tabulated variance is the exact one.
func TestTablesAreCentred(t *testing.T) {
	lopsided, _, err := Sampled([]quantity.Voltage{0, 0, 0, 10, 3, 0})
	if err != nil {
		t.Fatal(err)
	}
	for what, d := range map[string]Distribution{
		"Gaussian": gaussian(t, 1), "thermionic": thermal(t), "sine": unit(Sine()), "triangle": unit(Triangle()),
		"square": unit(Square()), "lopsided": unit(lopsided),
		"convolved": Convolve(thermal(t), unit(Sine()), unit(lopsided).Scaled(3)),
	} {
		copied := &table{x: append([]float64(nil), d.table.x...), c: d.table.c}
		mean, square := 0.0, 0.0
		for i := 1; i < len(copied.x); i++ {
			a, b, p := copied.x[i-1], copied.x[i], copied.c[i]-copied.c[i-1]
			if p < 0 || b < a {
				t.Fatalf("%s: not rising at %d", what, i)
			}
			mean += p * (a + b) / 2
			square += p * (a*a + a*b + b*b) / 3
		}
		if math.Abs(mean) > 3e-6*math.Sqrt(square) {
			t.Errorf("%s: mean %v", what, mean)
		}
		near(t, what+" variance", square, d.table.variance, 3e-5)
	}
}

func TestFullWidth(t *testing.T) {
	w, err := Convolve(unit(Sine()), unit(Square()).Scaled(2)).FullWidth()
	if err != nil {
		t.Fatal(err)
	}
	near(t, "full widths add", float64(w), 6, 1e-9)
	_, err = Convolve(unit(Sine()), gaussian(t, 1)).FullWidth()
	lacking(t, "tails", err, lack.Outside)
}

// The maximum of a convolution, where there is one. Two Gaussians make a Gaussian;
// a source under a large sine has two peaks.
func TestHalfMaximumOfAConvolution(t *testing.T) {
	w, err := Convolve(gaussian(t, 3), gaussian(t, 4)).FWHM()
	if err != nil {
		t.Fatal(err)
	}
	near(t, "3, 4, 5", float64(w), 5*2.3548200, 1e-4)
	w, err = Convolve(unit(Triangle()), unit(Triangle())).FWHM()
	if err != nil {
		t.Fatal(err)
	}
	near(t, "two uniform ones make a triangle, its top rounded by the grid", float64(w), 2, 2e-3)
	_, err = Convolve(gaussian(t, 0.1), unit(Sine())).FWHM()
	lacking(t, "two peaks", err, lack.Outside)
}

func TestNoWidth(t *testing.T) {
	var none Distribution
	width, err := none.FWHM()
	if none.RMS() != 0 || none.FW50() != 0 || none.DiscFW50() != 0 || width != 0 || err != nil {
		t.Error("no distribution, no width")
	}
	if d := Convolve(none, unit(Sine()).Scaled(0)); !d.narrow() {
		t.Errorf("nothing and nothing make %v", d)
	}
	same := Convolve(none, gaussian(t, 1))
	near(t, "adding nothing", float64(same.FW50()), float64(gaussian(t, 1).FW50()), 1e-15)
}

// A sampled sine is a sine.
func TestSampledForms(t *testing.T) {
	samples := make([]quantity.Voltage, 200)
	for i := range samples {
		samples[i] = 100 + 5*quantity.Voltage(math.Sin(2*math.Pi*float64(i)/200))
	}
	w, amplitude, err := Sampled(samples)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "amplitude", amplitude, 5, 1e-9)
	near(t, "rms", float64(unit(w).RMS()), 1/math.Sqrt2, 1e-4)
	near(t, "FW50", float64(unit(w).FW50()), math.Sqrt2, 1e-4)
	near(t, "disc", float64(unit(w).DiscFW50()), float64(unit(Sine()).DiscFW50()), 1e-4)
}

// Any closed polygon: rising to one, centred, and as wide as its samples say.
func TestAnySampledForm(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		samples := make([]quantity.Voltage, rapid.IntRange(2, 40).Draw(t, "samples"))
		for i := range samples {
			samples[i] = quantity.Voltage(rapid.IntRange(-5, 5).Draw(t, fmt.Sprint(i)))
		}
		w, amplitude, err := Sampled(samples)
		if err != nil || amplitude == 0 {
			return // level
		}
		mean, square, high := 0.0, 0.0, math.Inf(-1)
		for i, s := range samples {
			a, b := float64(s), float64(samples[(i+1)%len(samples)])
			mean += (a + b) / 2 / float64(len(samples))
			square += (a*a + a*b + b*b) / 3 / float64(len(samples))
			high = math.Max(high, a)
		}
		d := Line{Amplitude: amplitude, Form: w}.Distribution()
		last := len(d.table.x) - 1
		for i := 1; i <= last; i++ {
			if d.table.x[i] < d.table.x[i-1] || d.table.c[i] < d.table.c[i-1]-1e-15 {
				t.Fatalf("falls at %d: %v", i, d.table)
			}
		}
		near(t, "all of it", d.table.c[last], 1, 1e-15)
		near(t, "greatest", d.table.x[last]*d.unit, high-mean, 1e-9)
		near(t, "variance", d.variance(), square-mean*mean, 1e-9)
		near(t, "convolved with next to nothing", float64(Convolve(d, gaussian(t, float64(amplitude)*1e-3)).RMS()), float64(d.RMS()), 1e-4)
	})
}

// A rectangle that is low three quarters of the time holds its 75 % level from one
// value to the other: the wider reading is taken.
func TestCentralHalfOfARectangle(t *testing.T) {
	for _, c := range []struct{ low, half float64 }{{0.74, 2}, {0.75, 2}, {0.76, 0}} {
		rectangle := &table{x: []float64{-1, -1, 1, 1}, c: []float64{0, c.low, c.low, 1}, variance: 1, full: 2}
		if got := float64(Distribution{rectangle, 1}.FW50()); got != c.half {
			t.Errorf("low for %v: %v, want %v", c.low, got, c.half)
		}
	}
}

func TestSampledFailsClosed(t *testing.T) {
	for what, s := range map[string][]quantity.Voltage{
		"none": nil, "one": {1}, "not a number": {0, 1, quantity.Voltage(math.NaN())}, "endless": {0, quantity.Voltage(math.Inf(1))},
	} {
		if _, _, err := Sampled(s); lack.Of(err) == nil {
			t.Errorf("%s: %v", what, err)
		}
	}
	_, amplitude, err := Sampled([]quantity.Voltage{5, 5, 5})
	if err != nil || amplitude != 0 {
		t.Errorf("a level wave-form disturbs nothing: %v, %v", amplitude, err)
	}
	_, err = GaussianFWHM(0)
	lacking(t, "no width", err, lack.Outside)
	_, err = Thermionic(0)
	lacking(t, "0 K", err, lack.Outside)
}

// Energies that are independent: variances add, whatever the forms, and widths
// scale with the whole.
func TestVariancesAdd(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		parts := anyParts(t)
		sum := 0.0
		for _, d := range parts {
			sum += d.variance()
		}
		whole := Convolve(parts...)
		near(t, "variance", whole.variance(), sum, 1e-9)
		k := rapid.Float64Range(0.01, 100).Draw(t, "factor")
		for i := range parts {
			parts[i] = parts[i].Scaled(k)
		}
		// Two like squares leave a gap just at 25 %, where rounding moves the reading a little.
		near(t, "FW50 scales", float64(Convolve(parts...).FW50()), k*float64(whole.FW50()), 1e-6)
		near(t, "disc scales", float64(Convolve(parts...).DiscFW50()), k*float64(whole.DiscFW50()), 1e-9)
	})
}

// anyParts draws two to five distributions of any kind and width.
func anyParts(t *rapid.T) []Distribution {
	var parts []Distribution
	for i := range rapid.IntRange(2, 5).Draw(t, "parts") {
		label := fmt.Sprint("part ", i)
		d := []Distribution{gaussian(t, 1), thermal(t), unit(Sine()), unit(Triangle()), unit(Square())}[rapid.IntRange(0, 4).Draw(t, label)]
		parts = append(parts, d.Scaled(math.Pow(10, rapid.Float64Range(-2, 2).Draw(t, label+" log width"))))
	}
	return parts
}
