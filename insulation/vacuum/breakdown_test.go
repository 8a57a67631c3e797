package vacuum_test

import (
	"fmt"
	"math"
	"testing"

	"kilovet/hv/chance"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/shape"
	"kilovet/insulation/vacuum"

	"pgregory.net/rapid"
)

func ExamplePlaneBreakdown() {
	for _, d := range []quantity.Length{0.5 * mm, 1 * mm, 10 * mm, 100 * mm} {
		a, _ := vacuum.PlaneBreakdown(d)
		fmt.Println(quantity.Text(d), quantity.Text(a.Value), a.Because)
	}
	// Output:
	// 500 µm 20 kV short vacuum gap, 40 kV/mm at the electrode
	// 1 mm 39 kV long vacuum gap, the square-root law at the field of the electrode
	// 10 mm 123.3 kV long vacuum gap, the square-root law at the field of the electrode
	// 100 mm 390 kV long vacuum gap, the square-root law at the field of the electrode
}

// Pairs of gap and voltage that were held or reached between prepared electrodes:
// aluminium 41.4 kV over 0.76 mm and 2.8 kV over 0.07 mm (breakdown, abstract), niobium
// gun 225 kV over 20 mm (Phys. Rev. ST Accel. Beams 15, 083502), polished titanium
// dipole 400 kV over 100 mm (TRIUMF). An estimate to judge by must not lie above them.
func TestBreakdownDoesNotExceedWhatWasHeld(t *testing.T) {
	for _, row := range []struct{ d, held, atLeast float64 }{
		{0.07, 2.8, 0.99}, {0.76, 41.4, 0.7}, {20, 225, 0.7}, {100, 400, 0.95},
	} {
		a, err := vacuum.PlaneBreakdown(quantity.Length(row.d * mm))
		if err != nil {
			t.Fatal(err)
		}
		marked(t, "plane gap", a)
		if part := float64(a.Value) / (row.held * kV); !quantity.AtMost(part, 1) || part < row.atLeast {
			t.Errorf("%g mm: %s is %.3f of the %g kV held", row.d, quantity.Text(a.Value), part, row.held)
		}
	}
}

// Cranberg's survey spans 20 kV at 0.2 mm to 7 MV at 6 m (abstract; pairing the ends is
// ours): 45 to 90 kV/√mm, all above the constant used.
func TestRootLawLiesUnderTheSurvey(t *testing.T) {
	for d, c := range map[float64]float64{0.2: 44.72, 6000: 90.37} {
		survey := c * math.Sqrt(d)
		near(t, "survey", survey, map[float64]float64{0.2: 20, 6000: 7000}[d], 1e-4)
		a, err := vacuum.PlaneBreakdown(quantity.Length(d * mm))
		if err != nil || float64(a.Value) > survey*kV {
			t.Errorf("at %g mm %v (%v), the survey has %g kV", d, a.Value, err, survey)
		}
	}
}

// The two laws cross near 1 mm, where a change of mechanism was seen at 0.89 mm.
func TestLawsCrossNearAMillimetre(t *testing.T) {
	below, _ := vacuum.PlaneBreakdown(0.94 * mm)
	above, _ := vacuum.PlaneBreakdown(0.96 * mm)
	if below.Because == above.Because {
		t.Errorf("no change of law between 0.94 and 0.96 mm: %s", below.Because)
	}
	near(t, "the laws meet", float64(above.Value/below.Value), 0.96/0.94, 0.02)
}

// Ten times the gap gives ten times the voltage of a short gap, √10 times that of a long.
func TestLongGapsGainLess(t *testing.T) {
	ratio := func(d quantity.Length) float64 {
		a, _ := vacuum.PlaneBreakdown(d)
		b, _ := vacuum.PlaneBreakdown(10 * d)
		return float64(b.Value / a.Value)
	}
	near(t, "short", ratio(0.08*mm), 10, 1e-12)
	near(t, "long", ratio(5*mm), math.Sqrt(10), 1e-12)
}

// A teaching table gives vacuum 20 kV/inch, and general tables 20 to 40 kV/mm without a
// gap: neither straight rule holds over centimetres. Traps.
func TestStraightRulesFromTablesAreNotTheLaw(t *testing.T) {
	a, _ := vacuum.PlaneBreakdown(1 * mm)
	if float64(a.Value) < 40*20*kV/25.4 {
		t.Error("1 mm follows 20 kV/inch")
	}
	a, _ = vacuum.PlaneBreakdown(50 * mm)
	if float64(a.Value) > 0.3*20*kV*50 {
		t.Errorf("50 mm stands %s: 20 kV/mm was multiplied by the gap", quantity.Text(a.Value))
	}
}

// Both laws are those of the field at the electrode: V E ≤ C² and E ≤ 40 kV/mm. With C =
// 39 kV/√mm the product is 1.52e4 kV²/cm; cyclotron deflectors, 1.5e4 (Smith and Grunder
// 1963, memory).
func TestBreakdownOfShapesFollowsTheFieldAtTheElectrode(t *testing.T) {
	for d := range map[quantity.Length]bool{0.2 * mm: true, 2 * mm: true, 30 * mm: true} {
		for k, g := range shapes(d) {
			a, err := vacuum.Breakdown(g)
			if err != nil {
				t.Fatalf("%s: %v", k, err)
			}
			marked(t, string(k), a)
			l, _ := shape.Of(*g.Shape, d)
			peak := float64(l.Peak(a.Value))
			product := float64(a.Value) * peak / (kV * kV * 100) // kV²/cm
			if peak > 40e6*(1+1e-12) || product > 1.521e4*(1+1e-9) {
				t.Errorf("%s at %v: %.4g V/m, %.4g kV²/cm", k, d, peak, product)
			}
			if math.Abs(peak/40e6-1) > 1e-9 && math.Abs(product/1.521e4-1) > 1e-9 {
				t.Errorf("%s at %v: neither law governs", k, d)
			}
			if plane, _ := vacuum.PlaneBreakdown(d); a.Value > plane.Value {
				t.Errorf("%s at %v stands more than plates", k, d)
			}
		}
	}
}

func TestBreakdownGovernsByPreparedElectrodesAndShowsHalf(t *testing.T) {
	a, _ := vacuum.Breakdown(plates(10 * mm))
	if len(a.Assumptions) != 0 || len(a.Shown) != 1 {
		t.Fatalf("assumptions %v, shown %v", a.Assumptions, a.Shown)
	}
	near(t, "before conditioning", float64(a.Shown[0].Value), float64(a.Value)/2, 1e-12)
}

func TestGapsOutsideTheLawsAreLacks(t *testing.T) {
	for _, d := range []quantity.Length{0.06 * mm, 6.1} {
		_, err := vacuum.PlaneBreakdown(d)
		lacks(t, quantity.Text(d), err, lack.Outside)
		_, err = vacuum.Breakdown(plates(d))
		lacks(t, quantity.Text(d), err, lack.Outside)
	}
	_, err := vacuum.Breakdown(gap.Gap{Medium: gap.Vacuum, Clearance: 10 * mm})
	lacks(t, "no shape", err, lack.Missing)
	_, err = vacuum.Breakdown(plates(0))
	lacks(t, "no clearance", err, lack.Missing)
}

// At a pressure and gap where electrons meet gas the gap is no vacuum gap.
func TestPressureEndsTheVacuumLaws(t *testing.T) {
	g := plates(10 * mm) // free up to 0.001 Torr cm: 1.33e-3 mbar
	g.Pressure = 0.13
	if _, err := vacuum.Breakdown(g); err != nil {
		t.Errorf("1.3e-3 mbar: %v", err)
	}
	g.GaugeFactor = 2
	_, err := vacuum.Breakdown(g)
	lacks(t, "twice that", err, lack.Outside)
}

func TestClearanceForBreakdownInvertsBreakdown(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		d := quantity.Length(math.Exp(rapid.Float64Range(math.Log(0.1*mm), math.Log(300*mm)).Draw(t, "log d")))
		all := shapes(d)
		all[gap.Plates] = plates(d)
		for k, g := range all {
			a, err := vacuum.Breakdown(g)
			if err != nil {
				t.Fatalf("%s: %v", k, err)
			}
			back, err := vacuum.ClearanceForBreakdown(g, a.Value)
			// The field of a sphere no longer changes where the gap is far wider than it.
			if err != nil || math.Abs(float64(back/d)-1) > 1e-6 {
				t.Fatalf("%s: %v came back as %v (%v)", k, d, back, err)
			}
		}
	})
}

func TestClearanceForBreakdownHasEnds(t *testing.T) {
	_, err := vacuum.ClearanceForBreakdown(plates(0), 1*kV)
	lacks(t, "under 0.07 mm", err, lack.Outside)
	_, err = vacuum.ClearanceForBreakdown(plates(0), 5e6)
	lacks(t, "over 6 m", err, lack.Outside)
	sphere := gap.Gap{Shape: &gap.Shape{Kind: gap.SpherePlane, Radius: 1 * mm}}
	_, err = vacuum.ClearanceForBreakdown(sphere, 100*kV)
	lacks(t, "a sphere too small at any distance", err, lack.Outside)
	_, err = vacuum.ClearanceForBreakdown(gap.Gap{}, 10*kV)
	lacks(t, "no shape", err, lack.Missing)
}

// With a pressure given, the widest gap is where electrons still cross freely.
func TestClearanceUnderPressureEndsWhereGasBegins(t *testing.T) {
	g := plates(0)
	g.Pressure = 0.13 // 10.3 mm
	d, err := vacuum.ClearanceForBreakdown(g, 120*kV)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "within it", float64(d), math.Pow(120.0/39, 2)*mm, 1e-9)
	_, err = vacuum.ClearanceForBreakdown(g, 130*kV)
	lacks(t, "beyond it", err, lack.Outside)
}
