package solve_test

import (
	"errors"
	"math"
	"testing"

	"kilovet/hv/lack"
	"kilovet/insulation/solve"
)

func TestRiseFindsKnownCrossings(t *testing.T) {
	for name, c := range map[string]struct {
		lo, hi, want float64
		f            func(float64) float64
	}{
		"line":        {1, 9, 4, func(x float64) float64 { return 2*x - 8 }},
		"power":       {0.1, 50, 2, func(x float64) float64 { return math.Pow(x, 9) - 512 }},
		"logarithm":   {1e-6, 1, 1e-3, func(x float64) float64 { return math.Log(x / 1e-3) }},
		"exponential": {0.01, 30, math.Log(7), func(x float64) float64 { return math.Exp(x) - 7 }},
		"kink":        {1, 2, 1.7, func(x float64) float64 { return math.Max(1e-6*(x-1.7), 1e6*(x-1.7)) }},
		"lower end":   {1, 2, 1, func(x float64) float64 { return x - 1 }},
		"upper end":   {1, 2, 2, func(x float64) float64 { return x - 2 }},
	} {
		n := 0
		x, err := solve.Rise(c.lo, c.hi, func(x float64) (float64, error) { n++; return c.f(x), nil })
		if err != nil || math.Abs(x/c.want-1) > 1e-10 {
			t.Errorf("%s: %v (%v), want %v", name, x, err, c.want)
		}
		if n > 80 {
			t.Errorf("%s took %d evaluations", name, n)
		}
	}
}

func TestRiseWithoutACrossingIsTheProgrammersFault(t *testing.T) {
	defer func() {
		if recover() == nil {
			t.Error("no panic")
		}
	}()
	_, _ = solve.Rise(1, 2, func(x float64) (float64, error) { return x, nil })
}

func TestErrorsOfTheFunctionComeThrough(t *testing.T) {
	broken := errors.New("broken")
	if _, err := solve.Rise(1, 2, func(float64) (float64, error) { return 0, broken }); !errors.Is(err, broken) {
		t.Errorf("Rise returned %v", err)
	}
	if _, err := solve.Above(1, 2, func(float64) (float64, error) { return 0, broken }); !errors.Is(err, broken) {
		t.Errorf("Above returned %v", err)
	}
}

func TestAboveDoublesAndGivesUp(t *testing.T) {
	f := func(x float64) (float64, error) { return x - 10, nil }
	if x, err := solve.Above(1, 100, f); err != nil || x != 16 {
		t.Errorf("first doubling past 10: %v (%v)", x, err)
	}
	if _, err := solve.Above(1, 9, f); lack.Of(err) == nil || lack.Of(err).Kind != lack.NotReached {
		t.Errorf("past the limit: %v", err)
	}
}

func TestLevelFindsAValueOrSaysWhichEndFallsShort(t *testing.T) {
	low, high := errors.New("low"), errors.New("high")
	at := func(want float64) (float64, error) {
		return solve.Level(1e-5, 10, want, func(x float64) (float64, error) { return 7 * math.Sqrt(x), nil }, func() error { return low }, func() error { return high })
	}
	for _, x := range []float64{1e-5, 3e-4, 0.2, 10} {
		if got, err := at(7 * math.Sqrt(x)); err != nil || math.Abs(got/x-1) > 1e-9 {
			t.Errorf("%g came back as %g (%v)", x, got, err)
		}
	}
	if _, err := at(1e-3); !errors.Is(err, low) {
		t.Errorf("under the lower end: %v", err)
	}
	if _, err := at(100); !errors.Is(err, high) {
		t.Errorf("above the upper end: %v", err)
	}
	broken := errors.New("broken")
	if _, err := solve.Level(1, 2, 1, func(float64) (float64, error) { return 0, broken }, nil, nil); !errors.Is(err, broken) {
		t.Errorf("Level returned %v", err)
	}
}
