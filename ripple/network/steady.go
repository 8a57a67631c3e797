package network

import (
	"math"

	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
)

// Options of a steady state; the zero value serves.
type Options struct {
	// Frequency of the drive; zero takes that of the ladder's own source, or of the
	// first alternating source. Sources of another frequency are held at zero.
	Frequency quantity.Frequency
	// From is a periodic state of a similar circuit to start from.
	From *Periodic
	// Before and After are states of two circuits that differ from each other as the circuit
	// does from that of From, where there are such: what the difference makes of the charges
	// is foreseen.
	Before, After *Periodic
	// Most is the number of steps after which the search is given up; zero serves any
	// ordinary circuit several times over.
	Most int
	// Swift ends the search where the state is known to a part in a million and the charges
	// come back to 1e-5 of what the diodes pass, for figures that are compared with limits
	// and ratings; else it is 1e-9 and 1e-8. A slight correction is carried through the period
	// where no switching misplaces more charge than that. Where From is near the rough mesh is
	// left out, and the uncertainty is that of the state started from. No haste is made where
	// hardly more than leakage holds that state.
	Swift bool

	creeping bool // creep first: Newton's method is known to go astray
	walking  bool // walk a period again after its last correction, however slight

	work *Work // adds up what searches cost, given up or not
}

// idle is the frequency at which a circuit without an alternating source is walked;
// its state does not depend on it.
const idle quantity.Frequency = 1

// Steady finds the periodic state of a circuit under its drive. The error is a lack
// where a value of the circuit is in doubt, where sources contradict one another,
// where a load draws current that nothing feeds, or where the state was not reached.
func Steady(c *circuit.Circuit, o Options) (*Periodic, error) {
	if err := c.Doubt(); err != nil {
		return nil, err
	}
	s, err := compile(c, &o)
	if err != nil {
		return nil, err
	}
	h := o.search(s)
	if o.Most > 0 {
		h.most = o.Most
	}
	if o.work != nil {
		defer func() { o.work.add(h.pace.work) }()
	}
	return h.solve(o.similar())
}

// search sets up a search as the options ask for it.
func (o *Options) search(s *system) *search {
	h := newSearch(newShooter(s))
	h.swift, h.creeping = o.Swift, o.creeping
	if o.walking {
		h.slight = 0
	}
	return h
}

// compile sets up the equations of a circuit.
func compile(c *circuit.Circuit, o *Options) (*system, error) {
	frequency := o.Frequency
	if frequency == 0 {
		frequency = Drive(c)
	}
	return newSystem(c, float64(frequency), smallestLeak*float64(frequency), o.From)
}

// attempt is one way to begin a search.
type attempt struct {
	// press is how hard the diodes are pressed to conduct in the guess, in parts of the
	// charge that takes a ladder down by about its own voltage.
	press float64
	leaps int  // that Newton's method may take where it goes astray
	creep bool // creep instead
	anew  int  // guesses made anew, each pressed twice as hard, for diodes that sleep
}

// attempts are the ways to begin a search, in the order in which they are tried.
func attempts() []attempt {
	return []attempt{
		{press: 0.1, leaps: 1, anew: 2},
		{leaps: 2},
		{creep: true},
		{press: 0.05, leaps: 6, anew: 2},
		{press: 0.5, leaps: 10},
		{press: 5, leaps: 100},
	}
}

// ways are the attempts of a search, to creep before the others where it is to.
func (s *search) ways() []attempt {
	if !s.creeping {
		return attempts()
	}
	return append([]attempt{{creep: true}}, attempts()...)
}

// solve searches briskly, and with care where that does not get there.
func (s *search) solve(from *similar) (*Periodic, error) {
	p, err := s.search(from)
	if err == nil {
		return p, nil
	}
	if !s.rings() {
		s.pace.care = careful
		if p, err = s.search(from); err == nil {
			return p, nil
		}
	}
	return s.atStillest(err)
}

// search searches from the state of a similar circuit where there is one, as long as
// Newton's method gets there by itself, and then in one way after the other.
func (s *search) search(from *similar) (*Periodic, error) {
	if from != nil {
		s.swift = s.swift && !from.loose
		if s.swift {
			if p, err := s.pass(from); err == nil {
				return p, nil
			}
		}
		s.prepare(0)
		s.startFrom(from)
		if s.begin(attempt{}) == nil {
			return s.refine()
		}
	}
	var err error
	for _, a := range s.ways() {
		s.press(a.press)
		if err = s.begin(a); err == nil {
			return s.refine()
		}
	}
	return nil, err
}

// pass goes from the state of a similar circuit to that of this one in the fine grade
// alone, as far as Newton's method gets there by itself.
func (s *search) pass(from *similar) (*Periodic, error) {
	s.prepare(0)
	s.startFrom(from)
	s.judge(math.Max(s.pace.passed, from.state.track.passed()))
	s.patience, s.rousing = 0, rousing{}
	if err := s.converge(fine); err != nil {
		return nil, err
	}
	p := s.periodic()
	p.Uncertainty, p.amplified = from.state.Uncertainty, math.Max(p.amplified, from.state.amplified)
	if err := p.plausible(); err != nil {
		return p, err
	}
	return p, p.sober()
}

// periodic is the state found.
func (s *search) periodic() *Periodic {
	p := s.shooter.periodic()
	p.amplified = s.amplified
	return p
}

// prepare guesses a state at the given drive.
func (s *search) prepare(press float64) {
	s.recall.forget()
	s.driveTo(1)
	s.guess(press)
	if s.level != nil {
		copy(s.level.base, s.x)
	}
}

// nearby is the correction, in parts of the state, that ends the search in the rough grade:
// what Newton's method leaves after it is far less than the two grades differ by.
const nearby = 3e-4

// begin leads the guess near to rest in the rough grade.
func (s *search) begin(a attempt) error {
	if a.creep {
		return s.creep(rough, nearby)
	}
	s.patience, s.rousing = a.leaps, rousing{pressing: a.press, anew: a.anew}
	return s.approach(rough, nearby)
}

// refine goes from the state in the rough grade to that in the fine one.
func (s *search) refine() (*Periodic, error) {
	s.judge(math.Max(s.pace.passed, s.pace.track.passed()))
	var before spot
	s.mark(&before)
	if err := s.settleFine(&before); err != nil {
		return nil, err
	}
	p := s.periodic()
	after := append([]float64(nil), s.x...)
	s.returnTo(&before)
	p.Uncertainty = quantity.Voltage(s.apart(s.x, after))
	if err := p.plausible(); err != nil {
		return p, err
	}
	return p, p.sober()
}

// settleFine goes from a state in the rough grade to that in the fine one. Where
// corrections come no nearer, what a diode may pass before its switching is located may
// decide whether it switches at all: then they go on with care.
func (s *search) settleFine(from *spot) error {
	if s.pace.care > careful {
		s.patience = 2
		if s.converge(fine) == nil {
			return nil
		}
		s.goBack(from)
		s.pace.care = careful
		s.judge(s.pace.passed)
	}
	s.patience = 20
	if s.converge(fine) == nil {
		return nil
	}
	s.goBack(from)
	if s.level != nil || s.rings() {
		return s.unreached()
	}
	if err := s.creep(fine, 1e-7); err != nil {
		return err
	}
	if !s.balanced(true) {
		return s.unreached()
	}
	return nil
}

// Drive is the frequency of a circuit's drive: of the first alternating source of
// the ladder, else of any. Without one it is 1 Hz, and nothing depends on it.
func Drive(c *circuit.Circuit) quantity.Frequency {
	var f quantity.Frequency
	for i := range c.Elements {
		e := &c.Elements[i]
		if e.Kind != circuit.Source || e.Wave.Form == circuit.Direct || e.Wave.Frequency <= 0 {
			continue
		}
		if e.Role == circuit.Ladder {
			return e.Wave.Frequency
		}
		if f == 0 {
			f = e.Wave.Frequency
		}
	}
	if f == 0 {
		return idle
	}
	return f
}

// apart is the largest difference of a capacitor's voltage between two states.
func (s *shooter) apart(x, y []float64) float64 {
	_, v := s.widest(x, y)
	return v
}

// widest is the capacitor whose voltage differs most between two states, and by how much.
func (s *shooter) widest(x, y []float64) (name string, worst float64) {
	u := [2][]float64{make([]float64, s.n), make([]float64, s.n)}
	for i, z := range [][]float64{x, y} {
		s.unpack(z, s.root, s.q, s.amps)
		s.pace.place(s.q, s.amps, s.on)
		s.pace.try(s.grain)
		copy(u[i], s.pace.stage[2])
	}
	for i := range s.capacitors {
		c := &s.capacitors[i]
		if v := abs(c.difference(u[0]) - c.difference(u[1])); v > worst {
			name, worst = s.c.Elements[c.element].Name, v
		}
	}
	return name, worst
}
