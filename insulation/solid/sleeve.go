package solid

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Sleeve is a conductor through an insulating sleeve in the hole of an earthed plate,
// with an annulus of gas or vacuum within the sleeve, around it, or both.
type Sleeve struct {
	Conductor    quantity.Length // radius
	Bore         quantity.Length // inner radius of the sleeve
	Outside      quantity.Length // its outer radius
	Hole         quantity.Length // radius of the hole; zero: the sleeve fills it
	Permittivity float64         // of the sleeve
	Resistivity  quantity.Resistivity
}

// Inner is the annulus between conductor and bore.
func (s Sleeve) Inner() Slit { return Slit{sleeve: s, From: s.Conductor, To: s.Bore} }

// Outer is the annulus between sleeve and hole.
func (s Sleeve) Outer() Slit { return Slit{sleeve: s, From: s.Outside, To: s.hole()} }

func (s Sleeve) hole() quantity.Length {
	if s.Hole == 0 {
		return s.Outside
	}
	return s.Hole
}

// complete refuses radii that do not grow; an annulus may be closed.
func (s Sleeve) complete() error {
	if !(s.Conductor > 0 && s.Bore >= s.Conductor && s.Outside > s.Bore && s.hole() >= s.Outside) {
		return lack.Because("conductor, bore, outside of the sleeve and hole are not growing radii")
	}
	return nil
}

// open are the logarithms of the radii of both annuli, zero where one is closed, and
// that of the sleeve.
func (s Sleeve) extents() (inner, wall, outer float64) {
	return math.Log(float64(s.Bore / s.Conductor)), math.Log(float64(s.Outside / s.Bore)), math.Log(float64(s.hole() / s.Outside))
}

// Shares are the parts of the voltage on inner annulus, sleeve and outer annulus.
// Switched, by permittivity: most on the annuli, whose own is 1. Settled: nothing on the
// sleeve, since none insulates as a dry gas or a vacuum does; its charges wander until
// its field is gone, and as none leave it the annuli share as capacitors in series.
// Without an annulus all is on the sleeve.
func (s Sleeve) Shares(how Sharing) (inner, wall, outer quantity.Fraction, err error) {
	if err := s.complete(); err != nil {
		return 0, 0, 0, err
	}
	a, w, b := s.extents()
	closed := a+b == 0
	switch {
	case closed:
		return 0, 1, 0, nil
	case how == Settled:
		w = 0
	case s.Permittivity < 1:
		return 0, 0, 0, lack.Because("the relative permittivity of the sleeve is not given, 1 or more")
	default:
		w /= s.Permittivity
	}
	sum := a + w + b
	return quantity.Fraction(a / sum), quantity.Fraction(w / sum), quantity.Fraction(b / sum), nil // electrostatics
}

// Settling is the time constant with which the voltage leaves the sleeve for its annuli,
// (C + C₁)/G, C₁ the annuli in series: ρ ε₀ (ε + ln(sleeve)/ln(annuli)). Without an
// annulus nothing moves, a lack.
func (s Sleeve) Settling() (quantity.Time, error) {
	if err := s.complete(); err != nil {
		return 0, err
	}
	a, w, b := s.extents()
	switch {
	case a+b == 0:
		return 0, lack.Range("a sleeve without an annulus has one layer only")
	case s.Permittivity < 1:
		return 0, lack.Because("the relative permittivity of the sleeve is not given, 1 or more")
	case s.Resistivity <= 0:
		return 0, lack.Because("the resistivity of the sleeve is not given: when DC settles is not known")
	}
	return quantity.Time(float64(s.Resistivity) * vacuumPermittivity * (s.Permittivity + w/(a+b))), nil // Maxwell and Wagner
}
