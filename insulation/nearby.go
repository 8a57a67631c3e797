package insulation

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

// StrengthBounds are what is known of a voltage that no law gives at the distance of a gap:
// more distance between the same electrodes never stands less, so a narrower gap that a law
// answers bounds it from below and a wider one from above. What lies under the lower one
// holds, what lies above the upper one does not; between them nothing is known.
type StrengthBounds struct {
	Least gap.Result[quantity.Voltage]
	Most  gap.Result[quantity.Voltage]
}

// BreakdownBounds bounds the breakdown of a gap. The lower bound is one of air and gases,
// whose laws also hold left of the Paschen minimum, of boards, oil and solids, and of surfaces
// in vacuum. The upper one in other gases than air is that of plates, or that helium, argon,
// hydrogen and carbon dioxide stand no more than air; in what is called vacuum and is none,
// that of the gas left.
func BreakdownBounds(g gap.Gap, sharp gap.Polarity) StrengthBounds {
	law := func(g gap.Gap) (gap.Answer[quantity.Voltage], error) { return Breakdown(g, sharp) }
	b := StrengthBounds{Least: gap.ResultOf(narrower(g, law))}
	if g.Medium == gap.InGas && g.Filling() != gap.AirGas {
		b.Most = gap.ResultOf(asPlates(g))
	} else {
		b.Most = gap.ResultOf(wider(g, law))
	}
	switch {
	case b.Most.Lack != nil && weaker(g):
		b.Most = gap.ResultOf(asAir(g, sharp))
	case b.Most.Lack != nil && g.Medium == gap.Vacuum:
		b.Most = gap.ResultOf(Rarefied(g))
	}
	return b
}

// asPlates is what plates as far apart stand in the gas, more than which no other electrodes
// do.
func asPlates(g gap.Gap) (gap.Answer[quantity.Voltage], error) {
	if g.Shape == nil {
		return gap.Answer[quantity.Voltage]{}, lack.Key("spacing.shape")
	}
	g.Shape = &gap.Shape{Kind: gap.Plates}
	a, err := wider(g, func(g gap.Gap) (gap.Answer[quantity.Voltage], error) { return Breakdown(g, gap.Unknown) })
	a.Because = "plates as far apart, more than which no other electrodes stand: " + a.Because
	return a, err
}

// OnsetAtLeast is the voltage under which no discharge starts in a gap whose onset no law
// gives at its distance.
func OnsetAtLeast(g gap.Gap) (gap.Answer[quantity.Voltage], error) { return narrower(g, Onset) }

// WorkingAtMost is WorkingVoltage, or that of a wider gap where no law answers the gap's own
// distance.
func WorkingAtMost(g gap.Gap) (gap.Answer[quantity.Voltage], error) {
	a, err := WorkingVoltage(g)
	if l := lack.Of(err); l == nil || l.Kind == lack.Missing {
		return a, err
	}
	return wider(g, WorkingVoltage)
}

type law func(gap.Gap) (gap.Answer[quantity.Voltage], error)

// narrower is the answer of the widest narrower gap that a law answers.
func narrower(g gap.Gap, of law) (gap.Answer[quantity.Voltage], error) {
	switch {
	case g.Medium == gap.Vacuum && g.Creepage > longestInVacuum:
		g.Creepage = longestInVacuum
		a, err := of(g)
		a.Because += "; as along 300 mm, where the law ends: a longer surface stands no less"
		return a, err
	case g.Medium == gap.Vacuum:
		return gap.Answer[quantity.Voltage]{}, lack.Range("no gap bounds that in %s from below", named(g))
	}
	return nearest(g, 1/stepOfGaps, "stands no less", of)
}

// wider is the answer of the narrowest wider gap that a law answers with more than a lower
// bound.
func wider(g gap.Gap, of law) (gap.Answer[quantity.Voltage], error) {
	return nearest(g, stepOfGaps, "stands no more", func(g gap.Gap) (gap.Answer[quantity.Voltage], error) {
		a, err := of(g)
		if err == nil && a.AtLeast {
			return gap.Answer[quantity.Voltage]{}, lack.Range("only a lower bound is known")
		}
		return a, err
	})
}

const (
	stepOfGaps                      = 1.1
	mostSteps                       = 120 // a factor of 90 000
	longestInVacuum quantity.Length = 300e-3
)

// nearest looks for a gap that a law answers, from that of the electrodes on by a ratio;
// where a key is missing, none can.
func nearest(g gap.Gap, ratio float64, stands string, of law) (gap.Answer[quantity.Voltage], error) {
	at := func(d float64) (gap.Answer[quantity.Voltage], error) {
		n := WithGap(g, quantity.Length(d))
		n.Creepage = g.Creepage * quantity.Length(d) / g.Clearance
		return of(n)
	}
	if g.Clearance <= 0 {
		return gap.Answer[quantity.Voltage]{}, lack.Key("spacing.clearance")
	}
	d := float64(g.Clearance)
	first, err := at(d)
	if err == nil || lack.Of(err).Kind == lack.Missing {
		return first, err
	}
	answers := func(d float64) bool { _, err := at(d); return err == nil }
	for range mostSteps {
		last := d
		if d *= ratio; !answers(d) {
			continue
		}
		d = edge(d, last, answers)
		a, err := at(d)
		a.Because += "; as over " + quantity.Text(quantity.Length(d)) + ", where the law ends: this gap " + stands
		return a, err
	}
	return gap.Answer[quantity.Voltage]{}, err
}

// asAir is what air of the same pressure between the same electrodes stands, from a
// millimetre on: a bound of the gases that stand less, never a pass.
func asAir(g gap.Gap, sharp gap.Polarity) (gap.Answer[quantity.Voltage], error) {
	if g.Shape == nil {
		return gap.Answer[quantity.Voltage]{}, lack.Key("spacing.shape")
	}
	air := WithGap(g, max(g.Clearance, 1e-3))
	air.Gas = gap.AirGas
	a, err := Breakdown(air, sharp)
	a.Because = "air, more than which " + named(g) + " does not stand: " + a.Because
	a.Sources = append(a.Sources, gap.Source{Text: named(g) + " stands less than air of the same pressure over insulating distances", Mark: gap.Memory})
	return a, err
}
