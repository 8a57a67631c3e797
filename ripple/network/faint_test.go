package network

import (
	"math"
	"testing"

	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
)

// Two columns whose sources ring share the load by what hardly holds them together. The first
// correction changes pulses of current by a twentieth; carried through, diodes stood
// 1.6 hundredths beside the state walked on to.
const leaningColumns = `format = 1
[drive]
waveform = "square"
frequency = "1 Hz"
peak = "10 kV"
resistance = "0 ohm"
inductance = "1000 H"
[multiplier]
topology = "symmetrical"
polarity = "positive"
stages = 1
coupling_capacitor = { value = "203 pF" }
smoothing_capacitor = { value = "203 pF" }
diode = { forward_drop = "1 V", resistance = "0 ohm", capacitance = "0 F", leakage = "0.203 fA", rated_voltage = "30 kV" }
pickup_to_output = "0 F"
[[load]]
name = "load"
at = "multiplier"
resistance = "100 Tohm"
`

// Where pulses of current would change much, a correction is not carried through: means of the
// diodes' currents are those of the state walked on to, to a thousandth.
func TestOnlyFaintChangesOfPulsesAreCarriedThrough(t *testing.T) {
	whole := steady(t, build(t, leaningColumns))
	for _, more := range []float64{1.1, 1.05} {
		n := 0
		uneven := whole.Circuit.Each(func(e *circuit.Element) bool {
			if n++; n%2 == 1 {
				e.Capacitance *= quantity.Capacitance(more)
				e.Resistance *= quantity.Resistance(more)
				e.Current *= quantity.Current(more)
			}
			return true
		})
		carried, err := foundSwiftly(t, uneven, whole, slight)
		if err != nil {
			t.Fatal(err)
		}
		walked, err := foundSwiftly(t, uneven, whole, 0)
		if err != nil {
			t.Fatal(err)
		}
		_, amps, _ := extents(walked)
		for i := range uneven.Elements {
			e := &uneven.Elements[i]
			if e.Kind != circuit.Diode {
				continue
			}
			a, b := carried.Diode(e.Name).Mean, walked.Diode(e.Name).Mean
			if off := math.Abs(float64(a-b)) / amps; !(off <= 1e-3) {
				t.Errorf("%g: %v through %s, walked on %v", more, a, e.Name, b)
			}
		}
	}
}

// What changes lengths of steps or pulses of current, or misplaces a charge at a switching, by
// more than is borne is not followed, and the period stays as it was.
func TestWhatIsNotFollowed(t *testing.T) {
	h := searched(t, examples()["6 stages with filter and bias"])
	x := append([]float64(nil), h.x...)
	for _, c := range []struct {
		name string
		part float64
		most bearing
	}{
		{"steps and pulses", 1e-6, bearing{math.Inf(1), 1e-5}},
		{"switchings", 1e-6, bearing{1e-12 * h.pace.passed, 1}},
	} {
		h.pace.bounds, h.pace.smooth, h.pace.track = fine.bounds(), true, (&track{system: h.system}).reserve()
		if err := h.walk(); err != nil {
			t.Fatal(err)
		}
		at := h.pace.track.switchings()
		copy(h.step, x)
		scaleBy(h.step, c.part)
		h.unpack(h.step, h.root, h.dq, h.di)
		if h.pace.track.follow(h.dq, h.di, h.lanes, c.most) {
			t.Errorf("%s: followed", c.name)
		}
		for i, still := range h.pace.track.switchings() {
			if still != at[i] {
				t.Errorf("%s: switching %d moved", c.name, i)
			}
		}
	}
}

// Leakage alone holds the middle of column b, a millionth of the load: no haste is made from such a
// state, and another is found to its uncertainty. In haste it stood 29 V beside it.
const hangingColumns = `format = 1
[drive]
waveform = "sine"
frequency = "9.372 Hz"
peak = "10 kV"
resistance = "0 ohm"
inductance = "1 kH"
[multiplier]
topology = "symmetrical"
polarity = "negative"
stages = 1
coupling_capacitor = { value = "8.608 nF" }
smoothing_capacitor = { value = "8.608 nF" }
diode = { forward_drop = "6.233 V", resistance = "1.2395 Mohm", capacitance = "293.9 pF", leakage = "0.0807 pA", rated_voltage = "30 kV" }
pickup_to_output = "0 F"
[[load]]
name = "load"
at = "multiplier"
current = "25.4 nA"
`

func TestNoHasteWhereLeakageAloneHoldsAColumn(t *testing.T) {
	whole := steady(t, build(t, hangingColumns))
	more, n := []float64{0.958, 1, 1.08, 0.988, 1.046, 0.905, 0.949, 0.92, 1.012, 1.1, 0.919, 1.014}, 0
	uneven := whole.Circuit.Each(func(e *circuit.Element) bool {
		e.Capacitance *= quantity.Capacitance(more[n])
		e.Resistance *= quantity.Resistance(more[n])
		e.Current *= quantity.Current(more[n])
		n++
		return true
	})
	exact := steady(t, uneven)
	swift, err := Steady(uneven, Options{From: whole, Swift: true})
	if err != nil {
		t.Fatal(err)
	}
	b, _ := uneven.Node("coupling.b.1")
	x, _ := exact.At(b)
	y, _ := swift.At(b)
	if off := math.Abs(float64(x.Mean - y.Mean)); !(off <= float64(exact.Uncertainty+swift.Uncertainty)) {
		t.Errorf("%v, exact %v, to %v and %v", y.Mean, x.Mean, swift.Uncertainty, exact.Uncertainty)
	}
}
