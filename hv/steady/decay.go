package steady

import (
	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Decay is how a chain runs down after switching off.
type Decay struct {
	Limit quantity.Voltage // what counts as discharged
	// Times are those the decay was followed at, from zero.
	Times []quantity.Time
	Work  Work

	circuit  *circuit.Circuit
	history  []Voltages      // by time
	arrivals []Voltages      // by time: how fast they move there, in volts a step
	idle     map[string]bool // diodes that never carried anything
}

// Discharge follows a circuit from the given potentials after all sources are
// switched off, heater and gun cold: of resistors only the permanent ones count, all
// capacitors do, diodes conduct forward without drop and block otherwise, leakage
// never counts, sources and inductors are connections, gaps are open. It ends when
// nothing moves any more. Times are good to a part in a thousand. Where a ladder runs off
// through its diodes, a rod on a node within it or its drive unplugged, which of them conduct
// hangs on little: the last node's time is good to a tenth there, and a node that nothing but
// diodes leads to may fall at once at a time that is not known.
//
// Errors: a lack for a doubted capacitance or a resistor without a value.
func Discharge(c *circuit.Circuit, from Voltages, limit quantity.Voltage) (*Decay, error) {
	return discharge(c, from, limit, 1e-3)
}

func discharge(c *circuit.Circuit, from Voltages, limit quantity.Voltage, tolerance float64) (*Decay, error) {
	bare := c.Each(func(e *circuit.Element) bool { return e.Permanent || e.Kind == circuit.Capacitor })
	r, err := runDown(bare, from, quiet(bare, false))
	if err != nil {
		return nil, err
	}
	d := &Decay{Limit: limit, circuit: bare, Times: []quantity.Time{0}, history: []Voltages{from}, arrivals: make([]Voltages, 1)}
	p := pace{tolerance: tolerance, floor: 0.1 * float64(limit), done: 1e-3 * float64(limit)}
	var rows rows
	err = r.run(p, func(t float64) {
		d.Times = append(d.Times, quantity.Time(t))
		d.history = append(d.history, r.potentials(rows.take(len(r.net.spots))))
		d.arrivals = append(d.arrivals, r.arrivals(rows.take(len(r.net.spots))))
	})
	d.Work, d.idle = r.work, r.idle()
	return d, err
}

// idle are the diodes that have passed no charge.
func (r *rundown) idle() map[string]bool {
	idle := map[string]bool{}
	for i := range r.valves {
		if r.valves[i].charge == 0 {
			idle[r.valves[i].element.Name] = true
		}
	}
	return idle
}

// potentials puts those of the nodes into a row.
func (r *rundown) potentials(v Voltages) Voltages {
	for n := range v {
		v[n] = quantity.Voltage(r.net.at(circuit.Node(n), r.v))
	}
	return v
}

// At is the potential of a node at each of the times.
func (d *Decay) At(node string) ([]quantity.Voltage, error) {
	n, there := d.circuit.Node(node)
	if !there {
		return nil, lack.Failed("there is no node %s", node)
	}
	v := make([]quantity.Voltage, len(d.history))
	for i := range v {
		v[i] = d.history[i][n]
	}
	return v, nil
}

// Ending is how long a node or a capacitor stays charged.
type Ending struct {
	Of    string           // first name of the node, or name of the capacitor
	Start quantity.Voltage // signed
	Rest  quantity.Voltage // what is left when nothing moves any more, signed
	Time  quantity.Time    // the last time it was above the limit; zero where it never was
	Never bool             // it stays above the limit
}

// Lasts is the time, or a lack that says what stays.
func (e Ending) Lasts() (quantity.Time, error) {
	if e.Never {
		return 0, lack.Failed("%s stays at %s: no path discharges it", e.Of, e.Rest.Dimension().Text(float64(e.Rest)))
	}
	return e.Time, nil
}

// Outlasts reports whether this ending comes after another; never comes last, and of
// two that never come the one that leaves more.
func (e Ending) Outlasts(other Ending) bool {
	if e.Never && other.Never {
		return magnitude(e.Rest) > magnitude(other.Rest)
	}
	return e.Never || !other.Never && !quantity.AtMost(e.Time, other.Time)
}

// Node is the ending of a named node.
func (d *Decay) Node(name string) (Ending, error) {
	n, there := d.circuit.Node(name)
	if !there {
		return Ending{}, lack.Failed("there is no node %s", name)
	}
	return d.ending(name, func(v Voltages) quantity.Voltage { return v[n] }), nil
}

// Nodes are the endings of all nodes but ground, in the order of the circuit.
func (d *Decay) Nodes() []Ending {
	var all []Ending
	for n := 1; n < d.circuit.Nodes(); n++ {
		all = append(all, d.ending(d.circuit.Labels(circuit.Node(n))[0], func(v Voltages) quantity.Voltage { return v[n] }))
	}
	return all
}

// Capacitors are the endings of the voltages across all capacitors, in the order of
// the circuit: one can stay charged between nodes that are both discharged.
func (d *Decay) Capacitors() []Ending {
	var all []Ending
	for i := range d.circuit.Elements {
		if e := &d.circuit.Elements[i]; e.Kind == circuit.Capacitor {
			all = append(all, d.ending(e.Name, func(v Voltages) quantity.Voltage { return v.across(e) }))
		}
	}
	return all
}

// Slowest is the node that stays charged longest; the first of equals.
func (d *Decay) Slowest() Ending { return last(d.Nodes()) }

// MostLeft is the capacitor with the largest voltage when nothing moves any more.
func (d *Decay) MostLeft() Ending {
	var most Ending
	for _, e := range d.Capacitors() {
		if magnitude(e.Rest) > magnitude(most.Rest) {
			most = e
		}
	}
	return most
}

func last(endings []Ending) (slowest Ending) {
	for i, e := range endings {
		if i == 0 || e.Outlasts(slowest) {
			slowest = e
		}
	}
	return slowest
}

// ending looks for the last time a voltage of the history was above the limit.
func (d *Decay) ending(of string, voltage func(Voltages) quantity.Voltage) Ending {
	final := len(d.history) - 1
	e := Ending{Of: of, Start: voltage(d.history[0]), Rest: voltage(d.history[final])}
	i := final
	for i >= 0 && quantity.AtMost(magnitude(voltage(d.history[i])), d.Limit) {
		i--
	}
	switch {
	case i == final:
		e.Never = true
	case i >= 0:
		e.Time = d.crossing(i, voltage)
	}
	return e
}
