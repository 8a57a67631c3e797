package evidence

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/hv/steady"
)

// Drift is how far one cause moves the accelerating voltage within an exposure, peak to
// peak, or why that is not known.
type Drift struct {
	Name    string
	Voltage quantity.Voltage
}

// Drifts lists what moves the accelerating voltage within an exposure; a lack where
// nothing is said of what could.
func (e *Evidence) Drifts() ([]Drift, error) {
	return remember(e, "drifts", func() ([]Drift, error) {
		if e.chain.Site == nil || !e.chain.Site.TemperatureChange.Set() && (e.chain.Regulation == nil || !e.chain.Regulation.Stability.Set()) {
			return nil, lack.Because("nothing is said of temperature and regulation during an exposure", "site.temperature_change", "regulation.stability")
		}
		var all []Drift
		for _, of := range []func() (Drift, error){e.dividerDrift, e.referenceDrift, e.stability, e.biasDrift} {
			d, err := of()
			if err != nil {
				return nil, err
			}
			if d.Voltage > 0 {
				all = append(all, d)
			}
		}
		return all, nil
	})
}

// change is by how much the air changes within an exposure.
func (e *Evidence) change() quantity.TemperatureRise { return e.chain.Site.TemperatureChange.V }

// dividerDrift is what the temperature coefficients of both arms leave, at worst.
func (e *Evidence) dividerDrift() (Drift, error) {
	if e.chain.Regulation == nil || e.change() == 0 {
		return Drift{}, nil
	}
	d, err := e.Divider()
	if err != nil {
		return Drift{}, err
	}
	part, err := d.Drift(e.change())
	if err != nil {
		return Drift{}, err
	}
	v, err := e.Accelerated()
	return Drift{"divider/temperature", magnitude(v) * quantity.Voltage(part)}, err
}

func (e *Evidence) referenceDrift() (Drift, error) {
	r := e.chain.Regulation
	if r == nil || e.change() == 0 || !r.TemperatureCoefficient.Set() {
		return Drift{}, nil
	}
	v, err := e.Accelerated()
	return Drift{"reference/temperature", magnitude(v) * quantity.Voltage(steady.Drift(r.TemperatureCoefficient.V, e.change()))}, err
}

func (e *Evidence) stability() (Drift, error) {
	r := e.chain.Regulation
	if r == nil {
		return Drift{}, nil
	}
	v, err := e.Accelerated()
	return Drift{"regulation/stability", magnitude(v) * quantity.Voltage(r.Stability.V)}, err
}

// biasDrift is what the bias resistor's temperature coefficient does where the output
// feeds the control electrode: the divider does not see it.
func (e *Evidence) biasDrift() (Drift, error) {
	b := e.chain.Bias
	if b == nil || b.Resistor == nil || !b.Resistor.TemperatureCoefficient.Set() || !e.biasMovesCathode() || e.change() == 0 {
		return Drift{}, nil
	}
	p, err := e.Gun()
	if err != nil {
		return Drift{}, err
	}
	return Drift{"bias resistor/temperature", p.DriftOfBias(steady.Drift(b.Resistor.TemperatureCoefficient.V, e.change()))}, nil
}
