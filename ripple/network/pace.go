package network

import (
	"math"

	"kilovet/hv/lack"
)

// grade is how finely a period is walked. The difference between the answers of the two
// bounds the error of the finer.
type grade int

const (
	rough grade = iota
	fine
)

// bounds are those of a grade; each is tighter in the finer one, the step after an event
// included.
type bounds struct {
	rough   float64 // roughness a step may have, relative to the ladder's energy at the drive's peak
	charge  float64 // charge a step may misplace in a diode, relative to that of a period
	longest float64 // step, in periods
	first   float64 // step after an event, in periods
	growth  float64 // of the step at most
}

func (g grade) bounds() bounds {
	if g == rough {
		return bounds{rough: 1e-3, charge: 0.05, longest: 1.0 / 12, first: 1.0 / 400, growth: 10}
	}
	return bounds{rough: 3e-5, charge: 0.005, longest: 1.0 / 24, first: 1.0 / 1600, growth: 6}
}

// pace walks a period. Its control of the step makes the end of the period a
// continuous function of the start: a step is shortened without a jump, an event
// only cuts it, and after each event the steps start anew. So the corrections of
// the state come to rest.
type pace struct {
	*walker
	bounds
	track   *track
	next    float64
	energy  float64 // norm the roughness is relative to
	passed  float64 // largest charge a diode passes in a period
	patient int     // steps left
	burst   float64 // time the next settling takes
}

// walk takes the walker from where it was placed through one period.
func (p *pace) walk() error {
	p.track.clear()
	p.patient, p.burst = 4000+400*len(p.diodes), p.grain
	p.work.Periods++
	if p.square {
		if err := p.stretch(p.period / 2); err != nil {
			return err
		}
		p.sign = -1
		p.switched()
	}
	return p.stretch(p.period)
}

// stretch settles after a jump and goes on to an instant.
func (p *pace) stretch(until float64) error {
	if err := p.settleFor(p.grain); err != nil {
		return err
	}
	p.lastStep().jump = true
	for p.time < until {
		if p.patient--; p.patient < 0 {
			return lack.Failed("a period took more than %d steps", len(p.track.steps))
		}
		if err := p.step(until); err != nil {
			return err
		}
	}
	return nil
}

// settleFor settles which diodes conduct over a short time.
func (p *pace) settleFor(h float64) error {
	p.factor = p.track.slot()
	if err := p.settle(h); err != nil {
		return err
	}
	p.track.keep(p.walker, h)
	p.lastStep().euler = true
	p.accept(h)
	p.next = p.first * p.period
	return nil
}

// rush goes on through a burst of switchings too fast to be followed one by one:
// each settling in a row takes twice the time of the one before.
func (p *pace) rush(until float64) error {
	h := math.Min(p.burst, until-p.time)
	p.burst = math.Min(2*p.burst, p.first*p.period)
	return p.settleFor(h)
}

func (p *pace) lastStep() *step { return &p.track.steps[len(p.track.steps)-1] }

// step takes one step, at most to an instant.
func (p *pace) step(until float64) error {
	p.factor = p.track.slot()
	h, left := math.Min(p.next, p.longest*p.period), until-p.time
	if h > left-1e-6*p.period {
		h = left
	}
	p.try(h)
	strain := p.strain(h)
	for pass := 0; strain > 1 && h > p.grain; pass++ {
		if pass > 0 && strain < 1.5 {
			break
		}
		h /= math.Min(10, math.Cbrt(strain))
		p.try(h)
		strain = p.strain(h)
	}
	full := h
	h, diode := p.locate(h)
	if diode >= 0 && h <= p.grain {
		return p.rush(until)
	}
	p.take(h, diode)
	if h == left {
		p.time = until
	}
	p.next = full * math.Min(p.growth, 1/math.Cbrt(strain+1e-9))
	if diode >= 0 {
		p.next = math.Min(p.next, p.first*p.period)
	}
	return nil
}

// take makes the trial step the state and records it.
func (p *pace) take(h float64, diode int) {
	p.track.keep(p.walker, h)
	if p.lastStep().event = diode >= 0; diode >= 0 {
		p.flip(diode)
	}
	p.accept(h)
	if h > 100*p.grain {
		p.burst = p.grain
	}
}

// strain is the largest of what limits a step, one where it is just allowed.
func (p *pace) strain(h float64) float64 {
	strain := p.roughness() / (p.rough * p.energy)
	if p.passed == 0 {
		return strain
	}
	limit, swing := p.charge*p.passed/h, p.sine[0]-back(p.sine[1], p.sine[2], p.sine[3])
	for i := range p.diodes {
		if d := &p.diodes[i]; p.on[i] {
			bend := d.difference(p.u) - back(d.difference(p.stage[0]), d.difference(p.stage[1]), d.difference(p.stage[2]))
			bend += d.offset.sine * swing
			strain = math.Max(strain, math.Abs(bend)*d.on/limit)
		}
	}
	return strain
}
