package beam

import (
	"math"
	"testing"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

type reporter interface {
	Helper()
	Errorf(format string, args ...any)
}

// near fails unless got is within a relative tolerance of want.
func near[Q ~float64](t reporter, what string, got, want Q, tolerance float64) {
	t.Helper()
	if !(math.Abs(float64(got-want)) <= tolerance*math.Abs(float64(want))) {
		t.Errorf("%s: got %.9g, want %.9g within %g", what, got, want, tolerance)
	}
}

// lacking fails unless err is a lack of the kind.
func lacking(t reporter, what string, err error, kind lack.Kind) {
	t.Helper()
	if l := lack.Of(err); l == nil || l.Kind != kind {
		t.Errorf("%s: got %v, want a lack of kind %d", what, err, kind)
	}
}

// at is an electron accelerated by kilovolts.
func at(t interface{ Fatal(...any) }, kilovolts float64) Particle {
	e, err := Accelerated(quantity.Voltage(kilovolts * 1e3))
	if err != nil {
		t.Fatal(err)
	}
	return e
}

// JEOL, glossary of TEM terms, "wavelength of electron", Table 1 (read): kV, V* in
// kV, wavelength in pm, speed in m/s, β; all to the rounding of the table. κ is
// derived. 20, 60, 120 and 300 kV are of the same table without the speed.
var published = []struct{ kV, corrected, picometres, speed, beta, kappa float64 }{
	{1, 1.0010, 38.764, 18728e3, 0.06247, 1.00098},
	{10, 10.098, 12.205, 58455e3, 0.19499, 1.00969},
	{20, 20.391, 8.5885, 0, 0.27187, 1.01919},
	{30, 30.881, 6.9791, 98445e3, 0.32838, 1.02852},
	{40, 41.566, 6.0155, 112140e3, 0.37406, 1.03766},
	{60, 63.523, 4.8661, 0, 0.44622, 1.05545},
	{80, 86.262, 4.1757, 150620e3, 0.50240, 1.07260},
	{100, 109.78, 3.7014, 164350e3, 0.54822, 1.08913},
	{120, 134.09, 3.3492, 0, 0.58667, 1.10508},
	{160, 185.05, 2.8510, 194300e3, 0.64811, 1.13536},
	{200, 239.14, 2.5079, 208450e3, 0.69531, 1.16367},
	{300, 388.06, 1.9687, 0, 0.77653, 1.22693},
	{400, 556.56, 1.6439, 248190e3, 0.82787, 1.281294},
	{500, 744.62, 1.4213, 258680e3, 0.86286, 1.328516},
	{1000, 1978.5, 0.87192, 282130e3, 0.94108, 1.49456},
	{1250, 2778.9, 0.73571, 286890e3, 0.95697, 1.550177},
}

func TestRelativisticTable(t *testing.T) {
	for _, row := range published {
		e := at(t, row.kV)
		near(t, "V*", float64(e.Corrected()), row.corrected*1e3, 6e-5)
		near(t, "wavelength", float64(e.Wavelength()), row.picometres*1e-12, 6e-5)
		near(t, "beta", e.Beta(), row.beta, 6e-5)
		near(t, "kappa", e.Kappa(), row.kappa, 6e-6)
		if row.speed > 0 {
			near(t, "speed", e.Speed(), row.speed, 6e-5)
		}
	}
}

// Queen Mary University of London, exercise on LEED (read): 20 eV, about 2.7 Å.
// Homework text after Williams and Carter (read): 200 kV, 0.00251 nm.
func TestFurtherWavelengths(t *testing.T) {
	near(t, "20 eV", float64(at(t, 0.02).Wavelength()), 2.7e-10, 0.02)
	near(t, "20 eV, without relativity", float64(at(t, 0.02).Wavelength()), 2.742372e-10, 1.1e-5)
	near(t, "200 kV", float64(at(t, 200).Wavelength()), 2.51e-12, 1e-3)
}

// Two errors in print (Czech Academy of Sciences, course text 1.3, read): a
// non-relativistic 7.08 pm at 30 kV, and 2.42 pm at 500 kV.
func TestPrintedWavelengthsThatAreWrong(t *testing.T) {
	for kV, wrong := range map[float64]float64{30: 7.08e-12, 500: 2.42e-12} {
		if got := float64(at(t, kV).Wavelength()); math.Abs(got/wrong-1) < 0.01 {
			t.Errorf("%v kV: %v m is the printed error", kV, got)
		}
	}
	for kV, right := range map[float64]float64{80: 4.18e-12, 90: 3.92e-12, 110: 3.51e-12, 1000: 0.87e-12, 3000: 0.36e-12} {
		near(t, "the same table's right rows", float64(at(t, kV).Wavelength()), right, 0.01)
	}
}

func TestRelativisticIdentities(t *testing.T) {
	for _, row := range published {
		e := at(t, row.kV)
		g := e.Gamma()
		near(t, "κ = 2γ/(1+γ)", e.Kappa(), (1+e.energy/restEnergy)/(1+e.energy/(2*restEnergy)), 1e-12)
		near(t, "β = √(1−1/γ²)", e.Beta(), math.Sqrt(1-1/g/g), 1e-9)
		up, down := at(t, row.kV*1.0001), at(t, row.kV*0.9999)
		near(t, "κ = d ln V*/d ln V", math.Log(float64(up.Corrected()/down.Corrected()))/math.Log(1.0001/0.9999), e.Kappa(), 1e-7)
	}
	near(t, "rest energy (CODATA)", restEnergy, 510998.950, 1e-9)
	near(t, "λ√V* = 1.2264260 nm", float64(at(t, 1).Wavelength())*math.Sqrt(float64(at(t, 1).Corrected())), 1.2264260e-9, 1e-7)
	for _, v := range []quantity.Voltage{0, -1, quantity.Voltage(math.NaN()), quantity.Voltage(math.Inf(1))} {
		_, err := Accelerated(v)
		lacking(t, "no voltage", err, lack.Outside)
	}
}
