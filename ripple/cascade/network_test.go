package cascade

import (
	"fmt"
	"testing"

	"kilovet/hv/quantity"
)

// solved is a ladder solved in time by an independent brute-force simulation
// (ideal sources, piecewise-linear diodes; computed, not published; relative
// uncertainty below 1e-7). Values are those of the periodic steady state.
type solved struct {
	name      string
	c         Cascade
	load      quantity.Current
	mean      float64
	maximum   float64
	minimum   float64
	first     float64 // amplitude at f
	second    float64 // amplitude at 2f
	input     float64 // W
	within    tolerances
	smoothing []float64
	coupling  []float64
	reverse   []float64
}

// tolerances are relative to the quantity's own drop or size.
type tolerances struct {
	drop   float64 // of mean, maximum and minimum
	ripple float64
	first  float64
	second float64
	each   float64 // of the drop across each capacitor and of the reverse voltage below its no-load value
}

// The tolerances are those of short but real pulses: about √(q/(C peak))/π of the
// ripple for one stage, half as much again for many; see the package comment.
var solvedInTime = []solved{
	{name: "1 stage, q/(C peak) 0.1", c: Cascade{Peak: 1000, Frequency: 50, ForwardDrop: 0.7, DiodeResistance: 10}.WithEqual(1, 50e-9), load: 0.25e-3,
		mean: 1855.24300673, maximum: 1898.72499516, minimum: 1808.69658075, first: 31.4657503819, second: 15.1946730201, input: 0.464182996523,
		within: tolerances{0.055, 0.115, 0.015, 0.05, 0.055}, smoothing: []float64{1855.24300673}, coupling: []float64{947.549570436}, reverse: []float64{1899.42750424, 1856.6620799}},
	{name: "2 stages, q/(C peak) 0.0004", c: Cascade{Peak: 5000, Frequency: 1000}.WithEqual(2, 10e-9), load: 20e-6,
		mean: 19984.0436048, maximum: 19987.0143535, minimum: 19981.0568865, first: 2.54715677949, second: 0.636314715345, input: 0.399831088989,
		within: tolerances{0.0035, 0.0075, 0.001, 0.001, 0.004}, smoothing: []float64{9994.01074345, 9990.03286132}, coupling: []float64{4997.99323914, 9992.01181269},
		reverse: []float64{9996, 9993, 9991, 9990}},
	{name: "2 stages, square", c: Cascade{Square: true, Peak: 1500, Frequency: 50e3, ForwardDrop: 3, SourceResistance: 100, DiodeResistance: 20}.WithEqual(2, 470e-12), load: 2e-3,
		mean: 5434.5123213, maximum: 5536.03047635, minimum: 5316.9684957, first: 95.6271825403, second: 21.1225562683, input: 12.000016271,
		within: tolerances{0.04, 0.03, 0.006, 0.04, 0.04}, smoothing: []float64{2775.67107761, 2658.84124369}, coupling: []float64{1417.00471513, 2710.67406429}},
	{name: "3 stages, q/(C peak) 0.004", c: Cascade{Peak: 5000, Frequency: 50e3, ForwardDrop: 10, DiodeResistance: 50}.WithEqual(3, 1e-9), load: 1e-3,
		mean: 29491.6736839, maximum: 29549.6201499, minimum: 29432.5977298, first: 57.1690005668, second: 9.39746576723, input: 29.5701259709,
		within: tolerances{0.055, 0.03, 0.003, 0.02, 0.1}, smoothing: []float64{9889.74596517, 9817.49270224, 9784.43501651}, coupling: []float64{4959.04997156, 9853.38089152, 9800.66892609},
		reverse: []float64{9929.6, 9884.0, 9847.4, 9821.1, 9804.5, 9798.3}},
	{name: "4 stages, first coupling capacitor doubled", c: doubledFirst(Cascade{Peak: 4000, Frequency: 20e3, ForwardDrop: 6, SourceResistance: 30, DiodeResistance: 40}.WithEqual(4, 2.2e-9)), load: 2e-3,
		mean: 30000.7270544, maximum: 30214.9515557, minimum: 29779.2325695, first: 229.016499493, second: 26.7856655879, input: 60.1898515141,
		within: tolerances{0.03, 0.045, 0.012, 0.085, 0.075}, smoothing: []float64{7805.69819521, 7542.36350133, 7368.17548872, 7284.48986915}, coupling: []float64{3945.03465192, 7671.09724065, 7453.03076341, 7325.05655664}},
	{name: "6 stages, 330 pF", c: Cascade{Peak: 2500, Frequency: 100e3, ForwardDrop: 5, SourceResistance: 50, DiodeResistance: 30}.WithEqual(6, 330e-12), load: 0.5e-3,
		mean: 27487.929391, maximum: 27639.6939248, minimum: 27332.0221166, first: 171.364898545, second: 13.052838364, input: 13.7872001901,
		within: tolerances{0.015, 0.035, 0.015, 0.11, 0.02}, smoothing: []float64{4854.02679564, 4704.76262636, 4585.52834218, 4496.50464572, 4437.77355959, 4409.33342155}},
	{name: "8 stages, light load", c: Cascade{Peak: 3000, Frequency: 60e3, ForwardDrop: 6, DiodeResistance: 50}.WithEqual(8, 1e-9), load: 0.3e-3,
		mean: 46101.2212358, maximum: 46188.9749953, minimum: 46012.1195552, first: 101.236972585, second: 6.07461268179, input: 13.8650653777,
		within: tolerances{0.045, 0.02, 0.007, 0.05, 0.065}, smoothing: []float64{5927.60937327, 5860.55090693, 5803.35403639, 5756.19226959, 5719.05774363, 5691.93658723, 5674.8201002, 5667.70021855}},
	{name: "10 stages, drop of 42 %", c: Cascade{Peak: 5000, Frequency: 25e3, ForwardDrop: 10, SourceResistance: 20, DiodeResistance: 40}.WithEqual(10, 4.7e-9), load: 7e-3,
		mean: 57899.566063, maximum: 59422.8463845, minimum: 56321.7064703, first: 1727.1395886, second: 42.3269762352, input: 408.565177692,
		within: tolerances{0.025, 0.06, 0.1, 1.3, 0}},
	{name: "12 stages, 50 Hz", c: Cascade{Peak: 5000, Frequency: 50, ForwardDrop: 10, SourceResistance: 500, DiodeResistance: 100}.WithEqual(12, 50e-9), load: 5e-6,
		mean: 117315.043537, maximum: 117392.132224, minimum: 117237.334187, first: 91.5065282325, second: 3.72650720118, input: 0.588724832325,
		within: tolerances{0.005, 0.008, 0.002, 0.03, 0}},
	{name: "symmetrical, 1 stage", c: Cascade{Symmetrical: true, Peak: 5000, Frequency: 50e3, ForwardDrop: 10, SourceResistance: 50, DiodeResistance: 50}.WithEqual(1, 1e-9), load: 10e-3,
		mean: 9832.3791202, maximum: 9876.54003655, minimum: 9785.87055952, second: 31.5374488438, input: 98.8280780267,
		within: tolerances{0.035, 0.105, 0.001, 0.01, 0.065}, smoothing: []float64{9832.3791202}, coupling: []float64{4936.59665956}},
	{name: "symmetrical, 2 stages, square", c: Cascade{Symmetrical: true, Square: true, Peak: 1500, Frequency: 50e3, ForwardDrop: 3, SourceResistance: 100, DiodeResistance: 20}.WithEqual(2, 470e-12),
		load: 5743.13240259 / 2e6, mean: 5743.13240259, maximum: 5776.20330697, minimum: 5712.46709543, second: 19.6578769318, input: 17.2294316565,
		within: tolerances{0.011, 0.045, 0.001, 0.012, 0.008}, smoothing: []float64{2886.75081855, 2856.38158404}, coupling: []float64{1443.37039348, 2878.75969384}},
}

func doubledFirst(c Cascade) Cascade {
	c.Coupling[0] *= 2
	return c
}

func TestAgainstLaddersSolvedInTime(t *testing.T) {
	for _, r := range solvedInTime {
		t.Run(r.name, func(t *testing.T) {
			s, err := r.c.Loaded(r.load)
			if err != nil {
				t.Fatal(err)
			}
			noLoad := float64(s.NoLoad)
			near(t, "drop of the mean", float64(s.Drop()), noLoad-r.mean, r.within.drop)
			near(t, "drop of the maximum", float64(s.DropOfMaximum()), noLoad-r.maximum, r.within.drop)
			near(t, "drop of the minimum", float64(s.DropOfMinimum()), noLoad-r.minimum, r.within.drop)
			near(t, "ripple", float64(s.Ripple.PeakToPeak()), r.maximum-r.minimum, r.within.ripple)
			near(t, "amplitude at f", float64(s.Ripple.Amplitude(1))+1e-9, r.first+1e-9, r.within.first)
			near(t, "amplitude at 2f", float64(s.Ripple.Amplitude(2)), r.second, r.within.second)
			power, err := r.c.InputPower(r.load)
			if err != nil {
				t.Fatal(err)
			}
			near(t, "input power", float64(power), r.input, 0.004+r.within.drop*(noLoad-r.mean)/r.mean)
			r.parts(t, s)
		})
	}
}

// parts compares what each capacitor and diode lacks of its voltage without load.
func (r solved) parts(t *testing.T, s State) {
	t.Helper()
	rung := float64(r.c.rung())
	for k, v := range r.smoothing {
		near(t, fmt.Sprintf("drop across smoothing capacitor %d", k+1), rung-float64(s.Smoothing[k].Mean), rung-v, r.within.each)
	}
	for k, v := range r.coupling {
		full := rung
		if k == 0 {
			full /= 2
		}
		near(t, fmt.Sprintf("drop across coupling capacitor %d", k+1), full-float64(s.Coupling[k].Mean), full-v, r.within.each)
	}
	for k, v := range r.reverse {
		full := float64(2*r.c.Peak - r.c.ForwardDrop)
		near(t, fmt.Sprintf("reverse voltage of diode %d", k+1), full-float64(s.DiodeReverse[k]), full-v, r.within.each)
	}
}
