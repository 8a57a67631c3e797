package phasor

import "math"

// equations are linear equations in complex numbers. A row or column below zero is
// ground, which has neither.
type equations struct {
	a     [][]complex128
	b     []complex128
	gross []float64 // by row: all that was added, before anything cancelled
}

func newEquations(n int) *equations {
	e := &equations{a: make([][]complex128, n), b: make([]complex128, n), gross: make([]float64, n)}
	whole := make([]complex128, n*n)
	for i := range e.a {
		e.a[i] = whole[i*n : (i+1)*n]
	}
	return e
}

func (e *equations) add(row, column int, y complex128) {
	if row >= 0 && column >= 0 {
		e.a[row][column] += y
		e.gross[row] += coarse(y)
	}
}

func (e *equations) feed(row int, current complex128) {
	if row >= 0 {
		e.b[row] += current
	}
}

// solve eliminates with row pivoting after every row has been scaled to what was
// added to it; it reports false for equations that do not determine an answer.
func (e *equations) solve() ([]complex128, bool) {
	e.scale()
	n := len(e.b)
	for k := range n {
		p := e.pivot(k)
		e.a[k], e.a[p], e.b[k], e.b[p] = e.a[p], e.a[k], e.b[p], e.b[k]
		if coarse(e.a[k][k]) < 1e-14 {
			return nil, false
		}
		for i := k + 1; i < n; i++ {
			f := e.a[i][k] / e.a[k][k]
			if f == 0 {
				continue
			}
			for j := k + 1; j < n; j++ {
				e.a[i][j] -= f * e.a[k][j]
			}
			e.b[i] -= f * e.b[k]
		}
	}
	return e.back(), true
}

func (e *equations) back() []complex128 {
	x := make([]complex128, len(e.b))
	for k := len(x) - 1; k >= 0; k-- {
		sum := e.b[k]
		for j := k + 1; j < len(x); j++ {
			sum -= e.a[k][j] * x[j]
		}
		x[k] = sum / e.a[k][k]
	}
	return x
}

func (e *equations) scale() {
	for i, row := range e.a {
		if e.gross[i] == 0 {
			continue
		}
		s := complex(1/e.gross[i], 0)
		for j := range row {
			row[j] *= s
		}
		e.b[i] *= s
	}
}

func (e *equations) pivot(k int) int {
	best := k
	for i := k + 1; i < len(e.a); i++ {
		if coarse(e.a[i][k]) > coarse(e.a[best][k]) {
			best = i
		}
	}
	return best
}

// coarse is near enough to the magnitude, and cheap.
func coarse(z complex128) float64 { return math.Abs(real(z)) + math.Abs(imag(z)) }
