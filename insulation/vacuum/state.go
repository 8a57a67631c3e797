package vacuum

import (
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

// referenceArea is the area under stress from which larger ones are judged lower: that
// of small laboratory electrodes (practice; the areas tested are not in the abstract).
const referenceArea quantity.Area = 1e-4

// state is what the electrodes of a gap are known to be.
type state struct {
	ready   bool // polished and conditioned
	smooth  bool // polished
	area    gap.Answer[quantity.Fraction]
	assumed []string
}

// stateOf reads finish, conditioning and area; what was not said counts as not done.
func stateOf(g gap.Gap) (state, error) {
	said := func(b *bool) bool { return b != nil && *b }
	s := state{ready: said(g.Polished) && said(g.Conditioned), smooth: said(g.Polished)}
	denied := g.Polished != nil && !*g.Polished || g.Conditioned != nil && !*g.Conditioned
	if (g.Polished == nil || g.Conditioned == nil) && !denied {
		s.assumed = append(s.assumed, "finish and conditioning of the electrodes in vacuum are not both given: taken as machined and not conditioned")
	}
	s.area.Value = 1
	if g.StressedArea == 0 {
		s.assumed = append(s.assumed, "the area of electrode under stress is not given and taken as "+quantity.Text(referenceArea)+" at most")
		return s, nil
	}
	if quantity.AtMost(g.StressedArea, referenceArea) {
		return s, nil
	}
	var err error
	s.area, err = AreaFactor(g.StressedArea, referenceArea)
	s.assumed = append(s.assumed, "the effect of area counts from "+quantity.Text(referenceArea)+" on, common practice")
	return s, err
}

// factor is what the state leaves of the breakdown voltage of prepared electrodes.
func (s state) factor() quantity.Voltage {
	f := quantity.Voltage(s.area.Value)
	if !s.ready {
		f /= aged
	}
	return f
}

// applied is the breakdown of prepared electrodes brought to the state; the other
// preparation stands beside it.
func (s state) applied(a gap.Answer[quantity.Voltage]) gap.Answer[quantity.Voltage] {
	whole := a.Value
	a.Value *= s.factor()
	a.Assumptions = s.assumed
	a.Shown = []gap.Beside[quantity.Voltage]{{Value: a.Value / aged, Source: agedSource}}
	if !s.ready {
		a.Because += ", half of it before polish and conditioning"
		a.Shown = []gap.Beside[quantity.Voltage]{{Value: whole * quantity.Voltage(s.area.Value), Source: gap.Source{Text: "the same polished and conditioned; " + a.Sources[0].Text, Mark: a.Sources[0].Mark}}}
		a.Sources = append([]gap.Source{agedSource.Governing()}, gap.Plain(a.Sources)...)
	}
	if s.area.Value < 1 {
		a.Because += ", less for a large area"
		a.Sources = append(a.Sources, gap.Plain(s.area.Sources)...)
	}
	return a
}

// calm is the field up to which electrodes of a state carry no current: that where
// polished metal begins to emit, half of it for machined metal.
func (s state) calm() (quantity.Field, gap.Source) {
	if s.smooth {
		return EmissionField, emissionSource
	}
	return ComfortableField, comfortableSource
}
