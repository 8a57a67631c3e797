package evidence

import (
	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/ripple/network"
)

// Capacitors names every fitted capacitor, cables among them, in the order of the
// circuit; strays are left out.
func (e *Evidence) Capacitors() []string {
	return e.elements(func(el *circuit.Element) bool {
		return el.Kind == circuit.Capacitor && el.Role != circuit.Stray
	})
}

// Diodes names every diode in the order of the circuit.
func (e *Evidence) Diodes() []string {
	return e.elements(func(el *circuit.Element) bool { return el.Kind == circuit.Diode })
}

// DriveSources names the sources of the drive.
func (e *Evidence) DriveSources() []string {
	return e.elements(func(el *circuit.Element) bool { return el.Kind == circuit.Source && el.Role == circuit.Ladder })
}

func (e *Evidence) elements(keep func(*circuit.Element) bool) []string {
	var names []string
	all := e.Layout().Elements
	for i := range all {
		if keep(&all[i]) {
			names = append(names, all[i].Name)
		}
	}
	return names
}

// Across is how the voltage across an element moves over a period.
func (e *Evidence) Across(element string) (network.Swing, error) {
	s, err := e.solution()
	if err != nil {
		return network.Swing{}, err
	}
	if s.Circuit.Element(element) == nil {
		return network.Swing{}, lack.Failed("there is no %s", element)
	}
	from, to := s.Circuit.Element(element).Ends()
	return s.between(from, to)
}

// Diode is what a diode bears over a period.
func (e *Evidence) Diode(name string) (network.DiodeFigures, error) { return e.diode(name) }

// Flow is how the current through an element moves over a period.
func (e *Evidence) Flow(element string) (network.Flow, error) {
	s, err := e.solution()
	if err != nil {
		return network.Flow{}, err
	}
	if s.Circuit.Element(element) == nil {
		return network.Flow{}, lack.Failed("there is no %s", element)
	}
	return s.Through(element)
}

// Current is the wave-form of the current through an element over a period.
func (e *Evidence) Current(element string) ([]network.CurrentPoint, error) {
	s, err := e.solution()
	if err != nil {
		return nil, err
	}
	if s.Circuit.Element(element) == nil {
		return nil, lack.Failed("there is no %s", element)
	}
	return s.Periodic.Current(element), nil
}

// Feed is the mean power that the sources besides the drive deliver: heater supply and
// fixed bias.
func (e *Evidence) Feed() (quantity.Power, error) {
	s, err := e.solution()
	if err != nil {
		return 0, err
	}
	var sum quantity.Power
	for i := range s.Circuit.Elements {
		if el := &s.Circuit.Elements[i]; el.Kind == circuit.Source && el.Role != circuit.Ladder {
			sum -= s.Power(el.Name)
		}
	}
	return sum, nil
}

// LongestConduction is the largest share of the period for which a diode of the
// multiplier conducts.
func (e *Evidence) LongestConduction() (quantity.Fraction, error) {
	return largestOf(e, isDiode, func(e *Evidence, name string) (quantity.Fraction, error) {
		d, err := e.diode(name)
		return d.Conducting, err
	})
}
