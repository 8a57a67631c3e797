package network

import (
	"slices"

	"kilovet/hv/quantity"
)

// stillest is the state of a search in the fine grade whose correction was the least
// of those over whose period hardly anything changed. A circuit that rings from one
// switching to the next is walked in steps that differ from period to period, so that the
// change over one keeps a rest that is not rounding and that Newton's method, for charges
// which only leakage ties down, makes much of.
type stillest struct {
	spot
	found bool
	step  float64 // the correction, in parts of the state
	times int     // such states in the search for the fine grade that is under way
}

const (
	quiet = 1e-7 // the change over a period, in parts of the state, that counts as hardly any
	loose = 3e-3 // the correction, in parts of the state, up to which such a state is taken
	tries = 8    // such states after which no better one is expected
)

// rings reports whether the search under way has seen so many of such states that no
// better one is expected.
func (s *search) rings() bool { return s.stillest.times >= tries }

// keepStillest keeps the state that was walked last where it is stiller than those before.
func (s *search) keepStillest(g grade, size float64) {
	step := norm(s.step) / norm(s.x)
	if g != fine || size > quiet*norm(s.x) || !(step <= loose) || s.largestCharge(s.r) > 1e-5*s.pace.passed {
		return
	}
	b := &s.stillest
	b.times++
	if !b.found || step < b.step {
		s.mark(&b.spot)
		b.found, b.step = true, step
	}
}

// atStillest is the stillest state of a search that was given up, with how far it may be
// off; where there is none it is why the search was given up.
func (s *search) atStillest(why error) (*Periodic, error) {
	b := &s.stillest
	if !b.found {
		return nil, why
	}
	s.goBack(&b.spot)
	if err := s.here(fine); err != nil {
		return nil, err
	}
	s.correct()
	after := append([]float64(nil), s.x...)
	axpy(1, s.step, after)
	s.pace.track = s.linear
	p := s.periodic()
	p.Uncertainty, p.Adrift = quantity.Voltage(s.apart(s.x, after)), quantity.Fraction(b.step)
	p.Assumptions = append(slices.Clone(p.Assumptions), p.Ringing())
	if err := p.plausible(); err != nil {
		return p, err
	}
	return p, p.sober()
}

// Ringing says how exactly a state that is adrift is known; empty of any other.
func (p *Periodic) Ringing() string {
	if p.Adrift == 0 {
		return ""
	}
	return "the supply rings from one switching to the next: voltages that only leakage ties down are known to " + quantity.Text(p.Adrift)
}
