package network

import "sync"

// room keeps the memory that factors took in one search for the searches that start from
// what it found.
type room struct {
	guard sync.Mutex
	free  [][]trio
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
