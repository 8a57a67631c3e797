package cascade

import (
	"testing"

	"kilovet/hv/quantity"
)

// J. Eoff, Voltage multipliers part 6 (laboratory notebook, 2019, read): mean
// readings at 50 Hz with 462 kΩ. Inferred, not stated: the drive, from a reading
// without load, and the meter: 10 MΩ for the doublers, 1 MΩ for two stages. The
// reading without load (through the meter) fixes the line's voltage where given.
func TestMeasuredLadders(t *testing.T) {
	rows := []struct {
		name              string
		stages            int
		each              quantity.Capacitance
		peak              quantity.Voltage
		meter             quantity.Resistance
		unloaded, reading float64
		tolerance         float64
	}{
		{"doubler, 100 nF", 1, 100e-9, 19.9095, 10e6, 38.1, 24.0, 0.02},
		{"doubler, 5 uF", 1, 5e-6, 19.9095, 10e6, 39.4, 38.7, 0.02},
		{"doubler, 10 uF", 1, 10e-6, 19.9095, 10e6, 39.0, 38.5, 0.03},
		{"two stages, 10 uF", 2, 10e-6, 15.5248, 1e6, 62.0, 59.0, 0.02},
	}
	for _, r := range rows {
		supply, err := Cascade{Peak: r.peak, Frequency: 50}.WithEqual(r.stages, r.each).Supply()
		if err != nil {
			t.Fatal(err)
		}
		meter := supply.Voltage(supply.Into(r.meter))
		near(t, r.name+", meter alone", float64(meter), r.unloaded, r.tolerance)
		both := 1 / (1/r.meter + 1/quantity.Resistance(462e3))
		near(t, r.name+", loaded", float64(supply.Voltage(supply.Into(both))), r.reading, r.tolerance)
	}
}

// The same notebook with 10 nF: 7.4 V measured, 5.1 V by the line. The capacitors
// empty within a period; the model must refuse rather than answer.
func TestMeasuredLadderOutsideTheModel(t *testing.T) {
	c := Cascade{Peak: 19.9095, Frequency: 50}.WithEqual(1, 10e-9)
	supply, _ := c.Supply()
	load := supply.Into(1 / (1/quantity.Resistance(10e6) + 1/quantity.Resistance(462e3)))
	near(t, "the line", float64(supply.Voltage(load)), 5.1, 0.01)
	refused(t, c, load)
}

// Part 7 (read): output resistance of 10 µF ladders at 50 Hz, 4.75 kΩ, 16.6 kΩ and
// 98.4 kΩ for 1, 2 and 4 stages; repeatability of the author's readings is poor
// (23.5 kΩ for two stages elsewhere) and the first holds the diode's own change, so
// only two and four stages are compared, and the growth from two to four.
func TestMeasuredOutputResistance(t *testing.T) {
	var at [5]float64
	for _, n := range []int{1, 2, 4} {
		s, err := Cascade{Peak: 20, Frequency: 50}.WithEqual(n, 10e-6).Supply()
		if err != nil {
			t.Fatal(err)
		}
		at[n] = float64(s.OutputResistance)
	}
	near(t, "one stage, derived", at[1], 3000, 1e-9)
	near(t, "two stages", at[2], 16565, 0.10)
	near(t, "four stages", at[4], 98351, 0.10)
	near(t, "growth from two to four", at[4]/at[2], 98351./16565, 0.10)
}

// D. L. Jones (video demonstration, figures read): four stages at ±1 V, pump-node
// peaks 1.67, 3.00, 4.43, 5.83 V under the probes. coupling.k peaks at
// stage.k + forward drop, 2k peak − (2k−1) forward drops: one drop per diode passed,
// 0.31 to 0.33 V each at microamperes; a fixed 0.7 V would give 3.1 V at the top.
func TestEachDiodeCostsItsDropOnce(t *testing.T) {
	for _, r := range []struct{ drop, tolerance float64 }{{0.32, 0.02}, {0.7, 0.5}} {
		c := Cascade{Peak: 1, Frequency: 1000, ForwardDrop: quantity.Voltage(r.drop)}.WithEqual(4, 1e-6)
		s, err := c.Loaded(0)
		if err != nil {
			t.Fatal(err)
		}
		if r.drop == 0.7 {
			near(t, "a fixed 0.7 V", float64(s.Nodes[3].Maximum+c.ForwardDrop), 3.1, 1e-9)
			continue
		}
		for k, measured := range []float64{1.67, 3.00, 4.43, 5.83} {
			near(t, "pump node", float64(s.Nodes[k].Maximum+c.ForwardDrop), measured, r.tolerance)
		}
	}
}

// Single Greinacher stage on a breadboard (public electronics notes, 2025, read):
// 1 µF, ±5 V at 100 Hz, 1 MΩ gave 9.04 V, which implies 0.41 V a diode at 9 µA.
func TestBreadboardDoubler(t *testing.T) {
	c := Cascade{Peak: 5, Frequency: 100, ForwardDrop: 0.41}.WithEqual(1, 1e-6)
	supply, err := c.Supply()
	if err != nil {
		t.Fatal(err)
	}
	near(t, "output", float64(supply.Voltage(supply.Into(1e6))), 9.04, 0.005)
}

// S. Haid, fusor report (read): 5 stages of 14.1 nF at 20 kHz, 9.3 mA; one 10 kV
// capacitor failed. The drive was not given, 4.1 kV is assumed: no check of numbers
// against a measurement but the lesson that four fifths of the rating were used.
func TestFailedCapacitorUtilisation(t *testing.T) {
	s, err := Cascade{Peak: 4100, Frequency: 20e3}.WithEqual(5, 14.1e-9).Loaded(9.3e-3)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "ripple, against time (own computation)", float64(s.Ripple.PeakToPeak()), 476.5, 0.04)
	near(t, "share of 10 kV", float64(s.Smoothing[0].Maximum)/10e3, 0.805, 0.015)
}

// S. Haid, purchased fivefold multiplier of 68 pF at 30 kHz under a 100.1 MΩ meter
// (read). Not reproduced (measured 550 V against 466 V: capacitors and secondary
// voltage were not metered); kept because a meter alone costs a third there. The
// compared values are an own computation in time.
func TestMeterLoadsASmallLadder(t *testing.T) {
	for _, r := range []struct {
		peak   quantity.Voltage
		inTime float64
	}{{68.78, 468.0}, {108.1, 735.5}, {196.5, 1337.3}} {
		supply, err := Cascade{Peak: r.peak, Frequency: 30e3}.WithEqual(5, 68e-12).Supply()
		if err != nil {
			t.Fatal(err)
		}
		v := supply.Voltage(supply.Into(1.001e8))
		near(t, "under the meter", float64(v), r.inTime, 0.01)
		near(t, "share lost", 1-float64(v/supply.NoLoad), 1./3, 0.04)
	}
}
