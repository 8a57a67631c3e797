package network

import "math"

// step is one step of a track.
type step struct {
	start, length float64
	sign          float64    // of the square wave
	sine          [4]float64 // at the start and the stages
	event         bool       // a diode switches at its end
	euler         bool       // taken to settle which diodes conduct, by the implicit Euler method
	jump          bool       // a jump of the square wave precedes it
}

// track is what a walk over a period leaves behind: potentials and currents at the
// start and the stages of each step, and the factors, with which a small change of
// the start is carried through the same period. Its memory is used again.
type track struct {
	*system
	steps   []step
	u       []float64 // 4 n a step
	amps    []float64 // 4 a step and inductor
	on      []bool    // by step and diode
	factors [][]trio  // by blocks of steps
}

func (t *track) clear() {
	t.steps, t.u, t.amps, t.on = t.steps[:0], t.u[:0], t.amps[:0], t.on[:0]
}

// reserve makes room for the steps of a period in which every diode switches twice.
func (t *track) reserve() *track {
	n := 16 + 8*len(t.diodes)
	t.steps, t.on = make([]step, 0, n), make([]bool, 0, n*len(t.diodes))
	t.u, t.amps = make([]float64, 0, 4*n*t.n), make([]float64, 0, 4*n*len(t.inductors))
	return t
}

// block is the number of steps whose factors lie together: memory that grows by blocks is
// never copied.
const block = 64

// slot is where the factors of the next step go.
func (t *track) slot() []trio {
	if k := len(t.steps); k == block*len(t.factors) {
		t.factors = append(t.factors, t.room.take(block*t.pattern.size()))
	}
	return t.factorsOf(len(t.steps))
}

func (t *track) factorsOf(step int) []trio {
	size, k := t.pattern.size(), step%block
	return t.factors[step/block][k*size : (k+1)*size]
}

// keep records the trial step of a walker, before it is accepted.
func (t *track) keep(w *walker, h float64) {
	t.steps = append(t.steps, step{start: w.time, length: h, sign: w.sign, sine: w.sine})
	t.u = append(t.u, w.u...)
	t.amps = append(t.amps, w.amps...)
	for j := range w.stage {
		t.u = append(t.u, w.stage[j]...)
		t.amps = append(t.amps, w.branch[j]...)
	}
	t.on = append(t.on, w.on...)
}

// potentials are those of the start (0) or a stage (1 to 3) of a step.
func (t *track) potentials(step, j int) []float64 {
	k := (4*step + j) * t.n
	return t.u[k : k+t.n]
}

func (t *track) currents(step, j int) []float64 {
	m := len(t.inductors)
	k := (4*step + j) * m
	return t.amps[k : k+m]
}

func (t *track) conducting(step int) []bool {
	m := len(t.diodes)
	return t.on[step*m : (step+1)*m]
}

// carry takes a small change of charges and inductor currents at the start of the
// track to its end. The diode law is continuous, so the instants of switching do
// not enter.
func (t *track) carry(dq, di []float64, lanes []trio, du []float64) {
	t.carryWatching(dq, di, lanes, du, nil)
}

// throughout makes the mean over a step from the solutions at the poles.
var throughout = trio{
	share1*residue[0].r + share2*residue[1].r + share3*residue[2].r,
	share1*residue[0].a + share2*residue[1].a + share3*residue[2].a,
	share1*residue[0].b + share2*residue[1].b + share3*residue[2].b,
}

// carryWatching is carry with the change of the mean over the track that a voltage
// undergoes; of none it is zero.
func (t *track) carryWatching(dq, di []float64, lanes []trio, du []float64, watched *span) (mean float64) {
	for k := range t.steps {
		h, all := t.steps[k].length, &throughout
		pole, stages := t.atPoles(k, dq, di, lanes)
		if t.steps[k].euler {
			all = &stages[2]
		}
		part := &stages[2]
		for i := range t.inductors {
			x := t.changeOfCoil(i, h, pole, di[i], t.inductors[i].differenceTrio(lanes))
			di[i] = part.of(&x)
		}
		if watched != nil {
			v := watched.differenceTrio(lanes)
			mean += h / t.period * all.of(&v)
		}
		for i := range lanes {
			du[i] = part.of(&lanes[i])
		}
		t.charge(du, dq)
	}
	return mean
}

// settling makes the stages of a step of the implicit Euler method.
var settling = [3]trio{{r: 1}, {r: 1}, {r: 1}}

// atPoles leaves in the lanes what a change of charges and inductor currents at the start of
// a step makes of its solutions at the poles; it returns the real pole and what makes the
// stages of them.
func (t *track) atPoles(k int, dq, di []float64, lanes []trio) (pole float64, stages *[3]trio) {
	pole, stages = poleR, &residue
	if t.steps[k].euler {
		pole, stages = 1, &settling
	}
	for i, q := range dq {
		lanes[i] = trio{r: q, a: q}
	}
	h := t.steps[k].length
	for i := range t.inductors {
		x := t.changeOfCoil(i, h, pole, di[i], trio{})
		t.inductors[i].injectTrio(lanes, trio{-h * x.r, -h * x.a, -h * x.b})
	}
	t.pattern.solve(t.factorsOf(k), lanes)
	return pole, stages
}

// changeOfCoil is a change of an inductor's current at the poles: (δi₀ + h δv/L)/p.
func (t *track) changeOfCoil(i int, h, pole, di float64, v trio) trio {
	g := h / t.inductors[i].value
	inv := 1 / complex(poleA, poleB)
	c := (complex(di, 0) + complex(g*v.a, g*v.b)) * inv
	return trio{(di + g*v.r) / pole, real(c), imag(c)}
}

// passed is the largest charge that a diode passes forward in the period.
func (t *track) passed() float64 {
	most := 0.0
	for i := range t.diodes {
		d, sum := &t.diodes[i], 0.0
		for k := range t.steps {
			if !t.conducting(k)[i] {
				continue
			}
			st := &t.steps[k]
			for j, c := range share {
				sum += c * st.length * d.on * (d.volts(t.potentials(k, j+1), st.sign, st.sine[j+1]) - d.drop)
			}
		}
		most = math.Max(most, sum)
	}
	return most
}
