package steady

import (
	"slices"

	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
)

// Recovered is the most that can stand at each node, as a magnitude, once capacitors have
// got a voltage back by themselves and nothing leads it away: back is that of each, signed
// as its voltage, by name. Of every chain of capacitors that begins at ground, shortest for
// the node, the voltages are added; the chain that gives most counts. Resistors, inductors
// and sources in series are connections; loads, strays and diodes are nothing.
func Recovered(c *circuit.Circuit, back map[string]quantity.Voltage) []quantity.Voltage {
	group := unite(c)
	most := make([]quantity.Voltage, c.Nodes())
	for i := range c.Elements {
		e := &c.Elements[i]
		if _, known := back[e.Name]; !known || (group[e.From] == group[circuit.Ground]) == (group[e.To] == group[circuit.Ground]) {
			continue
		}
		above := climb(c, group, back, e)
		for n := range most {
			most[n] = max(most[n], magnitude(above[group[n]]))
		}
	}
	return most
}

// unite gives the nodes that series parts join a common number.
func unite(c *circuit.Circuit) []circuit.Node {
	group := make([]circuit.Node, c.Nodes())
	for n := range group {
		group[n] = circuit.Node(n)
	}
	for _, e := range c.Elements {
		if e.Role == circuit.Load || !slices.Contains([]circuit.Kind{circuit.Resistor, circuit.Inductor, circuit.Source}, e.Kind) {
			continue
		}
		keep, gone := group[e.From], group[e.To]
		for n := range group {
			if group[n] == gone {
				group[n] = keep
			}
		}
	}
	return group
}

// climb adds the voltages up from ground over a first capacitor, nearest groups first,
// never over ground again; groups out of reach stay at zero.
func climb(c *circuit.Circuit, group []circuit.Node, back map[string]quantity.Voltage, first *circuit.Element) map[circuit.Node]quantity.Voltage {
	at := map[circuit.Node]quantity.Voltage{group[circuit.Ground]: 0}
	wave := []circuit.Node{}
	step := func(e *circuit.Element, here circuit.Node) {
		from, to, sign := group[e.From], group[e.To], quantity.Voltage(-1)
		if to == here {
			from, to, sign = to, from, 1
		}
		if _, seen := at[to]; from == here && !seen {
			at[to] = at[from] + sign*back[e.Name]
			wave = append(wave, to)
		}
	}
	step(first, group[circuit.Ground])
	for i := 0; i < len(wave); i++ {
		for k := range c.Elements {
			if _, known := back[c.Elements[k].Name]; known {
				step(&c.Elements[k], wave[i])
			}
		}
	}
	return at
}
