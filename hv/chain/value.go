package chain

import (
	"kilovet/hv/document"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Ohms is the value of a loose resistor.
func (p *Part) Ohms() (quantity.Resistance, error) { return valueAs[quantity.Resistance](p.Value) }

// Farads is the value of a loose capacitor.
func (p *Part) Farads() (quantity.Capacitance, error) { return valueAs[quantity.Capacitance](p.Value) }

// Henries is the value of a loose inductor.
func (p *Part) Henries() (quantity.Inductance, error) { return valueAs[quantity.Inductance](p.Value) }

// Strikes is the voltage at which a loose spark gap or varistor conducts.
func (p *Part) Strikes() (quantity.Voltage, error) { return valueAs[quantity.Voltage](p.Value) }

// valueAs reads a text as a quantity; a lack where it is absent, a refusal where it
// is of another dimension.
func valueAs[Q quantity.Number](text document.Given[string]) (Q, error) {
	var q Q
	if !text.Set() {
		return 0, lack.Key(text.Key)
	}
	v, err := q.Dimension().Parse(text.V)
	return Q(v), err
}

// Dimension is the dimension of the part's value; nil for kinds that have none.
func (p *Part) Dimension() *quantity.Dimension {
	switch p.Kind.V {
	case "resistor":
		return quantity.Resistance(0).Dimension()
	case "capacitor":
		return quantity.Capacitance(0).Dimension()
	case "inductor":
		return quantity.Inductance(0).Dimension()
	case "spark gap", "varistor":
		return quantity.Voltage(0).Dimension()
	}
	return nil
}
