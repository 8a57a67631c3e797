package evidence

import (
	"fmt"
	"math"

	"kilovet/hv/chain"
	"kilovet/hv/lack"
	"kilovet/hv/parallel"
	"kilovet/hv/quantity"
)

// Remedy is another value for one part, with which the disturbance just uses up the blur
// allowance, worked out by solving the chain again.
type Remedy struct {
	Part    string
	Unit    string // SI, of Now and Becomes
	Now     float64
	Becomes float64 // or as far as was tried
	// Reached reports whether the allowance is just met there; Relaxed whether it is met
	// already, so that this is how far the part may be relaxed.
	Reached, Relaxed bool
	// What the chain is with it: the disturbance at the cathode and the spot, and the side
	// effects. Disturbance and ripple are peak to peak.
	Disturbance, Drop, DriveNeeded quantity.Voltage
	Spot                           quantity.Length
	// Held reports whether the drive holds the set voltage with it.
	Held   bool
	Stored quantity.Energy
	Input  quantity.Power
	// Unknown is why it could not be worked out; nil where it was.
	Unknown error
}

// The search for a value: how far it goes, how near it comes, how often the chain is solved.
const (
	turnedBy  = 100.0 // times or parts of what is there
	nearness  = 0.01
	solutions = 7
	firstStep = 4.0
	leastTurn = 1.5
	feeble    = 0.02 // a change of the disturbance's logarithm that counts as none
)

// Remedies lists, part by part, what would bring the disturbance to just what the allowance
// leaves; a lack where no allowance leaves anything, or the ripple was measured.
func (e *Evidence) Remedies() ([]Remedy, error) {
	return remember(e, "remedies", func() ([]Remedy, error) {
		if !e.HasSupply() {
			return nil, lack.Key("drive", "multiplier")
		}
		if m, err := e.Measured(); m != nil || err != nil {
			return nil, lack.Failed("the ripple was measured: what a changed part makes of it is not known")
		}
		start, err := e.use()
		if err != nil {
			return nil, err
		}
		knobs := e.knobs()
		all := make([]Remedy, len(knobs))
		parallel.Each(len(knobs), func(i int) { all[i] = e.turn(knobs[i], start) })
		return all, nil
	})
}

// use is the disturbance over what the allowance leaves for it.
func (e *Evidence) use() (float64, error) {
	a, err := e.Allowed()
	if err != nil {
		return 0, err
	}
	if a.Scale == 0 {
		return 0, lack.Failed("the allowance leaves nothing for any disturbance")
	}
	return 1 / a.Scale, nil
}

// turn seeks the factor of a knob with which use is one: by secants of the logarithms,
// since ripple goes with powers of most values.
func (e *Evidence) turn(k knob, start float64) Remedy {
	r := Remedy{Part: k.name, Unit: k.unit, Now: k.now, Relaxed: start <= 1}
	a, ua := 0.0, math.Log(start)
	b := k.firstTurn(ua)
	if k.more == r.Relaxed {
		b = -b
	}
	bound := math.Copysign(math.Log(turnedBy), b)
	var last *Evidence
	for range solutions {
		x := e.Changed(k.change(math.Exp(b)))
		used, err := x.use()
		if err != nil {
			if last == nil { // else it cannot be carried further than before
				r.Unknown = err
			}
			break
		}
		ub := math.Log(used)
		last, r.Becomes, r.Reached = x, k.now*math.Exp(b), math.Abs(ub) < nearness
		beyond := (ub < 0) == r.Relaxed // it would have to go further still
		if r.Reached || beyond && quantity.Equal(b, bound) {
			break
		}
		next := bound
		if math.Abs(ub-ua) > feeble*math.Abs(b-a) {
			next = b - ub*(b-a)/(ub-ua)
		}
		if furthest := turnable(bound, b); !(next/bound > 0 && next/bound <= furthest) {
			next = bound * furthest
		}
		a, ua, b = b, ub, next
	}
	if last != nil {
		last.effects(&r)
	}
	return r
}

// turnable is how far, in parts of the way to the bound, the next turn may go: to the square
// of the last factor, since what the chain is far from that is not foreseen.
func turnable(bound, last float64) float64 { return math.Min(1, 2*last/bound) }

// firstTurn is the logarithm of the first factor to try, for that of the use at the start.
// A part with whose first power ripple goes at most takes about that power, or is relaxed as
// far as it is tried; one of which less is better falls to what others leave at most, and rises
// with about its first power.
func (k knob) firstTurn(use float64) float64 {
	switch relaxed := use <= 0; {
	case k.steep, !k.more && !relaxed:
		return math.Log(firstStep)
	case k.more && relaxed:
		return math.Log(turnedBy)
	}
	return math.Min(math.Max(math.Abs(use), math.Log(leastTurn)), math.Log(turnedBy))
}

// change turns the knob by a factor.
func (k knob) change(factor float64) Change {
	return Change{Name: fmt.Sprintf("%s times %.12g", k.name, factor), Edit: func(c *chain.Chain) { k.set(c, factor) }}
}

// effects notes what the changed chain is.
func (e *Evidence) effects(r *Remedy) {
	set := func(err error) {
		if err != nil && r.Unknown == nil {
			r.Unknown = err
		}
	}
	s, err := e.Spot()
	set(err)
	r.Disturbance, r.Spot = s.Disturbance.PeakToPeak, s.TotalFW50
	top, err := e.Potential("multiplier")
	set(err)
	out, err := e.Potential("output")
	set(err)
	r.Drop = magnitude(top) - magnitude(out)
	r.DriveNeeded, err = e.drive()
	set(err)
	r.Held = err == nil && quantity.AtMost(float64(r.DriveNeeded), float64(e.chain.Drive.Peak.V))
	r.Stored, err = e.StoredEnergy()
	set(err)
	r.Input, err = e.InputPower()
	set(err)
}

// drive is the peak that holds the set voltage, in an open loop that of the drive.
func (e *Evidence) drive() (quantity.Voltage, error) {
	if e.chain.Regulation == nil {
		return e.chain.Drive.Peak.V, nil
	}
	return e.PeakNeeded()
}
