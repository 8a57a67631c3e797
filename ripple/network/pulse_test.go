package network

import (
	"math"
	"testing"
)

// What is foreseen of pulses of current is what the moved period has: the largest current to
// rounding, the charge that passes more to the square of what is lost.
func TestPulsesAreForeseen(t *testing.T) {
	h := searched(t, examples()["6 stages with filter and bias"])
	h.pace.bounds, h.pace.smooth, h.pace.track = fine.bounds(), true, (&track{system: h.system}).reserve()
	if err := h.walk(); err != nil {
		t.Fatal(err)
	}
	copy(h.step, h.x)
	scaleBy(h.step, 1e-6)
	h.unpack(h.step, h.root, h.dq, h.di)
	tr := h.pace.track
	f := &followed{track: tr, du: make([]float64, len(tr.u)), damps: make([]float64, len(tr.amps)), later: make([]float64, len(tr.steps))}
	for k := range tr.steps {
		f.carryOver(k, h.dq, h.di, h.lanes)
	}
	if !f.delay(0.1) {
		t.Fatal("steps change much")
	}
	before, most := make([]pulse, len(f.diodes)), 0.0
	for i := range before {
		before[i] = f.pulse(i)
		most = math.Max(most, math.Abs(before[i].more))
	}
	for k := range tr.steps {
		f.move(k)
	}
	for i, was := range before {
		now := f.pulse(i)
		if !(math.Abs(now.peak-was.then) <= 1e-9*was.then) || was.then == was.peak {
			t.Errorf("diode %d: %g at most, foreseen %g, before %g", i, now.peak, was.then, was.peak)
		}
		if more := now.charge - was.charge; !(math.Abs(more-was.more) <= 0.02*most) {
			t.Errorf("diode %d: %g more, foreseen %g", i, more, was.more)
		}
	}
}
