package field

import (
	"math"

	"gonum.org/v1/gonum/blas"
	"gonum.org/v1/gonum/blas/blas64"
	"gonum.org/v1/gonum/lapack/lapack64"

	"kilovet/hv/lack"
)

// Work counts what a solution took.
type Work struct {
	Panels         int // of the last division
	Unknowns       int // of the last system
	Factorisations int
	Blocks         int // pairs of panels worked out
}

const (
	maxPanels   = 220
	maxUnknowns = 2400
	// worstClosure bounds how far the flux of a constant potential through the rim of
	// a region may miss its exact value: it shows outlines that do not close and
	// panels too long for their distance.
	worstClosure = 1e-4
)

// side is a panel as the rim of a region. The unknowns are the potential u and its
// derivative q along the normal out of the region.
type side struct {
	panel  *panel
	wall   int
	region int
	orient float64 // −1 the region is left of the panel, +1 right, 0 on both sides
	u, q   int     // first of its unknowns, −1 for none
	factor float64 // q is this times its unknown
	group  int     // electrodes whose potential u is, −1 for none
	row    int     // first of its equations
}

// solver carries what is kept from one division to the next.
type solver struct {
	*model
	layer
	constants []float64 // of each region: permittivity, or conductivity
	made      int       // panels so far
	aim       float64   // times the ordinary errors are allowed
	blocks    map[[2]int]*block
	work      Work
}

func newSolver(m *model) *solver {
	s := &solver{model: m, aim: 1, constants: make([]float64, len(m.regions)), blocks: map[[2]int]*block{}}
	for i, r := range m.regions {
		s.constants[i] = r.constant
	}
	s.quadrature = newQuadrature()
	if m.mirror != nil {
		s.mirrored, s.mirrorZ, s.parity = true, float64(m.mirror.z)/m.unit, 1
		if m.mirror.earthed {
			s.parity = -1
		}
	}
	return s
}

// solved is a division with the unknowns for each group at 1 and the others at 0.
type solved struct {
	panels   []*panel
	sides    []side
	of       [][]int   // sides of each region
	u, q     [][]nodal // of each group and side
	unknowns int
}

// solve sets up and solves the system of a division.
func (s *solver) solve(panels []*panel) (*solved, error) {
	v := &solved{panels: panels, of: make([][]int, len(s.regions))}
	for _, p := range panels {
		s.addSides(v, p)
	}
	if len(panels) > maxPanels || v.unknowns > maxUnknowns {
		return nil, lack.Failed("the figure needs more than %d panels or %d unknowns to be resolved", maxPanels, maxUnknowns)
	}
	a, b := general(v.unknowns, v.unknowns), general(v.unknowns, s.groups)
	for r := range s.regions {
		if err := s.assemble(v, r, a, b); err != nil {
			return nil, err
		}
	}
	pivots := make([]int, v.unknowns)
	s.work.Panels, s.work.Unknowns = len(panels), v.unknowns
	s.work.Factorisations++
	if !lapack64.Getrf(a, pivots) {
		return nil, lack.Failed("the equations of the field are singular")
	}
	lapack64.Getrs(blas.NoTrans, a, b, pivots)
	v.read(b, s.groups)
	return v, nil
}

// general is a matrix of zeros.
func general(rows, columns int) blas64.General {
	return blas64.General{Rows: rows, Cols: columns, Stride: columns, Data: make([]float64, rows*columns)}
}

// overshoot is how far a potential may lie outside those of the electrodes, the
// highest of which is 1, beside a sharp edge that panels do not resolve.
const overshoot = 0.02

// checkBounds holds the potentials against the maximum principle: nowhere is one
// beyond those of the electrodes.
func (v *solved) checkBounds() error {
	for g := range v.u {
		for i := range v.sides {
			for j, u := range v.u[g][i] {
				if !(u > -overshoot && u < 1+overshoot) || math.IsNaN(v.q[g][i][j]) || math.IsInf(v.q[g][i][j], 0) {
					return lack.Failed("the equations of the field are too nearly singular to be solved")
				}
			}
		}
	}
	return nil
}

// addSides numbers the unknowns of a panel: q on conductors, u on natural
// boundaries, both on interfaces. Where the flux ε q is the same on both sides the
// unknown is the q of the side with the smaller constant.
func (s *solver) addSides(v *solved, p *panel) {
	w := &s.walls[p.wall]
	left := side{panel: p, wall: p.wall, region: w.left, orient: -1, u: -1, q: -1, factor: 1, group: w.group}
	right := left
	right.region, right.orient = w.right, 1
	take := func() int {
		v.unknowns += order
		return v.unknowns - order
	}
	switch w.kind {
	case sheet:
		left.orient, left.q, right.region = 0, take(), -1
	case conductor:
		if left.region >= 0 {
			left.q = take()
		}
		if right.region >= 0 {
			right.q = take()
		}
	case natural:
		left.u = take()
		right.u = left.u
	case interfaces:
		left.u, left.q = take(), take()
		right.u, right.q = left.u, left.q
		if cl, cr := s.constants[w.left], s.constants[w.right]; cl <= cr {
			right.factor = -cl / cr
		} else {
			left.factor = -cr / cl
		}
	}
	s.addSide(v, left)
	s.addSide(v, right)
}

func (s *solver) addSide(v *solved, sd side) {
	if sd.region < 0 {
		return
	}
	sd.row = order * len(v.sides)
	v.of[sd.region] = append(v.of[sd.region], len(v.sides))
	v.sides = append(v.sides, sd)
}

// assemble writes Green's identity at every node of the rim of a region:
// u/2 + ∫ u ∂G/∂n dS − ∫ q G dS = 0.
func (s *solver) assemble(v *solved, r int, a, b blas64.General) error {
	for _, i := range v.of[r] {
		to := &v.sides[i]
		flux := to.diagonal(a, b)
		for _, j := range v.of[r] {
			from := &v.sides[j]
			k := s.between(to.panel, from.panel)
			for row := range order {
				flux[row] += from.write(k, to.row+row, row, a, b)
			}
		}
		if err := s.checkClosure(r, to, &flux); err != nil {
			return err
		}
	}
	return nil
}

// diagonal writes the part of the potential at the nodes themselves.
func (to *side) diagonal(a, b blas64.General) (flux nodal) {
	half := 0.5
	if to.orient == 0 {
		half = 1
	}
	for i := range order {
		flux[i] = half
		if to.u >= 0 {
			a.Data[(to.row+i)*a.Stride+to.u+i] += half
		} else {
			b.Data[(to.row+i)*b.Stride+to.group] -= half
		}
	}
	return flux
}

// write adds what a side contributes to an equation, and returns what it would for
// the potential 1.
func (from *side) write(k *block, equation, row int, a, b blas64.General) (flux float64) {
	line := a.Data[equation*a.Stride : (equation+1)*a.Stride]
	for j, d := range k.double[row] {
		flux += from.orient * d
		if from.u >= 0 {
			line[from.u+j] += from.orient * d
		}
	}
	if from.q >= 0 {
		for j, g := range k.single[row] {
			line[from.q+j] -= from.factor * g
		}
	}
	if from.u < 0 {
		b.Data[equation*b.Stride+from.group] -= flux
	}
	return flux
}

// between is the block of a pair of panels, worked out once.
func (s *solver) between(to, from *panel) *block {
	key := [2]int{to.id, from.id}
	k, known := s.blocks[key]
	if !known {
		k = s.block(to, from)
		s.blocks[key] = k
		s.work.Blocks++
	}
	return k
}

// checkClosure compares the flux of the potential 1 with what Gauss's law demands:
// 0 in a closed region, 1 in one that reaches to infinity.
func (s *solver) checkClosure(r int, to *side, flux *nodal) error {
	if s.mirrored && s.parity < 0 {
		return nil
	}
	want := 0.0
	if s.regions[r].face == 0 {
		want = 1
	}
	for _, f := range flux {
		if !(math.Abs(f-want) < worstClosure) {
			x := to.panel.middle * complex(s.unit*1e3, 0)
			return lack.Failed("the outlines about r = %.4g mm, z = %.4g mm cannot be resolved: Gauss's law is missed by %.2g", real(x), imag(x), math.Abs(f-want))
		}
	}
	return nil
}

// read takes the solution apart into sides.
func (v *solved) read(x blas64.General, groups int) {
	for g := range groups {
		u, q := make([]nodal, len(v.sides)), make([]nodal, len(v.sides))
		for i := range v.sides {
			sd := &v.sides[i]
			for j := range order {
				if sd.group == g {
					u[i][j] = 1
				}
				if sd.u >= 0 {
					u[i][j] = x.Data[(sd.u+j)*x.Stride+g]
				}
				if sd.q >= 0 {
					q[i][j] = sd.factor * x.Data[(sd.q+j)*x.Stride+g]
				}
			}
		}
		v.u, v.q = append(v.u, u), append(v.q, q)
	}
}
