package solid_test

import (
	"fmt"
	"math"
	"testing"

	"kilovet/hv/chance"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/shape"
	"kilovet/insulation/solid"

	"pgregory.net/rapid"
)

// coax is a wall of one material, its permittivity of no account.
func coax(r, R quantity.Length) solid.Wall {
	return solid.Wall{InnerRadius: r, Layers: []solid.Layer{{Thickness: R - r, Permittivity: 1}}}
}

// fields are the fields under alternating voltage.
func fields(t *testing.T, w solid.Wall, v float64) []quantity.Field {
	t.Helper()
	e, err := w.Fields(quantity.Voltage(v), solid.Switched)
	if err != nil {
		t.Fatal(err)
	}
	return e
}

// T. Gönen, Electric Power Transmission System Engineering, 2nd ed., ex. 5.1: 27.17 and
// 10.87 kV/cm; at the best conductor, 0.92 cm, 27.07.
func ExampleWall_Fields() {
	cable := coax(1*cm, 2.5*cm)
	e, _ := cable.Fields(24.9*kV, solid.Switched)
	fmt.Printf("%.2f kV/cm at the conductor, %.2f at the sheath\n", float64(e[0])/kVcm, float64(e[0])/kVcm/2.5)
	best, _ := coax(2.5*cm/math.E, 2.5*cm).Fields(24.9*kV, solid.Switched)
	fmt.Printf("%.2f kV/cm at %.2f cm\n", float64(best[0])/kVcm, 2.5/math.E)
	// Output:
	// 27.17 kV/cm at the conductor, 10.87 at the sheath
	// 27.07 kV/cm at 0.92 cm
}

// One layer is the coaxial field that shapes know.
func TestSingleLayerIsTheCoaxialShape(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		r := quantity.Length(rapid.Float64Range(0.1*mm, 50*mm).Draw(t, "r"))
		d := quantity.Length(rapid.Float64Range(0.1*mm, 50*mm).Draw(t, "d"))
		l, err := shape.Of(gap.Shape{Kind: gap.Coaxial, InnerRadius: r, OuterRadius: r + d}, 0)
		if err != nil {
			t.Fatal(err)
		}
		e, err := coax(r, r+d).Fields(1*kV, solid.Switched)
		if err != nil || math.Abs(float64(e[0]/l.Peak(1*kV))-1) > 1e-9 {
			t.Fatalf("%v, shape %v (%v)", e, l.Peak(1*kV), err)
		}
	})
}

// Gupta, Elements of Power System, ex. 11.6 (10 kV, 23 kV/cm) and 11.7 with Mehta, ex. 11.11
// (132 kV line, 60 kV/cm peak); Wadhwa, Electrical Power Systems, ex. 9.1, prints 7.07 cm
// for 85 kV and 65 kV/cm since it rounds the conductor to 2.6 cm first: 7.11 is exact.
func TestBestConductorPublished(t *testing.T) {
	for _, row := range []struct{ v, e, d, D, tolerance float64 }{
		{10 * kV, 23 * kVcm, 8.6957 * mm, 23.637 * mm, 1e-4},
		{132 * kV * math.Sqrt2 / math.Sqrt(3), 60 * kVcm, 35.93 * mm, 97.66 * mm, 2e-4},
		{85 * kV, 65 * kVcm, 2.615 * cm, 7.109 * cm, 2e-4},
	} {
		r, R, err := solid.BestConductor(quantity.Voltage(row.v), quantity.Field(row.e))
		if err != nil {
			t.Fatal(err)
		}
		near(t, "conductor", float64(2*r), row.d, row.tolerance)
		near(t, "sheath", float64(2*R), row.D, row.tolerance)
	}
	_, R, _ := solid.BestConductor(85*kV, 65*kVcm)
	if math.Abs(float64(2*R)/(7.07*cm)-1) < 5e-3 {
		t.Error("the rounded 7.07 cm was met")
	}
}

// Any other conductor in the best sheath has a higher field.
func TestBestConductorIsTheBest(t *testing.T) {
	r, R, _ := solid.BestConductor(10*kV, 5*kVmm)
	for _, part := range []quantity.Length{0.5, 0.9, 1.1, 2} {
		if e := fields(t, coax(r*part, R), 10*kV); e[0] <= 5*kVmm {
			t.Errorf("%v of the best: %v", part, e[0])
		}
	}
	near(t, "8 % of radius", float64(fields(t, coax(r*1.08, R), 10*kV)[0]), 5*kVmm*1.0034, 1e-3)
}

// S. Ray, Electrical Power Systems, ex. 6.2: 130 kV, 100 kV/cm; 3.49 cm round 1.5 cm, 2.23 cm
// at the best conductor (the book calls the thicknesses radii). OuterRadius inverts the field.
func TestOuterRadiusPublished(t *testing.T) {
	R, err := solid.OuterRadius(130*kV, 100*kVcm, 0.75*cm)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "thickness", float64(R)-0.75*cm, 3.495*cm, 2e-4)
	near(t, "field", float64(fields(t, coax(0.75*cm, R), 130*kV)[0]), 100*kVcm, 1e-9)
	r, R, _ := solid.BestConductor(130*kV, 100*kVcm)
	near(t, "thickness at the best", float64(R-r), 2.234*cm, 2e-4)
}

// Mehta, ex. 11.8: 40 to 10 kV/cm round 2 cm: 3 cm of insulation, 55.45 kV. Ulaby-type
// problem 4.53: 200 MV/m between 1 and 2 cm, 1.39 MV.
func TestCoaxialWithstandPublished(t *testing.T) {
	for _, row := range []struct{ r, R, e, want, tolerance float64 }{
		{1 * cm, 4 * cm, 40 * kVcm, 55.45 * kV, 1e-4},
		{1 * cm, 2 * cm, 200e6, 1.386e6, 3e-4},
	} {
		v, first, err := coax(quantity.Length(row.r), quantity.Length(row.R)).Withstand([]quantity.Field{quantity.Field(row.e)}, solid.Switched)
		if err != nil || first != 0 {
			t.Fatal(first, err)
		}
		near(t, "withstand", float64(v), row.want, row.tolerance)
	}
}

// The same 11 kV cable in two books: Gupta, ex. 11.4, 22.58 and 9.387 kV/cm by the peak of a
// phase; Mehta, ex. 11.9, 27.66 and 11.5 by the full rms. The formula is one, the basis is not.
func TestSameCableOnTwoBases(t *testing.T) {
	r := quantity.Length(math.Sqrt(0.645/math.Pi) * cm)
	for v, want := range map[float64][2]float64{11 * kV * math.Sqrt2 / math.Sqrt(3): {22.58, 9.387}, 11 * kV: {27.66, 11.5}} {
		e := fields(t, coax(r, 1.09*cm), v)
		near(t, "conductor", float64(e[0]), want[0]*kVcm, 1e-3)
		near(t, "sheath", float64(e[0])*float64(r)/(1.09*cm), want[1]*kVcm, 1e-3)
	}
}

// Naidu and Kamaraju, ex. 4.3: polyethylene, 1000 pF over 20 cm, 15 kV at 50 kV/cm: radii
// 11.74 and 12.04 cm (called diameters there), 0.3 cm apart.
func TestCoaxialCapacitorPublished(t *testing.T) {
	e := fields(t, coax(11.74*cm, 11.74*cm+0.3039*cm), 15*kV)
	near(t, "field", float64(e[0]), 50*kVcm, 1e-3)
	c, err := solid.CoaxialCapacitance(2.3, 11.74*cm, 11.74*cm+0.3039*cm)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "capacitance", float64(c)*0.2, 1000e-12, 2e-3)
}

// Mehta, ex. 11.4: ε 4, 1.8 to 1: 0.378 µF/km (Anand, ex. 8.2, with 0.024/log: 0.3761, 0.65 %
// low). Cable materials at D/d 2, e, 3.5, 5, 8 worked out apart from this code.
func TestCoaxialCapacitancePublished(t *testing.T) {
	c, err := solid.CoaxialCapacitance(4, 0.5*cm, 0.9*cm)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "per metre", float64(c), 378.6e-12, 2e-4)
	near(t, "the rule of 24", 0.024*4/math.Log10(1.8)*1e-9, float64(c)*(1-0.0065), 2e-4)
	for er, row := range map[float64][5]float64{2.26: {181, 126, 100, 78, 61}, 2.1: {169, 117, 93, 73, 56}, 3.1: {249, 173, 138, 107, 83}} {
		for i, ratio := range []float64{2, math.E, 3.5, 5, 8} {
			c, err := solid.CoaxialCapacitance(er, 1*mm, quantity.Length(ratio*mm))
			if err != nil || math.Abs(float64(c)*1e12-row[i]) > 0.6 {
				t.Errorf("ε %g, %g: %v (%v), want %g pF/m", er, ratio, c, err, row[i])
			}
		}
	}
}

// Mehta, ex. 11.1: 234 MΩ of 2 km; Abdel-Salam et al., ex. 12.3: 4.53e10 Ωm from 0.5 MΩ of 10
// km at a ratio of 2; Wadhwa, ex. 6.4: 600 pF from 250 to 92 V in 60 s, 1.0003e11 Ω.
func TestInsulationResistancePublished(t *testing.T) {
	r, err := solid.RadialResistance(5e12, 0.5*cm, 0.9*cm, 2000)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "radial", float64(r), 233.9e6, 5e-4)
	one, _ := solid.RadialResistance(1, 1*cm, 2*cm, 10e3)
	near(t, "resistivity", 0.5e6/float64(one), 4.532e10, 5e-4)
	r, err = solid.LeakageResistance(600e-12, 250, 92, 60)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "leak", float64(r), 1.0003e11, 1e-4)
}

// R C = ρ ε whatever the cable.
func TestResistanceTimesCapacitanceIsTheMaterial(t *testing.T) {
	for _, ratio := range []quantity.Length{1.1, 3, 20} {
		r, _ := solid.RadialResistance(1e14, 1*mm, ratio*mm, 7)
		c, _ := solid.CoaxialCapacitance(2.3, 1*mm, ratio*mm)
		near(t, "ρ ε", float64(r)*float64(c)*7, 1e14*2.3*8.8541878128e-12, 1e-12)
	}
}

// Layers used at their own limits. Abdel-Salam et al., ex. 12.1 (70.04 and 4.899 kV, 52.99 kV
// rms); Gupta, ex. 11.9 (4.6 and 15.4 mm, 46.32 kV rms) and 11.10 (35.596 kV rms); Mehta, ex.
// 11.12 (57.75 kV rms); Ray, ex. 6.3 (1 and 1.75 cm, 62.78 kV).
func TestGradePublished(t *testing.T) {
	for name, row := range map[string]struct {
		r, R       float64
		plies      []solid.Ply
		thick      []float64
		v, perPeak float64
	}{
		"Abdel-Salam 12.1": {2, 5, []solid.Ply{{6, 40 * kVcm}, {4, 25 * kVcm}}, []float64{2.8, 0.2}, 52.99, math.Sqrt2},
		"Gupta 11.9":       {0.5, 2.5, []solid.Ply{{4, 60 * kVcm}, {2.5, 50 * kVcm}}, []float64{0.46, 1.54}, 46.32, math.Sqrt2},
		"Gupta 11.10":      {1, 2.5, []solid.Ply{{5, 40 * kVcm}, {4, 40 * kVcm}, {3, 40 * kVcm}}, nil, 35.596, math.Sqrt2},
		"Mehta 11.12":      {1, 4, []solid.Ply{{5, 40 * kVcm}, {4, 40 * kVcm}, {3, 40 * kVcm}}, nil, 57.75, math.Sqrt2},
		"Ray 6.3":          {1.5, 4.25, []solid.Ply{{5, 30 * kVcm}, {3, 30 * kVcm}}, []float64{1, 1.75}, 62.78, 1},
	} {
		w, err := solid.Grade(quantity.Length(row.r*cm), quantity.Length(row.R*cm), row.plies)
		if err != nil {
			t.Fatalf("%s: %v", name, err)
		}
		var limits []quantity.Field
		for i, p := range row.plies {
			limits = append(limits, p.Limit)
			if row.thick != nil {
				near(t, name, float64(w.Layers[i].Thickness), row.thick[i]*cm, 1e-9)
			}
		}
		v, _, err := w.Withstand(limits, solid.Switched)
		if err != nil {
			t.Fatal(err)
		}
		near(t, name, float64(v)/row.perPeak, row.v*kV, 2e-4)
		for i, e := range fields(t, w, float64(v)) {
			near(t, name+" limit", float64(e), float64(row.plies[i].Limit), 1e-9)
		}
	}
}

// Abdel-Salam et al., ex. 12.1: the inner layer takes 70.04 kV, the outer 4.899 (their words
// are swapped in the companion).
func TestVoltagesOfGradedLayersPublished(t *testing.T) {
	w, _ := solid.Grade(2*cm, 5*cm, []solid.Ply{{6, 40 * kVcm}, {4, 25 * kVcm}})
	v, err := w.Voltages(74.94*kV, solid.Switched)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "inner", float64(v[0]), 70.04*kV, 2e-4)
	near(t, "outer", float64(v[1]), 4.899*kV, 2e-4)
}

// Ungraded: 39.2 kV (Mehta, ex. 11.12) and 46.87 kV (Ray, ex. 6.3).
func TestGradingGains(t *testing.T) {
	for _, row := range []struct{ r, R, e, want, perPeak float64 }{{1, 4, 40, 39.21, math.Sqrt2}, {1.5, 4.25, 30, 46.87, 1}} {
		v, _, err := coax(quantity.Length(row.r*cm), quantity.Length(row.R*cm)).Withstand([]quantity.Field{quantity.Field(row.e * kVcm)}, solid.Switched)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "ungraded", float64(v)/row.perPeak, row.want*kV, 3e-4)
	}
}

// Fields of given layers. Gönen, ex. 5.2: 11.2 kV/cm at the conductor; Gupta, ex. 11.11:
// 62.97, 25.19 and 15.11 kV/cm at the sheath.
func TestFieldsOfLayersPublished(t *testing.T) {
	w := solid.Wall{InnerRadius: 1 * cm, Layers: []solid.Layer{{Thickness: 2 * cm, Permittivity: 4}, {Thickness: 2 * cm, Permittivity: 3}}}
	near(t, "Gönen", float64(fields(t, w, 19.94*kV)[0]), 11.2*kVcm, 1e-3)
	w = solid.Wall{InnerRadius: 0.5 * cm, Layers: []solid.Layer{{Thickness: 1 * cm, Permittivity: 3}, {Thickness: 1 * cm, Permittivity: 2.5}}}
	e := fields(t, w, 66*kV*math.Sqrt2/math.Sqrt(3))
	near(t, "Gupta inner", float64(e[0]), 62.97*kVcm, 1e-3)
	near(t, "Gupta outer", float64(e[1]), 25.19*kVcm, 1e-3)
	near(t, "Gupta sheath", float64(e[1])*1.5/2.5, 15.11*kVcm, 1e-3)
}

// Abdel-Salam et al., ex. 12.10: 51.49 kV/cm agrees; the companion's 38.69 drops a radius and
// breaks the flux between the layers, which gives 32.18. A trap.
func TestFieldOfTheOuterLayerKeepsTheFlux(t *testing.T) {
	w := solid.Wall{InnerRadius: 1 * cm, Layers: []solid.Layer{{Thickness: 1 * cm, Permittivity: 4.5}, {Thickness: 0.65 * cm, Permittivity: 3.6}}}
	e := fields(t, w, 53.8*kV)
	near(t, "inner", float64(e[0]), 51.49*kVcm, 2e-4)
	near(t, "outer", float64(e[1]), 32.18*kVcm, 2e-4)
	near(t, "flux", 4.5*float64(e[0])*1, 3.6*float64(e[1])*2, 1e-12)
	if math.Abs(float64(e[1])/(38.69*kVcm)-1) < 0.1 {
		t.Error("the companion's slip was met")
	}
}

// Intersheaths: Ray, ex. 6.4, 44.9 kV without a sheath and 68.65 with one (whose place was
// not read: two sections used to 40 kV/cm reach at most 69.4). Abdel-Salam et al., ex. 12.8: 55.3 kV/cm without sheaths; the companion's 52.52 multiplies
// by the logarithm, a trap; with two sheaths 38.59 (Mehta, ex. 11.16, rounds to 39).
func TestIntersheathsPublished(t *testing.T) {
	section := func(r, R float64) float64 {
		v, _, err := coax(quantity.Length(r*cm), quantity.Length(R*cm)).Withstand([]quantity.Field{40 * kVcm}, solid.Switched)
		if err != nil {
			t.Fatal(err)
		}
		return float64(v)
	}
	near(t, "without", section(0.75, 3.35), 44.9*kV, 1e-3)
	most := 0.0
	for r := 0.76; r < 3.2; r += 0.01 {
		most = math.Max(most, section(0.75, r)+section(r+0.1, 3.35))
	}
	if most < 68.65*kV || most > 1.02*68.65*kV {
		t.Errorf("one sheath 1 mm thick gains up to %.4g V, published 68.65 kV", most)
	}

	phase := 66 * kV * math.Sqrt2 / math.Sqrt(3)
	e := float64(fields(t, coax(1*cm, 2.65*cm), phase)[0])
	near(t, "without sheaths", e, 55.3*kVcm, 1e-3)
	if math.Abs(e/(52.52*kVcm)-1) < 0.03 {
		t.Error("the companion's slip was met")
	}
	alpha := math.Cbrt(2.65)
	shares := 1 + alpha + alpha*alpha
	inner := float64(fields(t, coax(1*cm, quantity.Length(alpha*cm)), phase/shares)[0])
	near(t, "with two sheaths", inner, 38.59*kVcm, 1e-3)
	outer := float64(fields(t, coax(quantity.Length(alpha*alpha*cm), 2.65*cm), phase*alpha*alpha/shares)[0])
	near(t, "every section alike", outer, inner, 1e-9)
}

func TestCableLacks(t *testing.T) {
	_, err := solid.CoaxialCapacitance(0, 1, 2)
	lacks(t, "no permittivity", err, lack.Missing)
	_, err = solid.CoaxialCapacitance(2, 2, 1)
	lacks(t, "inside out", err, lack.Outside)
	_, err = solid.RadialResistance(1, 0, 1, 1)
	lacks(t, "no radius", err, lack.Missing)
	_, err = solid.LeakageResistance(1e-9, 90, 100, 1)
	lacks(t, "a leak that charges", err, lack.Outside)
	_, err = solid.OuterRadius(1, 0, 1)
	lacks(t, "no limit", err, lack.Missing)
	_, _, err = solid.BestConductor(0, 1)
	lacks(t, "no voltage", err, lack.Missing)
	_, err = solid.Grade(1*cm, 5*cm, []solid.Ply{{3, 40 * kVcm}, {5, 40 * kVcm}})
	lacks(t, "plies in the wrong order", err, lack.Outside)
	_, err = solid.Grade(1*cm, 1.2*cm, []solid.Ply{{5, 40 * kVcm}, {3, 40 * kVcm}})
	lacks(t, "no room", err, lack.Outside)
	_, err = solid.Grade(1*cm, 5*cm, []solid.Ply{{5, 0}, {3, 40 * kVcm}})
	lacks(t, "no limit", err, lack.Missing)
}
