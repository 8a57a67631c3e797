package evidence

import (
	"strconv"
	"strings"

	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/hv/steady"
)

// means are the mean potentials of all nodes.
func (e *Evidence) means() (steady.Voltages, error) {
	return remember(e, "means", func() (steady.Voltages, error) {
		c, err := e.Circuit()
		if err != nil {
			return nil, err
		}
		v := make(steady.Voltages, c.Nodes())
		for n := 1; n < c.Nodes(); n++ {
			if v[n], err = e.Potential(c.Labels(circuit.Node(n))[0]); err != nil {
				return nil, err
			}
		}
		return v, nil
	})
}

// charged is the circuit with the mean potentials of its nodes.
func (e *Evidence) charged() (*circuit.Circuit, steady.Voltages, error) {
	c, err := e.Circuit()
	if err != nil {
		return nil, nil, err
	}
	v, err := e.means()
	return c, v, err
}

// Stored is the energy of one part.
type Stored struct {
	Name   string
	Energy quantity.Energy
}

// StoredByPart is the energy in every capacitor whose capacitance is known.
func (e *Evidence) StoredByPart() ([]Stored, error) {
	c, v, err := e.charged()
	if err != nil {
		return nil, err
	}
	var all []Stored
	for _, s := range steady.Stores(c, v) {
		if s.Doubt == nil {
			all = append(all, Stored{s.Element, s.Energy})
		}
	}
	return all, nil
}

// StoredEnergy is the energy in the whole chain.
func (e *Evidence) StoredEnergy() (quantity.Energy, error) {
	c, v, err := e.charged()
	if err != nil {
		return 0, err
	}
	return steady.Energy(c, v)
}

// Short is what a short to ground at a node delivers.
type Short struct {
	Charge quantity.Charge
	Energy quantity.Energy
}

// ShortAt is what an ideal short at a node delivers, drive and loads off.
func (e *Evidence) ShortAt(node string) (Short, error) {
	name := e.canonical(node)
	if e.condition.Corner == Nominal && e.condition.Fault.Name == "" {
		all, err := e.shorts()
		if err != nil {
			return Short{}, err
		}
		if s, there := all[name]; there {
			return s.value, s.err
		}
	}
	return remember(e, "short at "+name, func() (Short, error) {
		all, err := e.shorted([]string{node})
		return all[node].value, first(err, all[node].err)
	})
}

// outcome is a value or the error instead of it.
type outcome[T any] struct {
	value T
	err   error
}

// shorts are the shorts at all nodes that a description may name.
func (e *Evidence) shorts() (map[string]outcome[Short], error) {
	return remember(e, "shorts", func() (map[string]outcome[Short], error) {
		var names []string
		for _, n := range e.Nodes() {
			names = append(names, e.canonical(n))
		}
		return e.shorted(names)
	})
}

// shorted are the shorts at the given nodes.
func (e *Evidence) shorted(nodes []string) (map[string]outcome[Short], error) {
	c, v, err := e.charged()
	if err != nil {
		return nil, err
	}
	delivered, errs := steady.Shorts(c, v, nodes)
	all := map[string]outcome[Short]{}
	for i, d := range delivered {
		all[nodes[i]] = outcome[Short]{Short{d.Charge, d.Energy}, errs[i]}
	}
	return all, nil
}

// Same reports whether two names are of one node.
func (e *Evidence) Same(a, b string) bool { return e.canonical(a) == e.canonical(b) }

// canonical is the first name of a node.
func (e *Evidence) canonical(node string) string {
	n, ok := e.Layout().Node(node)
	if !ok {
		return node
	}
	return e.Layout().Labels(n)[0]
}

// IsGround reports whether a name is one of ground's.
func (e *Evidence) IsGround(node string) bool {
	n, ok := e.Layout().Node(node)
	return ok && n == circuit.Ground
}

// measuring is the resistance through which a touch current is measured (IEC 60335-1,
// EN 50191: 2 kohm).
const measuring quantity.Resistance = 2e3

// TouchCurrent is the largest current that the supply drives through 2 kohm from a node
// to ground, for as long as it is on; of an alternating one the peak.
func (e *Evidence) TouchCurrent(node string) (quantity.Current, error) {
	return remember(e, "touch "+e.canonical(node), func() (quantity.Current, error) {
		if e.OnMains(node) {
			v, err := e.Touched(node)
			return quantity.Current(float64(v) / float64(measuring)), err
		}
		p, err := e.measured(node)
		if err != nil {
			return 0, err
		}
		f, err := p.Through(bodyName)
		return f.Peak, err
	})
}

// bodyName is the element through which a touch current is measured, which stands for a body.
const bodyName = "measuring resistor"

// measured is the state with the measuring resistor from a node to ground.
func (e *Evidence) measured(node string) (periodic, error) {
	return remember(e, "measured "+e.canonical(node), func() (periodic, error) {
		c, err := e.Circuit()
		if err != nil {
			return periodic{}, err
		}
		return e.solve(c.Bridge(bodyName, node, "ground", measuring), e.untouched(c, node), true)
	})
}

// untouched is what the state with a node measured is near to: of a node with next to no
// direct voltage that without the resistor, of an end of the heater, which hangs on the cathode
// by a few ohms, that with the cathode measured; of others nothing.
func (e *Evidence) untouched(c *circuit.Circuit, node string) beside {
	if v, err := e.Potential(node); err == nil && magnitude(v) < e.chain.Drive.Peak.V/100 {
		return beside{from: e.found()}
	}
	_, there := c.Node("cathode")
	if !there || node != "heater.a" && node != "heater.b" || e.canonical(node) == e.canonical("cathode") {
		return beside{}
	}
	s, err := e.measured("cathode")
	if err != nil {
		return beside{}
	}
	return beside{from: s.Periodic}
}

// longLadder is the number of stages above which the current that a person draws is
// worked out at the ends of a ladder only: each node between takes a search of its own.
const longLadder = 8

// Available is the touch current of a node, for print: not of the nodes within a long
// ladder.
func (e *Evidence) Available(node string) (quantity.Current, error) {
	n := e.chain.Multiplier.Stages.V
	if n > longLadder && e.within(node, n) {
		return 0, lack.Failed("not computed within a ladder of more than %d stages: see its ends", longLadder)
	}
	if e.Leaves("faults") && e.within(node, n) {
		return 0, lack.Failed("left out with the faults")
	}
	return e.TouchCurrent(node)
}

// within reports whether a node is one of a ladder's below its last stage.
func (e *Evidence) within(node string, stages int) bool {
	name := e.canonical(node)
	column, _, _ := strings.Cut(name, ".")
	k, err := strconv.Atoi(name[strings.LastIndex(name, ".")+1:])
	return err == nil && (column == "stage" || column == "coupling") && k < stages
}
