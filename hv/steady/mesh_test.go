package steady

import (
	"math"
	"testing"

	"gonum.org/v1/gonum/mat"
	"pgregory.net/rapid"

	"kilovet/hv/chance"
)

// solved is a network of conductances given as triples, solved by the mesh.
func solved(nodes int, pairs [][2]int, g, current []float64) []float64 {
	m := newMesh(nodes, pairs)
	slots := make([]float64, m.size)
	for i, p := range pairs {
		if p[0] != p[1] {
			slots[m.slot(p[0], p[1])] += g[i]
		}
	}
	f := m.newFactors()
	f.factor(slots)
	v := make([]float64, nodes)
	f.solve(append([]float64{}, current...), v)
	return v
}

// The mesh and a dense elimination of the nodal matrix give the same potentials.
func TestMeshAgreesWithDenseElimination(t *testing.T) {
	chance.Check(t, func(r *rapid.T) {
		nodes := rapid.IntRange(2, 12).Draw(r, "nodes")
		var pairs [][2]int
		for i := 1; i < nodes; i++ {
			pairs = append(pairs, [2]int{i, rapid.IntRange(0, i-1).Draw(r, "to")})
		}
		for range rapid.IntRange(0, 20).Draw(r, "more") {
			pairs = append(pairs, [2]int{rapid.IntRange(0, nodes-1).Draw(r, "a"), rapid.IntRange(0, nodes-1).Draw(r, "b")})
		}
		g, current := make([]float64, len(pairs)), make([]float64, nodes)
		a, b := mat.NewDense(nodes-1, nodes-1, nil), mat.NewVecDense(nodes-1, nil)
		stamp := func(i, j int, y float64) {
			if i > 0 && j > 0 {
				a.Set(i-1, j-1, a.At(i-1, j-1)+y)
			}
		}
		for k, p := range pairs {
			g[k] = rapid.Float64Range(0.1, 10).Draw(r, "g")
			if p[0] != p[1] {
				stamp(p[0], p[0], g[k])
				stamp(p[1], p[1], g[k])
				stamp(p[0], p[1], -g[k])
				stamp(p[1], p[0], -g[k])
			}
		}
		for i := 1; i < nodes; i++ {
			current[i] = rapid.Float64Range(-1, 1).Draw(r, "i")
			b.SetVec(i-1, current[i])
		}
		var want mat.VecDense
		if err := want.SolveVec(a, b); err != nil {
			r.Fatal(err)
		}
		got := solved(nodes, pairs, g, current)
		for i := 1; i < nodes; i++ {
			if math.Abs(got[i]-want.AtVec(i-1)) > 1e-9*(1+math.Abs(want.AtVec(i-1))) {
				r.Fatalf("node %d: %g, want %g", i, got[i], want.AtVec(i-1))
			}
		}
	})
}

// Nodes joined by 10 S that hang on 1e-30 S, where subtraction would leave nothing.
func TestMeshKeepsTheDigitsOfALooseEnd(t *testing.T) {
	v := solved(4, [][2]int{{1, 2}, {2, 3}, {1, 3}, {3, 0}}, []float64{10, 10, 10, 1e-30}, []float64{0, 1e-30, 0, 1e-30})
	for i := 1; i < 4; i++ {
		near(t, "potential", v[i], 2, 1e-14)
	}
}

// A node on nothing keeps what it had.
func TestMeshLeavesALoneNodeAlone(t *testing.T) {
	m := newMesh(3, [][2]int{{1, 0}})
	f := m.newFactors()
	f.factor([]float64{2})
	v := []float64{0, 0, 7}
	f.solve([]float64{0, 4, 0}, v)
	if v[1] != 2 || v[2] != 7 {
		t.Errorf("%v", v)
	}
}

// A ladder's mesh stays lean: the work of removing its nodes grows with its length.
func TestMeshOfALadderIsLean(t *testing.T) {
	fills := func(stages int) int {
		c, from := bledLadder("negative", stages, 1e9)
		r, err := runDown(c, from, quiet(c, false))
		if err != nil {
			t.Fatal(err)
		}
		total := 0
		for range 1 {
			total += len(r.mesh.fills)
		}
		return total
	}
	if six, sixty := fills(6), fills(60); sixty > 15*six {
		t.Errorf("%d updates for 6 stages, %d for 60", six, sixty)
	}
}

func TestStepsDoNotAllocate(t *testing.T) {
	c, from := bledLadder("negative", 6, 1e9)
	r, err := runDown(c, from, quiet(c, false))
	if err != nil {
		t.Fatal(err)
	}
	r.jump()
	p := pace{tolerance: 1, floor: 1, done: 0}
	if n := testing.AllocsPerRun(20, func() { r.step(1e-3, p); r.accept(1e-3) }); n > 0 {
		t.Errorf("%g allocations a step", n)
	}
}
