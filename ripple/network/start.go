package network

import (
	"math"
	"slices"

	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// StartOptions say how a circuit starts; the zero value of Ramp is full drive at once.
type StartOptions struct {
	Node  circuit.Node      // that has to come up
	Share quantity.Fraction // of its final mean; zero is 95 %
	Ramp  quantity.Time     // over which the drive rises in proportion to time

	every bool // period is walked: no leaps
}

// Startup is the start of a circuit from all capacitors discharged, the drive from
// phase zero.
type Startup struct {
	// Reached is the first instant at which the potential of the node itself, not its
	// mean, has the share of its final mean.
	Reached quantity.Time
	// Stresses are those between the start and the end of the period in which that
	// happens; of the periods passed over in leaps, only some are looked at.
	Stresses
	Work Work
}

// Start follows a circuit from nothing until a node has come up, given the periodic
// state it goes to. Single periods are walked at first and at the end; between,
// leaps of many periods follow the envelope to 0.2 % each. A ramp is a staircase of
// at most a hundred steps. It is a lack where the node does not come up, or takes
// more than 400 leaps.
func Start(p *Periodic, o StartOptions) (*Startup, error) {
	if o.Share == 0 {
		o.Share = 0.95
	}
	final, err := p.At(o.Node)
	if err != nil {
		return nil, err
	}
	r := &rise{options: o, periodic: p, level: math.Abs(float64(final.Mean) * float64(o.Share)), sign: math.Copysign(1, float64(final.Mean)), reached: math.Inf(1)}
	if err := r.run(); err != nil {
		return nil, err
	}
	r.out.Stresses = r.ledger.Stresses
	return &r.out, nil
}

// rise is a start under way.
type rise struct {
	options  StartOptions
	periodic *Periodic
	level    float64
	sign     float64
	ledger   *ledger
	x        []float64
	periods  float64
	reached  float64 // within the period last walked
	highest  float64 // potential of the node in that period, in the direction of its rise
	out      Startup
}

func (r *rise) run() error {
	stairs := r.stairs()
	for k := range stairs {
		until := math.Ceil(float64(r.options.Ramp) * float64(r.periodic.Frequency) * float64(k+1) / float64(stairs))
		e, err := r.stair((float64(k) + 0.5) / float64(stairs))
		if err != nil {
			return err
		}
		if done, err := r.climb(e, until); done || err != nil {
			return err
		}
	}
	e, err := r.stair(1)
	if err != nil {
		return err
	}
	_, err = r.climb(e, math.Inf(1))
	return err
}

// stairs is the number of steps of the ramp.
func (r *rise) stairs() int {
	return int(math.Min(100, math.Ceil(float64(r.options.Ramp)*float64(r.periodic.Frequency))))
}

// stair sets up the circuit at a part of the drive.
func (r *rise) stair(part float64) (*envelope, error) {
	c := r.periodic.Circuit
	f := float64(r.periodic.Frequency)
	if part < 1 {
		c = c.Each(func(e *circuit.Element) bool {
			if o := wave(e, f); e.Kind == circuit.Source && e.Wave.Form != circuit.Direct && o.size() > 0 {
				e.Wave.Amplitude *= quantity.Voltage(part)
			}
			return true
		})
	}
	s, err := newSystem(c, f, smallestLeak*f, r.periodic)
	if err != nil {
		return nil, err
	}
	h := newShooter(s)
	h.pace.care = coarse
	h.guess(0)
	passed := math.Max(h.pace.passed, 0.1*s.typical*s.scale)
	if r.x != nil {
		copy(h.x, r.x)
	} else {
		for i := range h.x {
			h.x[i] = 0
		}
	}
	// Voltages across what hangs on a source rest on its amplitude: each stair has its own
	// ledger, which goes on where the last one ended.
	next := newLedger(s)
	if r.ledger != nil {
		next.of, next.last = r.ledger.of, r.ledger.last
	}
	r.ledger = next
	h.judge(passed)
	return newEnvelope(h), nil
}

// look walks the period at the present state and reports whether the node comes up
// in it.
func (r *rise) look(e *envelope) (bool, error) {
	if err := e.here(rough); err != nil {
		return false, err
	}
	s, node := e.frame, r.options.Node
	way := span{e.at(s.group[node]), grounded, s.offset[node], -1}
	r.reached, r.highest = e.linear.reaches(&way, r.sign, r.level)
	passed := e.linear.passed()
	e.judge(math.Max(math.Min(e.pace.passed, passed), 0.01*passed))
	return !math.IsInf(r.reached, 1), nil
}

// climb goes on on one stair until the node has come up or the stair ends. Where a
// leap went past the instant it goes back and takes shorter ones, until a single
// period holds it.
func (r *rise) climb(e *envelope, until float64) (done bool, err error) {
	defer func() {
		r.x, r.periods = e.x, e.periods
		r.out.Work.add(e.pace.work)
		r.out.Work.Products += e.work.Products
	}()
	e.periods = r.periods
	at := newFoothold(e)
	for leaps := 0; leaps < 400 || r.options.every; leaps++ {
		if e.periods >= until {
			return false, nil
		}
		if done, err := r.tread(e, at); done || err != nil {
			return done, err
		}
		if r.options.every {
			e.pass()
			continue
		}
		if err := e.advance(at.reach(until, r.level)); err != nil {
			return false, err
		}
	}
	return false, lack.Failed("the start took more than 400 leaps")
}

// tread looks at the period at the present state: it is the one in which the node comes
// up, or a foothold, or beyond it, and then the climb goes back to the last foothold.
func (r *rise) tread(e *envelope, at *foothold) (done bool, err error) {
	leapt := e.periods-at.periods > 1
	at.track, e.linear = e.linear, at.track
	up, err := r.look(e)
	if err == nil && leapt {
		up, err = r.better(e, at, up)
	}
	if err != nil {
		return false, err
	}
	if !up || !leapt {
		r.ledger.enter(e.linear)
	}
	switch {
	case up && !leapt:
		r.out.Reached = quantity.Time(e.periods*e.period + r.reached)
		return true, nil
	case up:
		at.beyond, at.above = e.periods, r.highest
		at.back(e)
	default:
		at.below = r.highest
		at.hold(e)
	}
	return false, nil
}

// better looks again where the period after a leap was not the one foreseen: it is walked, or,
// where little is amiss, another passes.
func (r *rise) better(e *envelope, at *foothold, up bool) (bool, error) {
	walked, err := e.again()
	if err != nil {
		return false, err
	}
	if !walked {
		if e.doubtful || e.wandered() <= wandering || e.periods+1 >= at.beyond {
			return up, nil
		}
		e.pass()
	}
	return r.look(e)
}

// foothold is the last state at which the node had not come up, with its period.
type foothold struct {
	x, change    []float64
	track        *track // while another period is walked; else one to walk on
	periods      float64
	beyond       float64 // periods at which it had
	below, above float64 // its highest voltage here and there
}

func newFoothold(e *envelope) *foothold {
	return &foothold{x: slices.Clone(e.x), change: slices.Clone(e.start), track: &track{system: e.system}, periods: e.periods, beyond: math.Inf(1)}
}

// hold makes the period walked last the foothold.
func (f *foothold) hold(e *envelope) {
	copy(f.x, e.from)
	copy(f.change, e.start)
	f.periods = e.periods
}

// back goes to the foothold.
func (f *foothold) back(e *envelope) {
	copy(e.x, f.x)
	copy(e.from, f.x)
	copy(e.start, f.change)
	e.linear, f.track = f.track, e.linear
	e.periods = f.periods
}

// reach is the number of periods that the next leap may take: with the period that passes after
// it, it ends before what is known to lie beyond.
func (f *foothold) reach(until, level float64) float64 {
	most := until - f.periods
	if math.IsInf(f.beyond, 1) {
		return most
	}
	left := f.beyond - f.periods
	part := (level - f.below) / (f.above - f.below)
	return math.Min(most, math.Max(1, math.Min(math.Floor(left*part)-1, left-2)))
}
