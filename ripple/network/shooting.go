package network

import (
	"math"

	"kilovet/hv/lack"
)

// shooter finds the state that a period brings back to itself: Newton's method on
// the map of the period (Aprille and Trick, Proc. IEEE 60 (1972) 108), its linear
// equations solved by changes carried through the period. The network is passive
// and its diodes monotonic, so a period brings any two states closer together and
// the periodic state is the only one.
type shooter struct {
	*system
	root   []float64
	peaks  *peaks
	solver *krylov
	pace   *pace

	x, r, step, old []float64 // state, its change over a period, its correction
	q, amps         []float64
	dq, di, du      []float64
	lanes           []trio
	on              []bool
	pressed         float64 // how hard the diodes are pressed in the guess
	swift           bool    // no more than limits and ratings ask for
	work            Work
}

func newShooter(s *system) *shooter {
	m := s.states()
	h := &shooter{system: s, root: s.roots(), solver: newKrylov(m), peaks: newPeaks(s)}
	h.pace = &pace{walker: newWalker(s), track: (&track{system: s}).reserve(), energy: s.measureOfEnergy()}
	h.x, h.r, h.step, h.old = make([]float64, m), make([]float64, m), make([]float64, m), make([]float64, m)
	h.q, h.dq, h.du = make([]float64, s.n), make([]float64, s.n), make([]float64, s.n)
	h.amps, h.di = make([]float64, len(s.inductors)), make([]float64, len(s.inductors))
	h.lanes, h.on = make([]trio, s.n), make([]bool, len(s.diodes))
	return h
}

// measureOfEnergy is what the roughness of a step is relative to: the root of twice
// the energy of a typical capacitor at the drive's peak.
func (s *system) measureOfEnergy() float64 {
	if s.typical == 0 {
		return 1
	}
	return math.Sqrt(s.typical) * s.scale
}

// guess starts from the charges at the negative peak of the drive, with the diodes
// pressed to conduct. What they pass without being pressed is the measure of their
// current.
func (s *shooter) guess(press float64) {
	s.pressed = 0
	s.balance(s.x)
	s.judge(s.peaks.passed())
	if press > 0 {
		s.pressed = press
		s.balance(s.x)
	}
}

// balance is the state at the negative peak of the drive by the balance of charges.
func (s *shooter) balance(x []float64) {
	p := s.peaks
	p.press(s.pressed)
	p.solve()
	p.lean()
	p.charge(p.u[s.n:], s.q)
	for k := range s.q {
		s.q[k] += s.capDirect[k] - s.capSquare[k] - s.capSine[k]
	}
	for i := range s.amps {
		s.amps[i] = 0
	}
	s.pack(s.q, s.amps, s.root, x)
}

// judge takes the largest charge a diode passes in a period as the measure of what
// matters in its current.
func (s *shooter) judge(passed float64) {
	s.pace.passed = passed
	s.pace.tolerate(passed / s.period)
}

// walk takes the state through one period; r is its change.
func (s *shooter) walk() error {
	s.unpack(s.x, s.root, s.q, s.amps)
	p := s.pace
	p.place(s.q, s.amps, s.on)
	if err := p.walk(); err != nil {
		return err
	}
	p.work.Longest = max(p.work.Longest, len(p.track.steps))
	copy(s.on, p.on)
	s.pack(p.q, p.walker.amps, s.root, s.r)
	axpy(-1, s.x, s.r)
	if !finite(s.r) {
		return lack.Failed("the arithmetic left its range")
	}
	return nil
}

func finite(x []float64) bool {
	for _, v := range x {
		if math.IsNaN(v) || math.IsInf(v, 0) {
			return false
		}
	}
	return true
}

// minus replaces a change of the start by what the period leaves of the difference
// between it and the change of the end.
func (s *shooter) minus(t *track, x []float64) {
	s.work.Products++
	s.unpack(x, s.root, s.dq, s.di)
	t.carry(s.dq, s.di, s.lanes, s.du)
	copy(s.old, x)
	s.pack(s.dq, s.di, s.root, x)
	for i, v := range s.old {
		x[i] = v - x[i]
	}
}

// precondition answers a change over the period as the circuit between the peaks
// would.
func (s *shooter) precondition(x []float64) {
	s.unpack(x, s.root, s.dq, s.di)
	s.peaks.answer(s.dq)
	s.pack(s.dq, s.di, s.root, x)
}
