package network

import (
	"math"

	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Settled is the steady state of a circuit in which something has failed.
type Settled struct {
	*Periodic
	Struck []string // gaps, tubes and varistors that conduct
	Ended  []string // constant currents that nothing feeds any more
}

// Failed is the part that failed, where there is one.
type Failed struct {
	Part   string
	Ladder bool // of the ladder, which it may cut in two
}

// mostSettling is how often a circuit may change until it is at rest.
const mostSettling = 8

// Settle finds the steady state of a circuit with a fault in it. What strikes and what
// dies off is found from one state after the other: a gap above its striking voltage
// holds that voltage from then on, or nothing where the voltage alternates; and a load
// of constant current that would have to be fed backwards, or that nothing feeds,
// draws none. The error is that of Steady.
func Settle(c *circuit.Circuit, failed Failed, o Options) (Settled, error) {
	var s Settled
	o.walking = true // what is cut off or shorted switches in bursts that nothing is carried through
	c, s.Ended = fed(c)
	r := reacher{failed: failed.Part, dead: failed.Ladder && len(s.Ended) > 0}
	r.taxing = r.taxed(o.From)
	for range mostSettling {
		p, err := r.reach(c, o)
		if err != nil {
			unloaded, ended := withoutLoads(c)
			if len(ended) == 0 {
				return s, err
			}
			c, s.Ended = unloaded, append(s.Ended, ended...)
			continue
		}
		s.Periodic = p
		next, struck := strike(c, p)
		next, ended := end(next, p)
		if len(struck)+len(ended) == 0 {
			return s, nil
		}
		c, s.Struck, s.Ended, o.From = next, append(s.Struck, struck...), append(s.Ended, ended...), p
	}
	return s, lack.Failed("what strikes and what ends does not come to rest")
}

// AtRest reports whether nothing strikes and nothing ends in a state, so that it is where
// the circuit settles.
func AtRest(p *Periodic) bool {
	_, unfed := fed(p.Circuit)
	_, struck := strike(p.Circuit, p)
	_, ended := end(p.Circuit, p)
	return len(unfed)+len(struck)+len(ended) == 0
}

// withoutLoads takes out every constant current.
func withoutLoads(c *circuit.Circuit) (*circuit.Circuit, []string) {
	var ended []string
	fed := c.Each(func(e *circuit.Element) bool {
		if e.Kind == circuit.Sink {
			ended = append(ended, e.Name)
		}
		return e.Kind != circuit.Sink
	})
	return fed, ended
}

// strike lets every gap conduct that is above its striking voltage.
func strike(c *circuit.Circuit, p *Periodic) (*circuit.Circuit, []string) {
	var struck []string
	for _, e := range c.Elements {
		if e.Kind != circuit.Gap {
			continue
		}
		s, err := p.Between(e.From, e.To)
		if err != nil || quantity.AtMost(s.Peak(), e.Strikes) {
			continue
		}
		struck = append(struck, e.Name)
		held := quantity.Voltage(math.Copysign(float64(e.Strikes), float64(s.Mean)))
		if quantity.AtMost(s.Mean*s.Mean, e.Strikes*e.Strikes/4) {
			c = c.Short(e.Name)
			continue
		}
		c = c.Hold(e.Name, held)
	}
	return c, struck
}

// end takes out the constant currents that would have to be fed backwards.
func end(c *circuit.Circuit, p *Periodic) (*circuit.Circuit, []string) {
	var ended []string
	for _, e := range p.Circuit.Elements {
		if e.Kind != circuit.Sink || e.Current == 0 {
			continue
		}
		if s, err := p.Between(e.From, e.To); err == nil && s.Mean <= 0 {
			ended = append(ended, e.Name)
			c = c.Open(e.Name)
		}
	}
	return c, ended
}

// fed takes out the constant currents that no path through the ladder feeds: resistors
// that are loads themselves feed nothing.
func fed(c *circuit.Circuit) (*circuit.Circuit, []string) {
	var ended []string
	for _, e := range c.Elements {
		if e.Kind == circuit.Sink && e.Current != 0 && !leads(c, e.To, e.From) {
			ended = append(ended, e.Name)
			c = c.Open(e.Name)
		}
	}
	return c, ended
}

// leads reports whether a direct current can flow from one node to another.
func leads(c *circuit.Circuit, from, to circuit.Node) bool {
	reached := make([]bool, c.Nodes())
	reached[from] = true
	for spread := true; spread; {
		spread = false
		for i := range c.Elements {
			e := &c.Elements[i]
			if !conducts(e) {
				continue
			}
			if reached[e.From] && !reached[e.To] {
				reached[e.To], spread = true, true
			}
			if e.Kind != circuit.Diode && reached[e.To] && !reached[e.From] {
				reached[e.From], spread = true, true
			}
		}
	}
	return reached[to]
}

// conducts reports whether an element carries direct current to a load.
func conducts(e *circuit.Element) bool {
	switch e.Kind {
	case circuit.Resistor:
		return e.Role != circuit.Load
	case circuit.Diode, circuit.Inductor, circuit.Source:
		return true
	}
	return false
}
