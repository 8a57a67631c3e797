package evidence

import (
	"kilovet/hv/lack"
	"kilovet/ripple/network"
)

// LoadRemoved is what the output does when the emission stops and the drive stays where
// it was: what the chain shows in an open loop, and under a regulation slower than the
// multiplier. One that is quicker holds its set voltage; how quick it is, is not described.
func (e *Evidence) LoadRemoved() (*network.Changed, error) { return e.loadGoes(Working, Cold) }

// LoadApplied is what the output does when the emission sets in and the drive stays where
// it was without: how far it falls before a regulation brings it back.
func (e *Evidence) LoadApplied() (*network.Changed, error) { return e.loadGoes(Cold, Working) }

// loadGoes is what the output does between two states at the drive of the first.
func (e *Evidence) loadGoes(before, after State) (*network.Changed, error) {
	return remember(e, string("load from "+before+" to "+after), func() (*network.Changed, error) {
		from, err := e.In(before).solution()
		if err != nil {
			return nil, err
		}
		to, err := e.atDriveOf(before, after)
		if err != nil {
			return nil, err
		}
		n, err := to.node("output")
		if err != nil {
			return nil, err
		}
		return network.Change(from.Periodic, to.Periodic, network.ChangeOptions{Node: n})
	})
}

// atDriveOf is the periodic state of one state at the drive of another.
func (e *Evidence) atDriveOf(drive, state State) (periodic, error) {
	return remember(e, string("drive of "+drive+", "+state), func() (periodic, error) {
		if i, err := e.In(Working).Emission(); err != nil || i == 0 {
			return periodic{}, first(err, lack.Failed("no gun emits: there is no load that comes and goes"))
		}
		if err := e.In(drive).sound(); err != nil {
			return periodic{}, err
		}
		peak, err := e.In(drive).Peak()
		if err != nil {
			return periodic{}, err
		}
		near, err := e.In(drive).solution()
		if err != nil {
			return periodic{}, err
		}
		c, err := e.In(state).circuitAt(peak)
		if err != nil {
			return periodic{}, err
		}
		return e.solve(c, beside{from: near.Periodic}, true)
	})
}

func first(errs ...error) error {
	for _, err := range errs {
		if err != nil {
			return err
		}
	}
	return nil
}
