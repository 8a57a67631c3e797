package network

import "math/bits"

// pattern is the fixed structure of the factors L D Lᵀ of every matrix of one
// circuit: which entries exist and which of them each pivot updates. A ladder is
// nearly a tree, so the order of least degree leaves two or three entries a
// column and every factorisation costs time in proportion to the stages.
type pattern struct {
	n      int
	start  []int32 // by column: its first entry in row; one more at the end
	row    []int32 // rows of the entries below the diagonal
	update []int32 // entries below the diagonal that the pivots update, in order of elimination
}

// size is the number of entries: n of the diagonal, then those below it.
func (p *pattern) size() int { return p.n + len(p.row) }

// entry finds where the entry (i, j), i ≠ j, stands.
func (p *pattern) entry(i, j int) int32 {
	if i < j {
		i, j = j, i
	}
	for s := p.start[j]; s < p.start[j+1]; s++ {
		if p.row[s] == int32(i) {
			return int32(p.n) + s
		}
	}
	panic("network: no such entry")
}

// graph is a set of neighbours for each unknown.
type graph struct {
	words int
	bits  []uint64
}

func newGraph(n int) *graph {
	w := (n + 63) / 64
	return &graph{w, make([]uint64, n*w)}
}

func (g *graph) of(i int) []uint64 { return g.bits[i*g.words : (i+1)*g.words] }

func (g *graph) add(i, j int) {
	if i != j {
		g.of(i)[j/64] |= 1 << (j % 64)
		g.of(j)[i/64] |= 1 << (i % 64)
	}
}

func (g *graph) degree(i int) int {
	d := 0
	for _, w := range g.of(i) {
		d += bits.OnesCount64(w)
	}
	return d
}

// members lists the neighbours of i in rising order.
func (g *graph) members(i int) []int {
	var list []int
	for k, w := range g.of(i) {
		for ; w != 0; w &= w - 1 {
			list = append(list, k*64+bits.TrailingZeros64(w))
		}
	}
	return list
}

// remove takes i out and joins its neighbours among themselves.
func (g *graph) remove(i int) {
	list := g.members(i)
	for _, j := range list {
		row := g.of(j)
		for k, w := range g.of(i) {
			row[k] |= w
		}
		row[i/64] &^= 1 << (i % 64)
		row[j/64] &^= 1 << (j % 64)
	}
}

// eliminate finds the order of least degree (Tinney and Walker, Proc. IEEE 55
// (1967) 1801, scheme 2) and the neighbours each unknown has when its turn comes.
func (g *graph) eliminate(n int) (order []int, below [][]int) {
	degree := make([]int, n)
	for i := range degree {
		degree[i] = g.degree(i)
	}
	for range n {
		k := -1
		for i, d := range degree {
			if d >= 0 && (k < 0 || d < degree[k]) {
				k = i
			}
		}
		list := g.members(k)
		g.remove(k)
		order, below = append(order, k), append(below, list)
		degree[k] = -1
		for _, j := range list {
			degree[j] = g.degree(j)
		}
	}
	return order, below
}

// newPattern orders the unknowns of a graph; place says where each one went.
func newPattern(g *graph, n int) (p *pattern, place []int) {
	order, below := g.eliminate(n)
	place = make([]int, n)
	for k, i := range order {
		place[i] = k
	}
	p = &pattern{n: n, start: make([]int32, n+1)}
	for k := range order {
		for _, j := range below[k] {
			p.row = append(p.row, int32(place[j]))
		}
		sortRows(p.row[p.start[k]:])
		p.start[k+1] = int32(len(p.row))
	}
	p.link()
	return p, place
}

// link lists the entry that each product of two entries of a column goes into.
func (p *pattern) link() {
	for k := range p.n {
		column := p.row[p.start[k]:p.start[k+1]]
		for s, i := range column {
			for _, j := range column[s+1:] {
				p.update = append(p.update, p.entry(int(j), int(i)))
			}
		}
	}
}

func sortRows(rows []int32) {
	for i := 1; i < len(rows); i++ {
		for j := i; j > 0 && rows[j] < rows[j-1]; j-- {
			rows[j], rows[j-1] = rows[j-1], rows[j]
		}
	}
}
