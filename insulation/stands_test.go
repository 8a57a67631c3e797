package insulation_test

import (
	"fmt"
	"math"
	"testing"

	"kilovet/hv/chance"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation"
	"kilovet/insulation/gap"
	"kilovet/insulation/gas"
	"kilovet/insulation/table"

	"pgregory.net/rapid"
)

// The clearances of case B are the breakdown gaps of the uniform-field law at 80 kPa and
// 20 °C: 2 to 100 kV within 4.3 %, 8.7 % at 8 kV.
func TestCaseBIsUniformBreakdownAtTwoThousandMetres(t *testing.T) {
	for kV := range map[float64]bool{2: true, 4: true, 8: true, 10: true, 20: true, 30: true, 50: true, 100: true} {
		r, err := table.SteadyClearance(table.CaseB).At(quantity.Voltage(kV * 1e3))
		if err != nil {
			t.Fatal(err)
		}
		u, err := gas.UniformAir(80e3/101325.0, r.Value)
		if err != nil {
			t.Fatal(err)
		}
		tolerance := 0.043
		if kV == 8 {
			tolerance = 0.088
		}
		near(t, fmt.Sprintf("%g kV", kV), float64(u), kV*1e3, tolerance)
	}
}

// The clearances of case A hold twice the gap of needle points from 10 to 50 kV.
func TestCaseAHoldsTwiceTheNeedleGap(t *testing.T) {
	warm := gas.State{Gas: gap.AirGas, Pressure: 101325, Temperature: 298.15}
	for kV, ratio := range map[float64]float64{10: 1.79, 20: 1.94, 30: 2.04, 40: 2.02, 50: 1.92} {
		r, err := table.SteadyClearance(table.CaseA).At(quantity.Voltage(kV * 1e3))
		if err != nil {
			t.Fatal(err)
		}
		a, err := gas.Needles(warm, r.Value/quantity.Length(ratio))
		if err != nil {
			t.Fatal(err)
		}
		near(t, fmt.Sprintf("%g kV", kV), float64(a.Value), kV*1e3, 0.005)
	}
}

// A gap that meets Table F.8 breaks down above the voltage it was read for, whatever its
// shape, up to the pressure of 2000 m and beyond it with the altitude factor; plates of
// case B do so within 9 %.
func TestATabledClearanceHolds(t *testing.T) {
	chance.Check(t, func(rt *rapid.T) {
		g := bench()
		g.Altitude = new(quantity.Length(rapid.Float64Range(0, 9000).Draw(rt, "altitude")))
		g.Temperature = 293.15
		peak := quantity.Voltage(rapid.Float64Range(600, 50e3).Draw(rt, "peak"))
		g.Clearance = clearance(t, g, gap.Voltages{Peak: peak}).Value
		if rapid.Bool().Draw(rt, "shaped") {
			g.Shape = &gap.Shape{Kind: gap.SpherePlane, Radius: max(50e-6, g.Clearance*quantity.Length(rapid.Float64Range(0.01, 3).Draw(rt, "radius")))}
		}
		a, err := insulation.Breakdown(g, gap.Unknown)
		if lack.Of(err) != nil {
			return // outside the laws of the shape
		}
		if float64(a.Value) < 0.98*float64(peak) { // the factor's printed digits, the standard atmosphere
			rt.Fatalf("%v over %v breaks down at %v (%s)", peak, g.Clearance, a.Value, a.Because)
		}
	})
}

// arrangements are shapes with an open sharpest radius.
var arrangements = []gap.Kind{gap.Coaxial, gap.ConcentricSpheres, gap.SpherePlane, gap.SphereSphere, gap.CylinderPlane,
	gap.ParallelCylinders, gap.PointPlane, gap.RoundedEdge}

// drawn is a gap of any shape, or none, in air.
func drawn(rt *rapid.T) gap.Gap {
	g := bench()
	g.Altitude = new(quantity.Length(rapid.Float64Range(0, 5000).Draw(rt, "altitude")))
	g.Clearance = quantity.Length(math.Pow(10, rapid.Float64Range(-3.3, -0.5).Draw(rt, "log d")))
	g.Surface = rapid.SampledFrom([]gap.Surface{gap.Smooth, gap.Weathered, gap.Stranded}).Draw(rt, "surface")
	switch k := rapid.SampledFrom(append([]gap.Kind{"none", gap.Plates}, arrangements...)).Draw(rt, "shape"); k {
	case "none":
	case gap.Plates:
		g.Clearance /= 2
		g.Shape = &gap.Shape{Kind: k}
	default:
		r := max(40e-6, g.Clearance*quantity.Length(math.Pow(10, rapid.Float64Range(-2.5, 1).Draw(rt, "log r/d"))))
		s := gap.Shape{Kind: k}.WithSharpest(r)
		s.OuterRadius = r + g.Clearance
		g.Shape = &s
	}
	return g
}

// More distance, a rounder edge, a lower place, a cleaner surface never lower the
// breakdown or the onset.
func TestNothingBetterStandsLess(t *testing.T) {
	chance.Check(t, func(rt *rapid.T) {
		g := drawn(rt)
		more := quantity.Length(rapid.Float64Range(1.001, 1.5).Draw(rt, "more"))
		polarity := rapid.SampledFrom([]gap.Polarity{gap.Unknown, gap.Positive, gap.Negative}).Draw(rt, "polarity")
		base := insulation.StrengthOf(g, polarity)
		better := map[string]gap.Gap{}
		wider, lower, cleaner := g, g, g
		wider.Clearance *= more
		lower.Altitude = new(*g.Altitude / more)
		cleaner.Surface = gap.Smooth
		if g.Shape != nil {
			s := *g.Shape
			s.OuterRadius = s.InnerRadius + wider.Clearance
			wider.Shape = &s
		}
		better["distance"], better["altitude"], better["surface"] = wider, lower, cleaner
		if g.Shape != nil && g.Shape.Kind != gap.Plates {
			s := g.Shape.WithSharpest(g.Shape.Sharpest() * more)
			s.OuterRadius = s.InnerRadius + g.Clearance
			rounder := g
			rounder.Shape = &s
			better["radius"] = rounder
		}
		for what, b := range better {
			after := insulation.StrengthOf(b, polarity)
			for name, pair := range map[string][2]gap.Result[quantity.Voltage]{
				"onset": {base.Onset, after.Onset}, "breakdown": {base.Breakdown, after.Breakdown}} {
				if pair[0].Lack == nil && pair[1].Lack == nil && !quantity.AtLeast(pair[1].Value, pair[0].Value*(1-1e-9)) {
					rt.Fatalf("%s lowers the %s from %v to %v of %+v %+v", what, name, pair[0].Value, pair[1].Value, g, g.Shape)
				}
			}
		}
		if base.Onset.Lack == nil && base.Breakdown.Lack == nil && base.Breakdown.Value < base.Onset.Value {
			rt.Fatalf("breakdown %v under onset %v", base.Breakdown.Value, base.Onset.Value)
		}
	})
}

// A known negative sharp electrode stands no less than an unknown one, which stands as
// the positive.
func TestPolarity(t *testing.T) {
	g := bench()
	g.Clearance, g.Shape = 50e-3, &gap.Shape{Kind: gap.PointPlane, TipRadius: 0.1e-3}
	at := func(p gap.Polarity) quantity.Voltage {
		a, err := insulation.Breakdown(g, p)
		if err != nil {
			t.Fatal(err)
		}
		return a.Value
	}
	if at(gap.Unknown) != at(gap.Positive) || at(gap.Negative) <= at(gap.Positive) {
		t.Errorf("unknown %v, positive %v, negative %v", at(gap.Unknown), at(gap.Positive), at(gap.Negative))
	}
}

// Without a shape it is the needle gap: AIEE, 40 kV crest at 38.1 mm and 25 °C.
func TestWithoutAShapeItIsTheNeedleGap(t *testing.T) {
	g := bench()
	g.Clearance, g.Pressure, g.Temperature = 38.1e-3, 101325, 298.15
	a, err := insulation.Breakdown(g, gap.Unknown)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "38.1 mm", float64(a.Value), 40e3, 1e-9)
}

func TestATipTooFineForAnOnsetIsSharp(t *testing.T) {
	g := bench()
	g.Clearance, g.Shape = 10e-3, &gap.Shape{Kind: gap.PointPlane, TipRadius: 2e-6}
	s := insulation.StrengthOf(g, gap.Unknown)
	if s.Onset.Lack == nil || s.Breakdown.Lack != nil || s.Breakdown.Value < 8e3 || s.Breakdown.Value > 10e3 {
		t.Errorf("onset %v, breakdown %v (%v)", s.Onset.Lack, s.Breakdown.Value, s.Breakdown.Lack)
	}
}
