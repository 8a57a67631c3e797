package insulation_test

import (
	"testing"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation"
	"kilovet/insulation/gap"
)

// In vacuum, oil and solids the laws hold over part of the lengths only; asked backwards
// they give the same gap within that part, and outside it say so.
func TestInversionsOutsideGases(t *testing.T) {
	plates := &gap.Shape{Kind: gap.Plates}
	for name, g := range map[string]gap.Gap{
		"vacuum, short": {Medium: gap.Vacuum, Shape: plates, Clearance: 0.2e-3},
		"vacuum, long":  {Medium: gap.Vacuum, Shape: plates, Clearance: 80e-3},
		"oil":           {Medium: gap.Oil, Shape: plates, Clearance: 8e-3},
		"solid, thin":   {Medium: gap.Solid, Material: "PTFE", Clearance: 0.1e-3},
		"solid, thick":  {Medium: gap.Solid, Material: "PTFE", Clearance: 20e-3},
	} {
		a, err := insulation.Breakdown(g, gap.Unknown)
		if err != nil {
			t.Fatalf("%s: %v", name, err)
		}
		d, err := insulation.ClearanceForBreakdown(g, a.Value, gap.Unknown)
		if err != nil {
			t.Fatalf("%s: %v", name, err)
		}
		again := g
		again.Clearance = d
		back, err := insulation.Breakdown(again, gap.Unknown)
		if err != nil {
			t.Fatalf("%s: %v", name, err)
		}
		near(t, name, float64(back.Value), float64(a.Value), 1e-6)
		for _, v := range []quantity.Voltage{1e-3 * a.Value / 1e3, 1e9} {
			if d, err := insulation.ClearanceForBreakdown(g, v, gap.Unknown); lack.Of(err) == nil {
				t.Errorf("%s: a gap of %v for %v", name, d, v)
			}
		}
	}
}
