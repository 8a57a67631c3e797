package shape_test

import (
	"fmt"
	"math"
	"testing"

	"kilovet/hv/chance"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/shape"

	"gonum.org/v1/gonum/integrate/quad"
	"pgregory.net/rapid"
)

// of builds a line of a kind with its sharpest radius and gap.
func of(t testing.TB, k gap.Kind, r, d quantity.Length, symmetric bool) shape.Line {
	t.Helper()
	s := shape.WithGap(gap.Shape{Kind: k, Symmetric: symmetric}.WithSharpest(r), d)
	l, err := shape.Of(s, d)
	if err != nil {
		t.Fatalf("%s r %v d %v: %v", k, r, d, err)
	}
	return l
}

// all are the arrangements, the symmetric spheres apart.
var all = []struct {
	kind      gap.Kind
	symmetric bool
}{
	{gap.Plates, false}, {gap.Coaxial, false}, {gap.ConcentricSpheres, false}, {gap.SpherePlane, false},
	{gap.SphereSphere, true}, {gap.SphereSphere, false}, {gap.CylinderPlane, false},
	{gap.ParallelCylinders, false}, {gap.PointPlane, false}, {gap.RoundedEdge, false},
}

func ExampleOf() {
	pin := gap.Shape{Kind: gap.Coaxial, InnerRadius: 3e-3, OuterRadius: 63e-3}
	l, err := shape.Of(pin, 60e-3)
	if err != nil {
		panic(err)
	}
	fmt.Println(quantity.Text(l.Peak(20e3)), "with a utilisation of", quantity.Text(l.Utilisation()))
	// Output: 2.19 MV/m with a utilisation of 15.22 %
}

// Utilisation factors against p = (r + d)/r, an independent computation with image
// series and closed forms, four digits.
func TestUtilisationFactors(t *testing.T) {
	columns := []int{1, 2, 4, 5, 3, 7, 6, 8}
	for _, row := range [][]float64{
		{1.1, 0.9531, 0.9091, 0.9675, 0.9675, 0.9367, 0.9837, 0.9679, 0.9382},
		{1.25, 0.8926, 0.8, 0.9219, 0.9202, 0.8528, 0.9603, 0.9242, 0.8608},
		{1.5, 0.8109, 0.6667, 0.8528, 0.834, 0.7358, 0.9242, 0.8608, 0.7603},
		{2, 0.6931, 0.5, 0.7358, 0.6592, 0.5649, 0.8608, 0.7603, 0.6232},
		{3, 0.5493, 0.3333, 0.5649, 0.4276, 0.3735, 0.7603, 0.6232, 0.4679},
		{5, 0.4024, 0.2, 0.3735, 0.238, 0.2172, 0.6232, 0.4679, 0.3228},
		{10, 0.2558, 0.1, 0.1963, 0.1099, 0.1047, 0.4418, 0.3008, 0.1917},
		{20, 0.1577, 0.05, 0.0995, 0.0525, 0.0512, 0.2911, 0.1846, 0.1117},
		{100, 0.0465, 0.01, 0.02, 0.0101, 0.01, 0.0914, 0.053, 0.0301},
	} {
		// all[1:9] in the order of the table: coaxial, concentric, spheres symmetric and
		// one earthed, sphere-plane, cylinders, cylinder-plane, hyperboloid.
		for k, i := range columns {
			got := float64(of(t, all[i].kind, 1e-2, quantity.Length(row[0]-1)*1e-2, all[i].symmetric).Utilisation())
			if math.Abs(got-row[k+1]) > 0.51e-4 {
				t.Errorf("%s, p %g: %.6f, table %.4f", all[i].kind, row[0], got, row[k+1])
			}
		}
	}
}

// Schwaiger's factors as handbooks print them (from memory).
func TestRememberedSchwaigerFactors(t *testing.T) {
	for _, c := range []struct {
		kind      gap.Kind
		symmetric bool
		p, want   float64
	}{
		{gap.SpherePlane, false, 1.5, 0.732}, {gap.SpherePlane, false, 2, 0.563}, {gap.SpherePlane, false, 3, 0.372},
		{gap.SpherePlane, false, 5, 0.218}, {gap.SpherePlane, false, 10, 0.105},
		{gap.SphereSphere, true, 2, 0.732}, {gap.SphereSphere, true, 3, 0.563}, {gap.SphereSphere, true, 5, 0.372},
		{gap.SphereSphere, true, 10, 0.197}, {gap.Coaxial, false, 2, 0.693},
		{gap.ParallelCylinders, false, 2, 0.861}, {gap.ParallelCylinders, false, 3, 0.760},
		{gap.ParallelCylinders, false, 5, 0.623}, {gap.ParallelCylinders, false, 10, 0.442},
	} {
		got := float64(of(t, c.kind, 5e-3, quantity.Length(c.p-1)*5e-3, c.symmetric).Utilisation())
		if math.Abs(got/c.want-1) > 0.006 {
			t.Errorf("%s p %g: %.4f, handbook %.3f", c.kind, c.p, got, c.want)
		}
	}
}

// Peak fields for 1 kV in kV/mm, closed forms that an independent finite-element
// solution confirmed to 5e-6 or better; lengths in mm.
func TestPeakFieldsAgainstAnotherSolution(t *testing.T) {
	for _, c := range []struct {
		kind gap.Kind
		r, d quantity.Length
		half bool
		want float64
	}{
		{gap.Coaxial, 2, 8, false, 0.31066746727980593},
		{gap.Coaxial, 0.5, 9.5, false, 0.6676164013906681},
		{gap.ConcentricSpheres, 5, 5, false, 0.4},
		{gap.ConcentricSpheres, 1, 9, false, 1.1111111111111112},
		{gap.SpherePlane, 10, 0.2, false, 5.066845137577394},
		{gap.SpherePlane, 10, 1, false, 1.0675748667564415},
		{gap.SpherePlane, 10, 10, false, 0.17702811946582703},
		{gap.SpherePlane, 10, 40, false, 0.11511097508603416},
		{gap.SpherePlane, 10, 90, false, 0.10612426718756936},
		{gap.SphereSphere, 10, 5, false, 0.2398124636316256},
		{gap.SphereSphere, 10, 5, true, 0.23452286524639238},
		{gap.PointPlane, 10, 10, false, 0.16045563234489546},
		{gap.PointPlane, 1, 10, false, 0.5612952390368798},
		{gap.PointPlane, 0.01, 10, false, 24.124272952187344},
	} {
		got := float64(of(t, c.kind, c.r*1e-3, c.d*1e-3, c.half).Peak(1e3)) / 1e6
		if math.Abs(got/c.want-1) > 1e-11 {
			t.Errorf("%s r %v d %v mm: %.12g kV/mm, want %.12g", c.kind, c.r, c.d, got, c.want)
		}
	}
	// The earthed one of two spheres: the far end of the line.
	l := of(t, gap.SphereSphere, 10e-3, 5e-3, false)
	if got := float64(l.PerVolt(5e-3)) * 1e-3; math.Abs(got/0.2292332668611592-1) > 1e-11 {
		t.Errorf("earthed sphere: %.12g kV/mm for 1 kV, want 0.229233266861", got)
	}
}

// Abdel-Salam et al., High-Voltage Engineering, 2nd ed., ex. 2.5: two spheres of
// 0.25 m, centres 1 m apart. The printed 4.206 V/m for each volt rests on 4πε₀ taken
// as 1.1127e-10 in place of its own value: a trap, off by that very factor.
func TestPrintedSphereFieldIsOffByItsConstant(t *testing.T) {
	got := float64(of(t, gap.SphereSphere, 0.25, 0.5, false).PerVolt(0))
	if math.Abs(got-4.677) > 5e-4 {
		t.Errorf("field %.4f V/m for each volt, image series gives 4.677", got)
	}
	if math.Abs(got/(4.206*1.1127)-1) > 1e-3 {
		t.Errorf("field %.4f is not the printed 4.206 times 1.1127", got)
	}
}

// The field along the line adds up to the voltage.
func TestTheLineCarriesTheWholeVoltage(t *testing.T) {
	chance.Check(t, func(rt *rapid.T) {
		a := rapid.SampledFrom(all).Draw(rt, "arrangement")
		d := math.Pow(10, rapid.Float64Range(-4, -1).Draw(rt, "log gap"))
		ratio := math.Pow(10, rapid.Float64Range(-2, 3).Draw(rt, "log gap/radius"))
		l := of(t, a.kind, quantity.Length(d/ratio), quantity.Length(d), a.symmetric)
		sum := piece(l, 0, float64(l.Trough()), false) + piece(l, float64(l.Trough()), float64(l.Gap()), true)
		if math.Abs(sum-1) > 1e-6 {
			rt.Fatalf("%s d/r %g: the field adds up to %.9f of the voltage", a.kind, ratio, sum)
		}
	})
}

// piece integrates the field from a to b, with points crowded at the end it rises to.
func piece(l shape.Line, a, b float64, atB bool) float64 {
	s := float64(l.Radius()) / 3
	return quad.Fixed(func(u float64) float64 {
		x := s * math.Expm1(u)
		at := a + x
		if atB {
			at = b - x
		}
		return float64(l.PerVolt(quantity.Length(at))) * (s + x)
	}, 0, math.Log1p((b-a)/s), 96, nil, 0)
}

// Far apart the sharper electrode alone counts, close together every shape is plates.
func TestShapesMeetInTheirLimits(t *testing.T) {
	const d = 1e-3
	for _, a := range all[1:] {
		flat := of(t, a.kind, 1000*d, d, a.symmetric)
		if u := float64(flat.Utilisation()); math.Abs(u-1) > 1e-3 {
			t.Errorf("%s with d/r = 0.001: utilisation %.6f, want that of plates", a.kind, u)
		}
	}
	const r = 1e-6 // far apart
	for _, k := range []gap.Kind{gap.SpherePlane, gap.ConcentricSpheres, gap.SphereSphere} {
		if e := float64(of(t, k, r, 1, false).PerVolt(0)) * r; math.Abs(e-1) > 2e-6 {
			t.Errorf("%s, far away: E r/V = %.8f, a lone sphere has 1", k, e)
		}
	}
	point := float64(of(t, gap.PointPlane, r, 1, false).PerVolt(0))
	if want := 2 / (r * math.Log(4/r)); math.Abs(point/want-1) > 1e-5 {
		t.Errorf("fine point: %g, limit 2/(r ln(4d/r)) = %g", point, want)
	}
	wire := float64(of(t, gap.CylinderPlane, r, 1, false).PerVolt(0))
	if want := 1 / (r * math.Log(2/r)); math.Abs(wire/want-1) > 1e-5 {
		t.Errorf("fine wire: %g, limit 1/(r ln(2h/r)) = %g", wire, want)
	}
}

// Two like electrodes at ±V/2 are two gaps to the plane between them, of half the
// voltage and half the gap: the peak is the same.
func TestTwinsAreTwoGapsToAPlane(t *testing.T) {
	for _, c := range []struct{ twins, plane gap.Kind }{
		{gap.SphereSphere, gap.SpherePlane}, {gap.ParallelCylinders, gap.CylinderPlane},
	} {
		twins, plane := of(t, c.twins, 2e-3, 20e-3, true), of(t, c.plane, 2e-3, 10e-3, false)
		if !quantity.Equal(twins.Peak(2e3), plane.Peak(1e3)) {
			t.Errorf("%s %v, %s %v", c.twins, twins.Peak(2e3), c.plane, plane.Peak(1e3))
		}
		if !quantity.Equal(twins.PerVolt(0), twins.PerVolt(20e-3)) || !quantity.Equal(twins.Trough(), 10e-3) {
			t.Errorf("%s is not symmetric", c.twins)
		}
	}
}

// In a fixed outer conductor the peak is least at R/r = e (coaxial) and 2 (spheres),
// where it is V/r and 4V/R: a thinner inner conductor widens the gap and still makes
// it worse past that point, better before it.
func TestBestInnerRadiusInAFixedOuterOne(t *testing.T) {
	const outer = 50e-3
	peak := func(k gap.Kind, ratio float64) float64 {
		s := gap.Shape{Kind: k, InnerRadius: quantity.Length(outer / ratio), OuterRadius: outer}
		l, err := shape.Of(s, 0)
		if err != nil {
			t.Fatal(err)
		}
		return float64(l.PerVolt(0))
	}
	for kind, best := range map[gap.Kind]float64{gap.Coaxial: math.E, gap.ConcentricSpheres: 2} {
		least := peak(kind, best)
		for _, off := range []float64{1.001, 1.1, 3} {
			if peak(kind, best*off) <= least || peak(kind, best*(1-(off-1)/5)) <= least {
				t.Errorf("%s: %g V/m at R/r = %g is not the least", kind, least, best)
			}
		}
	}
	if e := peak(gap.Coaxial, math.E); math.Abs(e*outer/math.E-1) > 1e-12 {
		t.Errorf("coaxial optimum: peak %g, want V/r = %g", e, math.E/outer)
	}
	if e := peak(gap.ConcentricSpheres, 2); math.Abs(e*outer/4-1) > 1e-12 {
		t.Errorf("spherical optimum: peak %g, want 4V/R = %g", e, 4/outer)
	}
}

// At a fixed gap a larger radius lowers the peak; at a fixed radius so does a larger gap.
func TestRounderAndWiderIsMilder(t *testing.T) {
	chance.Check(t, func(rt *rapid.T) {
		a := rapid.SampledFrom(all[1:]).Draw(rt, "arrangement")
		d := math.Pow(10, rapid.Float64Range(-4, 0).Draw(rt, "log gap"))
		r := d / math.Pow(10, rapid.Float64Range(-2, 3).Draw(rt, "log gap/radius"))
		more := rapid.Float64Range(1.01, 3).Draw(rt, "more")
		peak := func(r, d float64) float64 {
			return float64(of(t, a.kind, quantity.Length(r), quantity.Length(d), a.symmetric).PerVolt(0))
		}
		if peak(r*more, d) >= peak(r, d) {
			rt.Fatalf("%s: a larger radius raises the peak", a.kind)
		}
		if peak(r, d*more) >= peak(r, d) {
			rt.Fatalf("%s: a larger gap raises the peak", a.kind)
		}
	})
}

func TestTheEdgeIsABound(t *testing.T) {
	edge, wire := of(t, gap.RoundedEdge, 1e-3, 5e-3, false), of(t, gap.CylinderPlane, 1e-3, 5e-3, false)
	if !edge.Bound() || wire.Bound() || edge.Peak(1) != wire.Peak(1) {
		t.Errorf("edge %v bound %v, wire %v bound %v", edge.Peak(1), edge.Bound(), wire.Peak(1), wire.Bound())
	}
}

func TestSizesThatAreMissingOrContradict(t *testing.T) {
	for name, c := range map[string]struct {
		shape     gap.Shape
		clearance quantity.Length
		kind      lack.Kind
		key       string
	}{
		"no clearance":      {gap.Shape{Kind: gap.Plates}, 0, lack.Missing, "spacing.clearance"},
		"no radius":         {gap.Shape{Kind: gap.SpherePlane}, 1, lack.Missing, "spacing.shape.radius"},
		"no tip":            {gap.Shape{Kind: gap.PointPlane, Radius: 1}, 1, lack.Missing, "spacing.shape.tip_radius"},
		"no edge":           {gap.Shape{Kind: gap.RoundedEdge}, 1, lack.Missing, "spacing.shape.edge_radius"},
		"no inner radius":   {gap.Shape{Kind: gap.Coaxial, OuterRadius: 1}, 1, lack.Missing, "spacing.shape.inner_radius"},
		"no outer radius":   {gap.Shape{Kind: gap.Coaxial, InnerRadius: 1}, 1, lack.Missing, "spacing.shape.outer_radius"},
		"inside out":        {gap.Shape{Kind: gap.Coaxial, InnerRadius: 2, OuterRadius: 1}, 0, lack.Outside, ""},
		"another clearance": {gap.Shape{Kind: gap.Coaxial, InnerRadius: 1, OuterRadius: 2}, 0.9, lack.Outside, ""},
		"unknown kind":      {gap.Shape{Kind: "ring", Radius: 1}, 1, lack.Outside, ""},
		"touching spheres":  {gap.Shape{Kind: gap.SpherePlane, Radius: 1}, 1e-5, lack.Outside, ""},
	} {
		_, err := shape.Of(c.shape, c.clearance)
		l := lack.Of(err)
		if l == nil || l.Kind != c.kind || (c.key != "" && (len(l.Keys) != 1 || l.Keys[0] != c.key)) {
			t.Errorf("%s: %+v", name, l)
		}
	}
}

func BenchmarkSpherePlane(b *testing.B) {
	for b.Loop() {
		if of(b, gap.SpherePlane, 10e-3, 5e-3, false).PerVolt(1e-3) <= 0 {
			b.Fatal("no field")
		}
	}
}
