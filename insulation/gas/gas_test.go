package gas_test

import (
	"fmt"
	"math"
	"testing"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/gas"
	"kilovet/insulation/shape"

	"pgregory.net/rapid"
)

// normal is air at 20 °C and 760 Torr; warm the same at 25 °C, the reference of Peek and AIEE.
var (
	normal = gas.State{Gas: gap.AirGas, Pressure: 101325, Temperature: 293.15}
	warm   = gas.State{Gas: gap.AirGas, Pressure: 101325, Temperature: 298.15}
)

func near(t *testing.T, what string, got, want, tolerance float64) {
	t.Helper()
	if !(math.Abs(got/want-1) <= tolerance) {
		t.Errorf("%s: %.6g, want %.6g within %g", what, got, want, tolerance)
	}
}

func line(t testing.TB, k gap.Kind, r, d quantity.Length) shape.Line {
	t.Helper()
	l, err := shape.Of(shape.WithGap(gap.Shape{Kind: k}.WithSharpest(r), d), 0)
	if k != gap.Coaxial && k != gap.ConcentricSpheres {
		l, err = shape.Of(gap.Shape{Kind: k}.WithSharpest(r), d)
	}
	if err != nil {
		t.Fatal(err)
	}
	return l
}

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

func TestDensity(t *testing.T) {
	if d := normal.Density(); d != 1 {
		t.Errorf("normal density %v", d)
	}
	// Peek's form 0.392 b/(273 + t), b in Torr, on corona examples of textbooks, and the
	// multipliers of the AIEE table, two digits.
	for _, c := range []struct{ torr, celsius, want, tolerance float64 }{
		{750, 30, 0.9703, 2e-3}, {731.5, 26.67, 0.9569, 2e-3}, {736, 21, 0.9813, 2e-3}, {720, 27, 0.9408, 2e-3},
		{720, 0, 1.04, 0.01}, {720, 30, 0.93, 0.01}, {760, 10, 1.05, 0.01}, {780, 0, 1.12, 0.01}, {780, 20, 1.04, 0.01},
	} {
		s := gas.State{Pressure: quantity.Pressure(c.torr * 133.322), Temperature: quantity.Temperature(c.celsius + 273.15)}
		near(t, fmt.Sprintf("%g Torr, %g °C", c.torr, c.celsius), float64(s.Density())*298.15/293.15, c.want, c.tolerance)
	}
}

func TestAltitudePressure(t *testing.T) {
	// IEC 60664-1 Table A.2 rounds the same atmosphere: 80, 70, 62, 54, 47 kPa at 2 to 6 km.
	for h, kPa := range map[quantity.Length]float64{0: 101.3, 2000: 80, 3000: 70, 4000: 62, 5000: 54, 6000: 47} {
		p, err := gas.AltitudePressure(h)
		if err != nil {
			t.Fatal(err)
		}
		near(t, fmt.Sprintf("%g m", float64(h)), float64(p), kPa*1e3, 0.008)
	}
	if _, err := gas.AltitudePressure(11001); lack.Of(err) == nil {
		t.Error("the stratosphere has the troposphere's law")
	}
}

func TestStateOfAGap(t *testing.T) {
	for name, c := range map[string]struct {
		g   gap.Gap
		key string
	}{
		"no temperature": {gap.Gap{Altitude: new(quantity.Length(0))}, "site.air_temperature"},
		"no altitude":    {gap.Gap{Temperature: 300}, "site.altitude"},
		"no pressure":    {gap.Gap{Temperature: 300, Gas: gap.Nitrogen, Altitude: new(quantity.Length(0))}, "spacing.pressure"},
	} {
		_, err := gas.StateOf(c.g)
		if l := lack.Of(err); l == nil || l.Kind != lack.Missing || l.Keys[0] != c.key {
			t.Errorf("%s: %+v, want %s", name, l, c.key)
		}
	}
	s, err := gas.StateOf(gap.Gap{Temperature: 300, Pressure: 50e3, GaugeFactor: 2, Altitude: new(quantity.Length(5000))})
	if err != nil || s.Pressure != 100e3 {
		t.Errorf("a pressure given beside the altitude: %v (%v)", s.Pressure, err)
	}
}

// Wadhwa, High Voltage Engineering, ex. 1.4: A 12, B 365, γ 0.02: 325.05 V at 0.8906
// Torr cm. LUX: C = ln(A/ln(1 + 1/γ)) of 15, 365, 0.01 is 1.18.
func TestPaschenMinimumOfAPublishedExample(t *testing.T) {
	c := gas.Townsend{A: 12 / 1.33322, B: 365 / 1.33322, Gamma: 0.02}
	v, pd := c.Minimum()
	near(t, "minimum", float64(v), 325.05, 2e-4)
	near(t, "at", float64(pd)/1.33322, 0.8906, 2e-4)
	near(t, "C of air", math.Log(float64(gas.AirConstants.A)*1.33322/math.Log1p(1/gas.AirConstants.Gamma)), 1.18, 2e-3)
}

// Naidu and Kamaraju, ex. 2.5, print 481 V for A 15, B 360, γ 1e-4, with e misprinted
// as 2.178; it is 601 V: a trap.
func TestPrintedMinimumWithAMisprintedE(t *testing.T) {
	v, _ := gas.Townsend{A: 15 / 1.33322, B: 360 / 1.33322, Gamma: 1e-4}.Minimum()
	near(t, "minimum", float64(v), 600.9, 1e-3)
	near(t, "the printed one", float64(v)*2.178/math.E, 481, 2e-3)
}

// Argon, A 11 /(Pa m), B 135 V/(Pa m), γ 0.058 (Nasser 1971, worked in the documentation
// of a plasma library): 371.4407 V at 10 Pa m, 623.896 V at 20, minimum 96.859 V at 0.71748.
func TestPaschenOfArgonPublished(t *testing.T) {
	c := gas.Townsend{A: 11, B: 135, Gamma: 0.058, Most: 1e9}
	for pd, want := range map[quantity.PressureLength]float64{10: 371.4407, 20: 623.896} {
		v, err := c.Voltage(pd)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "argon", float64(v), want, 1e-6)
	}
	v, pd := c.Minimum()
	near(t, "minimum", float64(v), 96.859, 2e-4)
	near(t, "at", float64(pd), 0.71748, 2e-4)
}

// Abdel-Salam et al., ex. 4.7: air, 2 mm, 9 kV: α 2397.3 /m and γ 0.008343. The law with
// that γ gives the 9 kV back.
func TestPaschenOfAPublishedGamma(t *testing.T) {
	c := gas.Townsend{A: 11.2537, B: 273.84, Gamma: 0.008343, Most: 1e9}
	v, err := c.Voltage(101300 * 2e-3)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "voltage", float64(v), 9e3, 1e-4)
	near(t, "alpha", 11.2537*101300*math.Exp(-273.84*101300/4.5e6), 2397.3, 1e-4)
}

// Left of the minimum less gas stands more, right of it more gas does.
func TestPaschenTurnsAtItsMinimum(t *testing.T) {
	_, bottom := gas.AirConstants.Minimum()
	at := func(part quantity.PressureLength) quantity.Voltage {
		v, err := gas.AirConstants.Voltage(bottom * part)
		if err != nil {
			t.Fatal(err)
		}
		return v
	}
	if !(at(0.65) > at(0.8) && at(0.8) > at(1) && at(1) < at(1.5) && at(1.5) < at(5)) {
		t.Errorf("voltages %v %v %v %v %v", at(0.65), at(0.8), at(1), at(1.5), at(5))
	}
	for _, part := range []quantity.PressureLength{0.3, 0.4, 30} { // too few collisions, E/p past 800, under 100
		if _, err := gas.AirConstants.Voltage(bottom * part); lack.Of(err) == nil {
			t.Errorf("at %v of the minimum the constants do not hold", part)
		}
	}
}

// The computed minimum of air, 305 V, is under the measured 327 V at 7.5 µm and 1 atm:
// the measured one judges.
func TestMeasuredMinimumOfAirJudges(t *testing.T) {
	m, err := gas.MeasuredMinimum(gap.AirGas)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "voltage", float64(m.Voltage), 327, 1e-12)
	near(t, "gap at 1 atm", float64(m.At)/101325, 7.5e-6, 0.01)
	for _, torrCm := range []float64{0.05, 0.5, 0.6, 0.9} {
		s := gas.State{Gas: gap.AirGas, Pressure: 133.322, Temperature: 293.15}
		a, err := gas.UniformBreakdown(s, quantity.Length(torrCm*1e-2))
		if err != nil || a.Value != m.Voltage {
			t.Errorf("%g Torr cm: %v (%v), want the minimum", torrCm, a.Value, err)
		}
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
	rapid.Check(t, func(rt *rapid.T) {
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
	if _, err = gas.UniformBreakdown(s, 0.5e-3); lack.Of(err) == nil {
		t.Error("between Paschen's range and 1 mm nothing was measured")
	}
}

// Helium at atmospheric pressure lies outside its constants, two published sets of
// which differ by 2.4 there: no answer rather than a wrong one.
func TestOtherGasesEndWithTheirConstants(t *testing.T) {
	for _, g := range []gap.Gas{gap.Helium, gap.Argon, gap.Hydrogen, gap.CarbonDioxide, "xenon"} {
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
	if _, err = gas.UniformBreakdown(s, 20e-6); lack.Of(err) == nil {
		t.Error("20 µm asks for a field past the linear fit")
	}
}

// Abdel-Salam et al., ex. 5.8: a wire of 1 cm radius, 5 m to the next, δ 1:
// E₀ = 30 (1 + 0.3/√r) = 39 kV/cm, 6.2 E₀ r = 241.8 kV. Its companion multiplies by
// √(δ r) where Peek divides, the same here and wrong at another radius.
func TestPeekPublished(t *testing.T) {
	textbook := gas.Peek{Field: 30e5, Curve: 0.3 * 0.1}
	near(t, "E₀", float64(textbook.Onset(1, 10e-3)), 39e5, 1e-12)
	near(t, "V", 6.2*float64(textbook.Onset(1, 10e-3))*10e-3, 241.8e3, 1e-12)
	near(t, "rounded constant", float64(gas.ParallelWires.Onset(1, 10e-3)), 39e5, 1e-3)
	if e := gas.ParallelWires.Onset(1, 1e-3); e < 50e5 {
		t.Errorf("a wire of 1 mm: %v, the multiplied form gives 32.8 kV/cm", e)
	}
	// r.m.s. field of the line examples, 21.1 to 21.2 kV/cm.
	near(t, "r.m.s.", 30/math.Sqrt2, 21.2, 5e-3)
}

// Two companions of power-system textbooks: 1.036 cm in diameter, 2.44 m apart, 73.15
// cmHg, 26.67 °C, m_v 0.72, c 0.3: visual corona at 66.1 kV r.m.s. to neutral (the
// printed 66 from memory).
func TestVisualCoronaOfALine(t *testing.T) {
	p := gas.Peek{Field: 21.1e5, Curve: 0.03}
	const r = 5.18e-3
	v := 0.72 * float64(p.Onset(0.9569, r)) * r * math.Log(2.44/r)
	near(t, "line", v, 66.1e3, 1e-3)
}

// Between plates the criterion is the uniform-field law itself; the other coefficient,
// from memory, lies 3 to 10 % above it.
func TestStreamerBetweenPlates(t *testing.T) {
	for d, other := range map[quantity.Length]float64{0.5e-3: 2.83e3, 1e-3: 4.68e3, 10e-3: 31.1e3, 50e-3: 139e3} {
		l := line(t, gap.Plates, 0, d)
		v, err1 := gas.AirByUniformLaw.Onset(l, 1)
		q, err2 := gas.AirQuadratic.Onset(l, 1)
		u, _ := gas.UniformAir(1, d)
		if err1 != nil || err2 != nil {
			t.Fatal(err1, err2)
		}
		near(t, "law", float64(v), float64(u), 1e-9)
		near(t, "other coefficient", float64(q), other, 3e-3)
	}
}

// Onset fields of lone wires and spheres in kV/cm: by the streamer criterion, by the
// other coefficient as computed independently, and by Peek (coaxial, sphere).
func TestStreamerAgainstPeek(t *testing.T) {
	for _, c := range []struct {
		kind        gap.Kind
		r           quantity.Length
		other, peek float64
		tolerance   float64
	}{
		{gap.Coaxial, 1e-3, 64.5, 61.2, 0.03}, {gap.Coaxial, 10e-3, 41.0, 40.6, 0.035}, {gap.Coaxial, 50e-3, 33.8, 35.3, 0.075},
		{gap.ConcentricSpheres, 10e-3, 46.5, 41.9, 0.06}, {gap.ConcentricSpheres, 50e-3, 36.5, 33.8, 0.05},
		{gap.ConcentricSpheres, 1e-3, 0, 73.7, 0.01}, {gap.Coaxial, 0.1e-3, 0, 126.5, 0.115},
	} {
		l := line(t, c.kind, c.r, 200*c.r)
		v, err := gas.AirByUniformLaw.Onset(l, 1)
		if err != nil {
			t.Fatal(err)
		}
		what := fmt.Sprintf("%s r %v", c.kind, c.r)
		near(t, what+" against Peek", float64(l.Peak(v))/1e5, c.peek, c.tolerance)
		q, err := gas.AirQuadratic.Onset(l, 1)
		if c.other == 0 { // its onset field lies past the end of its fit
			if lack.Of(err) == nil {
				t.Errorf("%s: the quadratic fit answers past 7.9 kV/(mm bar)", what)
			}
			continue
		}
		near(t, what+", other coefficient", float64(l.Peak(q))/1e5, c.other, 5e-3)
	}
}

// Georghiou et al., J. Phys. D 32 (1999) 1370: no streamer at or below 2.5 kV from a
// positive hyperboloid of 50 µm, 1 mm from a plane (a simulation). Onset comes at most
// a fifth before, never far above.
func TestOnsetOfAFinePoint(t *testing.T) {
	v, err := gas.AirByUniformLaw.Onset(line(t, gap.PointPlane, 50e-6, 1e-3), 1)
	if err != nil || v < 1800 || v > 2700 {
		t.Errorf("onset %v V (%v)", v, err)
	}
}

// Coaxial cylinders in a fixed outer one: onset is highest near, and past the field's
// own optimum R/r = e, and falls for a thicker and a much thinner inner one.
func TestOnsetInAFixedOuterCylinder(t *testing.T) {
	const outer = 50e-3
	at := func(ratio float64) float64 {
		l, err := shape.Of(gap.Shape{Kind: gap.Coaxial, InnerRadius: quantity.Length(outer / ratio), OuterRadius: outer}, 0)
		if err != nil {
			t.Fatal(err)
		}
		v, err := gas.AirByUniformLaw.Onset(l, 1)
		if err != nil {
			t.Fatal(err)
		}
		return float64(v)
	}
	if !(at(1.5) < at(2.2) && at(2.2) < at(math.E) && at(math.E) > at(6) && at(6) > at(20)) {
		t.Errorf("onsets %g %g %g %g %g", at(1.5), at(2.2), at(math.E), at(6), at(20))
	}
}

// IEC 60052 (values from memory), one sphere earthed in free space: at most 8 % under
// the table to half the diameter, never above it.
func TestStreamerAgainstSphereGaps(t *testing.T) {
	for _, diameter := range []quantity.Length{50e-3, 100e-3, 250e-3} {
		for _, part := range []quantity.Length{0.1, 0.2, 0.4, 0.5} {
			d := diameter * part
			iec, err := gas.SphereGap(normal, diameter, d)
			if lack.Of(err) != nil {
				continue // not tabulated
			}
			v, err := gas.AirByUniformLaw.Onset(line(t, gap.SphereSphere, diameter/2, d), 1)
			if ratio := float64(v / iec.Value); err != nil || ratio > 1 || ratio < 0.92 {
				t.Errorf("spheres %v, gap %v: %v, table %v (%v)", diameter, d, v, iec.Value, err)
			}
		}
	}
}

// AIEE spark-gap table, 10 cm spheres at 25 °C, crest: within 3 % of IEC 60052 taken to
// that density.
func TestSphereGapsOfTwoTables(t *testing.T) {
	for d, want := range map[quantity.Length]float64{9.5e-3: 30e3, 16.5e-3: 50e3, 28.4e-3: 80e3, 47.8e-3: 120e3} {
		r, err := gas.SphereGap(warm, 0.1, d)
		if err != nil {
			t.Fatal(err)
		}
		near(t, quantity.Text(d), float64(r.Value), want, 0.03)
	}
}

// Spheres of 2 cm, a web table: 4.7, 11.4, 20.4, 30.8, 39.3 kV at 1, 3, 6, 10, 15 mm.
func TestSmallSpheresMeasured(t *testing.T) {
	for d, want := range map[quantity.Length]float64{1e-3: 4.7e3, 3e-3: 11.4e3, 6e-3: 20.4e3, 10e-3: 30.8e3, 15e-3: 39.3e3} {
		r, err := gas.SphereGap(normal, 20e-3, d)
		if err != nil {
			t.Fatal(err)
		}
		near(t, quantity.Text(d), float64(r.Value), want, 0.02)
	}
}

func TestSphereGapsOutsideTheTable(t *testing.T) {
	for _, c := range []struct{ diameter, d quantity.Length }{{0.03, 0.01}, {0.1, 1e-3}, {0.1, 0.08}} {
		if _, err := gas.SphereGap(normal, c.diameter, c.d); lack.Of(err) == nil {
			t.Errorf("spheres %v, gap %v: no lack", c.diameter, c.d)
		}
	}
}

// The AIEE needle gaps, and the law of rod gaps 2 + 0.534 d kV (d in mm; memory), which
// lies 2 to 5 % under them.
func TestNeedles(t *testing.T) {
	for d, crest := range map[quantity.Length]float64{8.5e-3: 10e3, 52e-3: 50e3, 0.301: 170e3, 0.452: 250e3, 0.547: 300e3} {
		a, err := gas.Needles(warm, d)
		if err != nil {
			t.Fatal(err)
		}
		near(t, quantity.Text(d), float64(a.Value), crest, 1e-9)
		if d > 0.25 {
			near(t, "rod gap "+quantity.Text(d), 2e3+0.534e6*float64(d), crest, 0.05)
		}
	}
	if _, err := gas.Needles(warm, 0.55); lack.Of(err) == nil {
		t.Error("needles past the last row")
	}
	dense := warm
	dense.Pressure *= 2
	a, _ := gas.Needles(dense, 52e-3)
	near(t, "no credit past the density of the table", float64(a.Value), 1.12*50e3, 1e-9)
	thin := warm
	thin.Pressure *= 0.93 / 2
	a, _ = gas.Needles(thin, 104e-3)
	near(t, "thin air by similarity", float64(a.Value), 0.93*50e3, 1e-9)
}

// A positive point against a plane: under needle points everywhere, and at half a metre
// 225 kV against 228 kV of the rod-plane law of IEC 60071-2, 750 √2 ln(1 + 0.55 d^1.2).
func TestPointPlane(t *testing.T) {
	for _, d := range []quantity.Length{0.1e-3, 1e-3, 4.2e-3, 10e-3, 50e-3, 0.1, 0.3, 0.5} {
		n, err1 := gas.Needles(normal, d)
		p, err2 := gas.PointPlane(normal, d)
		if err1 != nil || err2 != nil || p.Value >= n.Value {
			t.Errorf("%v: needles %v, point and plane %v (%v, %v)", d, n.Value, p.Value, err1, err2)
		}
	}
	p, _ := gas.PointPlane(normal, 0.5)
	rod := 750e3 * math.Sqrt2 * math.Log(1+0.55*math.Pow(0.5, 1.2))
	if ratio := float64(p.Value) / rod; ratio > 1 || ratio < 0.95 {
		t.Errorf("half a metre: %v, rod and plane %v", p.Value, rod)
	}
	for _, d := range []quantity.Length{9e-6, 0.51} {
		if _, err := gas.PointPlane(normal, d); lack.Of(err) == nil {
			t.Errorf("%v: no lack", d)
		}
	}
	// At 80 kPa and 20 °C it is Table F.8 read backwards.
	p, _ = gas.PointPlane(gas.State{Gas: gap.AirGas, Pressure: 80e3, Temperature: 293.15}, 34e-3)
	near(t, "F.8, 34 mm", float64(p.Value), 20e3, 1e-9)
}

func TestRoughSurfacesStartEarlier(t *testing.T) {
	l := line(t, gap.Coaxial, 3e-3, 60e-3)
	last := quantity.Voltage(math.Inf(1))
	for _, s := range []gap.Surface{gap.Smooth, gap.Weathered, gap.Stranded} {
		a, err := gas.Onset(normal, l, s)
		if err != nil || a.Value >= last {
			t.Errorf("%s: %v after %v (%v)", s, a.Value, last, err)
		}
		last = a.Value
	}
	if _, err := gas.Onset(normal, l, "furry"); lack.Of(err) == nil {
		t.Error("an unknown surface has a factor")
	}
}

func TestOnsetRefusesWhatItDoesNotKnow(t *testing.T) {
	helium := normal
	helium.Gas = gap.Helium
	dense := normal
	dense.Pressure = 2e6
	for name, c := range map[string]struct {
		s gas.State
		l shape.Line
	}{
		"helium":      {helium, line(t, gap.Coaxial, 3e-3, 60e-3)},
		"2 MPa":       {dense, line(t, gap.Coaxial, 3e-3, 60e-3)},
		"fine tip":    {normal, line(t, gap.PointPlane, 5e-6, 1e-3)},
		"shortest":    {normal, line(t, gap.SpherePlane, 1e-3, 0.05e-3)},
		"rarefied":    {gas.State{Gas: gap.AirGas, Pressure: 100, Temperature: 293.15}, line(t, gap.SpherePlane, 1e-3, 10e-3)},
		"sharp, thin": {gas.State{Gas: gap.AirGas, Pressure: 10e3, Temperature: 293.15}, line(t, gap.PointPlane, 50e-6, 10e-3)},
	} {
		if _, err := gas.Onset(c.s, c.l, gap.Smooth); lack.Of(err) == nil {
			t.Errorf("%s: no lack", name)
		}
	}
}

// Density and length enter together: twice the density at half the size is the same
// discharge at the same voltage.
func TestSimilarity(t *testing.T) {
	rapid.Check(t, func(rt *rapid.T) {
		k := rapid.SampledFrom([]gap.Kind{gap.Coaxial, gap.SpherePlane, gap.PointPlane, gap.ParallelCylinders, gap.SphereSphere}).Draw(rt, "kind")
		r := quantity.Length(math.Pow(10, rapid.Float64Range(-4, -1.5).Draw(rt, "log r")))
		d := quantity.Length(math.Pow(10, rapid.Float64Range(-3.5, -1).Draw(rt, "log d")))
		factor := rapid.Float64Range(0.5, 2).Draw(rt, "factor")
		a, err1 := gas.AirByUniformLaw.Onset(line(t, k, r, d), 1)
		b, err2 := gas.AirByUniformLaw.Onset(line(t, k, r/quantity.Length(factor), d/quantity.Length(factor)), quantity.Fraction(factor))
		if err1 != nil || err2 != nil || math.Abs(float64(b/a)-1) > 1e-6 {
			rt.Fatalf("%s: %v and %v (%v, %v)", k, a, b, err1, err2)
		}
	})
}

// A larger gap or radius never lowers the onset, a lower place neither. The spheres of
// either kind are the hardest: a larger radius lets the far one count.
func TestOnsetRises(t *testing.T) {
	kinds := []gap.Kind{gap.Coaxial, gap.ConcentricSpheres, gap.SpherePlane, gap.SphereSphere, gap.CylinderPlane, gap.ParallelCylinders, gap.PointPlane}
	rapid.Check(t, func(rt *rapid.T) {
		k := rapid.SampledFrom(kinds).Draw(rt, "kind")
		d := quantity.Length(math.Pow(10, rapid.Float64Range(-3.5, -0.7).Draw(rt, "log d")))
		r := d * quantity.Length(math.Pow(10, rapid.Float64Range(-2.5, 1.5).Draw(rt, "log r/d")))
		if r < 50e-6 {
			rt.Skip()
		}
		more := quantity.Length(rapid.Float64Range(1.001, 1.5).Draw(rt, "more"))
		onset := func(r, d quantity.Length, density quantity.Fraction) quantity.Voltage {
			v, err := gas.AirByUniformLaw.Onset(line(t, k, r, d), density)
			if err != nil {
				rt.Fatal(err)
			}
			return v
		}
		base := onset(r, d, 0.9)
		for what, better := range map[string]quantity.Voltage{
			"gap": onset(r, d*more, 0.9), "radius": onset(r*more, d, 0.9), "density": onset(r, d, 0.9*quantity.Fraction(more)),
		} {
			if !quantity.AtLeast(better, base) {
				rt.Fatalf("%s r %v d %v: onset %v, with more %s %v", k, r, d, base, what, better)
			}
		}
	})
}

// Forty gaps in one review: their onsets together are a few milliseconds.
func BenchmarkFortyOnsets(b *testing.B) {
	kinds := []gap.Kind{gap.Coaxial, gap.SpherePlane, gap.SphereSphere, gap.ParallelCylinders, gap.PointPlane}
	var lines []shape.Line
	for i := range 40 {
		r := quantity.Length(0.2e-3 * math.Pow(1.12, float64(i)))
		lines = append(lines, line(b, kinds[i%len(kinds)], r, 20e-3))
	}
	for b.Loop() {
		for _, l := range lines {
			if _, err := gas.AirByUniformLaw.Onset(l, 1); err != nil {
				b.Fatal(err)
			}
		}
	}
}
