package network

import "math"

// reaches is the first instant within a track at which a voltage times sign reaches a
// level, infinite where it does not, and the highest it has at the end of a step.
func (t *track) reaches(s *span, sign, level float64) (at, highest float64) {
	at, highest = math.Inf(1), math.Inf(-1)
	for k := range t.steps {
		st := &t.steps[k]
		y := t.stages(k, s)
		highest = max(highest, sign*y[3])
		if !math.IsInf(at, 1) {
			continue
		}
		for j := range y {
			y[j] = sign*y[j] - level
		}
		p := y.polynomial(st.euler)
		if _, high := p.hull(); high > 0 {
			if x := p.rise(0); x <= 1 {
				at = st.start + x*st.length
			} else if p[0] >= 0 {
				at = st.start
			}
		}
	}
	return at, highest
}
