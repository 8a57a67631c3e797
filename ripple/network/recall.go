package network

// recall makes a preconditioner better by what earlier solutions of nearly the same
// equations have learnt (recycling of a Krylov space: Parks, de Sturler, Mackey, Johnson
// and Maiti, SIAM J. Sci. Comput. 28 (2006) 1651; here one lesson a solution, each of the
// equations as the lessons before had left them).
type recall struct {
	lessons []lesson
	vectors int // in all lessons
	c, y    []float64
}

// lesson is what one solution has left: A M V = W H with M the preconditioner, W the
// basis, V the basis without its last vector, H = Q R.
type lesson struct {
	basis    [][]float64
	triangle [][]float64 // R, by column
	cos, sin []float64   // Q
}

// mostRecalled is the number of vectors past which earlier lessons are forgotten.
const mostRecalled = 60

func (r *recall) forget() { r.lessons, r.vectors = nil, 0 }

// learn keeps what the last solution of a solver found out.
func (r *recall) learn(s *krylov) {
	k := s.used
	for i := range k {
		if s.h[i][i] == 0 {
			return
		}
	}
	if k == 0 {
		return
	}
	if r.vectors+k > mostRecalled {
		r.forget()
	}
	r.vectors += k
	l := lesson{basis: rows(k+1, s.n), triangle: rows(k, k)}
	for i := range l.basis {
		copy(l.basis[i], s.basis[i])
	}
	for i := range l.triangle {
		copy(l.triangle[i], s.h[i][:i+1])
	}
	l.cos, l.sin = append(l.cos, s.cos[:k]...), append(l.sin, s.sin[:k]...)
	r.lessons = append(r.lessons, l)
	if r.c == nil {
		r.c, r.y = make([]float64, s.most+1), make([]float64, s.most)
	}
}

// improve goes before the preconditioner.
func (r *recall) improve(x []float64) {
	for i := len(r.lessons) - 1; i >= 0; i-- {
		r.lessons[i].improve(x, r.c, r.y)
	}
}

// improve replaces x by x + (V − W H) y, y = R⁻¹ Qᵀ Wᵀ x: what of x lies in the span of W H
// is answered by V y with the least squares y, and only the rest as it was before.
func (l *lesson) improve(x, c, y []float64) {
	k := len(l.triangle)
	for i, w := range l.basis {
		c[i] = dot(x, w)
	}
	for i := range k {
		c[i], c[i+1] = l.cos[i]*c[i]+l.sin[i]*c[i+1], l.cos[i]*c[i+1]-l.sin[i]*c[i]
	}
	c[k] = 0
	for i := k - 1; i >= 0; i-- {
		v := c[i]
		for j := i + 1; j < k; j++ {
			v -= l.triangle[j][i] * y[j]
		}
		y[i] = v / l.triangle[i][i]
	}
	for i := k - 1; i >= 0; i-- {
		c[i], c[i+1] = l.cos[i]*c[i]-l.sin[i]*c[i+1], l.sin[i]*c[i]+l.cos[i]*c[i+1]
	}
	for i, v := range l.basis[:k] {
		axpy(y[i]-c[i], v, x)
	}
	axpy(-c[k], l.basis[k], x)
}
