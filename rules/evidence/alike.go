package evidence

import "kilovet/ripple/network"

// beside is a state that a search starts from, and two that differ as what is sought does
// from that one; nil where there are none.
type beside struct{ from, before, after *network.Periodic }

// options are those of a search for a state.
func (e *Evidence) options(near beside, swift bool) network.Options {
	return network.Options{Frequency: e.chain.Drive.Frequency.V, From: near.from, Before: near.before, After: near.after, Swift: swift}
}

// alike is what to start from: the state of the chain before it was changed, of the nominal
// chain at the same drive, or of the whole and nominal one at its full drive; nothing where
// this is the one, or where it has none.
func (e *Evidence) alike() beside {
	near, c := e, e.condition
	full := Condition{State: c.State}
	switch {
	case e.before != nil:
		near = e.before.Under(c)
	case c.Corner != Nominal && c.Fault.Name == "":
		c.Corner = Nominal
		near = e.Under(c)
	case c.key() != full.key():
		near = e.Under(full)
	default:
		return beside{}
	}
	at := beside{from: near.found()}
	if at.from != nil {
		at.before, at.after = e.likewise()
	}
	return at
}

// likewise are the states of the nominal chain and of a corner in which all parts are at one
// end, at the full drive of the state; where that is sought itself and no emission loads it,
// while regulation holds the voltage. A corner makes about as much of one as of the other.
func (e *Evidence) likewise() (nominal, corner *network.Periodic) {
	c := e.condition
	if e.before != nil || e.failed() || c.Corner != AllLow && c.Corner != AllHigh {
		return nil, nil
	}
	full := Condition{State: c.State, Corner: c.Corner}
	if c.key() == full.key() {
		if full.State = Cold; c.State != Lost {
			return nil, nil
		}
	}
	corner = e.Under(full).found()
	full.Corner = Nominal
	if nominal = e.Under(full).found(); nominal == nil || corner == nil {
		return nil, nil
	}
	return nominal, corner
}

// found is the state under the condition; nil where it has none.
func (e *Evidence) found() *network.Periodic {
	s, err := e.solution()
	if err != nil {
		return nil
	}
	return s.Periodic
}

// working is the state of the chain at work, to start from.
func (e *Evidence) working() beside { return beside{from: e.Under(Condition{State: Working}).found()} }
