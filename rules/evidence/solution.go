package evidence

import (
	"math"

	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/ripple/network"
)

// Basis is what the steady state rests on.
const Basis = "ripple.network"

// solution is the steady state under the condition: the one that the search for the
// drive ended with, or one found from that of the nominal chain, which is near.
func (e *Evidence) solution() (periodic, error) {
	return remember(e, "solution", func() (periodic, error) {
		if e.failed() {
			f, err := e.failure()
			return periodic{f.Periodic}, err
		}
		c, err := e.Circuit()
		if err != nil {
			return periodic{}, err
		}
		near := e.alike()
		swift := near.from != nil
		if e.holds() {
			if t, err := e.trial(); err == nil {
				if t.peak <= e.chain.Drive.Peak.V {
					return periodic{t.state}, nil
				}
				near = beside{from: t.state} // of this circuit at more drive than there is
			}
		}
		if own, same := e.itself(); same {
			return own.solution()
		}
		return e.solve(c, near, swift)
	})
}

// holds reports whether regulation is at work and at its full drive.
func (e *Evidence) holds() bool {
	share := e.condition.Drive
	return e.condition.Peak == 0 && e.chain.Regulation != nil && e.condition.State != Lost && (share == 0 || share == 1)
}

// itself is the chain in its state, where the drive is set by hand to what it is there anyway.
func (e *Evidence) itself() (*Evidence, bool) {
	c := e.condition
	if c.Peak == 0 || c.Corner != Nominal || c.Fault.Name != "" || c.Drive != 0 && c.Drive != 1 {
		return nil, false
	}
	own := e.Under(Condition{State: c.State})
	peak, err := own.Peak()
	return own, err == nil && quantity.Equal(peak, c.Peak)
}

// Network is the steady state in time, for wave-forms and what else is not asked often.
func (e *Evidence) Network() (*network.Periodic, error) {
	s, err := e.solution()
	return s.Periodic, err
}

// Potential is the mean potential of a node to ground, signed.
func (e *Evidence) Potential(node string) (quantity.Voltage, error) {
	s, err := e.swing(node, "ground")
	return s.Mean, err
}

// Between is the largest magnitude of the voltage between two nodes over a period of
// the drive.
func (e *Evidence) Between(a, b string) (quantity.Voltage, error) {
	s, err := e.swing(a, b)
	if err != nil || a != mainsNode && b != mainsNode {
		return s.Peak(), err
	}
	common, err := e.mainsPeak()
	return s.Peak() + common, err
}

// mainsNode is the earthed side of the heater feed. It swings at the frequency of the
// mains, which a period of the drive does not show.
const mainsNode = "mains"

// mainsPeak is the peak of the earthed side to ground: its common mode where stated,
// else that of the mains.
func (e *Evidence) mainsPeak() (quantity.Voltage, error) {
	if h := e.chain.Heater; h != nil && h.Feed != nil && h.Feed.CommonMode.Set() {
		return h.Feed.CommonMode.V * math.Sqrt2, nil
	}
	if e.chain.Site == nil || !e.chain.Site.Mains.Set() {
		return 0, lack.Key("heater.feed.common_mode", "site.mains")
	}
	return e.chain.Site.Mains.V * math.Sqrt2, nil
}

// RMS is the r.m.s. voltage between two nodes: of a DC voltage its magnitude.
func (e *Evidence) RMS(a, b string) (quantity.Voltage, error) {
	s, err := e.solution()
	if err != nil {
		return 0, err
	}
	return s.rms(a, b)
}

// Swing is the peak-to-peak voltage between two nodes.
func (e *Evidence) Swing(a, b string) (quantity.Voltage, error) {
	if err := e.sound(); err != nil {
		return 0, err
	}
	s, err := e.swing(a, b)
	return s.PeakToPeak(), err
}

func (e *Evidence) swing(a, b string) (network.Swing, error) {
	s, err := e.solution()
	if err != nil {
		return network.Swing{}, err
	}
	return s.between(a, b)
}

// ElementPeak is the largest magnitude of the voltage across an element.
func (e *Evidence) ElementPeak(name string) (quantity.Voltage, error) {
	from, to := e.ends(name)
	return e.Between(from, to)
}

// ends are the nodes between which an element stands, or stood before a fault took it out.
func (e *Evidence) ends(name string) (from, to string) { return e.element(name).Ends() }

// element is an element of the circuit under the condition, or as it was before a fault
// took it out.
func (e *Evidence) element(name string) *circuit.Element {
	if e.failed() {
		if c, err := e.Circuit(); err == nil && c.Element(name) != nil {
			return c.Element(name)
		}
	}
	return e.Layout().Element(name)
}

// OnePeak is the largest voltage across any one element of a resistor that has several.
func (e *Evidence) OnePeak(name string) (quantity.Voltage, error) {
	v, err := e.ElementPeak(name)
	return v * quantity.Voltage(e.element(name).Share()), err
}

// OnePower is the largest mean power in any one element of a resistor that has several.
func (e *Evidence) OnePower(name string) (quantity.Power, error) {
	p, err := e.ElementPower(name)
	return p * quantity.Power(e.element(name).Heat()), err
}

// ElementCurrent is the magnitude of the mean current through a resistor or load.
func (e *Evidence) ElementCurrent(name string) (quantity.Current, error) {
	s, err := e.solution()
	if err != nil {
		return 0, err
	}
	if s.Circuit.Element(name) == nil {
		return 0, e.absent(name)
	}
	f, err := s.Through(name)
	return quantity.Current(math.Abs(float64(f.Mean))), err
}

// ElementPower is the mean power a resistor turns into heat.
func (e *Evidence) ElementPower(name string) (quantity.Power, error) {
	s, err := e.solution()
	if err != nil {
		return 0, err
	}
	if s.Circuit.Element(name) == nil {
		return 0, e.absent(name)
	}
	return s.Power(name), nil
}

// ReversePeak is the largest reverse voltage of a diode.
func (e *Evidence) ReversePeak(name string) (quantity.Voltage, error) {
	d, err := e.diode(name)
	return d.ReversePeak, err
}

// DiodeMean is the mean forward current of a diode.
func (e *Evidence) DiodeMean(name string) (quantity.Current, error) {
	d, err := e.diode(name)
	return max(0, d.Mean), err
}

// DiodePeak is the largest forward current of a diode, without that of its junction.
func (e *Evidence) DiodePeak(name string) (quantity.Current, error) {
	d, err := e.diode(name)
	return d.Peak, err
}

func (e *Evidence) diode(name string) (network.DiodeFigures, error) {
	s, err := e.solution()
	if err != nil {
		return network.DiodeFigures{}, err
	}
	if s.Circuit.Element(name) == nil {
		return network.DiodeFigures{}, e.absent(name)
	}
	return s.Diode(name), nil
}

// absent is the error for an element that is not in the circuit: none where a fault took
// it out, for it then bears nothing.
func (e *Evidence) absent(name string) error {
	if e.failed() && e.Layout().Element(name) != nil {
		return nil
	}
	return lack.Failed("there is no %s", name)
}
