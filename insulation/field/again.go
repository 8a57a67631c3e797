package field

import (
	"maps"
	"slices"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// With is the field of the same outlines with other permittivities of some bodies; the
// medium is named Medium. What depends on the outlines alone is kept.
func (s *Solution) With(permittivities map[string]float64) (*Solution, error) {
	a := s.copied()
	for _, name := range slices.Sorted(maps.Keys(permittivities)) {
		k, err := s.body(name)
		if err != nil {
			return nil, err
		}
		if k == 0 {
			a.Permittivity = permittivities[name]
		} else {
			a.Dielectrics[k-1].Permittivity = permittivities[name]
		}
	}
	m, err := newModel(a, s.resistive)
	if err != nil {
		return nil, err
	}
	return s.again(m)
}

// Settled is SolveResistive of the same figure. What depends on the outlines alone is
// kept.
func (s *Solution) Settled() (*Solution, error) {
	a := s.copied()
	if err := leaks(a); err != nil {
		return nil, err
	}
	m, err := newModel(a, true)
	if err != nil {
		return nil, err
	}
	if err := m.held(); err != nil {
		return nil, err
	}
	return s.again(m)
}

// Passing is the field after a step of the voltages, averaged over time with the weight
// e^(−t/T)/T: the transform of the passage from Solve to SolveResistive. Where that
// passage has one time constant the field lies half way at T equal to it.
func (s *Solution) Passing(over quantity.Time) (*Solution, error) {
	a := s.copied()
	if err := leaks(a); err != nil {
		return nil, err
	}
	if !(over > 0) {
		return nil, lack.Range("a time over which a field is averaged is positive")
	}
	m := &model{Arrangement: a, over: float64(over)}
	if faults := m.build(); len(faults) > 0 {
		return nil, faults
	}
	return s.againBy(m, Rough)
}

func (s *Solution) copied() *Arrangement {
	a := *s.Arrangement
	a.Dielectrics = slices.Clone(a.Dielectrics)
	return &a
}

// again solves a model that differs in its constants from the division of this one, with
// the integrals that were done for it.
func (s *Solution) again(m *model) (*Solution, error) { return s.againBy(m, Aim(s.aim)) }

// againBy is again with another aim: a rougher one goes on from the last division, which
// mostly serves it, a fine one from the last but one, to see what the last changes.
func (s *Solution) againBy(m *model, aim Aim) (*Solution, error) {
	if !s.samePlane(m) {
		return m.solution(aim)
	}
	next := newSolver(m)
	next.blocks, next.made, next.aim = maps.Clone(s.blocks), s.made, float64(aim)
	if aim > Fine {
		return next.solution(s.fine.panels)
	}
	return next.solution(s.coarse.panels)
}

// samePlane reports whether two models have the same walls between the same regions.
func (s *Solution) samePlane(m *model) bool {
	return len(s.regions) == len(m.regions) && slices.EqualFunc(s.walls, m.walls, func(a, b wall) bool {
		return a.kind == b.kind && a.edge == b.edge && a.left == b.left && a.right == b.right && a.curve == b.curve
	})
}
