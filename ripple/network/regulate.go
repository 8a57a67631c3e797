package network

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Regulation is what seeks a drive by what it reads, of a chain whose states may jump: what
// strikes above a drive need not go out below it.
type Regulation[S any] struct {
	Wanted quantity.Voltage // what is to be read
	First  quantity.Voltage // drive to begin with
	// Limit is the most that the drive can reach.
	Limit func() (quantity.Voltage, error)
	// At is the state at a drive, sought from the one before, which is nil at first; Read is
	// what the regulation reads of it.
	At   func(peak quantity.Voltage, before *S) (S, error)
	Read func(S) quantity.Voltage
}

// regulatedWithin is how near the reading comes to what is wanted, as a part of it: far below
// what a divider is off.
const regulatedWithin = 1e-4

// mostTrials is how many drives are tried until the regulation is at rest.
const mostTrials = 40

// tried is a drive with its state and its reading.
type tried[S any] struct {
	peak, read quantity.Voltage
	state      S
}

// Regulate finds the state in which the regulation is at rest: where it reads what it wants,
// within a ten thousandth; at the limit of the drive where that is not enough; or just below
// a jump over what it wants. In proportion first, then by false position between the nearest
// drives. A lack where it does not come to rest.
func Regulate[S any](r Regulation[S]) (S, error) {
	var low, high tried[S] // the nearest that read too little and too much
	peak := r.First
	var before *S
	for range mostTrials {
		state, err := r.At(peak, before)
		if err != nil {
			return state, err
		}
		at := tried[S]{peak, r.Read(state), state}
		if quantity.AtMost(math.Abs(float64(at.read/r.Wanted-1)), regulatedWithin) || r.exhausted(at) {
			return state, nil
		}
		if at.read < r.Wanted {
			low = at
		} else {
			high = at
		}
		if low.peak > 0 && high.peak > 0 && quantity.AtMost(float64(high.peak/low.peak-1), regulatedWithin) {
			return low.state, nil // it reads too much with a little more: what strikes keeps it there
		}
		if peak, err = r.next(at, low, high); err != nil {
			return state, err
		}
		before = &at.state
	}
	var none S
	return none, lack.Failed("the regulation does not come to rest")
}

// exhausted reports whether too little is read with all the drive there is.
func (r Regulation[S]) exhausted(at tried[S]) bool {
	if at.read >= r.Wanted {
		return false
	}
	limit, err := r.Limit()
	return err == nil && quantity.AtLeast(at.peak, limit)
}

// next is the drive to try next.
func (r Regulation[S]) next(at, low, high tried[S]) (quantity.Voltage, error) {
	if low.peak > 0 && high.peak > 0 {
		p := low.peak + (r.Wanted-low.read)*(high.peak-low.peak)/(high.read-low.read)
		edge := (high.peak - low.peak) / 20
		return min(max(p, low.peak+edge), high.peak-edge), nil
	}
	if at.read > r.Wanted {
		return at.peak * max(r.Wanted/at.read, 0.1), nil
	}
	limit, err := r.Limit()
	if err != nil {
		return 0, err
	}
	if at.read <= 0 || at.peak*r.Wanted/at.read > limit {
		return limit, nil
	}
	return min(limit, at.peak*(1+1.02*(r.Wanted/at.read-1))), nil
}
