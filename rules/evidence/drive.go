package evidence

import (
	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/hv/steady"
	"kilovet/ripple/network"
)

// Peak is the peak of the drive under the condition: with regulation what holds the
// set voltage, as far as the drive goes; with regulation lost the limit.
func (e *Evidence) Peak() (quantity.Voltage, error) {
	return remember(e, "peak", func() (quantity.Voltage, error) {
		if e.failed() {
			f, err := e.failure()
			return f.peak, err
		}
		peak, err := e.fullPeak()
		if d := e.condition.Drive; d != 0 {
			peak *= quantity.Voltage(d)
		}
		return peak, err
	})
}

func (e *Evidence) fullPeak() (quantity.Voltage, error) {
	d := e.chain.Drive
	switch {
	case e.condition.Peak != 0:
		return e.condition.Peak, nil
	case e.condition.State == Lost:
		return e.limit()
	case e.chain.Regulation == nil:
		return d.Peak.V, nil
	}
	needed, err := e.PeakNeeded()
	return min(needed, d.Peak.V), err
}

// limit is the most the drive can reach; in an open loop that is its peak where
// nothing more is stated.
func (e *Evidence) limit() (quantity.Voltage, error) {
	d := e.chain.Drive
	if d.PeakLimit.Set() || e.chain.Regulation != nil {
		return d.PeakLimit.Need()
	}
	return d.Peak.V, nil
}

// PeakNeeded is the peak of the drive that holds the set voltage at the sensed node.
// In a corner the divider reads low by its error and the voltage is held too high.
func (e *Evidence) PeakNeeded() (quantity.Voltage, error) {
	if e.chain.Regulation == nil {
		return 0, lack.Key("regulation")
	}
	t, err := e.trial()
	return t.peak, err
}

// trial is a drive with the state it brings about.
type trial struct {
	peak  quantity.Voltage
	state *network.Periodic
}

// trial is the drive that holds the set voltage.
func (e *Evidence) trial() (trial, error) {
	return remember(e, "drive that holds", func() (trial, error) {
		set, err := e.held()
		if err != nil {
			return trial{}, err
		}
		return e.peakFor(set)
	})
}

// HeldBetween are the least and the most that the sensed node may really stand at while
// regulation reads its set voltage: the divider reads high or low by its error.
func (e *Evidence) HeldBetween() (least, most quantity.Voltage, err error) {
	if e.chain.Regulation == nil {
		return 0, 0, lack.Key("regulation")
	}
	wrong, err := e.DividerError()
	if err != nil {
		return 0, 0, err
	}
	return steady.Misread(e.chain.Regulation.Set.V, wrong)
}

// held is the voltage that regulation really holds at the sensed node.
func (e *Evidence) held() (quantity.Voltage, error) {
	if e.condition.Corner == Nominal {
		return e.chain.Regulation.Set.V, nil
	}
	nominal := e.Healthy().condition // its divider reads, whatever is thought away
	nominal.Corner = Nominal
	_, most, err := e.Under(nominal).HeldBetween()
	return most, err
}

// peakFor finds the peak for a mean at the sensed node.
func (e *Evidence) peakFor(set quantity.Voltage) (trial, error) {
	near := e.alike()
	peak, at, err := network.Hold(network.HoldOptions{
		Node: e.chain.Divider.Senses.Or("output"), Set: set, First: e.firstPeak(),
		Options: e.options(near, near.from != nil),
		Build:   e.trustedAt,
	})
	e.tellSolved()
	return trial{peak, at}, err
}

// trustedAt is the circuit at a drive, doubts outside the multiplier set aside.
func (e *Evidence) trustedAt(peak quantity.Voltage) (*circuit.Circuit, error) {
	c, err := e.circuitAt(peak)
	if err != nil {
		return nil, err
	}
	return trusted(c), nil
}

// firstPeak is a drive to begin the search with: one that is near, or the full one.
func (e *Evidence) firstPeak() quantity.Voltage {
	if e.before != nil {
		if t, err := e.before.Under(e.condition).trial(); err == nil {
			return t.peak
		}
	}
	if e.condition.Corner != Nominal {
		nominal := e.condition
		nominal.Corner = Nominal
		if t, err := e.Under(nominal).trial(); err == nil {
			return t.peak
		}
	}
	return e.chain.Drive.Peak.V
}

// Circuit is the circuit under the condition.
func (e *Evidence) Circuit() (*circuit.Circuit, error) {
	if !e.HasSupply() {
		return nil, lack.Key("drive", "multiplier")
	}
	return remember(e, "circuit", func() (*circuit.Circuit, error) {
		if e.failed() {
			f, err := e.failure()
			return f.Circuit, err
		}
		peak, err := e.Peak()
		if err != nil {
			return nil, err
		}
		return e.circuitAt(peak)
	})
}

func (e *Evidence) circuitAt(peak quantity.Voltage) (*circuit.Circuit, error) {
	emission, err := e.Emission()
	if err != nil {
		return nil, err
	}
	c := circuit.Build(e.chain, circuit.Setting{Peak: peak, Emission: emission, Corner: e.corner()})
	if e.condition.Fault.Edit != nil {
		c = e.condition.Fault.Edit(c)
	}
	if e.failed() {
		if c, err = e.withBias(c); err != nil {
			return nil, err
		}
	}
	return c, ladderDoubt(c)
}

// ladderDoubt is the first doubt about a value of the multiplier; means and ratings
// rest on those alone, ripple and stored charge on all (see sound).
func ladderDoubt(c *circuit.Circuit) error {
	for _, el := range c.Elements {
		if el.Doubt != nil && el.Role == circuit.Ladder {
			return el.Doubt
		}
	}
	return nil
}

// sound is the first doubt about any value of the circuit.
func (e *Evidence) sound() error {
	c, err := e.Circuit()
	if err != nil {
		return err
	}
	return c.Doubt()
}

func (e *Evidence) corner() func(string, quantity.Fraction) float64 { return e.condition.Corner.ends() }
