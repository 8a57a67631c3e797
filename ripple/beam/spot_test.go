package beam

import (
	"fmt"
	"math"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

func ExampleCompute() {
	electron, _ := Accelerated(20e3)
	source, _ := GaussianFWHM(1.5)
	ripple, _ := Disturb(Line{"ripple", 38e3, 1.5, Sine()})
	optics := Optics{Chromatic: 9e-3, Spherical: 25e-3, Angle: 5e-3, SourceImage: 4e-9}
	spot, _ := Compute(electron, optics, source, ripple)
	allowed, _ := spot.RippleAllowed(5.5e-9)
	fmt.Printf("source %s, ripple %s, together %s\n", quantity.Text(spot.BlurChromaticFW50), quantity.Text(spot.BlurRippleFW50), quantity.Text(spot.Terms.Chromatic))
	fmt.Printf("spot %s, %s without ripple; %s allowed for 5.5 nm\n", quantity.Text(spot.TotalFW50), quantity.Text(spot.TotalWithoutRippleFW50), quantity.Text(allowed))
	// Output:
	// source 1.184 nm, ripple 2.779 nm, together 2.704 nm
	// spot 5.22 nm, 4.619 nm without ripple; 3.576 V allowed for 5.5 nm
}

// A spot of hand-made parts: every figure follows from its own formula.
func TestSpotIsTheSumOfItsTerms(t *testing.T) {
	e, o, source, d := reviewed(t)
	s, err := Compute(e, o, source, d)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "source", float64(s.BlurChromaticFW50), 0.344174*9e-3*5e-3*e.Kappa()*1.5/20e3, 1e-5)
	near(t, "spherical", float64(s.Terms.Spherical), 0.1767767*25e-3*125e-9, 1e-6)
	near(t, "diffraction", float64(s.Terms.Diffraction), 0.534832*8.5885e-12/5e-3, 6e-5)
	near(t, "width in, width out", float64(s.WidthSourceFW50), 1.5*1.3489795/2.35482, 1e-5)
	near(t, "total", float64(s.TotalFW50), float64(Terms{4e-9, s.Terms.Diffraction, s.Terms.Spherical, o.ChromaticFW50(e, Convolve(source, d.Energies))}.BarthKruit()), 1e-12)
	if !(s.Terms.Chromatic > s.BlurChromaticFW50 && s.Terms.Chromatic < s.BlurChromaticFW50+s.BlurRippleFW50) {
		t.Error("both together lie between one and the sum")
	}
}

func TestLimitsOfASpot(t *testing.T) {
	e, o, source, d := reviewed(t)
	quiet, _ := Compute(e, o, source, Disturbance{})
	if quiet.BlurRippleFW50 != 0 || quiet.TotalFW50 != quiet.TotalWithoutRippleFW50 || quiet.Shares().Ripple != 0 {
		t.Errorf("no ripple: %+v", quiet)
	}
	sharp, _ := Compute(e, o, Distribution{}, d)
	near(t, "ripple alone", float64(sharp.Terms.Chromatic), float64(sharp.BlurRippleFW50), 1e-12)
	o.Chromatic = 0
	perfect, _ := Compute(e, o, source, d)
	near(t, "no chromatic aberration", float64(perfect.TotalFW50), float64(perfect.TotalWithoutRippleFW50), 1e-12)
}

func TestShares(t *testing.T) {
	e, o, source, d := reviewed(t)
	s, _ := Compute(e, o, source, d)
	shares := s.Shares()
	near(t, "ripple", float64(shares.Ripple), 1-math.Pow(float64(s.TotalWithoutRippleFW50/s.TotalFW50), 2), 1e-12)
	near(t, "chromatic", float64(shares.Chromatic), math.Pow(float64(s.Terms.Chromatic/s.TotalFW50), 2), 1e-12)
	only := Spot{Terms: Terms{Spherical: 1}, TotalFW50: 1}
	if got := only.Shares(); got.Spherical != 1 || got.Diffraction != 0 {
		t.Errorf("one cause alone: %+v", got)
	}
	if (Spot{}).Shares() != (Shares{}) {
		t.Error("no spot, no shares")
	}
}

// Put back into the spot, the ripple allowed gives the allowance to 1e-6.
func TestRippleAllowedMeetsTheAllowance(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		e := at(t, rapid.Float64Range(0.5, 300).Draw(t, "kV"))
		o := Optics{Chromatic: 9e-3, Spherical: 25e-3, Angle: quantity.Angle(rapid.Float64Range(1e-3, 20e-3).Draw(t, "angle")), SourceImage: 1e-9}
		source := []Distribution{{}, gaussian(t, 0.6), thermal(t).Scaled(0.23)}[rapid.IntRange(0, 2).Draw(t, "source")]
		d := Disturbance{PeakToPeak: 1, Energies: Convolve(anyLines(t)...)}
		s, err := Compute(e, o, source, d)
		if err != nil {
			t.Fatal(err)
		}
		allowance := s.TotalWithoutRippleFW50 * quantity.Length(1+math.Pow(10, rapid.Float64Range(-3, 2).Draw(t, "log room")))
		volts, err := s.RippleAllowed(allowance)
		if err != nil {
			t.Fatal(err)
		}
		d.Energies = d.Energies.Scaled(float64(volts / d.PeakToPeak))
		s, _ = Compute(e, o, source, d)
		near(t, "the allowance", float64(s.TotalFW50), float64(allowance), 1e-6)
	})
}

// Derived: for a sine alone Vpp = d E/(0.404 Cc a κ).
func TestRippleAllowedOfASineAlone(t *testing.T) {
	e, o := at(t, 20), Optics{Chromatic: 10e-3, Angle: 5e-3}
	d, _ := Disturb(Line{"sine", 50, 7, Sine()})
	s, err := Compute(e, o, Distribution{}, d)
	if err != nil {
		t.Fatal(err)
	}
	disc := 3e-9
	allowance := quantity.Length(math.Hypot(disc, float64(s.Terms.Diffraction)))
	volts, err := s.RippleAllowed(allowance)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "peak to peak", float64(volts), disc*20e3/(0.4039728*10e-3*5e-3*e.Kappa()), 1e-5)
}

func TestRippleAllowedLacks(t *testing.T) {
	e, o, source, d := reviewed(t)
	s, _ := Compute(e, o, source, d)
	_, err := s.RippleAllowed(s.TotalWithoutRippleFW50 * 0.99)
	lacking(t, "too wide without ripple", err, lack.NotReached)
	volts, err := s.RippleAllowed(s.TotalWithoutRippleFW50)
	if err != nil || volts != 0 {
		t.Errorf("just met without ripple: %v, %v", volts, err)
	}
	quiet, _ := Compute(e, o, source, Disturbance{})
	_, err = quiet.RippleAllowed(1e-6)
	lacking(t, "nothing to scale", err, lack.NotReached)
	o.Chromatic = 0
	perfect, _ := Compute(e, o, source, d)
	_, err = perfect.RippleAllowed(1e-6)
	lacking(t, "nothing blurs", err, lack.NotReached)
}

// More room allows more ripple; a wider source leaves less.
func TestRippleAllowedIsMonotonous(t *testing.T) {
	e, o, source, d := reviewed(t)
	s, _ := Compute(e, o, source, d)
	last := quantity.Voltage(0)
	for k := 1.01; k < 20; k *= 1.3 {
		volts, err := s.RippleAllowed(s.TotalFW50 * quantity.Length(k))
		if err != nil || volts <= last {
			t.Fatalf("room %v: %v after %v, %v", k, volts, last, err)
		}
		last = volts
	}
	wide, _ := Compute(e, o, source.Scaled(2), d)
	allowance := wide.TotalFW50 * 1.5
	narrow, _ := s.RippleAllowed(allowance)
	less, err := wide.RippleAllowed(allowance)
	if err != nil || less >= narrow {
		t.Errorf("wider source: %v of %v, %v", less, narrow, err)
	}
}
