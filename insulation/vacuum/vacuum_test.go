package vacuum_test

import (
	"math"
	"testing"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

const (
	mm = 1e-3
	kV = 1e3
)

func near(t *testing.T, what string, got, want, tolerance float64) {
	t.Helper()
	if !(math.Abs(got/want-1) <= tolerance) {
		t.Errorf("%s: %.6g, want %.6g within %g", what, got, want, tolerance)
	}
}

// lacks demands a lack of a kind.
func lacks(t *testing.T, what string, err error, kind lack.Kind) {
	t.Helper()
	if l := lack.Of(err); l == nil || l.Kind != kind {
		t.Errorf("%s: %v, want a lack of kind %d", what, err, kind)
	}
}

// marked demands that every source of an answer has a text and a mark, the first
// governing.
func marked[Q quantity.Number](t *testing.T, what string, a gap.Answer[Q]) {
	t.Helper()
	if a.Because == "" || len(a.Sources) == 0 || !a.Sources[0].Governs {
		t.Errorf("%s: an answer without a reason or a governing source", what)
	}
	for _, s := range a.Sources {
		if s.Text == "" || s.Mark == "" {
			t.Errorf("%s: source %+v", what, s)
		}
	}
	for _, b := range a.Shown {
		if b.Source.Text == "" || b.Source.Mark == "" {
			t.Errorf("%s: shown %+v", what, b)
		}
	}
}

func plates(d quantity.Length) gap.Gap {
	return prepared(gap.Gap{Clearance: d, Shape: &gap.Shape{Kind: gap.Plates}})
}

// prepared is the gap with polished, conditioned electrodes of a small area.
func prepared(g gap.Gap) gap.Gap {
	g.Medium, g.Polished, g.Conditioned, g.StressedArea = gap.Vacuum, new(true), new(true), 1e-4
	return g
}

// shapes are gaps of all kinds, their sharpest radius 3 mm.
func shapes(d quantity.Length) map[gap.Kind]gap.Gap {
	all := map[gap.Kind]gap.Gap{}
	for _, k := range []gap.Kind{gap.Coaxial, gap.ConcentricSpheres, gap.SpherePlane, gap.SphereSphere,
		gap.CylinderPlane, gap.ParallelCylinders, gap.PointPlane, gap.RoundedEdge} {
		s := gap.Shape{Kind: k, OuterRadius: 3*mm + d}.WithSharpest(3 * mm)
		all[k] = prepared(gap.Gap{Clearance: d, Shape: &s})
	}
	return all
}
