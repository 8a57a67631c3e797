package network

import (
	"math"

	"kilovet/hv/lack"
)

// level leads the drive along with the state, so that the mean of a voltage is what it
// is to be: after each correction of the state the drive is changed by what the mean
// lacks, and the state by what that does to the circuit between the peaks.
type level struct {
	node  string
	span  span
	set   float64
	drive float64   // over that of the circuit that was given
	base  []float64 // the state by the circuit between the peaks at this drive

	lifted float64 // by which the mean was to change last
	trust  float64 // what it changed by over what it was to
}

// The part of the voltage to be held by which the mean may be off, and in a swift search.
const (
	held       = 1e-8
	heldNearly = 1e-6
)

// strange is the part of the drive by which a lift makes the changes over a period before
// and after it unlike: drops and loads do not grow with the drive.
const strange = 1e-5

// amplify multiplies the alternating sources.
func (s *system) amplify(f float64) {
	for _, v := range [][]float64{s.capSine, s.capSquare, s.condSine, s.condSquare} {
		scaleBy(v, f)
	}
	s.spans(func(p *span) { p.offset.amplify(f) })
	for n := range s.frame.offset {
		s.frame.offset[n].amplify(f)
	}
	s.scale *= f
}

func (o *offset) amplify(f float64) { o.square, o.sine = o.square*f, o.sine*f }

// driveTo brings the drive of a search to a multiple of the given one.
func (s *search) driveTo(drive float64) {
	l := s.level
	if l == nil || l.drive == drive {
		return
	}
	f := drive / l.drive
	s.amplify(f)
	l.span.offset.amplify(f)
	l.drive = drive
	s.peaks.renew()
	s.balance(l.base)
}

// tolerated is the part by which the mean may be off in a grade.
func (s *search) tolerated(g grade) float64 {
	switch {
	case g == rough:
		return 1e-3
	case s.swift:
		return heldNearly
	}
	return held
}

// lacking is the factor by which the mean over the period walked last, and what the
// correction in hand does to it all along the period, falls short of the voltage to be held.
func (s *search) lacking() (float64, error) {
	l := s.level
	if l == nil {
		return 1, nil
	}
	p := Periodic{track: s.linear}
	mean := float64(p.swing(&l.span).Mean)
	s.unpack(s.step, s.root, s.dq, s.di)
	s.work.Products++
	mean += s.linear.carryWatching(s.dq, s.di, s.lanes, s.du, &l.span)
	if mean/l.set <= 0 {
		return 0, lack.Failed("the load pulls the voltage to nothing")
	}
	return l.set / mean, nil
}

// lift changes the drive so that the mean comes nearer by a factor, and the state with
// it. How much drive that takes is what the circuit between the peaks says, put right by
// how well it said so the last time: a loaded ladder gives way by more than its drive.
func (s *search) lift(f float64) {
	l := s.level
	f = math.Max(0.5, math.Min(2, f))
	wanted := l.set * (1 - 1/f)
	if l.lifted != 0 {
		l.trust = math.Max(0.3, math.Min(3, l.trust*(1-wanted/l.lifted)))
	}
	axpy(-1, l.base, s.x)
	before, from := s.foreseen(), l.drive
	s.driveTo(from * f)
	if slope := (s.foreseen() - before) / (l.drive - from); slope*l.set > 0 {
		s.driveTo(math.Max(from/2, math.Min(2*from, from+wanted/slope/l.trust)))
	}
	l.lifted = wanted
	axpy(1, l.base, s.x)
}

// foreseen is the mean of the voltage in the circuit between the peaks.
func (s *search) foreseen() float64 {
	return middle(&s.level.span, s.peaks.u[:s.n], s.peaks.u[s.n:])
}

// middle is between what a voltage is at the two peaks.
func middle(s *span, positive, negative []float64) float64 {
	return s.offset.direct + (s.difference(positive)+s.difference(negative))/2
}

// aim guesses the drive from the circuit between the peaks.
func (s *search) aim() {
	const passes = 3 // drops and loads do not grow with the drive
	l := s.level
	if l == nil {
		return
	}
	for range passes {
		if f := l.set / s.foreseen(); f > 0 && !math.IsInf(f, 0) {
			s.lift(f)
		}
	}
	l.trust, l.lifted = 1, 0
}

// spot is a state a search may go back to.
type spot struct {
	x     []float64
	drive float64
}

func (s *search) mark(p *spot) {
	p.x = append(p.x[:0], s.x...)
	if s.level != nil {
		p.drive = s.level.drive
	}
}

func (s *search) goBack(p *spot) {
	s.driveTo(p.drive)
	copy(s.x, p.x)
}

// returnTo is the same at the present drive.
func (s *search) returnTo(p *spot) {
	if s.level == nil {
		s.goBack(p)
		return
	}
	drive := s.level.drive
	s.goBack(p)
	axpy(-1, s.level.base, s.x)
	s.driveTo(drive)
	axpy(1, s.level.base, s.x)
}
