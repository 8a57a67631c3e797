package steady

import "math/bits"

// mesh is the pattern in which a network of conductances is solved by removing one
// node after another: the star of conductances at a node becomes the equivalent
// mesh between its neighbours (A. Rosen, J. IEE 62 (1924) 916; memory). Nothing is
// ever subtracted, so 1e-30 S beside 10 S keeps its digits and a part of the network
// that hangs on next to nothing is still solved exactly (Grassmann, Taksar and
// Heyman, Oper. Res. 33 (1985) 1107, for Markov chains; memory). Ground is node 0.
type mesh struct {
	nodes  int
	slots  []int32 // by two nodes: slot of the conductance between them, or noSlot
	size   int     // number of slots
	pivots []pivot
	arms   []arm
	fills  []fill
}

// pivot is one node to remove: where its arms to nodes still there end in the list
// of all, and where the slots that receive the mesh that replaces them.
type pivot struct{ node, arms, fills int32 }

type arm struct{ node, slot int32 }

type fill struct{ one, other, slot int32 }

const noSlot = -1

// newMesh plans the removal for a network whose conductances join the given pairs.
func newMesh(nodes int, pairs [][2]int) *mesh {
	m := &mesh{nodes: nodes, slots: make([]int32, nodes*nodes)}
	for i := range m.slots {
		m.slots[i] = noSlot
	}
	for _, p := range pairs {
		m.slot(p[0], p[1])
	}
	m.plan(newCrowd(nodes, pairs))
	return m
}

// slot finds or makes the slot between two nodes; none within one node.
func (m *mesh) slot(i, j int) int {
	if i == j {
		return noSlot
	}
	s := &m.slots[i*m.nodes+j]
	if *s == noSlot {
		*s = int32(m.size)
		m.slots[j*m.nodes+i] = *s
		m.size++
	}
	return int(*s)
}

// plan removes the node with the fewest neighbours first.
func (m *mesh) plan(c *crowd) {
	for range m.nodes - 1 {
		node := c.leanest()
		first := len(m.arms)
		for _, j := range c.remove(node) {
			m.arms = append(m.arms, arm{int32(j), int32(m.slot(node, j))})
		}
		arms := m.arms[first:]
		for i, a := range arms {
			for _, b := range arms[:i] {
				m.fills = append(m.fills, fill{a.slot, b.slot, int32(m.slot(int(a.node), int(b.node)))})
			}
		}
		m.pivots = append(m.pivots, pivot{int32(node), int32(len(m.arms)), int32(len(m.fills))})
	}
}

// crowd is who is whose neighbour among the nodes that are left.
type crowd struct {
	words  int
	bits   []uint64 // by node, a bit for each neighbour
	degree []int    // by node; −1 where it is gone
}

func newCrowd(nodes int, pairs [][2]int) *crowd {
	c := &crowd{words: (nodes + 63) / 64, degree: make([]int, nodes)}
	c.bits = make([]uint64, nodes*c.words)
	for _, p := range pairs {
		if p[0] != p[1] {
			c.of(p[0])[p[1]/64] |= 1 << (p[1] % 64)
			c.of(p[1])[p[0]/64] |= 1 << (p[0] % 64)
		}
	}
	for i := range c.degree {
		c.degree[i] = c.count(i)
	}
	return c
}

func (c *crowd) of(i int) []uint64 { return c.bits[i*c.words : (i+1)*c.words] }

func (c *crowd) count(i int) int {
	d := 0
	for _, w := range c.of(i) {
		d += bits.OnesCount64(w)
	}
	return d
}

// leanest is the first node but ground with the fewest neighbours.
func (c *crowd) leanest() int {
	best := 0
	for i := 1; i < len(c.degree); i++ {
		if d := c.degree[i]; d >= 0 && (best == 0 || d < c.degree[best]) {
			best = i
		}
	}
	return best
}

// remove takes a node out, joins its neighbours among themselves and lists them.
func (c *crowd) remove(i int) []int {
	var list []int
	for k, w := range c.of(i) {
		for ; w != 0; w &= w - 1 {
			list = append(list, k*64+bits.TrailingZeros64(w))
		}
	}
	for _, j := range list {
		row := c.of(j)
		for k, w := range c.of(i) {
			row[k] |= w
		}
		row[i/64] &^= 1 << (i % 64)
		row[j/64] &^= 1 << (j % 64)
		c.degree[j] = c.count(j)
	}
	c.degree[i] = -1
	return list
}

// factors are the conductances of a mesh with all nodes removed.
type factors struct {
	mesh  *mesh
	g     []float64 // by slot
	arms  []float64 // by arm: its conductance when its node was removed
	share []float64 // by pivot: one over all conductance at the node when it was removed; zero where there was none
}

func (m *mesh) newFactors() *factors {
	return &factors{m, make([]float64, m.size), make([]float64, len(m.arms)), make([]float64, len(m.pivots))}
}

// factor removes all nodes of the network with the given conductances, by slot.
func (f *factors) factor(g []float64) {
	copy(f.g, g)
	clear(f.g[len(g):])
	f.remove()
}

// remove removes all nodes of the network whose conductances are in place.
func (f *factors) remove() {
	g, arms, kept := f.g, f.mesh.arms, f.arms[:len(f.mesh.arms)]
	next, first := 0, int32(0) // arm and fill
	for k := range f.mesh.pivots {
		p := &f.mesh.pivots[k]
		sum := 0.0
		for ; next < int(p.arms); next++ {
			y := g[arms[next].slot]
			kept[next] = y
			sum += y
		}
		f.share[k] = 0
		if sum > 0 {
			share := 1 / sum
			f.share[k] = share
			for _, x := range f.mesh.fills[first:p.fills] {
				g[x.slot] += g[x.one] * share * g[x.other]
			}
		}
		first = p.fills
	}
}

// solve finds the potentials for the currents fed into the nodes, which it uses up.
// A node that hangs on nothing keeps the potential it had in v.
func (f *factors) solve(current, v []float64) {
	pivots, arms, kept := f.mesh.pivots, f.mesh.arms, f.arms[:len(f.mesh.arms)]
	share, next := f.share[:len(pivots)], 0
	for k := range pivots {
		p := &pivots[k]
		passed := current[p.node] * share[k]
		for ; next < int(p.arms); next++ {
			current[arms[next].node] += passed * kept[next]
		}
	}
	v[0] = 0
	for k := len(pivots) - 1; k >= 0; k-- {
		end, from := next, 0
		if k > 0 {
			from = int(pivots[k-1].arms)
		}
		next = from
		if share[k] == 0 {
			continue
		}
		node := pivots[k].node
		total := current[node]
		for i := from; i < end; i++ {
			total += kept[i] * v[arms[i].node]
		}
		v[node] = total * share[k]
	}
}
