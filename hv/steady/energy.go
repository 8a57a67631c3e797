package steady

import (
	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
)

// Voltages are the potentials to ground of all nodes of a circuit, by node.
type Voltages []quantity.Voltage

// Carry gives the same potentials to an edited circuit, whose nodes may be numbered
// otherwise; a node with only new names is at ground.
func (v Voltages) Carry(from, to *circuit.Circuit) Voltages {
	carried := make(Voltages, to.Nodes())
	for n := range carried {
		for _, name := range to.Labels(circuit.Node(n)) {
			if old, there := from.Node(name); there && n != 0 {
				carried[n] = v[old]
				break
			}
		}
	}
	return carried
}

func (v Voltages) across(e *circuit.Element) quantity.Voltage { return v[e.From] - v[e.To] }

// Store is what one capacitor holds.
type Store struct {
	Element string
	Voltage quantity.Voltage // From above To
	Energy  quantity.Energy
	// Doubt is why the energy is not known: the capacitance is not.
	Doubt error
}

// Stores lists the capacitors of a circuit with their energies C U²/2 at the given
// potentials, in the order of the circuit. Junctions of diodes are left out: they
// hold a thousandth of what stands beside them.
func Stores(c *circuit.Circuit, v Voltages) []Store {
	var stores []Store
	for i := range c.Elements {
		e := &c.Elements[i]
		if e.Kind != circuit.Capacitor {
			continue
		}
		s := Store{Element: e.Name, Voltage: v.across(e), Energy: charged(e.Capacitance, v.across(e))}
		if e.Doubt != nil {
			s.Doubt = e.Doubt
		}
		stores = append(stores, s)
	}
	return stores
}

// Energy is the sum over all capacitors; a lack where one of them is doubted.
func Energy(c *circuit.Circuit, v Voltages) (quantity.Energy, error) {
	sum := quantity.Energy(0)
	for _, s := range Stores(c, v) {
		if s.Doubt != nil {
			return 0, s.Doubt
		}
		sum += s.Energy
	}
	return sum, nil
}

func charged(c quantity.Capacitance, u quantity.Voltage) quantity.Energy {
	return quantity.Energy(float64(c) * float64(u) * float64(u) / 2)
}
