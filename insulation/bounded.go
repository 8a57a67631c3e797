package insulation

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/gas"
	"kilovet/insulation/shape"
)

// finer is the ratio of neighbouring gaps that the bound below is looked up at.
const finer = 1.05

// atLeastUniform is a lower bound of the onset between curved electrodes in a gas of which
// only the breakdown between plates is known: an avalanche along the line grows nowhere
// faster than at its peak, so the peak field must be that of plates as far apart, V =
// E(plates) times gap times utilisation (derived). A wider gap of the same electrodes
// stands no less, so the best of the narrower ones counts too, straight between them.
func atLeastUniform(g gap.Gap, s gas.State, l shape.Line) (gap.Answer[quantity.Voltage], error) {
	d := float64(l.Gap())
	k := math.Floor(math.Log(d) / math.Log(finer))
	low, high := math.Pow(finer, k), math.Pow(finer, k+1)
	under, text, err := bestWithin(g, s, low)
	if err != nil {
		return gap.Answer[quantity.Voltage]{}, err
	}
	over, _, err := bestWithin(g, s, high)
	if err != nil {
		over = under // past the law of the gas
	}
	part := quantity.Voltage((d - low) / (high - low))
	text.Value = under + part*(over-under)
	text.AtLeast = true
	text.Because = "the field at the electrode reaches that of plates, a lower bound; " + text.Because
	text.Sources = append([]gap.Source{{Text: "an avalanche grows nowhere faster than at the peak field", Mark: gap.Derived, Governs: true}}, gap.Plain(text.Sources)...)
	text.Assumptions = append(text.Assumptions, "round electrodes in "+string(s.Gas)+" are judged by the field of plates at the electrode, a lower bound: no ionisation coefficient is known here")
	return text, nil
}

// bestWithin is the largest bound of the gaps on the grid up to a distance.
func bestWithin(g gap.Gap, s gas.State, most float64) (quantity.Voltage, gap.Answer[quantity.Voltage], error) {
	var best gap.Answer[quantity.Voltage]
	var last error = lack.Range("no narrower gap is known")
	for d := most * (1 + 1e-12); d > 10e-6 && d > 1.0001e-4*float64(g.Shape.Sharpest()); d /= finer {
		l, err := lineOf(WithGap(g, quantity.Length(d)))
		if err != nil {
			return 0, best, err
		}
		a, err := gas.UniformBreakdown(s, quantity.Length(d))
		if err != nil {
			last = err
			if best.Value > 0 {
				break
			}
			continue
		}
		if a.Value *= quantity.Voltage(l.Utilisation()); a.Value > best.Value {
			best = a
		}
	}
	if best.Value == 0 {
		return 0, best, last
	}
	return best.Value, best, nil
}

// roughened takes the factor of the surface from an onset.
func roughened(g gap.Gap) func(gap.Answer[quantity.Voltage], error) (gap.Answer[quantity.Voltage], error) {
	return func(a gap.Answer[quantity.Voltage], err error) (gap.Answer[quantity.Voltage], error) {
		if err != nil {
			return a, err
		}
		m, source, err := gas.SurfaceFactor(g.Surface)
		a.Value *= quantity.Voltage(m)
		if m < 1 {
			a.Sources = append(a.Sources, source)
		}
		return a, err
	}
}
