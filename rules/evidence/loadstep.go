package evidence

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/ripple/network"
)

// LoadRemoved is what the output does when the emission stops and the drive stays where
// it was: what the chain shows in an open loop, and under a regulation slower than the
// multiplier. One that is quicker holds its set voltage; how quick it is, is not described.
func (e *Evidence) LoadRemoved() (*network.Changed, error) {
	return remember(e, "load removed", func() (*network.Changed, error) {
		from, err := e.In(Working).solution()
		if err != nil {
			return nil, err
		}
		to, err := e.atDriveOf(Working, Cold)
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

// LoadApplied is the magnitude of the output with the emission on and the drive where it
// was without: what it falls to before a regulation brings it back.
func (e *Evidence) LoadApplied() (quantity.Voltage, error) {
	p, err := e.atDriveOf(Cold, Working)
	if err != nil {
		return 0, err
	}
	s, err := p.between("output", "ground")
	return magnitude(s.Mean), err
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
		return e.solve(c, near.Periodic)
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
