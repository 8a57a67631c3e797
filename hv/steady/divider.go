package steady

import (
	"math"

	"kilovet/hv/chain"
	"kilovet/hv/circuit"
	"kilovet/hv/document"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Divider is a measuring divider at work: its sensed node stands at a voltage.
type Divider struct {
	part    *chain.Divider
	circuit *circuit.Circuit
	senses  string
	sensed  quantity.Voltage
	air     document.Given[quantity.Temperature]
	state   *State
}

// The divider's elements as the circuit names them.
const (
	upperArm = "divider.upper"
	lowerArm = "divider.lower"
	meter    = "divider.meter"
	clamp    = "divider.clamp"
	leakage  = "divider.clamp.leakage"
	tap      = "divider.tap"
)

// Measure looks at the divider of a circuit with its sensed node at a potential and
// in air of the site's temperature. Without a divider the lack names it.
func Measure(c *circuit.Circuit, part *chain.Divider, sensed quantity.Voltage, air document.Given[quantity.Temperature]) (*Divider, error) {
	if part == nil {
		return nil, lack.Key("divider")
	}
	d := &Divider{part: part, circuit: c, senses: part.Senses.Or("output"), sensed: sensed, air: air}
	state, err := Held(c, Fixed{d.senses, sensed})
	d.state = state
	return d, err
}

// Ratio is the voltage of the sensed node over that of the tap, meter connected.
func (d *Divider) Ratio() (float64, error) {
	unit, err := Held(d.circuit, Fixed{d.senses, 1})
	if err != nil {
		return 0, err
	}
	v, err := unit.Potential(tap)
	if err != nil {
		return 0, err
	}
	if v == 0 {
		return 0, lack.Range("the tap of the divider is at ground: it has no ratio")
	}
	return 1 / float64(v), nil
}

// Reading is the magnitude of the voltage at the meter.
func (d *Divider) Reading() (quantity.Voltage, error) {
	v, err := d.state.Potential(tap)
	return magnitude(v), err
}

// Current is the magnitude of the current that the upper arm draws.
func (d *Divider) Current() (quantity.Current, error) {
	i, err := d.state.Current(upperArm)
	return magnitude(i), err
}

// Dissipation is the power in both arms.
func (d *Divider) Dissipation() (quantity.Power, error) {
	return d.sum(func(a load) float64 { return a.power() * a.elements })
}

// ElementDissipation is the largest power in any one element of the arms.
func (d *Divider) ElementDissipation() (quantity.Power, error) {
	return largest(d, func(a load) quantity.Power { return quantity.Power(a.power()) })
}

// ElementVoltage is the largest voltage over any one element of the arms.
func (d *Divider) ElementVoltage() (quantity.Voltage, error) {
	return largest(d, func(a load) quantity.Voltage { return a.voltage })
}

// load is what one element of an arm bears; series and strings share evenly.
type load struct {
	part     *chain.Resistor
	elements float64 // of the arm
	voltage  quantity.Voltage
	value    quantity.Resistance
}

func (l load) power() float64 { return float64(l.voltage*l.voltage) / float64(l.value) }

// arms are the loads of the upper and the lower arm; an arm that is open bears nothing.
func (d *Divider) arms() ([]load, error) {
	var loads []load
	for name, part := range d.described {
		e := d.circuit.Element(name)
		if e == nil {
			continue
		}
		v, err := d.state.Across(name)
		if err != nil {
			return nil, err
		}
		count, strings := part.Elements()
		loads = append(loads, load{part, float64(count * strings), magnitude(v) / quantity.Voltage(count),
			e.Resistance * quantity.Resistance(strings) / quantity.Resistance(count)})
	}
	return loads, nil
}

// described yields the arms in order, upper first.
func (d *Divider) described(yield func(string, *chain.Resistor) bool) {
	_ = yield(upperArm, d.part.Upper) && yield(lowerArm, d.part.Lower)
}

func (d *Divider) sum(of func(load) float64) (quantity.Power, error) {
	loads, err := d.arms()
	total := 0.0
	for _, l := range loads {
		total += of(l)
	}
	return quantity.Power(total), err
}

func largest[Q ~float64](d *Divider, of func(load) Q) (Q, error) {
	loads, err := d.arms()
	var most Q
	for _, l := range loads {
		most = max(most, of(l))
	}
	return most, err
}

func magnitude[Q ~float64](q Q) Q { return Q(math.Abs(float64(q))) }
