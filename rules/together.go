package rules

import "kilovet/hv/parallel"

// inTurn calls makers at the same time and strings what they give together in order.
func inTurn[T any](makers ...func() []T) []T {
	parts := make([][]T, len(makers))
	work := make([]func(), len(makers))
	for i, make := range makers {
		work[i] = func() { parts[i] = make() }
	}
	parallel.Do(work...)
	var all []T
	for _, p := range parts {
		all = append(all, p...)
	}
	return all
}
