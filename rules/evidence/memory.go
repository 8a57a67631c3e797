package evidence

import (
	"fmt"
	"maps"
	"sync"
)

// memory holds what was computed, by condition and name, for one review. What one asks for
// while another computes it is waited for.
type memory struct {
	lock  sync.Mutex
	known map[memoryKey]any // of *recollection
}

type memoryKey struct {
	condition conditionKey
	name      string
}

// recollection is a value that is computed once.
type recollection[T any] struct {
	ready chan struct{} // closed when value and err are there
	value T
	err   error
	whole bool // computing it came to its end
}

// Remember computes a value once for each condition in a review; the name is its own.
func Remember[T any](e *Evidence, name string, compute func() (T, error)) (T, error) {
	return remember(e, "of rules: "+name, compute)
}

// remember computes a value once for each condition.
func remember[T any](e *Evidence, name string, compute func() (T, error)) (T, error) {
	key := memoryKey{e.condition.key(), name}
	e.memory.lock.Lock()
	if r, ok := e.memory.known[key].(*recollection[T]); ok {
		e.memory.lock.Unlock()
		if <-r.ready; !r.whole {
			panic(fmt.Sprintf("evidence: %s was not computed to its end", name))
		}
		return r.value, r.err
	}
	r := &recollection[T]{ready: make(chan struct{})}
	e.memory.known[key] = r
	e.memory.lock.Unlock()
	defer close(r.ready)
	r.value, r.err = compute()
	r.whole = true
	return r.value, r.err
}

// Forget lets go of everything that was computed under the fault of the condition: its state
// in time is large, and a chain has hundreds of faults. Who asks again has it computed again,
// with the same result. Without a fault nothing is forgotten.
func (e *Evidence) Forget() {
	fault := e.condition.key().fault
	if fault == "" {
		return
	}
	e.memory.lock.Lock()
	defer e.memory.lock.Unlock()
	maps.DeleteFunc(e.memory.known, func(k memoryKey, _ any) bool { return k.condition.fault == fault })
}
