package rules

import "sync"

// together does pieces of work that do not need one another's results at the same time;
// what one of them panics with comes out here.
func together(work ...func()) {
	var group sync.WaitGroup
	broken := make(chan any, len(work))
	for _, do := range work {
		group.Go(func() {
			defer func() {
				if what := recover(); what != nil {
					broken <- what
				}
			}()
			do()
		})
	}
	group.Wait()
	select {
	case what := <-broken:
		panic(what)
	default:
	}
}

// inTurn calls makers at the same time and strings what they give together in order.
func inTurn[T any](makers ...func() []T) []T {
	parts := make([][]T, len(makers))
	work := make([]func(), len(makers))
	for i, make := range makers {
		work[i] = func() { parts[i] = make() }
	}
	together(work...)
	var all []T
	for _, p := range parts {
		all = append(all, p...)
	}
	return all
}
