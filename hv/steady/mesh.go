package steady

// mesh is the pattern in which a network of conductances is solved by removing one
// node after another: the star of conductances at a node becomes the equivalent
// mesh between its neighbours (A. Rosen, J. IEE 62 (1924) 916; memory). Nothing is
// ever subtracted, so 1e-30 S beside 10 S keeps its digits and a part of the network
// that hangs on next to nothing is still solved exactly (Grassmann, Taksar and
// Heyman, Oper. Res. 33 (1985) 1107, for Markov chains; memory). Ground is node 0.
type mesh struct {
	nodes  int
	slots  [][]int // slot of the conductance between two nodes; −1 where there is none
	size   int     // number of slots
	pivots []pivot
}

// pivot is one node to remove: its arms to nodes still there, and which slots
// receive the mesh that replaces them.
type pivot struct {
	node  int
	arms  []arm
	fills []fill
}

type arm struct{ node, slot int }

type fill struct{ one, other, slot int }

const noSlot = -1

// newMesh plans the removal for a network whose conductances join the given pairs.
func newMesh(nodes int, pairs [][2]int) *mesh {
	m := &mesh{nodes: nodes, slots: make([][]int, nodes)}
	for i := range m.slots {
		m.slots[i] = make([]int, nodes)
		for j := range m.slots[i] {
			m.slots[i][j] = noSlot
		}
	}
	for _, p := range pairs {
		m.slot(p[0], p[1])
	}
	m.plan()
	return m
}

// slot finds or makes the slot between two nodes; none within one node.
func (m *mesh) slot(i, j int) int {
	if i == j {
		return noSlot
	}
	if m.slots[i][j] == noSlot {
		m.slots[i][j], m.slots[j][i] = m.size, m.size
		m.size++
	}
	return m.slots[i][j]
}

// plan removes the node with the fewest neighbours first.
func (m *mesh) plan() {
	left := make([]bool, m.nodes)
	for i := range left {
		left[i] = true
	}
	for range m.nodes - 1 {
		node, arms := m.leanest(left)
		left[node] = false
		p := pivot{node: node, arms: arms}
		for i, a := range arms {
			for _, b := range arms[:i] {
				p.fills = append(p.fills, fill{a.slot, b.slot, m.slot(a.node, b.node)})
			}
		}
		m.pivots = append(m.pivots, p)
	}
}

func (m *mesh) leanest(left []bool) (best int, arms []arm) {
	for i := 1; i < m.nodes; i++ {
		if !left[i] {
			continue
		}
		if a := m.arms(i, left); best == 0 || len(a) < len(arms) {
			best, arms = i, a
		}
	}
	return best, arms
}

func (m *mesh) arms(node int, left []bool) []arm {
	var arms []arm
	for j, s := range m.slots[node] {
		if s != noSlot && left[j] {
			arms = append(arms, arm{j, s})
		}
	}
	return arms
}

// factors are the conductances of a mesh with all nodes removed.
type factors struct {
	mesh *mesh
	g    []float64 // by slot
	sum  []float64 // by pivot: all conductance at the node when it was removed
}

func (m *mesh) newFactors() *factors {
	return &factors{m, make([]float64, m.size), make([]float64, len(m.pivots))}
}

// factor removes all nodes of the network with the given conductances, by slot.
func (f *factors) factor(g []float64) {
	copy(f.g, g)
	clear(f.g[len(g):])
	for k := range f.mesh.pivots {
		p := &f.mesh.pivots[k]
		sum := 0.0
		for _, a := range p.arms {
			sum += f.g[a.slot]
		}
		f.sum[k] = sum
		if sum == 0 {
			continue
		}
		for _, x := range p.fills {
			f.g[x.slot] += f.g[x.one] * f.g[x.other] / sum
		}
	}
}

// solve finds the potentials for the currents fed into the nodes, which it uses up.
// A node that hangs on nothing keeps the potential it had in v.
func (f *factors) solve(current, v []float64) {
	for k := range f.mesh.pivots {
		p := &f.mesh.pivots[k]
		if f.sum[k] == 0 {
			continue
		}
		share := current[p.node] / f.sum[k]
		for _, a := range p.arms {
			current[a.node] += share * f.g[a.slot]
		}
	}
	v[0] = 0
	for k := len(f.mesh.pivots) - 1; k >= 0; k-- {
		p := &f.mesh.pivots[k]
		if f.sum[k] == 0 {
			continue
		}
		total := current[p.node]
		for _, a := range p.arms {
			total += f.g[a.slot] * v[a.node]
		}
		v[p.node] = total / f.sum[k]
	}
}
