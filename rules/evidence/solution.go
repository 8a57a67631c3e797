package evidence

import (
	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// span is how a voltage moves over a period of the drive, with its signs.
type span struct {
	least, most, mean, rms quantity.Voltage
}

// peak is the largest magnitude.
func (s span) peak() quantity.Voltage { return max(s.most, -s.least) }

// swing is peak to peak.
func (s span) swing() quantity.Voltage { return s.most - s.least }

// carried is what a diode carries over a period.
type carried struct {
	reverse    quantity.Voltage // largest
	peak, mean quantity.Current
}

// solution is the steady state of a circuit over a period of its drive.
type solution interface {
	mean(node string) (quantity.Voltage, error)
	between(node, reference string) (span, error)
	diode(name string) (carried, error)
	power(element *circuit.Element) (quantity.Power, error)
	// harmonic is the complex amplitude at k times the drive frequency.
	harmonic(node, reference string, k int) (complex128, error)
	basis() string
}

// solution is the steady state under the condition.
func (e *Evidence) solution() (solution, error) {
	return remember(e, "solution", func() (solution, error) {
		c, err := e.Circuit()
		if err != nil {
			return nil, err
		}
		return e.solve(c)
	})
}

// Potential is the mean potential of a node to ground, signed.
func (e *Evidence) Potential(node string) (quantity.Voltage, error) {
	s, err := e.solution()
	if err != nil {
		return 0, err
	}
	return s.mean(node)
}

// Between is the largest magnitude of the voltage between two nodes over a period of
// the drive.
func (e *Evidence) Between(a, b string) (quantity.Voltage, error) {
	s, err := e.span(a, b)
	return s.peak(), err
}

// RMS is the r.m.s. voltage between two nodes: of a DC voltage its magnitude.
func (e *Evidence) RMS(a, b string) (quantity.Voltage, error) {
	s, err := e.span(a, b)
	return s.rms, err
}

// Swing is the peak-to-peak voltage between two nodes.
func (e *Evidence) Swing(a, b string) (quantity.Voltage, error) {
	if err := e.sound(); err != nil {
		return 0, err
	}
	s, err := e.span(a, b)
	return s.swing(), err
}

func (e *Evidence) span(a, b string) (span, error) {
	s, err := e.solution()
	if err != nil {
		return span{}, err
	}
	return s.between(a, b)
}

// ElementPeak is the largest magnitude of the voltage across an element.
func (e *Evidence) ElementPeak(name string) (quantity.Voltage, error) {
	from, to := e.Layout().Element(name).Ends()
	return e.Between(from, to)
}

// ElementCurrent is the magnitude of the mean current through a resistor or load.
func (e *Evidence) ElementCurrent(name string) (quantity.Current, error) {
	c, err := e.Circuit()
	if err != nil {
		return 0, err
	}
	el := c.Element(name)
	if el == nil {
		return 0, lack.Failed("there is no %s", name)
	}
	if el.Kind == circuit.Sink {
		return el.Current, nil
	}
	from, to := el.Ends()
	s, err := e.span(from, to)
	return quantity.Current(float64(magnitude(s.mean)) / float64(el.Resistance)), err
}

// ElementPower is the mean power a resistor turns into heat.
func (e *Evidence) ElementPower(name string) (quantity.Power, error) {
	s, err := e.solution()
	if err != nil {
		return 0, err
	}
	c, err := e.Circuit()
	if err != nil {
		return 0, err
	}
	return s.power(c.Element(name))
}

// ReversePeak is the largest reverse voltage of a diode.
func (e *Evidence) ReversePeak(name string) (quantity.Voltage, error) {
	d, err := e.carried(name)
	return d.reverse, err
}

// DiodeMean is the mean forward current of a diode.
func (e *Evidence) DiodeMean(name string) (quantity.Current, error) {
	d, err := e.carried(name)
	return d.mean, err
}

func (e *Evidence) carried(name string) (carried, error) {
	s, err := e.solution()
	if err != nil {
		return carried{}, err
	}
	return s.diode(name)
}
