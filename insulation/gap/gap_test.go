package gap_test

import (
	"errors"
	"testing"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

func TestSharpestIsTheRadiusThatWithSharpestSets(t *testing.T) {
	kinds := []gap.Kind{gap.Coaxial, gap.ConcentricSpheres, gap.SpherePlane, gap.SphereSphere,
		gap.CylinderPlane, gap.ParallelCylinders, gap.PointPlane, gap.RoundedEdge}
	for _, k := range kinds {
		s := gap.Shape{Kind: k, OuterRadius: 0.06}
		if got := s.WithSharpest(0.002).Sharpest(); got != 0.002 {
			t.Errorf("%s: sharpest radius %v, set 0.002", k, got)
		}
		if s.WithSharpest(0.002).OuterRadius != 0.06 {
			t.Errorf("%s: the outer radius was touched", k)
		}
	}
}

func TestClassAndFillingHaveDefaults(t *testing.T) {
	if g := (gap.Gap{}); g.Class() != gap.Basic || g.Filling() != gap.AirGas {
		t.Errorf("defaults %q, %q", g.Class(), g.Filling())
	}
	if g := (gap.Gap{Insulation: gap.Reinforced, Gas: gap.Helium}); g.Class() != gap.Reinforced || g.Filling() != gap.Helium {
		t.Errorf("given words lost: %q, %q", g.Class(), g.Filling())
	}
}

func TestTruePressureAppliesTheGaugeFactor(t *testing.T) {
	if p := (gap.Gap{Pressure: 100}).TruePressure(); p != 100 {
		t.Errorf("without factor %v Pa, want 100", p)
	}
	if p := (gap.Gap{Pressure: 100, GaugeFactor: 5.9}).TruePressure(); !quantity.Equal(p, 590) {
		t.Errorf("with factor %v Pa, want 590", p)
	}
}

func TestResultHoldsAnswerOrLack(t *testing.T) {
	r := gap.ResultOf(gap.Answer[quantity.Length]{Value: 0.01}, nil)
	if v, err := r.Get(); err != nil || v != 0.01 {
		t.Errorf("answer came back as %v, %v", v, err)
	}
	r = gap.ResultOf(gap.Answer[quantity.Length]{Value: 0.01}, lack.Key("spacing.clearance"))
	if v, err := r.Get(); lack.Of(err) == nil || v != 0 {
		t.Errorf("lack came back as %v, %v", v, err)
	}
}

func TestResultOfAnotherErrorIsTheProgrammersFault(t *testing.T) {
	defer func() {
		if recover() == nil {
			t.Error("an error that is no lack was swallowed")
		}
	}()
	gap.ResultOf(gap.Answer[quantity.Length]{}, errors.New("other"))
}
