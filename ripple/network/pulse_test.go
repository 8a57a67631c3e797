package network

import (
	"math"
	"testing"
)

// What is foreseen of pulses of current is what the moved period has: the largest current to
// rounding, the charge that passes more to the square of what is lost.
func TestPulsesAreForeseen(t *testing.T) {
	h := searched(t, examples()["6 stages with filter and bias"])
	f := h.carriedOver(t, 1e-6)
	if !f.delay(0.1) {
		t.Fatal("steps change much")
	}
	before, most := make([]pulse, len(f.diodes)), 0.0
	for i := range before {
		before[i] = f.pulse(i)
		most = math.Max(most, math.Abs(before[i].more))
	}
	for k := range f.steps {
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

// carriedOver is what a state larger by a part makes of the period, at fixed instants.
func (s *search) carriedOver(t *testing.T, part float64) *followed {
	tr := s.walkedAnew(t)
	s.enlarge(part)
	f := &followed{track: tr, du: make([]float64, len(tr.u)), damps: make([]float64, len(tr.amps)), later: make([]float64, len(tr.steps))}
	for k := range tr.steps {
		f.carryOver(k, s.dq, s.di, s.lanes)
	}
	return f
}

// Steps that become a part longer are borne up to that part, and no further.
func TestLengthsThatAreBorne(t *testing.T) {
	f := searched(t, examples()["6 stages with filter and bias"]).carriedOver(t, 1e-6)
	if !f.delay(1) {
		t.Fatal("steps change much")
	}
	most := 0.0
	for k := range f.steps {
		from, to := f.ends(k)
		most = math.Max(most, math.Abs(to-from)/f.steps[k].length)
	}
	if most == 0 || f.delay(0.99*most) || !f.delay(1.01*most) {
		t.Errorf("steps become %g longer: borne up to 0.99 of it %v, to 1.01 %v", most, f.delay(0.99*most), f.delay(1.01*most))
	}
}

// Charges are compared with the largest, peaks with their own and with a hundredth of the largest.
func TestPulsesThatAreBorne(t *testing.T) {
	large := pulse{charge: 1, peak: 1, then: 1}
	for _, c := range []struct {
		name  string
		p     pulse
		borne bool
	}{
		{"none changes", pulse{charge: 0.1, peak: 0.1, then: 0.1}, true},
		{"charge, slightly", pulse{charge: 0.1, more: -0.0099, peak: 0.1, then: 0.1}, true},
		{"charge", pulse{charge: 0.1, more: -0.0101, peak: 0.1, then: 0.1}, false},
		{"peak, slightly", pulse{charge: 0.1, peak: 0.1, then: 0.1009}, true},
		{"peak", pulse{charge: 0.1, peak: 0.1, then: 0.0989}, false},
		{"peak of what hardly conducts, slightly", pulse{peak: 1e-6, then: 9.9e-5}, true},
		{"peak of what hardly conducts", pulse{peak: 1e-6, then: 1.1e-4}, false},
		{"no number", pulse{peak: math.NaN(), then: 1}, false},
	} {
		if got := faintly([]pulse{large, c.p}, 0.01); got != c.borne {
			t.Errorf("%s: borne %v", c.name, got)
		}
	}
}
