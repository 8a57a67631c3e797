package insulation

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/gas"
	"kilovet/insulation/shape"
	"kilovet/insulation/solve"
	"kilovet/insulation/vacuum"
)

// The inversions ask the same laws backwards: the gap or radius at which a law gives a
// wanted value. What no gap or radius within the laws reaches is a lack.

// ClearanceForBreakdown is the gap whose breakdown is at a voltage; its shape keeps its
// sharpest radius.
func ClearanceForBreakdown(g gap.Gap, v quantity.Voltage, sharp gap.Polarity) (quantity.Length, error) {
	if law := mediumOf(g).forBreakdown; law != nil {
		return law(g, v)
	}
	return overGaps(g, float64(v), func(g gap.Gap) (float64, error) {
		a, err := Breakdown(g, sharp)
		return float64(a.Value), err
	})
}

// ClearanceForOnset is the gap at which a discharge starts at a voltage.
func ClearanceForOnset(g gap.Gap, v quantity.Voltage) (quantity.Length, error) {
	if law := mediumOf(g).forOnset; law != nil {
		return law(g, v)
	}
	return overGaps(g, float64(v), func(g gap.Gap) (float64, error) {
		a, err := Onset(g)
		return float64(a.Value), err
	})
}

// ClearanceForField is the gap whose peak field at a voltage is the given one. A radius
// whose field stays above it at any gap is a lack.
func ClearanceForField(g gap.Gap, v quantity.Voltage, limit quantity.Field) (quantity.Length, error) {
	return overGaps(g, 1/float64(limit), func(g gap.Gap) (float64, error) {
		a, err := FieldPeak(g, gap.Voltages{Peak: v})
		return 1 / float64(a.Value), err
	})
}

// RadiusForOnset is the sharpest radius, at the gap given, at which a discharge starts
// at a voltage. What plates at that gap do not stand is a lack.
func RadiusForOnset(g gap.Gap, v quantity.Voltage) (quantity.Length, error) {
	return overRadii(g, float64(v), func(g gap.Gap) (float64, error) {
		a, err := Onset(g)
		return float64(a.Value), err
	})
}

// RadiusForBreakdown is the sharpest radius, at the gap given, whose breakdown is at a
// voltage. Where sharp electrodes stand it already, and where plates do not, there is a
// lack.
func RadiusForBreakdown(g gap.Gap, v quantity.Voltage, sharp gap.Polarity) (quantity.Length, error) {
	return overRadii(g, float64(v), func(g gap.Gap) (float64, error) {
		a, err := Breakdown(g, sharp)
		return float64(a.Value), err
	})
}

// CreepageForFlashover is the length of a surface in vacuum whose flashover is at a
// voltage. Elsewhere the surface has no voltage of its own, a lack.
func CreepageForFlashover(g gap.Gap, v quantity.Voltage) (quantity.Length, error) {
	if g.Medium != gap.Vacuum {
		return 0, lack.Range("no flashover voltage of surfaces in %s is computed", string(g.Medium))
	}
	return vacuum.ReferenceOf(g).LengthFor(v)
}

// RadiusForField is the sharpest radius, at the gap given, whose peak field at a voltage
// is the given one.
func RadiusForField(g gap.Gap, v quantity.Voltage, limit quantity.Field) (quantity.Length, error) {
	return overRadii(g, 1/float64(limit), func(g gap.Gap) (float64, error) {
		a, err := FieldPeak(g, gap.Voltages{Peak: v})
		return 1 / float64(a.Value), err
	})
}

// WithGap is a gap with another clearance, its shape moved along, the sharpest radius kept.
func WithGap(g gap.Gap, d quantity.Length) gap.Gap {
	g.Clearance = d
	if g.Shape != nil {
		s := shape.WithGap(*g.Shape, d)
		g.Shape = &s
	}
	return g
}

// withRadius is the gap with another sharpest radius and the same clearance.
func withRadius(g gap.Gap, r, d quantity.Length) gap.Gap {
	s := shape.WithGap(g.Shape.WithSharpest(r), d)
	g.Shape = &s
	return g
}

// overGaps finds the gap at which a rising answer takes a value.
func overGaps(g gap.Gap, want float64, answer func(gap.Gap) (float64, error)) (quantity.Length, error) {
	s, err := gas.StateOf(g)
	if err != nil && (g.Medium == gap.Air || g.Medium == gap.InGas) {
		return 0, err
	}
	law := func(d float64) (float64, error) { return answer(WithGap(g, quantity.Length(d))) }
	shortest, longest := reachOf(g, s)
	if g.Medium != gap.Air && (g.Medium != gap.InGas || g.Filling() != gap.AirGas) {
		all, err := stretches(shortest, longest, law)
		if err != nil {
			return 0, err
		}
		s, err := holding(all, want, law)
		if err != nil {
			return 0, err
		}
		shortest, longest = s.from*(1+1e-9), s.to*(1-1e-9) // rounding must not leave it
	}
	return crossingOf(shortest, longest, want, law)
}

// overRadii finds the sharpest radius at which a rising answer takes a value.
func overRadii(g gap.Gap, want float64, answer func(gap.Gap) (float64, error)) (quantity.Length, error) {
	l, err := lineOf(g)
	if err != nil {
		return 0, err
	}
	if g.Shape.Kind == gap.Plates {
		return 0, lack.Range("plates have no radius")
	}
	finest := float64(gas.FinestRadius)
	if s, err := gas.StateOf(g); err == nil {
		finest /= math.Min(1, float64(s.Density()))
	}
	d := l.Gap()
	return crossingOf(finest*(1+1e-9), 1e3*float64(d), want, func(r float64) (float64, error) {
		return answer(withRadius(g, quantity.Length(r), d))
	})
}

// reachOf are the shortest and longest gaps the laws of a gap hold for.
func reachOf(g gap.Gap, s gas.State) (shortest, longest float64) {
	shortest, longest = 10e-6, 0.5
	if s.Gas != gap.AirGas || (g.Medium != gap.Air && g.Medium != gap.InGas) {
		return shortest, longest
	}
	if g.Shape != nil {
		shortest = math.Max(shortest, 0.1e-3/float64(s.Density()))
		if g.Shape.Kind == gap.Plates {
			shortest, longest = 10e-6, 0.2/float64(s.Density())
		}
		shortest = math.Max(shortest, 1e-4*float64(g.Shape.Sharpest()))
	}
	return shortest * (1 + 1e-9), longest * (1 - 1e-9)
}

// crossingOf finds where a rising function of a length takes a value.
func crossingOf(lo, hi, want float64, f func(float64) (float64, error)) (quantity.Length, error) {
	end := func(at float64, even string) func() error {
		return func() error {
			return lack.Range("even %s, the end of the law, gives %s than is asked for", quantity.Text(quantity.Length(at)), even)
		}
	}
	x, err := solve.Level(lo, hi, want, f, end(lo, "more"), end(hi, "less"))
	if err != nil {
		return 0, err
	}
	if y, err := f(x); err != nil || math.Abs(y/want-1) > 1e-6 {
		return 0, lack.Range("laws change at %s: between what one gives there and the other does lies what is asked for", quantity.Text(quantity.Length(x)))
	}
	return quantity.Length(x), nil
}
