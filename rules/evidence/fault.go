package evidence

import (
	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/ripple/network"
)

// Fault is a change of the circuit, and how the regulation answers it.
type Fault struct {
	Name string
	Edit func(*circuit.Circuit) *circuit.Circuit
	Loop Loop
	// Part is the element concerned, where there is one; Gone says that it is no part any
	// more, so that its own ratings say nothing.
	Part string
	Gone bool
	// Strains says that the regulation is likely to end at its limit: it is tried first.
	Strains bool
	// Cuts says that it cuts the ladder in two for direct current.
	Cuts bool
}

// Loop is how the regulation answers a fault.
type Loop int

// The answers of the regulation.
const (
	Held     Loop = iota // it goes on holding the true voltage: a thought, not a failure
	Reads                // it holds what its divider reads, as far as the drive goes
	RunsAway             // it does not work: the drive goes to its limit
)

// failed reports whether something has failed under the condition.
func (e *Evidence) failed() bool { return e.condition.Fault.Loop != Held }

// Failed reports whether something has failed under the condition: then it is judged as a
// single fault.
func (e *Evidence) Failed() bool { return e.failed() }

// Healthy is the evidence under the same condition without the fault.
func (e *Evidence) Healthy() *Evidence {
	c := e.condition
	c.Fault = Fault{}
	return e.Under(c)
}

// failure is where a chain comes to rest with a fault.
type failure struct {
	network.Settled
	peak quantity.Voltage
	// Circuit is the circuit at rest, with what has struck or ended.
	Circuit *circuit.Circuit
}

func (e *Evidence) failure() (failure, error) {
	return remember(e, "failure", func() (failure, error) {
		if !e.HasSupply() {
			return failure{}, lack.Key("drive", "multiplier")
		}
		if e.holds() && e.condition.Fault.Loop == Reads {
			return e.regulated()
		}
		peak, err := e.unregulated()
		if err != nil {
			return failure{}, err
		}
		return e.settle(peak, e.alike())
	})
}

// unregulated is the peak of a drive that no regulation moves.
func (e *Evidence) unregulated() (quantity.Voltage, error) {
	share := e.condition.Drive
	if e.condition.Peak != 0 {
		return e.condition.Peak, nil
	}
	if e.condition.Fault.Loop == RunsAway && e.condition.Peak == 0 && (share == 0 || share == 1) {
		return e.limit()
	}
	return e.Healthy().Peak()
}

// settle is where the chain comes to rest at a drive.
func (e *Evidence) settle(peak quantity.Voltage, near beside) (failure, error) {
	c, err := e.circuitAt(peak)
	if err != nil {
		return failure{}, err
	}
	s, err := network.Settle(trusted(c), network.Failed{Part: e.condition.Fault.Part, Ladder: e.condition.Fault.Cuts}, e.options(near, true))
	if err != nil {
		return failure{}, err
	}
	return failure{s, peak, s.Circuit}, nil
}

// regulated is where the regulation comes to rest: where its divider reads what it read
// before, or at the limit of the drive where that is not enough.
func (e *Evidence) regulated() (failure, error) {
	wanted, peak, err := e.wanted()
	if err != nil {
		return failure{}, err
	}
	if at, err := e.seek(wanted, peak); err == nil {
		return at, nil
	}
	return network.Regulate(network.Regulation[failure]{
		Wanted: wanted, First: peak, Limit: e.limit, Read: e.read,
		At: func(peak quantity.Voltage, before *failure) (failure, error) {
			near := e.alike()
			if before != nil {
				near = beside{from: before.Periodic}
			}
			return e.settle(peak, near)
		},
	})
}

// seek finds where the regulation holds its reading, where nothing strikes or ends there.
func (e *Evidence) seek(wanted, first quantity.Voltage) (failure, error) {
	if e.condition.Fault.Strains || e.condition.Fault.Cuts {
		return failure{}, lack.Failed("the regulation is likely to end at its limit")
	}
	peak, p, err := network.Seek(network.HoldOptions{
		Node: "divider.tap", Set: wanted, First: first,
		Options: e.options(e.alike(), true),
		Build:   e.trustedAt,
	})
	if err != nil {
		return failure{}, err
	}
	limit, err := e.limit()
	if err != nil || peak > limit || p.Circuit.Reference() != "ground" || !network.AtRest(p) {
		return failure{}, lack.Failed("the regulation does not simply hold its reading")
	}
	return failure{network.Settled{Periodic: p}, peak, p.Circuit}, nil
}

// wanted is what the regulation wants to read at the tap, and the drive it begins with.
func (e *Evidence) wanted() (reading, peak quantity.Voltage, err error) {
	healthy := e.Healthy()
	if peak, err = healthy.Peak(); err != nil {
		return 0, 0, err
	}
	if limit, err := e.limit(); err == nil && e.condition.Fault.Strains {
		peak = limit
	}
	p, err := healthy.solution()
	if err != nil {
		return 0, 0, err
	}
	s, err := p.between("divider.tap", "ground")
	return magnitude(s.Mean), peak, err
}

// read is what the regulation reads: the mean at the tap, negative where the polarity is
// the wrong one.
func (e *Evidence) read(f failure) quantity.Voltage {
	s, err := periodic{f.Periodic}.between("divider.tap", f.Circuit.Reference())
	if err != nil {
		return 0
	}
	if e.chain.Multiplier.Negative() {
		return -s.Mean
	}
	return s.Mean
}

// Struck are the gaps and clamps that a fault makes conduct, Ended the constant currents
// that it ends.
func (e *Evidence) Struck() ([]string, error) {
	f, err := e.failure()
	return f.Struck, err
}

// Ended are the constant currents that a fault ends.
func (e *Evidence) Ended() ([]string, error) {
	f, err := e.failure()
	return f.Ended, err
}
