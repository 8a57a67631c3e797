package solid_test

import (
	"math"
	"testing"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

const (
	mm = 1e-3
	cm = 1e-2
	kV = 1e3

	kVcm = kV / cm
	kVmm = kV / mm
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

// marked demands that every source of an answer has a text and a mark, the first alone
// governing.
func marked[Q quantity.Number](t *testing.T, what string, a gap.Answer[Q]) {
	t.Helper()
	if a.Because == "" || len(a.Sources) == 0 {
		t.Errorf("%s: an answer without a reason or source", what)
	}
	for i, s := range a.Sources {
		if s.Text == "" || s.Mark == "" || s.Governs != (i == 0) {
			t.Errorf("%s: source %d %+v", what, i, s)
		}
	}
	for _, b := range a.Shown {
		if b.Source.Text == "" || b.Source.Mark == "" {
			t.Errorf("%s: shown %+v", what, b)
		}
	}
}

func sheet(material string, t quantity.Length) gap.Gap {
	return gap.Gap{Medium: gap.Solid, Material: material, Clearance: t, Shape: &gap.Shape{Kind: gap.Plates}}
}

func tube(material string, r, t quantity.Length) gap.Gap {
	return gap.Gap{Medium: gap.Solid, Material: material, Clearance: t, Shape: &gap.Shape{Kind: gap.Coaxial, InnerRadius: r, OuterRadius: r + t}}
}
