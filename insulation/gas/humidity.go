package gas

import (
	"fmt"
	"math"

	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

const gramPerCubicMetre quantity.Humidity = 1e-3

// moisture is a humidity factor 1 + slope x + bend x², x = h/δ − reference, h in g/m³. Moist
// air is stronger; more than the reference gets no credit, and drier than 1 g/m³, where the
// data end, counts as that.
type moisture struct {
	slope, bend, reference float64
	source                 gap.Source
}

var (
	// ofUniform is that of sphere gaps, IEC 60052: the reference read, the slope from memory.
	ofUniform = moisture{0.002, 0, 8.5, gap.Source{Text: "IEC 60052, humidity 1 + 0.002 (h/δ − 8.5)", Mark: gap.Memory}}
	// ofSharp is that of DC, IEC 60060-1, for h/δ of 1 to 15 g/m³, to the power w that is at
	// most 1. Its linear part alone is that of IEC 60052 for rods, which takes off less.
	ofSharp = moisture{0.014, -0.00022, 11, gap.Source{Text: "IEC 60060-1, DC, humidity 1 + 0.014 x − 0.00022 x², x = h/δ − 11, to the power 1", Mark: gap.Memory}}
)

// factor is the humidity factor of the air.
func (m moisture) factor(s State) float64 {
	h := float64(*s.Humidity/gramPerCubicMetre) / float64(s.Density())
	x := min(max(h, 1), m.reference) - m.reference
	return 1 + m.slope*x + m.bend*x*x
}

// matters reports whether the humidity of the air is known.
func matters(s State) bool { return s.Humidity != nil && s.Gas == gap.AirGas }

// applied multiplies an answer by the factor where the humidity of the air is known.
func (m moisture) applied(s State, a gap.Answer[quantity.Voltage]) gap.Answer[quantity.Voltage] {
	if !matters(s) {
		return a
	}
	factor := quantity.Voltage(m.factor(s))
	a.Value *= factor
	a.Sources = append(a.Sources, m.source)
	for i := range a.Shown {
		a.Shown[i].Value *= factor
	}
	return a
}

// sharpened is ofSharp on the breakdown of sharp electrodes a distance apart. The power w of
// IEC 60060-1 falls to nothing where streamers fill little of the gap or the gap is short;
// its largest, 1, judges, and what w gives is shown.
func sharpened(s State, d quantity.Length, a gap.Answer[quantity.Voltage]) gap.Answer[quantity.Voltage] {
	if !matters(s) {
		return a
	}
	k := ofSharp.factor(s)
	g := streamerPart(a.Value, d, s.Density(), k)
	w := HumidityExponent(g)
	beside := gap.Beside[quantity.Voltage]{
		Value:  a.Value * quantity.Voltage(math.Pow(k, w)),
		Source: gap.Source{Text: fmt.Sprintf("IEC 60060-1, the same to the power w = %.2g at g = %.3g", w, g), Mark: gap.Memory},
	}
	a = ofSharp.applied(s, a)
	a.Shown = append(a.Shown, beside)
	return a
}

// streamerPart is g = U/(500 L δ k), U in kV and L in m: the voltage over that of streamers
// that fill the gap (IEC 60060-1, memory).
func streamerPart(u quantity.Voltage, d quantity.Length, density quantity.Fraction, k float64) float64 {
	return float64(u) / 1e3 / (500 * float64(d) * float64(density) * k)
}

// HumidityExponent is the power w of the humidity factor by g (IEC 60060-1, memory): 0 under
// 0.2, g (g − 0.2)/0.8 to 1, 1 to 1.2, (2.2 − g)(2 − g)/0.8 to 2, 0 above.
func HumidityExponent(g float64) float64 {
	switch {
	case g <= 0.2 || g >= 2:
		return 0
	case g < 1:
		return g * (g - 0.2) / 0.8
	case g <= 1.2:
		return 1
	}
	return (2.2 - g) * (2 - g) / 0.8
}
