package network

// trio holds the three lanes of a step: the real pole and the real and imaginary
// part of the complex one.
type trio struct{ r, a, b float64 }

// factorise replaces a matrix by its factors, and a right-hand side by the solution. The
// matrix is that of a network: it is given by what ties each unknown to ground (the first n
// entries) and to each other (the others, as positive admittances), and each elimination is a
// star turned into a mesh, which only ever adds. So nothing cancels, however far the
// admittances lie apart (Grassmann, Taksar and Heyman, Oper. Res. 33 (1985) 1107). It leaves
// the inverse of each pivot and the parts in which a star divides.
func (p *pattern) factorise(x, y []trio) {
	pivot, low := x[:p.n], x[p.n:]
	row, end, y := p.row[:len(low)], p.start[1:p.n+1], y[:len(pivot)]
	s, u := 0, 0
	for k := range pivot {
		last := int(end[k])
		ground, v := pivot[k], y[k]
		d := ground
		for j := s; j < last; j++ {
			g := &low[j]
			d.r, d.a, d.b = d.r+g.r, d.a+g.a, d.b+g.b
		}
		m := 1 / (d.a*d.a + d.b*d.b)
		d = trio{1 / d.r, d.a * m, -d.b * m}
		pivot[k] = d
		y[k] = trio{v.r * d.r, v.a*d.a - v.b*d.b, v.a*d.b + v.b*d.a}
		for ; s < last; s++ {
			g := &low[s]
			l := trio{g.r * d.r, g.a*d.a - g.b*d.b, g.a*d.b + g.b*d.a}
			*g = l
			e, f := &pivot[row[s]], &y[row[s]]
			e.r += l.r * ground.r
			e.a += l.a*ground.a - l.b*ground.b
			e.b += l.a*ground.b + l.b*ground.a
			f.r += l.r * v.r
			f.a += l.a*v.a - l.b*v.b
			f.b += l.a*v.b + l.b*v.a
			for j := s + 1; j < last; j++ {
				w, e := &low[j], &x[p.update[u]]
				u++
				e.r += l.r * w.r
				e.a += l.a*w.a - l.b*w.b
				e.b += l.a*w.b + l.b*w.a
			}
		}
	}
	p.back(x, y)
}

// solve replaces a right-hand side by the solution.
func (p *pattern) solve(x, y []trio) {
	pivot, low := x[:p.n], x[p.n:]
	row, end, y := p.row[:len(low)], p.start[1:p.n+1], y[:len(pivot)]
	s := 0
	for k := range pivot {
		v, d := y[k], &pivot[k]
		for ; s < int(end[k]); s++ {
			l, e := &low[s], &y[row[s]]
			e.r += l.r * v.r
			e.a += l.a*v.a - l.b*v.b
			e.b += l.a*v.b + l.b*v.a
		}
		y[k] = trio{v.r * d.r, v.a*d.a - v.b*d.b, v.a*d.b + v.b*d.a}
	}
	p.back(x, y)
}

// back takes a right-hand side from the pivots to the solution.
func (p *pattern) back(x, y []trio) {
	low := x[p.n:]
	row, start := p.row[:len(low)], p.start[:p.n+1]
	for k := p.n - 1; k >= 0; k-- {
		v := y[k]
		for s := int(start[k]); s < int(start[k+1]); s++ {
			l, w := &low[s], &y[row[s]]
			v.r += l.r * w.r
			v.a += l.a*w.a - l.b*w.b
			v.b += l.a*w.b + l.b*w.a
		}
		y[k] = v
	}
}

// drowned is the part of its own entry below which rounding has eaten up a pivot.
const drowned = 1e-13

// factoriseReal replaces a real symmetric matrix, given by its diagonal and the
// entries below it, by its factors L D Lᵀ, the diagonal inverted. own is the diagonal
// by which drowned pivots are told and made good: what hangs on next to nothing.
func (p *pattern) factoriseReal(x, own []float64) {
	u := 0
	copy(own, x[:p.n])
	for k := range p.n {
		first := int(p.start[k])
		column := x[p.n+first : p.n+int(p.start[k+1])]
		switch least := drowned * own[k]; {
		case x[k] > least:
			x[k] = 1 / x[k]
		case least > 0:
			x[k] = 1 / least
		default:
			x[k] = 0
		}
		for s := range column {
			l := column[s] * x[k]
			x[p.row[first+s]] -= l * column[s]
			for _, w := range column[s+1:] {
				x[p.update[u]] -= l * w
				u++
			}
			column[s] = l
		}
	}
}

// solveReal replaces a right-hand side by the solution with the factors of
// factoriseReal.
func (p *pattern) solveReal(x, y []float64) {
	low := x[p.n:]
	for k := range p.n {
		v := y[k]
		for s := p.start[k]; s < p.start[k+1]; s++ {
			y[p.row[s]] -= low[s] * v
		}
		y[k] = v * x[k]
	}
	for k := p.n - 1; k >= 0; k-- {
		v := y[k]
		for s := p.start[k]; s < p.start[k+1]; s++ {
			v -= low[s] * y[p.row[s]]
		}
		y[k] = v
	}
}

// axpy adds a·x to y.
func axpy(a float64, x, y []float64) {
	y = y[:len(x)]
	for i, v := range x {
		y[i] += a * v
	}
}

func dot(x, y []float64) float64 {
	y = y[:len(x)]
	sum := 0.0
	for i, v := range x {
		sum += v * y[i]
	}
	return sum
}
