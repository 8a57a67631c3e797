package network

import (
	"slices"
	"sync"
)

// found is a pattern that was worked out for a graph.
type found struct {
	bits    []uint64
	pattern *pattern
	place   []int
}

// lately are the patterns found last: a review solves one ladder many times over, and most
// faults leave a graph as it is.
var lately struct {
	guard sync.Mutex
	list  []found
	next  int // to be forgotten
}

// mostPatterns is the number of patterns that are kept.
const mostPatterns = 16

// patternOf is newPattern, which is not asked again for what it found lately. Both results
// are not to be changed.
func patternOf(g *graph, n int) (*pattern, []int) {
	lately.guard.Lock()
	defer lately.guard.Unlock()
	for i := range lately.list {
		if f := &lately.list[i]; f.pattern.n == n && slices.Equal(f.bits, g.bits) {
			return f.pattern, f.place
		}
	}
	f := found{bits: slices.Clone(g.bits)}
	f.pattern, f.place = newPattern(g, n)
	if len(lately.list) < mostPatterns {
		lately.list = append(lately.list, f)
	} else {
		lately.list[lately.next] = f
	}
	lately.next = (lately.next + 1) % mostPatterns
	return f.pattern, f.place
}
