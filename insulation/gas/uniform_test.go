package gas_test

import (
	"fmt"
	"math"
	"testing"

	"kilovet/hv/chance"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/gas"

	"pgregory.net/rapid"
)

// Naidu and Kamaraju, High Voltage Engineering, ch. 2, ex. 2.3: the breakdown field of
// air at 1 mm and 20 cm, 43.45 and 25.58 kV/cm (question read, answers from memory).
func ExampleUniformAir() {
	for _, d := range []quantity.Length{1e-3, 0.2} {
		v, _ := gas.UniformAir(1, d)
		fmt.Printf("%.2f kV/cm\n", float64(v)/float64(d)/1e5)
	}
	// Output:
	// 43.45 kV/cm
	// 25.58 kV/cm
}

func TestUniformLawAgainstOtherFigures(t *testing.T) {
	v := func(d quantity.Length) float64 {
		u, err := gas.UniformAir(1, d)
		if err != nil {
			t.Fatal(err)
		}
		return float64(u)
	}
	// A physics text lets dry air stand 3 MV/m over 2.5 cm, 75 kV (answer from memory).
	near(t, "2.5 cm against 75 kV", v(25e-3), 75e3, 0.07)
	// V = 30 d + 1.35 kV, d in cm, a rule for gaps to 2 cm; 12 % high at 5 cm.
	near(t, "30 d + 1.35 at 1 mm", v(1e-3), 4.35e3, 0.002)
	near(t, "30 d + 1.35 at 1 cm", v(10e-3), 31.35e3, 0.035)
	if v(50e-3) > 151.4e3/1.1 {
		t.Error("at 5 cm the straight rule is no longer 12 % high")
	}
	// V = 24.36 p d + 6.72 √(p d), p in bar (Kuffel, memory): 6 % above at 1 mm, 2.6 to 3.8 %
	// from 1 to 10 cm.
	for d, more := range map[float64]float64{0.1: 1.060, 1: 1.038, 10: 1.026} {
		second := (24.36*d*1.01325 + 6.72*math.Sqrt(d*1.01325)) * 1e3
		near(t, fmt.Sprintf("second form at %g cm", d), second, more*v(quantity.Length(d*1e-2)), 1e-3)
	}
	// A constant pair once found beside Paschen's law, 43.66 and 12.8 in MV, atm, m, gives
	// 53 kV at 1 cm: a trap.
	if v(10e-3) > 0.6*53.3e3 {
		t.Error("the law follows the constants that are off by 1.7")
	}
}

func TestUniformLawEndsWhereItWasMeasured(t *testing.T) {
	for _, d := range []quantity.Length{0.09e-3, 0.21} {
		if _, err := gas.UniformAir(1, d); lack.Of(err) == nil {
			t.Errorf("gap %v: no lack", d)
		}
	}
	if _, err := gas.UniformAir(0.5, 0.15e-3); lack.Of(err) == nil { // by density times gap
		t.Error("0.15 mm at half density: no lack")
	}
}

func TestPaschenMeetsTheUniformLawAtATenthOfAMillimetre(t *testing.T) {
	v, err := gas.AirConstants.Voltage(101325 * 0.1e-3)
	if err != nil {
		t.Fatal(err)
	}
	u, _ := gas.UniformAir(1, 0.1e-3)
	near(t, "0.1 mm", float64(v), float64(u), 0.02)
	// At 1 cm the constants are far outside their range and 17 % off.
	if _, err = gas.AirConstants.Voltage(101325 * 10e-3); lack.Of(err) == nil {
		t.Error("Townsend constants answer at 1 cm")
	}
}

// More gap never breaks down lower, right of the minimum, through all laws of air.
func TestUniformAirRises(t *testing.T) {
	chance.Check(t, func(rt *rapid.T) {
		p := math.Pow(10, rapid.Float64Range(1, 6).Draw(rt, "log p"))
		x := math.Pow(10, rapid.Float64Range(-6, -0.75).Draw(rt, "log δd")) // 1 µm to 18 cm
		d := x * 101325 / p
		if d < 10e-6 {
			rt.Skip()
		}
		s := gas.State{Gas: gap.AirGas, Pressure: quantity.Pressure(p), Temperature: 293.15}
		a, err1 := gas.UniformBreakdown(s, quantity.Length(d))
		b, err2 := gas.UniformBreakdown(s, quantity.Length(d*rapid.Float64Range(1, 1.1).Draw(rt, "more")))
		if err1 != nil || err2 != nil || !quantity.AtLeast(b.Value, a.Value) {
			rt.Fatalf("δd %g m: %v then %v (%v, %v)", x, a.Value, b.Value, err1, err2)
		}
	})
}

// G. G. Raju, Dielectrics in Electric Fields, ch. 8: nitrogen, 1 cm, 1 atm, 30.4 kV.
func TestNitrogen(t *testing.T) {
	s := normal
	s.Gas = gap.Nitrogen
	a, err := gas.UniformBreakdown(s, 10e-3)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "1 cm", float64(a.Value), 30.4e3, 0.01)
	// Between its read constants and 1 mm it rests on memory: 8.8 and 275, γ 0.1, at 38 Torr cm
	// 275·38/ln(8.8·38/ln 11) = 2.116 kV, against 2.57 kV of air.
	a, err = gas.UniformBreakdown(s, 0.5e-3)
	near(t, "0.5 mm", float64(a.Value), 2116, 1e-3)
	if err != nil || len(a.Assumptions) != 1 {
		t.Errorf("0.5 mm: %v (%v)", a.Assumptions, err)
	}
}

// At atmospheric pressure helium and argon lie outside their constants: no answer rather
// than a wrong one, and the lack says how far the figures reach.
func TestOtherGasesEndWithTheirConstants(t *testing.T) {
	for _, g := range []gap.Gas{gap.Helium, gap.Argon, "xenon"} {
		s := normal
		s.Gas = g
		if a, err := gas.UniformBreakdown(s, 10e-3); lack.Of(err) == nil {
			t.Errorf("%s at 1 cm: %v", g, a.Value)
		}
	}
	s := gas.State{Gas: gap.Helium, Pressure: 1000, Temperature: 293.15}
	a, err := gas.UniformBreakdown(s, 5e-3) // 3.75 Torr cm, left of the minimum
	if err != nil || a.Value != 156 {
		t.Errorf("helium left of its minimum: %v (%v), want 156 V", a.Value, err)
	}
}

// Abdel-Salam et al., High-Voltage Engineering, 2nd ed., ex. 5.2: SF6, 101.3 kPa, 1 mm,
// avalanche of 1e8: 9.688 kV; the critical field alone gives 9.006 kV.
func TestSF6Published(t *testing.T) {
	s := gas.State{Gas: gap.SulphurHexafluoride, Pressure: 101300, Temperature: 293.15}
	a, err := gas.UniformBreakdown(s, 1e-3)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "1 mm", float64(a.Value), 9.6882e3, 1e-5)
	if e := float64(a.Value) - 18.42/0.027; math.Abs(e/9006-1) > 1e-4 {
		t.Errorf("critical part %v, published 9.006 kV", e)
	}
	// 20 µm asks for a field past the linear fit: only a lower bound is known.
	if a, err = gas.UniformBreakdown(s, 20e-6); err != nil || !a.AtLeast || a.Value != 507 {
		t.Errorf("20 µm: %v, a bound %v (%v)", a.Value, a.AtLeast, err)
	}
}
