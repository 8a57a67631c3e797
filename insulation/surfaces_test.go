package insulation_test

import (
	"math"
	"testing"

	"kilovet/hv/chance"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation"
	"kilovet/insulation/gap"

	"pgregory.net/rapid"
)

// Without a tested surface oil, solids and other gases have no table; with one the length
// follows it: in proportion below, as the square above, and 80 % of it is used.
func TestSurfacesFromATestedOne(t *testing.T) {
	for _, g := range []gap.Gap{
		{Medium: gap.Oil}, {Medium: gap.Solid, Material: "PTFE"}, {Medium: gap.InGas, Gas: gap.Helium, Pressure: 101325}, {Medium: gap.InGas, Gas: gap.Nitrogen, Pressure: 50e3},
	} {
		_, err := insulation.CreepageNeeded(g, gap.Voltages{Peak: 10e3, LongTerm: 10e3})
		if l := lack.Of(err); l == nil || len(l.Keys) != 2 {
			t.Errorf("%s %s: %v", g.Medium, g.Gas, err)
		}
		g.Tested = gap.Tested{Voltage: 40e3, Length: 20e-3}
		for peak, want := range map[quantity.Voltage]float64{32e3: 20e-3, 16e3: 10e-3, 64e3: 80e-3} {
			a, err := insulation.CreepageNeeded(g, gap.Voltages{Peak: peak, LongTerm: peak})
			if err != nil {
				t.Fatalf("%s: %v", g.Medium, err)
			}
			if g.Medium != gap.Solid { // there the clearance may govern
				near(t, string(g.Medium)+" at "+quantity.Text(peak), float64(a.Value), want, 1e-9)
			}
			if len(a.Assumptions) == 0 {
				t.Errorf("%s: no assumption", g.Medium)
			}
		}
	}
}

// A reinforced surface in oil takes the step of 160 % once: where the clearance needed, 2
// kV/mm, is more than what a very good tested surface asks for, that is 16 mm for 20 kV.
func TestReinforcedSurfacesTakeOneStep(t *testing.T) {
	g := gap.Gap{Medium: gap.Oil, Shape: &gap.Shape{Kind: gap.Plates}, Insulation: gap.Reinforced, Tested: gap.Tested{Voltage: 400e3, Length: 20e-3}}
	a, err := insulation.CreepageNeeded(g, gap.Voltages{Peak: 20e3, LongTerm: 20e3})
	if err != nil {
		t.Fatal(err)
	}
	near(t, "reinforced", float64(a.Value), 16e-3, 1e-9)
}

// A surface in nitrogen or sulphur hexafluoride at 80 kPa or more, where the tables of air hold, needs what it needs in
// air at sea level, and says that this is an assumption; reinforced it is doubled once.
func TestSurfacesInGasesNoWeakerThanAir(t *testing.T) {
	air := bench()
	air.Altitude, air.Material = new(quantity.Length), "FR-4"
	for _, class := range []gap.Insulation{gap.Basic, gap.Reinforced} {
		air.Insulation = class
		v := gap.Voltages{Peak: 5e3, LongTerm: 5e3}
		want, err := insulation.CreepageNeeded(air, v)
		if err != nil {
			t.Fatal(err)
		}
		for _, p := range []quantity.Pressure{80e3, 101300, 2e5} {
			g := air
			g.Medium, g.Gas, g.Pressure = gap.InGas, gap.Nitrogen, p
			got, err := insulation.CreepageNeeded(g, v)
			if err != nil || got.Value != want.Value || len(got.Assumptions) == 0 {
				t.Errorf("%s, %v: %v (%v), in air %v", class, p, got.Value, err, want.Value)
			}
			if g.Pressure = p - 20100; p < 101e3 {
				if _, err = insulation.CreepageNeeded(g, v); lack.Of(err) == nil {
					t.Errorf("%s, %v: thin nitrogen answers as air", class, g.Pressure)
				}
			}
		}
	}
}

// Ribs count where their grooves are wide enough for the pollution degree, and nowhere
// outside air.
func TestSurfaceCounted(t *testing.T) {
	g := bench()
	g.Creepage, g.Ribs = 100e-3, gap.Ribs{Count: 5, Depth: 4e-3, Width: 1.1e-3}
	v := gap.Voltages{Peak: 10e3, LongTerm: 10e3}
	for degree, want := range map[int]quantity.Length{1: 100e-3, 2: 100e-3, 3: 60e-3} { // X of 0.25, 1, 1.5 mm
		g.PollutionDegree = degree
		got, why, err := insulation.SurfaceCounted(g, v)
		if err != nil || math.Abs(float64(got-want)) > 1e-12 || (why == "") != (want == g.Creepage) {
			t.Errorf("degree %d: %v, %q (%v)", degree, got, why, err)
		}
	}
	g.Medium = gap.Vacuum
	if got, _, err := insulation.SurfaceCounted(g, v); err != nil || math.Abs(float64(got-60e-3)) > 1e-12 {
		t.Errorf("in vacuum %v (%v)", got, err)
	}
}

// The radius for a breakdown and the length of surface for a flashover undo their laws.
func TestInversionsByRadiusAndSurface(t *testing.T) {
	chance.Check(t, func(rt *rapid.T) {
		g := drawn(rt)
		if g.Shape == nil || g.Shape.Kind == gap.Plates {
			rt.Skip()
		}
		a, err := insulation.Breakdown(g, gap.Negative)
		if err != nil {
			rt.Skip()
		}
		r, err := insulation.RadiusForBreakdown(g, a.Value, gap.Negative)
		if err != nil { // finer radii stand it too: sharp electrodes judge
			rt.Skip()
		}
		s := g.Shape.WithSharpest(r)
		s.OuterRadius = s.InnerRadius + g.Clearance
		g.Shape = &s
		back, err := insulation.Breakdown(g, gap.Negative)
		if err != nil || math.Abs(float64(back.Value/a.Value)-1) > 1e-6 {
			rt.Fatalf("%v came back as %v (%v)", a.Value, back.Value, err)
		}
	})
	g := gap.Gap{Medium: gap.Vacuum, Material: "alumina", Creepage: 40e-3}
	for _, v := range []quantity.Voltage{5e3, 10e3, 30e3} {
		l, err := insulation.CreepageForFlashover(g, v)
		if err != nil {
			t.Fatal(err)
		}
		g.Creepage = l
		a, err := insulation.Breakdown(g, gap.Unknown)
		if err != nil || math.Abs(float64(a.Value/v)-1) > 1e-6 {
			t.Errorf("%v needs %v, which flashes over at %v (%v)", v, l, a.Value, err)
		}
	}
}
