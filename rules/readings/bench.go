package readings

import (
	"math"

	"kilovet/hv/match"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/plan"
)

// bench holds the readings with their errors, ready to be held against hypotheses.
type bench struct {
	e       *evidence.Evidence
	all     []taken
	read    []float64
	healthy []float64
	own     []float64 // standard errors
	common  []match.Common
}

// Standard errors of readings: common practice, no source.
const (
	readShare  = 0.005 // how well a steady reading is taken
	driveShare = 0.01  // how well the drive is known
	resolution = 1e-3  // of the largest reading of the instrument
	faintest   = 1e-9  // in SI units: an instrument that shows nothing is not read better
	effect     = 0.05  // of what a fault changes: it varies with the tolerances of the other parts
)

// errors are the standard errors of the readings under a prediction.
func (b *bench) errors(predicted []float64) []float64 {
	all := make([]float64, len(b.own))
	for i, own := range b.own {
		all[i] = math.Hypot(own, effect*(predicted[i]-b.healthy[i]))
	}
	return all
}

func newBench(e *evidence.Evidence, all []taken) *bench {
	b := &bench{e: e, all: all}
	largest := map[string]float64{}
	for _, t := range all {
		b.read, b.healthy = append(b.read, t.read), append(b.healthy, t.expected.Value)
		name := t.step.Readings[t.place].Instrument
		largest[name] = max(largest[name], t.expected.Value)
	}
	for _, t := range all {
		name := t.step.Readings[t.place].Instrument
		own := readShare*t.expected.Value + resolution*largest[name]
		if t.expected.Value <= 0 { // its bounds say what it may show by itself
			own = max(own, t.expected.High/2, faintest)
		}
		b.own = append(b.own, own)
	}
	b.common = b.shared()
	return b
}

// shared are the errors common to many readings: that of the drive, and for each
// instrument what its bounds allow, taken as two standard errors.
func (b *bench) shared() []match.Common {
	every := match.Common{Share: driveShare}
	var names []string
	of := map[string]*match.Common{}
	for i, t := range b.all {
		every.Of = append(every.Of, true)
		name := t.step.Readings[t.place].Instrument
		c := of[name]
		if c == nil {
			c = &match.Common{Of: make([]bool, len(b.all))}
			of[name], names = c, append(names, name)
		}
		c.Of[i] = true
		if v := t.expected; v.Value > 0 {
			c.Share = max(c.Share, (v.High-v.Low)/v.Value/4)
		}
	}
	all := []match.Common{every}
	for _, name := range names {
		all = append(all, *of[name])
	}
	return all
}

// predict is what every reading would be with a change of the circuit. Between the
// lowest and the highest drive of a state readings lie on a straight line, as those of
// any circuit do whose diodes only have a drop; two solutions serve for all its steps.
func (b *bench) predict(change evidence.Fault) ([]float64, error) {
	values := make([]float64, len(b.all))
	for _, state := range evidence.States {
		low, high := b.span(state)
		if low == nil {
			continue
		}
		at, err := b.reads(*low, change)
		if err != nil {
			return nil, err
		}
		top := at
		if low.Peak < high.Peak {
			if top, err = b.reads(*high, change); err != nil {
				return nil, err
			}
		}
		for i, t := range b.all {
			if t.at.State == state {
				values[i] = at[t.place] + (top[t.place]-at[t.place])*share(t.at.Peak, low.Peak, high.Peak)
			}
		}
	}
	return values, nil
}

func share(x, low, high quantity.Voltage) float64 {
	if low >= high {
		return 0
	}
	return float64((x - low) / (high - low))
}

// span is the lowest and the highest drive that was read in a state.
func (b *bench) span(state evidence.State) (low, high *evidence.Condition) {
	for i := range b.all {
		at := &b.all[i].at
		if at.State != state {
			continue
		}
		if low == nil || at.Peak < low.Peak {
			low = at
		}
		if high == nil || at.Peak > high.Peak {
			high = at
		}
	}
	return low, high
}

// reads is what the instruments of a step show with a change of the circuit.
func (b *bench) reads(at evidence.Condition, change evidence.Fault) ([]float64, error) {
	at.Fault = both(change, at.Fault)
	return plan.Values(b.e, at)
}
