package evidence

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/hv/steady"
	"kilovet/hv/touch"
)

// ComesBackAt is the most that dielectric absorption brings back at a node after a short
// discharge, where nothing leads it away, with what is assumed of its dielectrics. A cable
// is not among it.
func (e *Evidence) ComesBackAt(node string) (touch.Recharged, error) {
	all, err := e.recovered()
	if err != nil {
		return touch.Recharged{}, err
	}
	n, there := e.Layout().Node(node)
	if !there {
		return touch.Recharged{}, lack.Failed("there is no node %s", node)
	}
	r, err := e.Reachable(node)
	if err != nil {
		return touch.Recharged{}, err
	}
	return touch.Recharged{Voltage: all[n], Charge: touch.Charge(r.Capacitance, all[n]), Energy: touch.Energy(r.Capacitance, all[n])}, nil
}

func (e *Evidence) recovered() ([]quantity.Voltage, error) {
	return remember(e, "recovered", func() ([]quantity.Voltage, error) {
		all, err := e.Comebacks()
		if err != nil {
			return nil, err
		}
		c, v, err := e.charged()
		if err != nil {
			return nil, err
		}
		back := map[string]quantity.Voltage{}
		for _, b := range all {
			el := c.Element(b.Part)
			back[b.Part], _ = bounded(b)
			if v[el.From] < v[el.To] {
				back[b.Part] = -back[b.Part]
			}
		}
		return steady.Recovered(c, back), nil
	})
}
