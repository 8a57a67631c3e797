package field

import (
	"testing"

	"kilovet/hv/quantity"
)

// What a solution may take, by kind of figure; and that a further condition takes
// nothing more.
func TestWork(t *testing.T) {
	for _, c := range []struct {
		id                       string
		unknowns, factorisations int
	}{
		{"a_rod_gap/R=3", 250, 5},
		{"b1_feedthrough", 260, 5},
		{"b3_feedthrough", 260, 5},
		{"c1_tight", 550, 5},
		{"c1_annulus0.5", 850, 5},
		{"c2_brazed_annulus0.1", 1200, 4},
		{"c3_outer_gap0.1", 850, 6},
		{"d45_frustum", 700, 4},
		{"e_disc_rim1", 300, 5},
		{"f1_gun", 700, 5},
		{"f3_gun", 650, 5},
	} {
		ref := reference(t, c.id)
		s := ref.solution(t)
		w := s.Work()
		if w.Unknowns > c.unknowns || w.Factorisations > c.factorisations || w.Panels*order > w.Unknowns {
			t.Errorf("%s: %+v", c.id, w)
		}
		if w.Blocks > 3*w.Panels*w.Panels {
			t.Errorf("%s: %d pairs worked out for %d panels", c.id, w.Blocks, w.Panels)
		}
		if _, err := s.Under(ref.potentials(s)); err != nil || s.Work() != w {
			t.Errorf("%s: a condition changed the work to %+v: %v", c.id, s.Work(), err)
		}
	}
}

// One inner step of the integrals takes no memory.
func TestInnerLoopAllocatesNothing(t *testing.T) {
	f := reference(t, "b1_feedthrough").solve(t)
	n := testing.AllocsPerRun(100, func() {
		ringIntegrals(1, 1.5, -0.5, 0.1)
		f.evaluate(f.values, 0, 0.05+0.3i)
	})
	if n > 0 {
		t.Errorf("%v allocations", n)
	}
}

func BenchmarkSolve(b *testing.B) {
	for _, id := range []string{"b1_feedthrough", "b3_feedthrough", "c1_tight", "c1_annulus0.5", "c2_brazed_annulus0.1", "c3_outer_gap0.1", "f1_gun", "f3_gun"} {
		a := reference(b, id).arrangement(b)
		b.Run(id, func(b *testing.B) {
			var s *Solution
			for range b.N {
				var err error
				if s, err = Solve(a); err != nil {
					b.Fatal(err)
				}
			}
			b.ReportMetric(float64(s.Work().Unknowns), "unknowns")
			b.ReportMetric(float64(s.Work().Factorisations), "factorisations")
		})
	}
}

func BenchmarkFurtherCondition(b *testing.B) {
	s, err := Solve(reference(b, "f1_gun").arrangement(b))
	if err != nil {
		b.Fatal(err)
	}
	for i := range b.N {
		f, err := s.Under(map[string]quantity.Voltage{"control": -1000, "tip": quantity.Voltage(-1000 + i%100), "anode": 0})
		if err != nil {
			b.Fatal(err)
		}
		if _, err := f.Peak("control"); err != nil {
			b.Fatal(err)
		}
	}
}
