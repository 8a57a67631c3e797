package insulation_test

import (
	"fmt"
	"math"
	"slices"
	"strings"
	"testing"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation"
	"kilovet/insulation/gap"
	"kilovet/insulation/gas"
	"kilovet/insulation/table"

	"pgregory.net/rapid"
)

// bench is a gap in the air of a laboratory with nothing but its place known.
func bench() gap.Gap {
	return gap.Gap{Medium: gap.Air, PollutionDegree: 2, Altitude: new(quantity.Length(240)), Temperature: 303.15}
}

// feedthrough is the air side of a 20 kV feedthrough.
func feedthrough() gap.Gap {
	g := bench()
	g.Clearance, g.Creepage, g.Material = 60e-3, 150e-3, "alumina"
	g.Shape = &gap.Shape{Kind: gap.Coaxial, InnerRadius: 3e-3, OuterRadius: 63e-3}
	return g
}

func near(t *testing.T, what string, got, want, tolerance float64) {
	t.Helper()
	if !(math.Abs(got/want-1) <= tolerance) {
		t.Errorf("%s: %.6g, want %.6g within %g", what, got, want, tolerance)
	}
}

func clearance(t testing.TB, g gap.Gap, v gap.Voltages) gap.Answer[quantity.Length] {
	t.Helper()
	a, err := insulation.ClearanceNeeded(g, v)
	if err != nil {
		t.Fatal(err)
	}
	return a
}

func ExampleAssess() {
	a := insulation.Assess(feedthrough(), gap.Voltages{Peak: 20e3, LongTerm: 20e3})
	fmt.Println("clearance needed", quantity.Text(a.ClearanceNeeded.Value))
	fmt.Println(a.ClearanceNeeded.Because)
	fmt.Println("creepage needed", quantity.Text(a.CreepageNeeded.Value))
	fmt.Println("peak field", quantity.Text(a.FieldPeak.Value), "of", quantity.Text(a.FieldLimit.Value))
	fmt.Println("onset", quantity.Text(a.Onset.Value), "breakdown", quantity.Text(a.Breakdown.Value))
	// Output:
	// clearance needed 34 mm
	// 20 kV peak: IEC 60664-1:2020 Table F.8, case A, row 20 kV; beyond the standard's scope of 1.5 kV DC, whose table is used to its last row
	// creepage needed 34 mm
	// peak field 2.19 MV/m of 4.538 MV/m
	// onset 41.45 kV breakdown 41.45 kV
}

// TI SLUAAR5 (2023): 3 mm at 2000 m for 4 kV impulse, 3.87 mm at 4000 m; reinforced at
// 4 kV takes the row of 6 kV.
func TestClearanceOfAPublishedExample(t *testing.T) {
	g := bench()
	v := gap.Voltages{Peak: 400, LongTerm: 400, RatedImpulse: 4000}
	near(t, "2000 m", float64(clearance(t, g, v).Value), 3e-3, 1e-12)
	g.Altitude = new(quantity.Length(4000))
	near(t, "4000 m", float64(clearance(t, g, v).Value), 3.87e-3, 1e-9)
	g = bench()
	g.Insulation = gap.Reinforced
	near(t, "reinforced", float64(clearance(t, g, v).Value), 5.5e-3, 1e-12)
}

func TestTheLargerOfSteadyAndImpulseGoverns(t *testing.T) {
	g := bench()
	g.Mains = &gap.Mains{LineToNeutral: 230, Category: 2} // 2.5 kV, 1.5 mm
	a := clearance(t, g, gap.Voltages{Peak: 1e3})
	if !quantity.Equal(a.Value, 1.5e-3) || !strings.Contains(a.Sources[0].Text, "F.2") {
		t.Errorf("1 kV on the mains: %v by %v", a.Value, a.Sources)
	}
	if len(a.Shown) != 1 || !quantity.Equal(a.Shown[0].Value, 0.26e-3) {
		t.Errorf("what F.8 asks for is not shown: %+v", a.Shown)
	}
	if !slices.ContainsFunc(a.Sources, func(s gap.Source) bool { return strings.Contains(s.Text, "F.1") }) {
		t.Errorf("where the impulse comes from is not named: %v", a.Sources)
	}
	a = clearance(t, g, gap.Voltages{Peak: 10e3})
	if !quantity.Equal(a.Value, 15.2e-3) || !strings.Contains(a.Sources[0].Text, "F.8") {
		t.Errorf("10 kV on the mains: %v by %v", a.Value, a.Sources)
	}
	g.Mains = nil
	a = clearance(t, g, gap.Voltages{Peak: 1e3})
	near(t, "no mains", float64(a.Value), 0.26e-3, 1e-12)
}

// IEC 61010-1 Table K.11: 2.24 kV behind a mains of 230 V, category III, 5.2 mm; twice
// that for reinforced insulation.
func TestSecondaryCircuitsTakeTheLaboratoryStandard(t *testing.T) {
	g := bench()
	g.Mains = &gap.Mains{LineToNeutral: 230, Category: 3, Secondary: true}
	a := clearance(t, g, gap.Voltages{Peak: 2240})
	if !quantity.Equal(a.Value, 5.2e-3) || !strings.Contains(a.Sources[0].Text, "K.11") {
		t.Errorf("category III: %v by %v", a.Value, a.Sources)
	}
	g.Insulation = gap.Reinforced
	near(t, "reinforced", float64(clearance(t, g, gap.Voltages{Peak: 2240}).Value), 10.4e-3, 1e-12)
	g = bench()
	g.Mains = &gap.Mains{LineToNeutral: 230, Category: 2, Secondary: true} // its table was not read
	if a = clearance(t, g, gap.Voltages{Peak: 2240}); !strings.Contains(a.Sources[0].Text, "IEC 60664-1") {
		t.Errorf("category II: by %v", a.Sources)
	}
}

func TestReinforcedSteps(t *testing.T) {
	g := bench()
	g.Insulation, g.Material = gap.Reinforced, "PTFE"
	v := gap.Voltages{Peak: 12.5e3, LongTerm: 12.5e3}
	near(t, "160 % of 12.5 kV is the row of 20 kV", float64(clearance(t, g, v).Value), 34e-3, 1e-12)
	c, err := insulation.CreepageNeeded(g, v)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "twice the row of 12.5 kV", float64(c.Value), 126e-3, 1e-12)
	basic, functional := g, g
	basic.Insulation, functional.Insulation = gap.Basic, gap.Functional
	if a, b := clearance(t, basic, v), clearance(t, functional, v); a.Value != b.Value || a.Value >= clearance(t, g, v).Value {
		t.Errorf("functional %v, basic %v: neither takes a safety step", b.Value, a.Value)
	}
}

// Case B needs an impulse test; a shape that is not homogeneous takes it back, and no
// shape makes it an assumption.
func TestCaseBNeedsATestAndAShape(t *testing.T) {
	v := gap.Voltages{Peak: 20e3}
	for name, c := range map[string]struct {
		tested  bool
		shape   *gap.Shape
		want    quantity.Length
		assumed bool
	}{
		"untested":          {false, nil, 34e-3, false},
		"untested plates":   {false, &gap.Shape{Kind: gap.Plates}, 34e-3, false},
		"tested":            {true, nil, 8e-3, true},
		"tested plates":     {true, &gap.Shape{Kind: gap.Plates}, 8e-3, false},
		"tested, blunt":     {true, &gap.Shape{Kind: gap.SpherePlane, Radius: 20e-3}, 8e-3, false},
		"tested, but sharp": {true, &gap.Shape{Kind: gap.SpherePlane, Radius: 19e-3}, 34e-3, false},
	} {
		g := bench()
		g.Clearance, g.ImpulseTested, g.Shape = 20e-3, c.tested, c.shape
		a := clearance(t, g, v)
		if !quantity.Equal(a.Value, c.want) || (len(a.Assumptions) > 0) != c.assumed {
			t.Errorf("%s: %v, assumptions %v; want %v", name, a.Value, a.Assumptions, c.want)
		}
	}
}

func TestPollutionFloors(t *testing.T) {
	for degree, want := range map[int]quantity.Length{1: 0.003e-3, 2: 0.2e-3, 3: 0.8e-3, 4: 1.6e-3} {
		g := bench()
		g.PollutionDegree = degree
		a := clearance(t, g, gap.Voltages{Peak: 100})
		if !quantity.Equal(a.Value, want) {
			t.Errorf("degree %d: %v, want %v", degree, a.Value, want)
		}
	}
	g := bench()
	g.Medium = gap.PrintedBoard
	g.Board = gap.PolymerCoated // degree 1 under the coating
	near(t, "coated board", float64(clearance(t, g, gap.Voltages{Peak: 10}).Value), 0.05e-3, 1e-12)
}

func TestPastTheLastRowIsALack(t *testing.T) {
	g := bench()
	g.Material = "PTFE"
	for name, c := range map[string]struct {
		class gap.Insulation
		peak  quantity.Voltage
	}{"basic": {gap.Basic, 51e3}, "reinforced": {gap.Reinforced, 32e3}} {
		g.Insulation = c.class
		_, err := insulation.ClearanceNeeded(g, gap.Voltages{Peak: c.peak, LongTerm: c.peak})
		if l := lack.Of(err); l == nil || l.Kind != lack.Outside {
			t.Errorf("%s: %v", name, err)
		}
	}
	g.Insulation = gap.Basic
	c, err := insulation.CreepageNeeded(g, gap.Voltages{Peak: 51e3, LongTerm: 50e3})
	if err != nil || !quantity.Equal(c.Value, 0.25) || len(c.Assumptions) == 0 {
		t.Errorf("creepage at 50 kV: %v, %v (%v); it stands by itself and says what it does not know", c.Value, c.Assumptions, err)
	}
	if _, err = insulation.CreepageNeeded(g, gap.Voltages{Peak: 10e3, LongTerm: 64e3}); lack.Of(err) == nil {
		t.Error("creepage past 63 kV")
	}
}

func TestWhatIsMissingIsNamed(t *testing.T) {
	v := gap.Voltages{Peak: 5e3, LongTerm: 5e3}
	for name, c := range map[string]struct {
		spoil func(*gap.Gap)
		keys  map[string]string // result by key that must be named
	}{
		"degree": {func(g *gap.Gap) { g.PollutionDegree = 0 }, map[string]string{"clearance": "site.pollution_degree", "creepage": "site.pollution_degree"}},
		"altitude": {func(g *gap.Gap) { g.Altitude = nil }, map[string]string{
			"clearance": "site.altitude", "creepage": "site.altitude", "onset": "site.altitude", "breakdown": "site.altitude", "limit": "site.altitude"}},
		"temperature": {func(g *gap.Gap) { g.Temperature = 0 }, map[string]string{"onset": "site.air_temperature", "breakdown": "site.air_temperature", "limit": "site.air_temperature"}},
		"material":    {func(g *gap.Gap) { g.Material = "" }, map[string]string{"creepage": "spacing.material"}},
		"shape":       {func(g *gap.Gap) { g.Shape = nil }, map[string]string{"onset": "spacing.shape", "field": "spacing.shape", "limit": "spacing.shape"}},
		"clearance":   {func(g *gap.Gap) { g.Shape, g.Clearance = nil, 0 }, map[string]string{"breakdown": "spacing.clearance"}},
	} {
		g := feedthrough()
		c.spoil(&g)
		a := insulation.Assess(g, v)
		lacks := map[string]*lack.Lack{"clearance": a.ClearanceNeeded.Lack, "creepage": a.CreepageNeeded.Lack, "field": a.FieldPeak.Lack,
			"limit": a.FieldLimit.Lack, "onset": a.Onset.Lack, "breakdown": a.Breakdown.Lack}
		for result, l := range lacks {
			key, wanting := c.keys[result]
			if wanting && (l == nil || !slices.Contains(l.Keys, key)) {
				t.Errorf("no %s: %s has %+v, want it to ask for %s", name, result, l, key)
			}
			if l != nil && !wanting && !(name == "clearance" && result != "breakdown") {
				t.Errorf("no %s: %s is lost too: %v", name, result, l)
			}
		}
	}
}

func TestOtherMediaAreNotAnsweredByTheTablesOfAir(t *testing.T) {
	for _, m := range []gap.Medium{gap.Vacuum, gap.Oil, gap.Solid} {
		g := feedthrough()
		g.Medium = m
		a := insulation.Assess(g, gap.Voltages{Peak: 5e3, LongTerm: 5e3})
		if a.ClearanceNeeded.Lack == nil || a.CreepageNeeded.Lack == nil || a.Onset.Lack == nil || a.Breakdown.Lack == nil {
			t.Errorf("%s is answered as air", m)
		}
		if a.FieldPeak.Lack != nil {
			t.Errorf("%s: the field of the shape is a matter of geometry: %v", m, a.FieldPeak.Lack)
		}
	}
	g := feedthrough()
	g.Medium, g.Gas, g.Pressure = gap.InGas, gap.SulphurHexafluoride, 101325
	a := insulation.Assess(g, gap.Voltages{Peak: 5e3, LongTerm: 5e3})
	if a.ClearanceNeeded.Lack == nil || a.Onset.Lack != nil || a.Onset.Value < 2*insulation.Assess(feedthrough(), gap.Voltages{}).Onset.Value {
		t.Errorf("SF6: clearance %v, onset %v (%v)", a.ClearanceNeeded.Value, a.Onset.Value, a.Onset.Lack)
	}
}

// Creepage never below clearance: at low voltages on good material the clearance for
// the impulse rules.
func TestCreepageIsNeverUnderTheClearance(t *testing.T) {
	g := bench()
	g.Material, g.PollutionDegree = "PTFE", 1
	v := gap.Voltages{Peak: 1000, LongTerm: 700, RatedImpulse: 6000}
	c, err := insulation.CreepageNeeded(g, v)
	if err != nil || !quantity.Equal(c.Value, 5.5e-3) || !strings.Contains(c.Because, "not under the clearance") {
		t.Errorf("creepage %v, %q (%v), want the 5.5 mm of the clearance", c.Value, c.Because, err)
	}
}

func TestIndexOutranksName(t *testing.T) {
	g := bench()
	g.Material, g.CTI = "PTFE", new(quantity.Voltage(150))
	c, err := insulation.CreepageNeeded(g, gap.Voltages{Peak: 10e3, LongTerm: 10e3})
	if err != nil || !quantity.Equal(c.Value, 100e-3) {
		t.Errorf("PTFE with a measured index of 150: %v (%v), want that of group IIIb", c.Value, err)
	}
}

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
	rapid.Check(t, func(rt *rapid.T) {
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
	rapid.Check(t, func(rt *rapid.T) {
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
