package insulation_test

import (
	"testing"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation"
	"kilovet/insulation/gap"
	"kilovet/insulation/table"
)

// A surface in oil at 20 kV: too short under the 10 mm of oil itself (2 kV/mm, practice),
// long enough at the 80 mm of Table F.5, pollution degree 1 (read), twice both reinforced; the
// upper bound is an assumption.
func TestSurfaceInOilIsBounded(t *testing.T) {
	g := gap.Gap{Medium: gap.Oil, OilTest: 60e3}
	v := gap.Voltages{Peak: 20e3, LongTerm: 20e3}
	b := insulation.CreepageBounds(g, v)
	near(t, "least", float64(b.Least.Value), 10e-3, 1e-9)
	near(t, "enough", float64(b.Enough.Value), 80e-3, 1e-9)
	if len(b.Enough.Assumptions) == 0 {
		t.Error("nothing is said to be assumed")
	}
	g.Insulation = gap.Reinforced
	b = insulation.CreepageBounds(g, v)
	near(t, "least, reinforced", float64(b.Least.Value), 16e-3, 1e-9)
	near(t, "enough, reinforced", float64(b.Enough.Value), 160e-3, 1e-9)
}

// The column of pollution degree 1 asks no more than those of dirtier air, whatever the
// material: no surface is let off by it that air would not let off.
func TestCleanSurfaceIsTheColumnOfDegree1(t *testing.T) {
	for _, peak := range []quantity.Voltage{1e3, 5e3, 20e3, 60e3} {
		b := insulation.CreepageBounds(gap.Gap{Medium: gap.Solid, Material: "PTFE"}, gap.Voltages{Peak: peak, LongTerm: peak})
		r, err := table.Creepage(peak, table.Surface{Degree: 1, Group: table.GroupI})
		if err != nil || b.Enough.Lack != nil || b.Enough.Value < r.Value {
			t.Errorf("%v: %v (%v), the column says %v (%v)", peak, b.Enough.Value, b.Enough.Lack, r.Value, err)
		}
	}
}

// Helium, argon and carbon dioxide have no upper bound; their lower one is air between plates,
// 24.22 x + 6.08 √x kV at a quarter above the peak. Rarefied, where helium stands more than
// air does left of its minimum, there is none.
func TestWeakGasesAreBoundedByAir(t *testing.T) {
	v := gap.Voltages{Peak: 20e3, LongTerm: 20e3}
	for _, gas := range []gap.Gas{gap.Helium, gap.Argon, gap.CarbonDioxide} {
		g := gap.Gap{Medium: gap.InGas, Gas: gas, Pressure: 101325, Temperature: 293.15, Creepage: 30e-3}
		b := insulation.CreepageBounds(g, v)
		if b.Enough.Lack == nil {
			t.Errorf("%s: %v would be enough", gas, b.Enough.Value)
		}
		near(t, string(gas), float64(b.Least.Value), 8.07e-3, 1e-3) // 25 kV, worked out apart
		g.Shape, g.Clearance = &gap.Shape{Kind: gap.Plates}, 10e-3
		b2 := insulation.BreakdownBounds(g, gap.Unknown)
		near(t, string(gas)+", plates 10 mm apart", float64(b2.Most.Value), 30.3e3, 1e-9) // of air
		if b2.Least.Lack != nil || b2.Least.Value >= b2.Most.Value {
			t.Errorf("%s: at least %v (%v)", gas, b2.Least.Value, b2.Least.Lack)
		}
	}
}

// Past the ends of their data gaps are bounded by those ends: needles by the 547 mm of the
// AIEE table, 300 kV crest at 25 °C, plates by 20 cm, short gaps from above; a missing key
// is no end.
func TestGapsPastTheDataAreBounded(t *testing.T) {
	g := gap.Gap{Medium: gap.Air, Pressure: 101325, Temperature: 298.15, Clearance: 1}
	b := insulation.BreakdownBounds(g, gap.Unknown)
	near(t, "needles", float64(b.Least.Value), 300e3, 1e-6)
	if b.Most.Lack == nil {
		t.Errorf("a metre of needles stands at most %v", b.Most.Value)
	}
	g.Temperature, g.Shape = 293.15, &gap.Shape{Kind: gap.Plates}
	near(t, "plates", float64(insulation.BreakdownBounds(g, gap.Unknown).Least.Value), 511.6e3, 1e-3) // 25.58 kV/cm
	g.Shape, g.Clearance = &gap.Shape{Kind: gap.SpherePlane, Radius: 10e-3}, 50e-6
	b = insulation.BreakdownBounds(g, gap.Unknown)
	if b.Most.Lack != nil || b.Most.Value < 700 || b.Most.Value > 900 { // 0.850 kV of plates at 0.1 mm
		t.Errorf("50 µm: at most %v (%v)", b.Most.Value, b.Most.Lack)
	}
	g.Temperature = 0
	if b = insulation.BreakdownBounds(g, gap.Unknown); b.Most.Lack == nil || b.Most.Lack.Kind != lack.Missing {
		t.Errorf("without a temperature: %+v", b)
	}
}

// In vacuum the open gap bounds the surface (Hawley 1968): plates without preparation stand
// 25 kV over 1.64 mm, (2 × 25/39)² mm.
func TestVacuumBoundsItsSurfaces(t *testing.T) {
	b := insulation.CreepageBounds(gap.Gap{Medium: gap.Vacuum, Material: "PTFE"}, gap.Voltages{Peak: 20e3, LongTerm: 20e3})
	near(t, "least", float64(b.Least.Value), 1.6437e-3, 1e-3)
	if b.Enough.Lack == nil {
		t.Errorf("%v would be enough", b.Enough.Value)
	}
}
