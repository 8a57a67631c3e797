package network

import "math"

// krylov solves A x = b by the generalised minimal residual method (Saad and
// Schultz, SIAM J. Sci. Stat. Comput. 7 (1986) 856), preconditioned from the right.
type krylov struct {
	n       int
	most    int
	used    int // vectors of the last solution
	basis   [][]float64
	h       [][]float64 // by column
	cos     []float64
	sin     []float64
	g       []float64
	scratch []float64
}

func newKrylov(n int) *krylov {
	m := min(n, 80)
	return &krylov{n: n, most: m, basis: rows(m+1, n), h: rows(m, m+1),
		cos: make([]float64, m), sin: make([]float64, m), g: make([]float64, m+1), scratch: make([]float64, n)}
}

// solve replaces b by x such that the residual is below a part of b. It returns
// the part that was reached.
func (s *krylov) solve(b []float64, apply, precondition func(x []float64), tolerance float64) float64 {
	size := norm(b)
	if s.used = 0; size == 0 {
		return 0
	}
	copy(s.basis[0], b)
	scaleBy(s.basis[0], 1/size)
	for i := range s.g {
		s.g[i] = 0
	}
	s.g[0] = size
	k := 0
	for k < s.most {
		s.extend(k, apply, precondition)
		k++
		if math.Abs(s.g[k]) <= tolerance*size || s.h[k-1][k] == 0 {
			break
		}
	}
	s.used = k
	s.combine(k, b)
	precondition(b)
	return math.Abs(s.g[k]) / size
}

// extend adds one vector to the basis and one column to the triangle.
func (s *krylov) extend(k int, apply, precondition func(x []float64)) {
	w, h := s.basis[k+1], s.h[k]
	copy(w, s.basis[k])
	precondition(w)
	apply(w)
	before := norm(w)
	for i := 0; i <= k; i++ {
		h[i] = dot(w, s.basis[i])
		axpy(-h[i], s.basis[i], w)
	}
	for i := 0; i <= k; i++ { // once more, against loss of orthogonality
		d := dot(w, s.basis[i])
		h[i] += d
		axpy(-d, s.basis[i], w)
	}
	length := norm(w)
	if length <= 1e-15*before {
		length = 0
	} else {
		scaleBy(w, 1/length)
	}
	h[k+1] = length
	s.rotate(k, h)
}

// rotate makes the new column triangular by Givens rotations.
func (s *krylov) rotate(k int, h []float64) {
	for i := range k {
		h[i], h[i+1] = s.cos[i]*h[i]+s.sin[i]*h[i+1], s.cos[i]*h[i+1]-s.sin[i]*h[i]
	}
	r := math.Hypot(h[k], h[k+1])
	if r == 0 {
		s.cos[k], s.sin[k] = 1, 0
		return
	}
	s.cos[k], s.sin[k] = h[k]/r, h[k+1]/r
	below := h[k+1]
	h[k] = r
	s.g[k+1] = -s.sin[k] * s.g[k]
	s.g[k] *= s.cos[k]
	h[k+1] = below // kept only to see a breakdown
}

// combine adds up the basis with the coefficients of the triangle.
func (s *krylov) combine(k int, x []float64) {
	y := s.scratch[:k]
	for i := k - 1; i >= 0; i-- {
		v := s.g[i]
		for j := i + 1; j < k; j++ {
			v -= s.h[j][i] * y[j]
		}
		if s.h[i][i] == 0 {
			y[i] = 0
			continue
		}
		y[i] = v / s.h[i][i]
	}
	for i := range x {
		x[i] = 0
	}
	for i, v := range y {
		axpy(v, s.basis[i], x)
	}
}

func scaleBy(x []float64, a float64) {
	for i := range x {
		x[i] *= a
	}
}

// rows cuts one block of memory into rows.
func rows(n, m int) [][]float64 {
	flat := make([]float64, n*m)
	r := make([][]float64, n)
	for i := range r {
		r[i] = flat[i*m : (i+1)*m]
	}
	return r
}
