package insulation_test

import (
	"math"
	"strings"
	"testing"

	"kilovet/hv/chance"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation"
	"kilovet/insulation/gap"

	"pgregory.net/rapid"
)

// Every inversion undoes its law to 1e-6, where the law rises.
func TestInversionsUndoTheirLaws(t *testing.T) {
	chance.Check(t, func(rt *rapid.T) {
		g := drawn(rt)
		if g.Shape == nil || g.Shape.Kind == gap.Plates {
			g.Shape = &gap.Shape{Kind: gap.SpherePlane, Radius: g.Clearance}
		}
		s := insulation.StrengthOf(g, gap.Unknown)
		e, err := insulation.FieldPeak(g, gap.Voltages{Peak: 10e3})
		if s.Onset.Lack != nil || s.Breakdown.Lack != nil || err != nil {
			rt.Skip()
		}
		d := g.Clearance
		back := map[string]func() (quantity.Length, error){
			"onset by distance": func() (quantity.Length, error) { return insulation.ClearanceForOnset(g, s.Onset.Value) },
			"breakdown by distance": func() (quantity.Length, error) {
				return insulation.ClearanceForBreakdown(g, s.Breakdown.Value, gap.Unknown)
			},
			"field by distance": func() (quantity.Length, error) { return insulation.ClearanceForField(g, 10e3, e.Value) },
			"onset by radius":   func() (quantity.Length, error) { return insulation.RadiusForOnset(g, s.Onset.Value) },
			"field by radius":   func() (quantity.Length, error) { return insulation.RadiusForField(g, 10e3, e.Value) },
		}
		for name, invert := range back {
			got, err := invert()
			if err != nil {
				rt.Fatalf("%s of %+v: %v", name, g.Shape, err)
			}
			again := g
			again.Clearance = got
			shape := *g.Shape
			if name == "onset by radius" || name == "field by radius" {
				shape = shape.WithSharpest(got)
				again.Clearance = d
			}
			shape.OuterRadius = shape.InnerRadius + again.Clearance
			again.Shape = &shape
			after := insulation.StrengthOf(again, gap.Unknown)
			field, _ := insulation.FieldPeak(again, gap.Voltages{Peak: 10e3})
			pairs := map[string][2]float64{
				"onset by distance":     {float64(after.Onset.Value), float64(s.Onset.Value)},
				"onset by radius":       {float64(after.Onset.Value), float64(s.Onset.Value)},
				"breakdown by distance": {float64(after.Breakdown.Value), float64(s.Breakdown.Value)},
				"field by distance":     {float64(field.Value), float64(e.Value)},
				"field by radius":       {float64(field.Value), float64(e.Value)},
			}
			if p := pairs[name]; math.Abs(p[0]/p[1]-1) > 1e-6 {
				rt.Fatalf("%s of %+v: %v came back as %v", name, g.Shape, p[1], p[0])
			}
		}
	})
}

func TestInversionsWithoutAShape(t *testing.T) {
	for _, v := range []quantity.Voltage{2e3, 20e3, 150e3} {
		g := bench()
		d, err := insulation.ClearanceForBreakdown(g, v, gap.Unknown)
		if err != nil {
			t.Fatal(err)
		}
		g.Clearance = d
		a, err := insulation.Breakdown(g, gap.Unknown)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "needles", float64(a.Value), float64(v), 1e-6)
	}
}

func TestPeakByTableUndoesTheClearance(t *testing.T) {
	chance.Check(t, func(rt *rapid.T) {
		g := bench()
		g.Altitude = new(quantity.Length(rapid.Float64Range(0, 15000).Draw(rt, "altitude")))
		g.Insulation = rapid.SampledFrom([]gap.Insulation{gap.Functional, gap.Basic, gap.Reinforced}).Draw(rt, "class")
		peak := quantity.Voltage(rapid.Float64Range(1500, 31e3).Draw(rt, "peak"))
		g.Clearance = clearance(t, g, gap.Voltages{Peak: peak}).Value
		v, err := insulation.PeakByTable(g)
		if err != nil || math.Abs(float64(v/peak)-1) > 1e-6 {
			rt.Fatalf("%v needs %v, which meets %v (%v)", peak, g.Clearance, v, err)
		}
	})
}

func TestWhatNoSizeReachesIsALack(t *testing.T) {
	g := bench()
	g.Clearance, g.Shape = 5e-3, &gap.Shape{Kind: gap.SpherePlane, Radius: 5e-3}
	plates, err := insulation.Onset(gap.Gap{Medium: gap.Air, Altitude: g.Altitude, Temperature: g.Temperature, Clearance: 5e-3, Shape: &gap.Shape{Kind: gap.Plates}})
	if err != nil {
		t.Fatal(err)
	}
	if r, err := insulation.RadiusForOnset(g, plates.Value*1.01); lack.Of(err) == nil {
		t.Errorf("a radius of %v makes 5 mm stand more than plates do", r)
	}
	if d, err := insulation.ClearanceForBreakdown(g, 1e6, gap.Unknown); lack.Of(err) == nil {
		t.Errorf("a gap of %v stands a megavolt", d)
	}
	g.Shape = &gap.Shape{Kind: gap.Plates}
	if _, err := insulation.RadiusForOnset(g, 1e3); lack.Of(err) == nil {
		t.Error("plates have a radius")
	}
	// A sphere of 5 mm at 10 kV has 2 MV/m however far the plane is.
	g.Shape = &gap.Shape{Kind: gap.SpherePlane, Radius: 5e-3}
	if d, err := insulation.ClearanceForField(g, 10e3, 1.9e6); lack.Of(err) == nil {
		t.Errorf("a gap of %v brings the field of a lone sphere under its own", d)
	}
}

func BenchmarkNeeds(b *testing.B) {
	g := feedthrough()
	g.Material = "PTFE"
	for b.Loop() {
		if _, err := insulation.CreepageNeeded(g, gap.Voltages{Peak: 22e3, LongTerm: 20e3}); err != nil {
			b.Fatal(err)
		}
	}
}

func BenchmarkStrength(b *testing.B) {
	g := feedthrough()
	for b.Loop() {
		if s := insulation.StrengthOf(g, gap.Unknown); s.Breakdown.Lack != nil {
			b.Fatal(s.Breakdown.Lack)
		}
	}
}

// In other gases laws begin where their constants do; from there on every inversion undoes
// them to 1e-6.
func TestInversionsInOtherGases(t *testing.T) {
	for _, c := range []struct {
		gas      gap.Gas
		pressure quantity.Pressure
		kind     gap.Kind
		v        quantity.Voltage
	}{
		{gap.SulphurHexafluoride, 2e5, gap.Plates, 40e3}, {gap.SulphurHexafluoride, 2e5, gap.SpherePlane, 40e3}, {gap.SulphurHexafluoride, 4e5, gap.CylinderPlane, 80e3},
		{gap.Nitrogen, 101325, gap.Plates, 40e3}, {gap.Nitrogen, 3e5, gap.Plates, 40e3}, {gap.Nitrogen, 101325, gap.Plates, 3e3},
		{gap.Helium, 1000, gap.Plates, 300}, {gap.Argon, 5000, gap.Plates, 2e3}, {gap.Hydrogen, 101325, gap.Plates, 14e3},
	} {
		g := gap.Gap{Medium: gap.InGas, Gas: c.gas, Pressure: c.pressure, Temperature: 293.15, Shape: &gap.Shape{Kind: c.kind, Radius: 10e-3}}
		d, err := insulation.ClearanceForBreakdown(g, c.v, gap.Unknown)
		if err != nil {
			t.Errorf("%s, %s: %v", c.gas, c.kind, err)
			continue
		}
		g.Clearance = d
		a, err := insulation.Breakdown(g, gap.Unknown)
		if err != nil {
			t.Fatal(err)
		}
		near(t, string(c.gas)+", "+string(c.kind), float64(a.Value), float64(c.v), 1e-6)
	}
	// Nitrogen at 4 kV lies between its constants and the law of air, which begins at 1 mm.
	g := gap.Gap{Medium: gap.InGas, Gas: gap.Nitrogen, Pressure: 101325, Temperature: 293.15, Shape: &gap.Shape{Kind: gap.Plates}}
	if d, err := insulation.ClearanceForBreakdown(g, 4e3, gap.Unknown); lack.Of(err) == nil || !strings.Contains(err.Error(), "laws change at 1 mm") {
		t.Errorf("4 kV in nitrogen: %v (%v)", d, err)
	}
}
