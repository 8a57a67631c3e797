package beam

import (
	"math"
	"testing"
)

// At its own angle a spot has its own terms; what rises and falls with the angle does so
// by its power.
func TestTermsOverTheAngle(t *testing.T) {
	e, o, source, d := reviewed(t)
	s, err := Compute(e, o, source, d)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "own angle", float64(s.AtAngle(o.Angle).BarthKruit()), float64(s.TotalFW50), 1e-12)
	twice := s.AtAngle(2 * o.Angle)
	near(t, "spherical", float64(twice.Spherical), 8*float64(s.Terms.Spherical), 1e-12)
	near(t, "chromatic", float64(twice.Chromatic), 2*float64(s.Terms.Chromatic), 1e-12)
	near(t, "diffraction", float64(twice.Diffraction), float64(s.Terms.Diffraction)/2, 1e-12)
	angles := Angles(50, 1e-3, 2e-3)
	near(t, "from", float64(angles[0]), 2e-4, 1e-12)
	near(t, "to", float64(angles[49]), 1e-2, 1e-12)
}

// The density of a Gaussian is exp(−x²/2)/√(2π); what it sums to is all but the ends.
func TestDensityOfAGaussian(t *testing.T) {
	sum, all := 0.0, gaussian(t, 2).Densities(200)
	for i, p := range all {
		x := float64(p.Energy) / 2
		if want := math.Exp(-x*x/2) / math.Sqrt(2*math.Pi) / 2; math.Abs(p.Share-want) > 2e-3*want+1e-6 {
			t.Errorf("at %v: %v, want %v", x, p.Share, want)
		}
		if i > 0 {
			sum += p.Share * float64(p.Energy-all[i-1].Energy)
		}
	}
	near(t, "sum", sum, 0.998, 2e-3)
	if Densities := (Distribution{}).Densities(10); Densities != nil {
		t.Error("no width has a density")
	}
}
