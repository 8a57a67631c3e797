package steady

import (
	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Ohms is what an ohmmeter reads between two nodes of a circuit at rest: through its
// resistors alone, for as long as diodes block and capacitors are charged. It is a
// lack where no resistor joins the two.
func Ohms(c *circuit.Circuit, from, to string) (quantity.Resistance, error) {
	a, there := c.Node(from)
	b, also := c.Node(to)
	if !there || !also {
		return 0, lack.Failed("there is no node %s or no node %s", from, to)
	}
	if a == b {
		return 0, nil
	}
	// The mesh is solved against its node 0, so that the second lead takes its place.
	place := func(n circuit.Node) int {
		switch n {
		case b:
			return 0
		case circuit.Ground:
			return int(b)
		}
		return int(n)
	}
	pairs, conductances := resistors(c, place)
	m := newMesh(c.Nodes(), pairs)
	g := make([]float64, m.size)
	for i, p := range pairs {
		if s := m.slot(p[0], p[1]); s != noSlot {
			g[s] += conductances[i]
		}
	}
	f := m.newFactors()
	f.factor(g)
	current, v := make([]float64, c.Nodes()), make([]float64, c.Nodes())
	current[place(a)] = 1
	f.solve(current, v)
	if !linked(pairs, place(a)) || v[place(a)] == 0 {
		return 0, lack.Failed("no resistor joins %s and %s", from, to)
	}
	return quantity.Resistance(v[place(a)]), nil
}

// resistors lists the pairs of nodes that conduct at rest. An inductor is a wire: of
// a micro-ohm, which no ohmmeter tells from none.
func resistors(c *circuit.Circuit, place func(circuit.Node) int) (pairs [][2]int, conductances []float64) {
	const wire = 1e-6
	for _, e := range c.Elements {
		r := float64(e.Resistance)
		switch {
		case e.Kind == circuit.Inductor || e.Kind == circuit.Resistor && r == 0:
			r = wire
		case e.Kind != circuit.Resistor:
			continue
		}
		pairs, conductances = append(pairs, [2]int{place(e.From), place(e.To)}), append(conductances, 1/r)
	}
	return pairs, conductances
}

// linked reports whether a way along the pairs leads from a node to node 0.
func linked(pairs [][2]int, from int) bool {
	reached := map[int]bool{from: true}
	for grown := true; grown; {
		grown = false
		for _, p := range pairs {
			if reached[p[0]] != reached[p[1]] {
				reached[p[0]], reached[p[1]], grown = true, true, true
			}
		}
	}
	return reached[0]
}
