package network

import (
	"math"
	"testing"

	"kilovet/hv/circuit"
)

// Two columns whose sources ring share the load by what hardly holds them together. The first
// correction changes pulses of current by a twentieth; carried through, diodes stood
// 1.6 hundredths beside the state walked on to.
var leaningColumns = ladder{
	stages: 1, topology: "symmetrical", drive: "square", frequency: 1, peak: 1e4, inductor: 1000,
	capacitance: 203e-12, drop: 1, leakage: "0.203 fA",
}

// Where pulses of current would change much, a correction is not carried through: means of the
// diodes' currents are those of the state walked on to, to a thousandth.
func TestOnlyFaintChangesOfPulsesAreCarriedThrough(t *testing.T) {
	whole := steady(t, build(t, leaningColumns.describe()))
	for _, more := range []float64{1.1, 1.05} {
		uneven := times(whole.Circuit, func(n int, _ string) float64 {
			if n%2 == 0 {
				return more
			}
			return 1
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
	for _, c := range []struct {
		name string
		part float64
		most bearing
	}{
		{"steps and pulses", 1e-6, bearing{math.Inf(1), 1e-5}},
		{"switchings", 1e-6, bearing{1e-12 * h.pace.passed, 1}},
	} {
		at := h.walkedAnew(t).switchings()
		h.enlarge(c.part)
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
// state, and another is found to its uncertainty. In haste two of them stood 28 and 108 V beside it.
var hangingColumns = ladder{
	stages: 1, topology: "symmetrical", polarity: "negative", frequency: 9.372, peak: 1e4, inductor: 1000,
	capacitance: 8.608e-9, drop: 6.233, on: 1.2395e6, junction: 293.9e-12, leakage: "0.0807 pA", current: 25.4e-9,
}

func TestNoHasteWhereLeakageAloneHoldsAColumn(t *testing.T) {
	whole := steady(t, build(t, hangingColumns.describe()))
	for _, more := range [][]float64{
		{0.958, 1, 1.08, 0.988, 1.046, 0.905, 0.949, 0.92, 1.012, 1.1, 0.919, 1.014},
		{1, 1, 1.1, 1, 1, 0.9, 1, 0.9, 1, 1, 1, 1},
		{1, 1, 1.08, 1, 1, 0.92, 1, 0.92, 1, 1, 1, 1},
		{1, 1, 1.1, 1, 1, 0.9, 1, 0.9, 1, 1, 0.9, 1},
	} {
		uneven := times(whole.Circuit, func(n int, _ string) float64 { return more[n] })
		exact := steady(t, uneven)
		swift, err := Steady(uneven, Options{From: whole, Swift: true})
		if err != nil {
			t.Fatal(err)
		}
		b, _ := uneven.Node("coupling.b.1")
		x, _ := exact.At(b)
		y, _ := swift.At(b)
		if off := math.Abs(float64(x.Mean - y.Mean)); !(off <= float64(exact.Uncertainty+swift.Uncertainty)) {
			t.Errorf("%v: %v, exact %v, to %v and %v", more, y.Mean, x.Mean, swift.Uncertainty, exact.Uncertainty)
		}
	}
}
