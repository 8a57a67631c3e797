package network

import (
	"fmt"
	"math"

	"kilovet/hv/circuit"
	"kilovet/hv/lack"
)

// offset is what the ideal sources add to a potential: direct + square·s(t) +
// sine·sin(ωt), where s is +1 in the first half of the period and −1 in the second.
type offset struct{ direct, square, sine float64 }

func (o offset) plus(p offset, sign float64) offset {
	return offset{o.direct + sign*p.direct, o.square + sign*p.square, o.sine + sign*p.sine}
}

func (o offset) at(square, sine float64) float64 { return o.direct + o.square*square + o.sine*sine }

func (o offset) size() float64 { return math.Abs(o.direct) + math.Abs(o.square) + math.Abs(o.sine) }

// grounded marks nodes whose potential the sources alone fix.
const grounded = -1

// frame ties the nodes to the free potentials: nodes joined by ideal sources form
// a group with one free potential, and each differs from it by an offset. So no
// source current is an unknown, and the matrices stay symmetric.
type frame struct {
	group  []int    // by node: its free potential, or grounded
	offset []offset // by node
	count  int      // free potentials
	loose  []bool   // by node: nothing ties it to ground, its potential is arbitrary
	below  [][]int  // by element: the nodes beyond a tie, seen from its group's root
	toward []bool   // by element: the tie's To end is the one beyond
}

// isTie reports whether an element fixes the voltage between its ends.
func isTie(e *circuit.Element) bool {
	switch e.Kind {
	case circuit.Source:
		return true
	case circuit.Resistor:
		return e.Resistance == 0
	case circuit.Inductor:
		return e.Inductance == 0
	}
	return false
}

// wave is the offset a tie puts between its ends. A source of another frequency
// than the drive is held at zero.
func wave(e *circuit.Element, frequency float64) offset {
	if e.Kind != circuit.Source {
		return offset{}
	}
	a := float64(e.Wave.Amplitude)
	if e.Wave.Form == circuit.Direct {
		return offset{direct: a}
	}
	if math.Abs(float64(e.Wave.Frequency)-frequency) > 1e-9*frequency {
		return offset{}
	}
	if e.Wave.Form == circuit.Square {
		return offset{square: a}
	}
	return offset{sine: a}
}

func newFrame(c *circuit.Circuit, frequency float64) (*frame, error) {
	f := &frame{group: make([]int, c.Nodes()), offset: make([]offset, c.Nodes()), loose: make([]bool, c.Nodes()),
		below: make([][]int, len(c.Elements)), toward: make([]bool, len(c.Elements))}
	t := newTree(c)
	for n := range f.group {
		if t.seen[n] {
			continue
		}
		g := f.count
		if circuit.Node(n) == circuit.Ground {
			g = grounded
		} else {
			f.count++
		}
		if err := t.grow(f, n, g, frequency); err != nil {
			return nil, err
		}
	}
	return f, f.pin(c)
}

// tree walks the ties from node to node.
type tree struct {
	c    *circuit.Circuit
	ties [][]int // by node
	used []bool  // by element
	seen []bool  // by node
}

func newTree(c *circuit.Circuit) *tree {
	t := &tree{c: c, ties: make([][]int, c.Nodes()), used: make([]bool, len(c.Elements)), seen: make([]bool, c.Nodes())}
	for i := range c.Elements {
		if e := &c.Elements[i]; isTie(e) {
			t.ties[e.From] = append(t.ties[e.From], i)
			t.ties[e.To] = append(t.ties[e.To], i)
		}
	}
	return t
}

// grow gives a node and all beyond it their group; it returns an error where
// sources in a loop contradict one another.
func (t *tree) grow(f *frame, n, group int, frequency float64) error {
	t.seen[n] = true
	f.group[n] = group
	for _, i := range t.ties[n] {
		if t.used[i] {
			continue
		}
		t.used[i] = true
		e := &t.c.Elements[i]
		other, sign := int(e.To), -1.0
		if other == n {
			other, sign = int(e.From), 1
		}
		o := f.offset[n].plus(wave(e, frequency), sign)
		if t.seen[other] {
			if d := o.plus(f.offset[other], -1).size(); d > 1e-9*o.size() {
				return lack.Failed("%s stands in a loop of ideal sources that contradict one another", e.Name)
			}
			continue
		}
		f.offset[other] = o
		f.toward[i] = sign < 0
		if err := t.grow(f, other, group, frequency); err != nil {
			return err
		}
		f.below[i] = t.beyond(f, i, other)
	}
	return nil
}

// beyond lists the nodes on the far side of a tie.
func (t *tree) beyond(f *frame, tie, n int) []int {
	nodes := []int{n}
	for _, i := range t.ties[n] {
		if i != tie && f.below[i] != nil {
			nodes = append(nodes, f.below[i]...)
		}
	}
	return nodes
}

// pin fixes one potential of every part of the circuit that nothing ties to
// ground; only differences within such a part have a meaning.
func (f *frame) pin(c *circuit.Circuit) error {
	set := newSets(f.count + 1) // ground is the last
	for i := range c.Elements {
		e := &c.Elements[i]
		if e.Kind != circuit.Gap && e.Kind != circuit.Sink {
			set.join(f.slot(e.From), f.slot(e.To))
		}
	}
	ground := set.find(f.count)
	for i := range c.Elements {
		e := &c.Elements[i]
		if a, b := set.find(f.slot(e.From)), set.find(f.slot(e.To)); e.Kind == circuit.Sink && a != b && e.Current != 0 {
			return lack.Failed("%s draws a current between parts of the circuit that nothing connects", e.Name)
		}
	}
	renumber := make([]int, f.count)
	next := 0
	for g := range renumber {
		if r := set.find(g); r != ground && r == g {
			renumber[g] = grounded
			continue
		}
		renumber[g] = next
		next++
	}
	for n, g := range f.group {
		if g == grounded {
			continue
		}
		f.loose[n] = set.find(g) != ground
		f.group[n] = renumber[g]
	}
	f.count = next
	return nil
}

func (f *frame) slot(n circuit.Node) int {
	if g := f.group[n]; g != grounded {
		return g
	}
	return f.count
}

// known says why a node has no potential, if so.
func (f *frame) known(c *circuit.Circuit, n circuit.Node) error {
	if n < 0 || int(n) >= len(f.group) {
		panic(fmt.Sprintf("network: no node %d", n))
	}
	if f.loose[n] {
		return lack.Failed("nothing connects %s to ground: its potential is not determined", c.Labels(n)[0])
	}
	return nil
}

// sets are disjoint sets of small numbers.
type sets []int

func newSets(n int) sets {
	s := make(sets, n)
	for i := range s {
		s[i] = i
	}
	return s
}

func (s sets) find(i int) int {
	for s[i] != i {
		s[i] = s[s[i]]
		i = s[i]
	}
	return i
}

func (s sets) join(i, j int) { s[s.find(i)] = s.find(j) }
