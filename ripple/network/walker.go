package network

import (
	"math"
	"math/cmplx"
)

// walker carries a circuit through time, one step after another. Its state is the
// charge of every unknown and the current of every inductor: both go on through
// any switching and any jump of a source, so nothing has to be made consistent.
type walker struct {
	*system
	time   float64
	sign   float64    // of the square wave
	wave   complex128 // cos ωt + j sin ωt as the method carries it
	q      []float64
	amps   []float64
	u      []float64 // potentials at the end of the last step
	on     []bool    // by diode
	steady []float64 // direct currents under the present switching
	swing  []float64 // currents that go with the sine under the present switching
	held   []float64 // charge of the direct and square offsets
	matrix []float64 // G under the present switching

	factor  []trio // of the trial step
	lanes   []trio
	stage   [3][]float64 // potentials at the stages
	branch  [3][]float64 // inductor currents at the stages
	sine    [4]float64   // at the start and the stages
	next    complex128
	poleLow complex128 // sine seen at the complex pole
	poleR   float64    // and at the real one
	smooth  bool       // events are located as well as the arithmetic allows
	slack   []float64  // by diode: the excess that does not count
	near    []int      // diodes that the trial step may switch
	margin  float64    // by which they may escape the cubic
	care    float64    // the part of the mean current that it makes
	way     way        // of the last settling
	work    Work
}

func newWalker(s *system) *walker {
	w := &walker{system: s, sign: 1, wave: 1}
	w.q, w.u, w.steady, w.held = make([]float64, s.n), make([]float64, s.n), make([]float64, s.n), make([]float64, s.n)
	w.swing = make([]float64, s.n)
	w.amps, w.on = make([]float64, len(s.inductors)), make([]bool, len(s.diodes))
	w.matrix, w.slack, w.care = make([]float64, s.pattern.size()), make([]float64, len(s.diodes)), brisk
	w.factor, w.lanes = make([]trio, s.pattern.size()), make([]trio, s.n)
	for j := range w.stage {
		w.stage[j], w.branch[j] = make([]float64, s.n), make([]float64, len(s.inductors))
	}
	return w
}

// place puts the walker at the start of a period.
func (w *walker) place(q, amps []float64, on []bool) {
	copy(w.q, q)
	copy(w.amps, amps)
	copy(w.on, on)
	w.time, w.sign, w.wave = 0, 1, 1
	w.switched()
}

// switched renews what depends on the diodes that conduct and on the square wave.
func (w *walker) switched() {
	copy(w.matrix, w.cond)
	copy(w.swing, w.condSine)
	for k := range w.steady {
		w.steady[k] = w.condDirect[k] + w.sign*w.condSquare[k]
		w.held[k] = w.capDirect[k] + w.sign*w.capSquare[k]
	}
	for i := range w.diodes {
		if d := &w.diodes[i]; w.on[i] {
			w.enter(w.matrix, &d.span, d.on)
			if d.a != d.b {
				d.inject(w.steady, d.on*(d.offset.direct+w.sign*d.offset.square-d.drop))
				d.inject(w.swing, d.on*d.offset.sine)
			}
		}
	}
}

// try takes a step of a given length without making it the state.
func (w *walker) try(h float64) {
	w.work.Factorisations++
	w.turn(h)
	w.fill(h)
	w.load(h)
	w.pattern.factorise(w.factor, w.lanes)
	w.spread(h)
}

// turn carries the sine through the step: seen at the poles and at the stages.
func (w *walker) turn(h float64) {
	z := exact(w.omega * h)
	w.sine[0] = imag(w.wave)
	for j, c := range [3]float64{node1, node2, 1} {
		w.next = stageOf(c, z) * w.wave
		w.sine[j+1] = imag(w.next)
	}
	w.poleR = imag(w.wave / (poleR - z))
	p := complex(poleA, poleB)
	w.poleLow = (w.wave/(p-z) - cmplx.Conj(w.wave)/(p-cmplx.Conj(z))) / 2i
}

// fill sets up p C + h G + h²/(p L) in the three lanes.
func (w *walker) fill(h float64) {
	for k, c := range w.cap {
		g := h * w.matrix[k]
		w.factor[k] = trio{poleR*c + g, poleA*c + g, poleB * c}
	}
	if len(w.inductors) == 0 {
		return
	}
	inv := 1 / complex(poleA, poleB)
	for k, l := range w.coil {
		f := &w.factor[k]
		f.r += h * h * l / poleR
		f.a += h * h * l * real(inv)
		f.b += h * h * l * imag(inv)
	}
}

// load sets up the right-hand sides.
func (w *walker) load(h float64) {
	inv := 1 / complex(poleA, poleB)
	ga, gb := h*real(inv), h*imag(inv)
	p := complex(poleA, poleB) * w.poleLow
	for k, q := range w.q {
		q -= w.held[k]
		g, c, i := w.steady[k], w.capSine[k], h*w.swing[k]
		w.lanes[k] = trio{
			q - h/poleR*g - (poleR*c+i)*w.poleR,
			q - ga*g - (real(p)*c + real(w.poleLow)*i),
			-gb*g - (imag(p)*c + imag(w.poleLow)*i),
		}
	}
	for i := range w.inductors {
		x := w.coilCurrent(i, h, trio{})
		w.inductors[i].injectTrio(w.lanes, trio{-h * x.r, -h * x.a, -h * x.b})
	}
}

// coilCurrent is an inductor's current at the poles, for a difference v of the
// potentials at its ends at the poles: (i₀ + h v/L)/p.
func (w *walker) coilCurrent(i int, h float64, v trio) trio {
	l := &w.inductors[i]
	inv := 1 / complex(poleA, poleB)
	direct := l.offset.direct + w.sign*l.offset.square
	r := (w.amps[i] + h/l.value*(v.r+direct/poleR+l.offset.sine*w.poleR)) / poleR
	c := complex(direct, 0)*inv + complex(l.offset.sine, 0)*w.poleLow + complex(v.a, v.b)
	c = (complex(w.amps[i], 0) + complex(h/l.value, 0)*c) * inv
	return trio{r, real(c), imag(c)}
}

func (s *span) injectTrio(y []trio, i trio) {
	if s.a >= 0 {
		e := &y[s.a]
		e.r, e.a, e.b = e.r+i.r, e.a+i.a, e.b+i.b
	}
	if s.b >= 0 {
		e := &y[s.b]
		e.r, e.a, e.b = e.r-i.r, e.a-i.a, e.b-i.b
	}
}

func (s *span) differenceTrio(y []trio) trio {
	var v trio
	if s.a >= 0 {
		v = y[s.a]
	}
	if s.b >= 0 {
		e := y[s.b]
		v = trio{v.r - e.r, v.a - e.a, v.b - e.b}
	}
	return v
}

// spread makes the stages from the solutions at the poles.
func (w *walker) spread(h float64) {
	s1, s2, s3 := w.stage[0], w.stage[1], w.stage[2]
	for k := range w.lanes {
		x := &w.lanes[k]
		s1[k], s2[k], s3[k] = residue[0].of(x), residue[1].of(x), residue[2].of(x)
	}
	for i := range w.inductors {
		x := w.coilCurrent(i, h, w.inductors[i].differenceTrio(w.lanes))
		for j := range w.branch {
			w.branch[j][i] = residue[j].of(&x)
		}
	}
}

// accept makes the end of the trial step the state.
func (w *walker) accept(h float64) {
	w.work.Steps++
	w.time += h
	w.wave = w.next
	copy(w.u, w.stage[2])
	copy(w.amps, w.branch[2])
	w.charge(w.u, w.q)
	s := imag(w.wave)
	for k := range w.q {
		w.q[k] += w.held[k] + w.capSine[k]*s
	}
}

// roughness is how far the collocation polynomial bends away from the parabola at
// the start of the trial step, in the norm of energy: for an exponential e^z it is
// z³/60 while the step errs by z⁶/7200, and for what the step passes over it is the
// size of that. The energy the method loses is this squared (algebraic stability).
func (w *walker) roughness() float64 {
	sum := 0.0
	u0, u1, u2, u3 := w.u, w.stage[0], w.stage[1], w.stage[2]
	swing := w.sine[0] - back(w.sine[1], w.sine[2], w.sine[3])
	for i := range w.capacitors {
		c := &w.capacitors[i]
		if c.a == c.b {
			continue
		}
		var d0, d1, d2, d3 float64
		if k := c.a; k >= 0 {
			d0, d1, d2, d3 = u0[k], u1[k], u2[k], u3[k]
		}
		if k := c.b; k >= 0 {
			d0, d1, d2, d3 = d0-u0[k], d1-u1[k], d2-u2[k], d3-u3[k]
		}
		d := d0 - back(d1, d2, d3)
		d += c.offset.sine * swing
		sum += c.weight * d * d
	}
	for i := range w.inductors {
		d := w.amps[i] - back(w.branch[0][i], w.branch[1][i], w.branch[2][i])
		sum += w.inductors[i].value * d * d
	}
	return math.Sqrt(sum)
}

// excess is how far a diode has gone beyond its present state over the trial step,
// as a cubic: the voltage above the drop while open, below it while conducting.
func (w *walker) excess(i int) cubic {
	y := w.beyond(i)
	return through(y[0], y[1], y[2], y[3])
}

// beyond is the same at the start and the stages.
func (w *walker) beyond(i int) samples {
	d := &w.diodes[i]
	least := d.offset.direct + w.sign*d.offset.square - d.drop
	swing := d.offset.sine
	y := samples{least + swing*w.sine[0], least + swing*w.sine[1], least + swing*w.sine[2], least + swing*w.sine[3]}
	if k := d.a; k >= 0 {
		y[0], y[1], y[2], y[3] = y[0]+w.u[k], y[1]+w.stage[0][k], y[2]+w.stage[1][k], y[3]+w.stage[2][k]
	}
	if k := d.b; k >= 0 {
		y[0], y[1], y[2], y[3] = y[0]-w.u[k], y[1]-w.stage[0][k], y[2]-w.stage[1][k], y[3]-w.stage[2][k]
	}
	if w.on[i] {
		y[0], y[1], y[2], y[3] = -y[0], -y[1], -y[2], -y[3]
	}
	return y
}

// farBelow reports whether a cubic through samples surely stays under a level: it
// leaves their range by less than the range itself.
func (y *samples) farBelow(level float64) bool {
	low, high := y[0], y[0]
	for _, v := range y[1:] {
		if v > high {
			high = v
		} else if v < low {
			low = v
		}
	}
	return high+(high-low) < level
}

// How much of the mean current the excess makes that does not count: careful where an
// unloaded ladder beside a loaded part is not found otherwise.
const (
	brisk   = 1e-3
	careful = 1e-4
)

// tolerate sets the excess of the diodes that does not count: what makes a small part of
// the mean current, or what the arithmetic leaves.
func (w *walker) tolerate(current float64) {
	least := 1e-12 * w.scale
	if w.grain > finest*w.period {
		least = 1e-10 * w.scale
	}
	for i := range w.diodes {
		w.slack[i] = math.Max(w.care*current/w.diodes[i].on, least)
	}
}
