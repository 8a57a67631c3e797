package network

import (
	"slices"
	"sync"
)

// room is what searches share that start from one another's states: the memory that factors
// took, and the patterns that were found.
type room struct {
	guard  sync.Mutex
	free   [][]trio
	found  []found
	oldest int // of the patterns found
}

// found is the pattern that was found for a graph.
type found struct {
	bits    []uint64
	pattern *pattern
	place   []int
}

// mostFound is the number of patterns that are kept.
const mostFound = 16

// roomOf is that of a state; of none a new one.
func roomOf(p *Periodic) *room {
	if p == nil {
		return &room{}
	}
	return p.track.room
}

// take gives memory for so many factors, which holds anything.
func (r *room) take(size int) []trio {
	r.guard.Lock()
	defer r.guard.Unlock()
	for i := len(r.free) - 1; i >= 0; i-- {
		if m := r.free[i]; cap(m) >= size {
			r.free = append(r.free[:i], r.free[i+1:]...)
			return m[:size]
		}
	}
	return make([]trio, size)
}

// give takes back what a track no longer needs.
func (r *room) give(t *track) {
	r.guard.Lock()
	defer r.guard.Unlock()
	r.free = append(r.free, t.factors...)
	t.factors = nil
}

// pattern is that of a graph and the places of its unknowns, found once; neither is to be
// changed.
func (r *room) pattern(g *graph, n int) (*pattern, []int) {
	r.guard.Lock()
	defer r.guard.Unlock()
	for i := range r.found {
		if f := &r.found[i]; f.pattern.n == n && slices.Equal(f.bits, g.bits) {
			return f.pattern, f.place
		}
	}
	f := found{bits: slices.Clone(g.bits)}
	f.pattern, f.place = newPattern(g, n)
	if len(r.found) < mostFound {
		r.found = append(r.found, f)
	} else {
		r.found[r.oldest] = f
		r.oldest = (r.oldest + 1) % mostFound
	}
	return f.pattern, f.place
}
