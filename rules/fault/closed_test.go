package fault_test

import (
	"fmt"
	"math"
	"slices"
	"testing"

	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/fault"
)

// under is the evidence for a chain with one fault of its library.
func under(t *testing.T, e *evidence.Evidence, name string) *evidence.Evidence {
	t.Helper()
	for _, f := range fault.Of(e) {
		if f.Name == name {
			return e.Under(f.Condition())
		}
	}
	t.Fatalf("there is no fault %q", name)
	return nil
}

func near[Q ~float64](t *testing.T, what string, got Q, err error, want, tolerance float64) {
	t.Helper()
	if err != nil {
		t.Errorf("%s: %v", what, err)
	} else if math.Abs(float64(got)-want) > tolerance*max(math.Abs(want), 1e-9) {
		t.Errorf("%s = %.8g, want %.8g within %g", what, got, want, tolerance)
	}
}

// stiff is a ladder that holds its no-load voltage 2 N Vp = 2 kV a stage: large
// capacitors, ideal diodes, next to no load.
func stiff(stages int, more string) string {
	return fmt.Sprintf(`format = 1
[drive]
waveform = "sine"
frequency = "50 kHz"
peak = "1 kV"
peak_limit = "1.2 kV"
resistance = "10 ohm"
[multiplier]
topology = "half-wave"
polarity = "negative"
stages = %d
coupling_capacitor = { value = "100 nF" }
smoothing_capacitor = { value = "100 nF" }
diode = { rated_voltage = "10 kV", forward_drop = "0 V", resistance = "10 ohm", capacitance = "1 pF", leakage = "1 nA" }
`, stages) + more
}

const metered = `
[divider]
upper = { value = "100 Mohm", count = 10 }
lower = { value = "200 kohm", strings = 2 }
meter = { resistance = "10 Mohm" }
`

// TestOneStageWithAShort: with the coupling capacitor shorted one stage is a half-wave
// rectifier and gives Vp; with its first diode shorted it gives nothing.
func TestOneStageWithAShort(t *testing.T) {
	e := evidence.New(read(t, stiff(1, metered)))
	for name, want := range map[string]float64{"multiplier.coupling_capacitor.1 shorted": -1000, "multiplier.diode.1 shorted": 0} {
		v, err := under(t, e, name).Potential("output")
		near(t, name, v-1000, err, want-1000, 2e-3)
	}
}

// TestOpenDiodeAtAStage: nothing passes an open diode; below it the ladder is whole, and
// what hangs beyond it is discharged through the divider.
func TestOpenDiodeAtAStage(t *testing.T) {
	for k := 1; k <= 3; k++ {
		e := evidence.New(read(t, stiff(3, metered)))
		x := under(t, e, fmt.Sprintf("multiplier.diode.%d open", 2*k))
		v, err := x.Potential("output")
		if err == nil && math.Abs(float64(v)) > 20 {
			t.Errorf("diode %d open: the output stands at %v V", 2*k, v)
		}
		if err != nil {
			t.Errorf("diode %d open: %v", 2*k, err)
		}
		if k > 1 {
			v, err = x.Potential(fmt.Sprintf("stage.%d", k-1))
			near(t, fmt.Sprintf("below diode %d", 2*k), v, err, -2000*float64(k-1), 2e-3)
		}
	}
}

// TestOpenLowerArm: the meter alone is the lower arm, V Rm/(Ru + Rm); with a clamp, its
// voltage.
func TestOpenLowerArm(t *testing.T) {
	e := evidence.New(read(t, stiff(2, metered)))
	x := under(t, e, "divider.lower open")
	out, err := x.Potential("output")
	near(t, "output", out, err, -4000, 2e-3)
	tap, err := x.Potential("divider.tap")
	near(t, "tap", tap, err, float64(out)*10e6/(1000e6+10e6), 1e-5)

	e = evidence.New(read(t, stiff(2, metered+"clamp = { voltage = \"30 V\", kind = \"gas tube\" }\n")))
	x = under(t, e, "divider.lower open")
	tap, err = x.Potential("divider.tap")
	near(t, "clamped tap", tap, err, -30, 1e-9)
	if struck, err := x.Struck(); err != nil || !slices.Equal(struck, []string{"divider.clamp"}) {
		t.Errorf("struck: %v, %v", struck, err)
	}
}

// TestRegulationHoldsWhatItReads: with one of ten elements of the upper arm shorted the
// divider reads too much, and the output is held too low in the proportion of the
// ratios; with a string of the lower arm open likewise.
func TestRegulationHoldsWhatItReads(t *testing.T) {
	e := evidence.New(read(t, stiff(2, metered+"[regulation]\nset = \"3.5 kV\"\n")))
	lower := func(strings float64) float64 { return 1 / (1/(200e3/strings) + 1/10e6) }
	ratio := func(upper, lower float64) float64 { return (upper + lower) / lower }
	healthy := ratio(1000e6, lower(2))
	for name, faulty := range map[string]float64{
		"divider.upper: one element shorted": ratio(900e6, lower(2)),
		"divider.lower: one string open":     ratio(1000e6, lower(1)),
		"divider.meter open":                 ratio(1000e6, 100e3),
	} {
		v, err := under(t, e, name).Potential("output")
		near(t, name, v, err, -3500*faulty/healthy, 2e-4)
	}
	// Blind, it drives to its limit.
	for _, name := range []string{"divider.upper open", "divider.lower shorted", "divider.meter shorted", "regulation lost", "feedback lost", "whole ladder reversed"} {
		p, err := under(t, e, name).Peak()
		near(t, name, p, err, 1200, 1e-9)
	}
	v, err := under(t, e, "whole ladder reversed").Potential("output")
	near(t, "the wrong polarity", v, err, 4800, 2e-3)
}

const selfBiased = metered + `
[bias]
kind = "self"
fed = "control"
resistor = { value = "2 Mohm" }
[gun]
emission = "50 uA"
cutoff = "400 V"
exponent = 2.0
`

// TestBiasFaults: with I = K (Vc − Vb)² through 50 µA at 100 V, no bias gives 50 µA
// (400/300)²; an open resistor leaves the bias at cutoff and no emission.
func TestBiasFaults(t *testing.T) {
	e := evidence.New(read(t, stiff(2, selfBiased)))
	short := under(t, e, "bias.resistor shorted")
	i, err := short.Emission()
	near(t, "emission without bias", i, err, 50e-6*16/9, 1e-9)
	v, err := short.Between("cathode", "control")
	near(t, "bias", v, err, 0, 1e-6)

	open := under(t, e, "bias.resistor open")
	i, err = open.Emission()
	near(t, "emission at cutoff", i, err, 0, 1e-12)
	v, err = open.Between("cathode", "control")
	near(t, "bias at cutoff", v, err, 400, 1e-9)
}

// TestOpenBleederLeavesItsTime: with the bleeder open the divider alone discharges,
// R C ln(U/60 V) of all capacitors of one stage together.
func TestOpenBleederLeavesItsTime(t *testing.T) {
	e := evidence.New(read(t, stiff(1, metered+"permanent = true\n[[bleeder]]\nat = \"output\"\nresistor = { value = \"100 Mohm\" }\npermanent = true\n")))
	open := under(t, e, "bleeder.1 open")
	d, err := open.DischargeOf("output")
	if err != nil || d.Never {
		t.Fatal(d, err)
	}
	// The coupling capacitor holds half the voltage and joins in below that.
	r := 1000e6 + 1/(1/100e3)
	want := r*100e-9*math.Log(2) + r*200e-9*math.Log(1000/60.)
	near(t, "time", d.Time, nil, want, 1e-2)
}

// TestDeadNodesDrawNothing: behind an open resistor a constant current ends; nothing is
// left of the output, and the multiplier stands.
func TestDeadNodesDrawNothing(t *testing.T) {
	more := metered + "[[filter]]\nresistor = { value = \"1 Mohm\" }\ncapacitor = { value = \"1 nF\" }\n[[load]]\nname = \"l\"\nat = \"output\"\ncurrent = \"10 uA\"\n"
	x := under(t, evidence.New(read(t, stiff(2, more))), "filter.1.resistor open")
	v, err := x.Potential("output")
	near(t, "output", v+1000, err, 1000, 1e-3)
	v, err = x.Potential("multiplier")
	near(t, "multiplier", v, err, -4000, 2e-3)
	if ended, err := x.Ended(); err != nil || !slices.Equal(ended, []string{"load.l"}) {
		t.Errorf("ended: %v, %v", ended, err)
	}
}

// TestReturnOpen: with the return of the multiplier or the earth link open the full
// voltage stands on what was at ground.
func TestReturnOpen(t *testing.T) {
	e := evidence.New(read(t, stiff(2, metered)))
	for name, node := range map[string]string{"multiplier return open": "foot", "earth link open": "chassis"} {
		v, err := under(t, e, name).Between(node, "ground")
		if err != nil || math.Abs(float64(v)-4000) > 40 {
			t.Errorf("%s: %v, %v", name, quantity.Text(v), err)
		}
	}
}
