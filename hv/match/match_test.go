package match

import (
	"math"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
)

func near(t *testing.T, what string, got, want float64) {
	t.Helper()
	if math.Abs(got-want) > 1e-9*(1+math.Abs(want)) {
		t.Errorf("%s: %.12g, want %.12g", what, got, want)
	}
}

// Without common errors it is the sum of squared standard scores.
func TestOwnErrorsAlone(t *testing.T) {
	near(t, "two readings", Misfit([]float64{11, 18}, []float64{10, 20}, []float64{1, 4}, nil), 1+0.25)
	near(t, "none", Misfit(nil, nil, nil, nil), 0)
}

// One common error by hand: d = (1, 1), p = (10, 10), σ = 1, s = 0.1 give
// C = ((2, 1), (1, 2)), whose inverse is ((2, −1), (−1, 2))/3: dᵀC⁻¹d = 2/3.
func TestACommonErrorByHand(t *testing.T) {
	all := []Common{{0.1, []bool{true, true}}}
	near(t, "alike", Misfit([]float64{11, 11}, []float64{10, 10}, []float64{1, 1}, all), 2.0/3)
	near(t, "opposed", Misfit([]float64{11, 9}, []float64{10, 10}, []float64{1, 1}, all), 2)
}

// A common error can only excuse, never accuse; an error in common to all readings of
// a scaled prediction excuses it all but for own errors.
func TestCommonErrorsExcuse(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		n := rapid.IntRange(1, 8).Draw(t, "n")
		value := rapid.Float64Range(0.1, 100)
		read, predicted, own, of := make([]float64, n), make([]float64, n), make([]float64, n), make([]bool, n)
		for i := range n {
			read[i], predicted[i], own[i], of[i] = value.Draw(t, "read"), value.Draw(t, "predicted"), rapid.Float64Range(0.01, 10).Draw(t, "own"), rapid.Bool().Draw(t, "of")
		}
		bare := Misfit(read, predicted, own, nil)
		excused := Misfit(read, predicted, own, []Common{{rapid.Float64Range(0, 1).Draw(t, "share"), of}})
		if excused < 0 || excused > bare*(1+1e-6)+1e-9 {
			t.Fatalf("with a common error %g, without %g", excused, bare)
		}
	})
}
