package gas_test

import (
	"math"
	"strings"
	"testing"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gas"
)

// AIEE spark-gap table, spheres, all cells: each is given back.
func TestCellsOfTheSparkGapsOfSpheres(t *testing.T) {
	for _, row := range printedRows(t, printedAIEE) {
		for k, diameter := range []quantity.Length{0.025, 0.05, 0.1, 0.25} {
			if math.IsNaN(row[k+2]) {
				continue
			}
			r, err := gas.SparkGap(warm, diameter, quantity.Length(row[k+2]*1e-2))
			if err != nil || !quantity.Equal(r.Value, quantity.Voltage(row[0]*1e3)) {
				t.Errorf("%v, %g cm: %v (%v), printed %g kV", diameter, row[k+2], r.Value, err, row[0])
			}
		}
	}
	for _, c := range []struct{ diameter, d quantity.Length }{{0.03, 0.01}, {0.25, 1e-3}, {0.25, 0.2}, {0.025, 0.05}} {
		if _, err := gas.SparkGap(warm, c.diameter, c.d); lack.Of(err) == nil {
			t.Errorf("spheres %v, gap %v: no lack", c.diameter, c.d)
		}
	}
	thin := warm
	thin.Pressure = 70e3
	if _, err := gas.SparkGap(thin, 0.25, 0.01); lack.Of(err) == nil {
		t.Error("no lack at 70 kPa")
	}
}

// The rows of 5, 10 and 15 kV of spheres of 25 cm are 20, 9 and 4 % under the law of uniform
// fields, of which half the last digit makes 3, 1.5 and 1 %: at 20 kV the law lies within the
// digit. The rows themselves are in one proportion to 20 kV, 0.032 cm a kilovolt, which
// no measured short gap is: 2.9 and 4.7 kV at 0.5 and 1 mm of spheres of 2 cm (Kronjaeger,
// a web table), which the law meets within 12 %, from below.
func TestShortSparkGapsAreNoMeasure(t *testing.T) {
	law := func(d float64) float64 {
		v, err := gas.UniformAir(warm.Density(), quantity.Length(d))
		if err != nil {
			t.Fatal(err)
		}
		return float64(v)
	}
	for _, c := range []struct{ kV, gap, above float64 }{{5, 1.6e-3, 0.21}, {10, 3.2e-3, 0.085}, {15, 4.8e-3, 0.03}, {20, 6.4e-3, -0.005}} {
		least, most := law(c.gap-0.05e-3)/(c.kV*1e3)-1, law(c.gap+0.05e-3)/(c.kV*1e3)-1
		if least < c.above-0.005 || least > c.above+0.01 {
			t.Errorf("%g kV: the law is %.1f to %.1f %% above the cell", c.kV, 100*least, 100*most)
		}
		if contains := least <= 0 && most >= 0; contains != (c.kV == 20) {
			t.Errorf("%g kV: within the digit %v", c.kV, contains)
		}
		near(t, "proportion", c.gap/c.kV, 0.32e-3, 1e-9)
		r, err := gas.SparkGap(warm, 0.25, quantity.Length(c.gap))
		if err != nil || !strings.Contains(r.Source.Text, "in proportion to the voltage") {
			t.Errorf("%g kV: %q (%v)", c.kV, r.Source.Text, err)
		}
	}
	for d, measured := range map[float64]float64{0.5e-3: 2.9e3, 1e-3: 4.7e3} {
		if v, err := gas.UniformAir(1, quantity.Length(d)); err != nil || math.Abs(float64(v)/measured-1) > 0.12 {
			t.Errorf("%g mm: %v against %g (%v)", d*1e3, v, measured, err)
		}
	}
	if r, err := gas.SparkGap(warm, 0.25, 0.0098); err != nil || strings.Contains(r.Source.Text, "proportion") {
		t.Errorf("%q (%v)", r.Source.Text, err)
	}
}
