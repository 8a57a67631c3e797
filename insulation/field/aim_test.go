package field

import (
	"math"
	"testing"
)

// A rough solution takes less and its peaks are those of a fine one within a hundredth.
func TestRoughSolutions(t *testing.T) {
	for _, id := range []string{"b1_feedthrough", "b3_feedthrough", "c1_annulus0.5", "c3_outer_gap0.1", "f1_gun"} {
		a := reference(t, id).arrangement(t)
		fine, err := Solve(a)
		if err != nil {
			t.Fatal(err)
		}
		rough, err := Rough.Solve(a)
		if err != nil {
			t.Fatal(err)
		}
		n, m := rough.Work().Unknowns, fine.Work().Unknowns
		t.Logf("%s: %d unknowns instead of %d, %d factorisations instead of %d", id, n, m, rough.Work().Factorisations, fine.Work().Factorisations)
		if n > m {
			t.Errorf("%s: %d unknowns, finely %d", id, n, m)
		}
		is, want := rough.peaks(rough.fine), fine.peaks(fine.fine)
		for i := range want {
			if math.Abs(is[i]-want[i]) > 0.01*want[i] {
				t.Errorf("%s: peak %d is %g roughly and %g finely", id, i, is[i], want[i])
			}
		}
	}
}
