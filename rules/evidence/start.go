package evidence

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/ripple/network"
)

// RiseTime is from discharged to 95 % of the final mean at the top of the multiplier,
// at full drive with the loads on and without regulation.
func (e *Evidence) RiseTime() (quantity.Time, error) {
	s, err := e.Start()
	if err != nil {
		return 0, err
	}
	return s.Reached, nil
}

// Start is the start at full drive, without regulation, and what the parts bear in it.
func (e *Evidence) Start() (*network.Startup, error) {
	return remember(e, "start", func() (*network.Startup, error) { return e.risen(0) })
}

// RampedStart is the start with the drive rising over its ramp; a lack where none is
// described.
func (e *Evidence) RampedStart() (*network.Startup, error) {
	return remember(e, "ramped start", func() (*network.Startup, error) {
		if !e.HasSupply() {
			return nil, lack.Key("drive", "multiplier")
		}
		ramp, err := e.chain.Drive.Ramp.Need()
		if err != nil {
			return nil, err
		}
		return e.risen(ramp)
	})
}

// DescribedStart is the start as the description has it: on its ramp, else at once.
func (e *Evidence) DescribedStart() (*network.Startup, error) {
	if e.HasSupply() && e.chain.Drive.Ramp.Set() {
		return e.RampedStart()
	}
	return e.Start()
}

func (e *Evidence) risen(ramp quantity.Time) (*network.Startup, error) {
	p, err := e.fullDrive()
	if err != nil {
		return nil, err
	}
	top, err := p.node("multiplier")
	if err != nil {
		return nil, err
	}
	return network.Start(p.Periodic, network.StartOptions{Node: top, Ramp: ramp})
}

// fullDrive is the steady state at the full drive, to which a start leads.
func (e *Evidence) fullDrive() (periodic, error) {
	return remember(e, "full drive", func() (periodic, error) {
		if !e.HasSupply() {
			return periodic{}, lack.Key("drive", "multiplier")
		}
		c, err := e.circuitAt(e.chain.Drive.Peak.V)
		if err != nil {
			return periodic{}, err
		}
		return e.solve(c, e.working(), true)
	})
}

// StartDiodePeak is the largest current of a diode on the way up.
func (e *Evidence) StartDiodePeak(diode string) (quantity.Current, error) {
	s, err := e.DescribedStart()
	if err != nil {
		return 0, err
	}
	return s.Of(diode).Peak, nil
}

// StartVoltage is the largest voltage on a capacitor, or against a diode, on the way up.
func (e *Evidence) StartVoltage(part string) (quantity.Voltage, error) {
	s, err := e.DescribedStart()
	if err != nil {
		return 0, err
	}
	return size(s.Of(part)), nil
}
