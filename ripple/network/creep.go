package network

// mostCreeping is the number of periods after which creeping is given up.
const mostCreeping = 200

// farthest is the number of periods a step has to span before it counts as Newton's.
const farthest = 1e6

// creep leads a state to rest where Newton's method goes astray: implicit Euler steps
// over many periods at a time, (1/H + 1 − M) δ = r, with H growing as the change r over a
// period falls (pseudo-transient continuation: Kelley and Keyes, SIAM J. Numer. Anal. 35
// (1998) 508). A period brings any two states closer together, so a step of moderate H
// does not lead away, and a single period never does; with H large the step is Newton's.
func (s *search) creep(g grade, small float64) error {
	s.pace.smooth, s.ahead = false, 1
	if err := s.here(g); err != nil {
		return err
	}
	periods, steps := s.pace.work.Periods, s.pace.work.Steps
	for s.pace.work.Periods-periods < mostCreeping && s.pace.work.Steps-steps < s.budget() && !s.spent() {
		size := norm(s.start)
		if size == 0 {
			return nil
		}
		next, err := s.onward()
		if err != nil {
			return err
		}
		switch {
		case next <= 1.1*size && s.ahead > farthest && norm(s.step) <= small*norm(s.x):
			s.pace.track = s.linear
			return nil
		case next <= 1.1*size:
			s.stay()
			s.ahead *= min(max(2*size/next, 0.5), 10)
		case s.ahead > 1:
			s.ahead = max(1, s.ahead/5)
		default:
			if err := s.follow(g); err != nil {
				return err
			}
		}
	}
	return s.unreached()
}

// onward takes an implicit Euler step from the period walked last and walks the period
// it leads to; it returns the change over that.
func (s *search) onward() (float64, error) {
	s.peaks.prepare(1 / s.ahead)
	copy(s.step, s.start)
	s.solver.solve(s.step, func(x []float64) {
		copy(s.k2, x)
		s.minus(s.linear, x)
		axpy(1/s.ahead, s.k2, x)
	}, s.precondition, 1e-3)
	copy(s.x, s.from)
	axpy(1, s.step, s.x)
	s.work.Iterations++
	err := s.walk()
	return norm(s.r), err
}

// stay makes the period just walked the one that steps start from.
func (s *search) stay() {
	s.linear, s.spare = s.pace.track, s.linear
	s.pace.track = s.spare
	copy(s.from, s.x)
	copy(s.start, s.r)
}

// follow goes on to the end of the period that steps start from.
func (s *search) follow(g grade) error {
	copy(s.x, s.from)
	axpy(1, s.start, s.x)
	return s.here(g)
}
