package evidence

import (
	"slices"
	"sync"

	"kilovet/hv/chain"
	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
	"kilovet/hv/trace"
)

// Evidence is what is computed for a chain under one condition. Values for other
// conditions come from Under and share its memory.
type Evidence struct {
	chain     *chain.Chain
	condition Condition
	memory    *memory
	trace     *trace.Trace // of the measured ripple; nil where none was read
	before    *Evidence    // of the chain before it was changed, to start from; nil for the described one
	request   *request
}

// request is what a review was asked for beside the chain.
type request struct {
	without []string
	told    func(what string, done, of int)

	telling sync.Mutex
	solved  int // states of the circuit
}

// Without leaves families of rules out, with what they alone would compute.
func (e *Evidence) Without(families ...string) *Evidence {
	e.request.without = families
	return e
}

// Leaves reports whether a family of rules is left out.
func (e *Evidence) Leaves(family string) bool {
	return e.request != nil && slices.Contains(e.request.without, family)
}

// Telling has somebody told how far lengthy work has come; never by two at once.
func (e *Evidence) Telling(told func(what string, done, of int)) *Evidence {
	e.request.told = told
	return e
}

// Tell says how far lengthy work has come; of is zero where its end is not known.
func (e *Evidence) Tell(what string, done, of int) {
	if e.request == nil || e.request.told == nil {
		return
	}
	e.request.telling.Lock()
	defer e.request.telling.Unlock()
	e.request.told(what, done, of)
}

// tellSolved tells of one more state of the circuit.
func (e *Evidence) tellSolved() {
	if e.request == nil || e.request.told == nil {
		return
	}
	e.request.telling.Lock()
	defer e.request.telling.Unlock()
	e.request.solved++
	e.request.told("states of the circuit", e.request.solved, 0)
}

// New starts the evidence for a chain in working state, with an empty memory.
func New(c *chain.Chain) *Evidence {
	return &Evidence{chain: c, condition: Condition{State: Working}, memory: &memory{known: map[memoryKey]any{}}, request: &request{}}
}

// Under is the evidence for the same chain under another condition.
func (e *Evidence) Under(c Condition) *Evidence {
	with := *e
	with.condition = c
	return &with
}

// Change is another value for a part of the chain.
type Change struct {
	Name string // tells it from every other change
	Edit func(*chain.Chain)
}

// Changed is the evidence for the chain with a change, worked out from the state of the
// chain as it is. It has a memory of its own.
func (e *Evidence) Changed(c Change) *Evidence {
	changed, _ := remember(e, "changed: "+c.Name, func() (*Evidence, error) {
		copied := *e.chain
		c.Edit(&copied)
		with := New(&copied)
		with.condition, with.trace, with.before = e.condition, e.trace, e
		return with, nil
	})
	return changed
}

// In is the evidence in another state, otherwise under the same condition.
func (e *Evidence) In(s State) *Evidence {
	c := e.condition
	c.State = s
	return e.Under(c)
}

// Chain is the description.
func (e *Evidence) Chain() *chain.Chain { return e.chain }

// Condition is what this evidence is computed under.
func (e *Evidence) Condition() Condition { return e.condition }

// HasSupply reports whether a drive and a multiplier are described.
func (e *Evidence) HasSupply() bool { return e.chain.Multiplier != nil && e.chain.Drive != nil }

// Layout is the circuit as described, for what is connected to what; its drive and
// emission are those of no particular state.
func (e *Evidence) Layout() *circuit.Circuit {
	if !e.HasSupply() {
		return &circuit.Circuit{}
	}
	c, _ := remember(e.Under(Condition{}), "layout", func() (*circuit.Circuit, error) {
		return circuit.Build(e.chain, circuit.Setting{Peak: e.chain.Drive.Peak.V}), nil
	})
	return c
}

// Nodes lists the nodes a person would name, one name each where several share a
// node, ground left out.
func (e *Evidence) Nodes() []string {
	if !e.HasSupply() {
		return nil
	}
	nodes, _ := remember(e.Under(Condition{}), "nodes", func() ([]string, error) { return e.distinct(), nil })
	return nodes
}

// distinct keeps one name for each node of the circuit that a description may name.
func (e *Evidence) distinct() []string {
	var names []string
	seen := map[circuit.Node]bool{circuit.Ground: true}
	for _, name := range e.chain.Nodes() {
		n, ok := e.Layout().Node(name)
		if ok && !seen[n] {
			seen[n] = true
			names = append(names, name)
		}
	}
	return names
}

// magnitude is the size of a signed voltage.
func magnitude(v quantity.Voltage) quantity.Voltage { return max(v, -v) }
