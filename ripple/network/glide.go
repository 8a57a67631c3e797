package network

import "math"

// glide follows the state from period to period in leaps of many periods. With g(x) the
// change of the state over the period that starts at x, and M the map of small changes over
// a period, what a leap has to sum up is
//
//	d(n+1) = M d(n) + g(x) + N(n),
//
// period by period, where N is what g departs from the line by. N is known at the last
// states that were walked and continued from there as a polynomial; once the period at the
// end of the leap is walked, N is known there too, and the state is put right by it (the
// exponential form of the methods of Adams in predictor and corrector: Hochbruck and
// Ostermann, Acta Numer. 19 (2010) 209). So a leap costs one period, and is exact where the
// diodes conduct as they did.
type glide struct {
	*shooter
	periods float64 // since the start
	linear  *track  // of the period walked last
	way     float64 // length of the way to the state it goes to

	points []waypoint            // walked, the last is the present one
	flown  float64               // periods of the leap that has yet to prove itself
	reach  float64               // periods that the next leap may take
	m      [][]float64           // M
	known  bool                  // whether M is
	age    int                   // periods walked since it was found
	terms  [mostPoints][]float64 // of the polynomial
	d, e   []float64
	spare  []float64
}

// waypoint is a state whose period was walked.
type waypoint struct {
	x, g    []float64
	periods float64
}

// amend is the part of the way by which a leap may be put right.
const amend = 5e-4

// old is the part of its rank that M must last, in periods walked: it takes about as long to
// find as an eighth of that many.
const old = 5

// fastest is how many times the leap before a leap may be.
const fastest = 4

// mostPoints are the states by which N is continued, the present one among them.
const mostPoints = 3

func newGlide(h *shooter, way float64) *glide {
	n := len(h.x)
	e := &glide{shooter: h, linear: h.pace.track, m: rows(n, n), reach: 1, way: way}
	e.pace.bounds = fine.bounds()
	for i := range e.terms {
		e.terms[i] = make([]float64, n)
	}
	e.d, e.e, e.spare = make([]float64, n), make([]float64, n), make([]float64, n)
	return e
}

// here walks the period at the present state. Where the leap that led to it does not prove
// itself, it goes back and takes a shorter one.
func (e *glide) here() error {
	if err := e.walk(); err != nil {
		return err
	}
	for !e.proves() {
		e.leap(math.Max(1, math.Floor(e.flown/3)))
		if err := e.walk(); err != nil {
			return err
		}
	}
	e.arrive()
	return nil
}

// past is the number of states before the present one.
func (e *glide) past() int { return len(e.points) - 1 }

// arrive notes the period walked last.
func (e *glide) arrive() {
	p := waypoint{}
	if len(e.points) == mostPoints {
		p = e.points[0]
		copy(e.points, e.points[1:])
		e.points = e.points[:mostPoints-1]
	}
	p.x, p.g, p.periods = append(p.x[:0], e.x...), append(p.g[:0], e.r...), e.periods
	e.points = append(e.points, p)
	e.flown = 0
}

// back goes back to the state before the present one.
func (e *glide) back() {
	e.points = e.points[:len(e.points)-1]
	e.periods = e.last().periods
	copy(e.x, e.last().x)
	e.reach = math.Inf(1)
}

func (e *glide) last() *waypoint { return &e.points[len(e.points)-1] }

// advance leaps on from the present state, by at most a number of periods.
func (e *glide) advance(most float64) {
	e.leap(math.Max(1, math.Min(most, e.reach)))
}

// leap takes as many periods, at most a number, as can be foreseen.
func (e *glide) leap(most float64) {
	at := e.last()
	copy(e.x, at.x)
	e.flown = 1
	if e.past() == 0 || most < 2 {
		axpy(1, at.g, e.x)
	} else {
		e.chart()
		e.continued()
		e.flown = e.foresee(at, most)
		axpy(1, e.d, e.x)
	}
	e.periods = at.periods + e.flown
}

// foresee sums up the periods of a leap until what the last state adds to the polynomial
// makes too much.
func (e *glide) foresee(at *waypoint, most float64) float64 {
	clear(e.d)
	clear(e.e)
	limit, past := e.limit(), e.past()
	for n := 0.0; n < most; n++ {
		e.through(e.d)
		axpy(1, at.g, e.d)
		for i, a := range e.terms[:past] {
			axpy(e.basis(i, n), a, e.d)
		}
		e.through(e.e)
		axpy(e.basis(past-1, n), e.terms[past-1], e.e)
		if n >= 1 && norm(e.e) > limit {
			return n + 1
		}
	}
	return most
}

// proves puts the state at the end of a leap right by N as it is there, and reports
// whether that was little enough.
func (e *glide) proves() bool {
	if e.flown <= 1 {
		if e.flown == 1 {
			e.reach = fastest
		}
		return true
	}
	last := e.past()
	amiss := e.terms[last]
	e.departs(e.x, e.r, amiss)
	for k := range last {
		axpy(-e.basis(k, e.flown), e.terms[k], amiss)
	}
	clear(e.d)
	for n := 0.0; n < e.flown; n++ {
		e.through(e.d)
		axpy(e.basis(last, n)/e.basis(last, e.flown), amiss, e.d)
	}
	wrong, limit := norm(e.d), e.limit()
	e.reach = math.Floor(e.flown * math.Max(0.3, math.Min(fastest, 0.8*math.Cbrt(limit/(wrong+1e-30)))))
	if e.age++; e.reach <= e.flown && e.age >= len(e.m)/old {
		e.known = false
	}
	if wrong > limit {
		return false
	}
	axpy(1, e.d, e.x)
	axpy(-1, e.d, e.r)
	e.through(e.d)
	axpy(1, e.d, e.r)
	return true
}

// limit is by how much a leap may be put right.
func (e *glide) limit() float64 { return amend * e.way }
