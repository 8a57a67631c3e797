package gas

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/shape"
	"kilovet/insulation/solve"

	"gonum.org/v1/gonum/integrate/quad"
)

// FinestRadius is the radius, times density, under which no field law of a rounded electrode
// is trusted: the surface's own roughness decides.
const FinestRadius quantity.Length = 10e-6

// Onset is the voltage at which an avalanche along the critical line grows to a
// streamer: ∫ α/K dx = 1 (Raether, Meek) over the parts of the line where the field is
// above the critical one. Where the other electrode is curved too, its part counts in
// full unless the field between falls under 0.15 of the peak, and fades out to 0.015 of
// it: electrodes far apart start alone. That choice of this project keeps the onset
// rising with the radius. Radii under 10 µm and fields past the end of the fit are a lack.
func (i Ionisation) Onset(l shape.Line, density quantity.Fraction) (quantity.Voltage, error) {
	if r := quantity.Length(density) * l.Radius(); r < FinestRadius {
		return 0, lack.Range("no onset is known for radii under 10 µm at normal density, asked for %s", quantity.Text(r))
	}
	track := i.along(l, density)
	low := float64(track.critical) / track.peak // the field at the electrode is the critical one
	high, err := solve.Above(2*low, 1e6*low, track.surplus)
	if err != nil {
		return 0, err
	}
	v, err := solve.Rise(low, high, track.surplus)
	if err != nil {
		return 0, err
	}
	if e := quantity.Field(v * track.peak); e > track.most {
		return 0, lack.Range("the onset field %s lies past the end of %s", quantity.Text(e), i.Source.Text)
	}
	return quantity.Voltage(v), nil
}

// Growth is the streamer integral ∫ α/K dx along a critical line at a voltage, 1 where an
// avalanche grows to a streamer.
func (i Ionisation) Growth(l shape.Line, density quantity.Fraction, v quantity.Voltage) (float64, error) {
	return i.along(l, density).growth(float64(v))
}

// track is a critical line in a gas of some density.
type track struct {
	Ionisation
	line    shape.Line
	density float64
	peak    float64 // greatest field on the line for one volt
	end     float64 // of the line
	trough  float64
	other   float64 // how far the growth at the other electrode counts, 0 to 1
}

func (i Ionisation) along(l shape.Line, density quantity.Fraction) track {
	t := track{Ionisation: i, line: l, density: float64(density), peak: math.Max(float64(l.PerVolt(0)), float64(l.PerVolt(l.Gap()))), end: float64(l.Gap()), trough: float64(l.Trough())}
	t.critical *= quantity.Field(density)
	t.most *= quantity.Field(density)
	if t.trough < t.end {
		t.other = fade(float64(l.PerVolt(l.Trough())) / t.peak)
	}
	return t
}

// fade runs smoothly from 0 at 0.015 to 1 at 0.15.
func fade(ratio float64) float64 {
	x := math.Min(math.Max((ratio-0.015)/(0.15-0.015), 0), 1)
	return x * x * (3 - 2*x)
}

// surplus is the growth of the avalanche at a voltage, less what a streamer needs; as
// its square root where the rate is quadratic, so that it is nearly straight.
func (t track) surplus(v float64) (float64, error) {
	g, err := t.growth(v)
	if t.straight {
		return g - 1, err
	}
	return math.Sqrt(g) - 1, err
}

// growth is ∫ α/K dx from the stressed electrode, with that from the other.
func (t track) growth(v float64) (float64, error) {
	near, err := t.reach(v, 0, t.trough)
	if err != nil || t.other == 0 {
		return t.integral(v, 0, near), err
	}
	far, err := t.reach(v, t.end, t.end-t.trough)
	return t.integral(v, 0, near) + t.other*t.integral(v, t.end, far), err
}

// field is that at a distance x from the end of the line at from, 0 or its length.
func (t track) field(v, from, x float64) float64 {
	return v * float64(t.line.PerVolt(quantity.Length(math.Abs(from-x))))
}

// reach is how far from an end of the line, at most length, the field is above the
// critical one.
func (t track) reach(v, from, length float64) (float64, error) {
	critical := float64(t.critical)
	s := float64(t.line.Radius())
	place := func(u float64) float64 { return s * math.Expm1(u-1) } // u from 1: Rise wants no zero
	top := 1 + math.Log1p(length/s)
	if t.field(v, from, place(top)) >= critical { // not at length, from which rounding parts it
		return length, nil
	}
	if t.field(v, from, 0) <= critical {
		return 0, nil
	}
	u, err := solve.Rise(1, top, func(u float64) (float64, error) {
		return math.Log(critical / t.field(v, from, place(u))), nil
	})
	return place(u), err
}

// integral is ∫ α/K dx over a length from an end of the line, with points crowded
// there: x = s (eᵘ − 1).
func (t track) integral(v, from, length float64) float64 {
	s := float64(t.line.Radius())
	top, sum := math.Log1p(length/s), 0.0
	for k, node := range nodes {
		x := s * math.Expm1(node*top)
		e := t.field(v, from, x) / t.density
		sum += weights[k] * (s + x) * t.rate(quantity.Field(e))
	}
	return sum * top * t.density
}

// nodes and weights are those of Gauss and Legendre on 0…1.
var nodes, weights = func() (x, w [16]float64) {
	quad.Legendre{}.FixedLocations(x[:], w[:], 0, 1)
	return x, w
}()
