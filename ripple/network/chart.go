package network

// through replaces a change by what a period makes of it.
func (e *glide) through(x []float64) {
	for i, row := range e.m {
		e.spare[i] = dot(row, x)
	}
	copy(x, e.spare)
}

// chart finds M from the period walked last.
func (e *glide) chart() {
	if e.known {
		return
	}
	e.known, e.age = true, 0
	for j := range e.m {
		clear(e.d)
		e.d[j] = 1
		e.minus(e.linear, e.d)
		for i, v := range e.d {
			e.m[i][j] = -v
		}
		e.m[j][j]++
	}
}

// departs is by how much N at a state is other than at the present one.
func (e *glide) departs(x, g, out []float64) {
	at := e.last()
	for i := range out {
		e.d[i] = x[i] - at.x[i]
	}
	copy(out, e.d)
	e.through(e.d)
	for i := range out {
		out[i] += g[i] - at.g[i] - e.d[i]
	}
}

// before is how long before the present state another was walked, as a negative number.
func (e *glide) before(i int) float64 {
	return e.points[len(e.points)-2-i].periods - e.last().periods
}

// basis are the polynomials that N is continued by: n, n (n − n₁), n (n − n₁) (n − n₂).
func (e *glide) basis(i int, n float64) float64 {
	v := n
	for k := range i {
		v *= n - e.before(k)
	}
	return v
}

// continued finds the polynomial through N at the states walked.
func (e *glide) continued() {
	for i := range e.past() {
		p := &e.points[len(e.points)-2-i]
		e.departs(p.x, p.g, e.terms[i])
		for k := range i {
			axpy(-e.basis(k, e.before(i)), e.terms[k], e.terms[i])
		}
		scaleBy(e.terms[i], 1/e.basis(i, e.before(i)))
	}
}
