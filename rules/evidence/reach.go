package evidence

import (
	"strings"

	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
	"kilovet/hv/steady"
	"kilovet/hv/touch"
)

// Reachable is what a node holds, for a person or a tool that reaches it.
type Reachable struct {
	Node    string
	Voltage quantity.Voltage // largest magnitude to ground
	Short   Short
	// Capacitance is that which holds the charge at the voltage: what a rod meets.
	Capacitance quantity.Capacitance
}

// Reachable is what a node holds under the condition.
func (e *Evidence) Reachable(node string) (Reachable, error) {
	v, err := e.Touched(node)
	if err != nil {
		return Reachable{}, err
	}
	s, err := e.ShortAt(node)
	if err != nil {
		return Reachable{}, err
	}
	c, err := touch.CapacitanceOf(s.Charge, v)
	return Reachable{node, v, s, c}, err
}

// Rodded is what the earthing rod goes through at a node, and how long it has to stay on.
type Rodded struct {
	Peak   quantity.Current
	Energy quantity.Energy // at most: what a short there releases
	Node   Discharge       // of the node, the rod on it
	Whole  Discharge       // of the last node of the chain, the rod still there
}

// Rod is the earthing rod at a node, drive off: the times are those of the whole network,
// for what hangs behind a filter resistor comes through that.
func (e *Evidence) Rod(node string) (Rodded, error) {
	return remember(e, "rod at "+node, func() (Rodded, error) {
		r, err := e.Reachable(node)
		if err != nil {
			return Rodded{}, err
		}
		rod := e.chain.Access.EarthingRod.Resistance.V
		peak, err := touch.Current(r.Voltage, rod, 0)
		if err != nil {
			return Rodded{}, err
		}
		c, v, err := e.charged()
		if err != nil {
			return Rodded{}, err
		}
		const name = "earthing rod"
		earthed := c.Bridge(name, node, "ground", rod).With(name, func(el *circuit.Element) { el.Permanent = true })
		d, err := steady.Discharge(earthed, v.Carry(c, earthed), discharged)
		if err != nil {
			return Rodded{}, err
		}
		own, err := d.Node(node)
		return Rodded{peak, r.Short.Energy, discharge(own), discharge(d.Slowest())}, err
	})
}

// Shock is what a body would take at a node, as information.
func (e *Evidence) Shock(node string, body touch.Body) (touch.Shock, error) {
	r, err := e.Reachable(node)
	if err != nil {
		return touch.Shock{}, err
	}
	x, err := touch.Through(r.Capacitance, r.Voltage, body.Resistance)
	x.Energy = min(x.Energy, r.Short.Energy) // what is charged in series gives its charge at less than the whole voltage
	return x, err
}

// Unplugged is the discharge of a node with the drive unplugged: the columns have no way
// to ground through it.
func (e *Evidence) Unplugged(node string) (Discharge, error) {
	d, err := remember(e, "decay, drive unplugged", func() (*steady.Decay, error) {
		c, v, err := e.charged()
		if err != nil {
			return nil, err
		}
		open := c
		for _, l := range c.Links() {
			if strings.HasPrefix(l, "drive lead") {
				open = open.Open(l)
			}
		}
		return steady.Discharge(open, v.Carry(c, open), discharged)
	})
	if err != nil {
		return Discharge{}, err
	}
	x, err := d.Node(node)
	return discharge(x), err
}

// Comeback is what dielectric absorption brings back on a capacitor.
type Comeback struct {
	Part       string
	Voltage    quantity.Voltage // before
	Absorption touch.Absorption
	Back       touch.Recharged
	Err        error // where nothing is published of its dielectric
}

// Comebacks are those of every capacitor given as a part, by the largest voltage on it.
func (e *Evidence) Comebacks() ([]Comeback, error) {
	var all []Comeback
	for _, el := range e.Layout().Elements {
		if el.Kind != circuit.Capacitor || el.CapacitorPart == nil {
			continue
		}
		v, err := e.ElementPeak(el.Name)
		if err != nil {
			return nil, err
		}
		b := Comeback{Part: el.Name, Voltage: v}
		b.Absorption, b.Err = touch.FindAbsorption(el.CapacitorPart.Dielectric.V)
		if b.Err == nil {
			b.Back, b.Err = b.Absorption.Recharge(el.Capacitance, v)
		}
		all = append(all, b)
	}
	return all, nil
}
