package insulation

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/gas"
	"kilovet/insulation/oil"
	"kilovet/insulation/shape"
	"kilovet/insulation/vacuum"
)

// StrengthAlong is what a gap stands along a critical line whose field was computed, in
// volts across the line; of the gap its medium, state and surface are read. Sharp is the
// polarity of the electrode the line starts from.
func StrengthAlong(g gap.Gap, l shape.Line, sharp gap.Polarity) Strength {
	onset := gap.ResultOf(onsetAlong(g, l))
	return Strength{
		Onset:      onset,
		FieldLimit: gap.ResultOf(fieldAlong(l, onset)),
		Breakdown:  gap.ResultOf(breakdownAlong(g, l, sharp, onset)),
	}
}

// StreamerAlong is the streamer integral along a critical line at a voltage across it, 1
// where a discharge starts.
func StreamerAlong(g gap.Gap, l shape.Line, v quantity.Voltage) (quantity.Fraction, error) {
	if err := inGas(g); err != nil {
		return 0, err
	}
	s, err := gas.StateOf(g)
	if err != nil {
		return 0, err
	}
	k, err := gas.Growth(s, l, v)
	return quantity.Fraction(k), err
}

// Ionising is the field at or under which the gas of a gap does not ionise: no discharge
// starts whatever the shape.
func Ionising(g gap.Gap) (quantity.Field, gap.Source, error) {
	if err := inGas(g); err != nil {
		return 0, gap.Source{}, err
	}
	s, err := gas.StateOf(g)
	if err != nil {
		return 0, gap.Source{}, err
	}
	return gas.Critical(s)
}

// WorkingAlong is the field that the place at the start of a critical line in oil may have
// in service; other media have no such law, which is a lack.
func WorkingAlong(g gap.Gap, l shape.Line) (gap.Answer[quantity.Field], error) {
	if g.Medium != gap.Oil {
		return gap.Answer[quantity.Field]{}, lack.Range("no working field is known for %s", string(g.Medium))
	}
	return oil.WorkingAlong(g, l)
}

func onsetAlong(g gap.Gap, l shape.Line) (gap.Answer[quantity.Voltage], error) {
	if g.Medium == gap.Vacuum {
		return vacuum.OnsetAlong(g, l)
	}
	if err := inGas(g); err != nil {
		return gap.Answer[quantity.Voltage]{}, err
	}
	s, err := gas.StateOf(g)
	if err != nil {
		return gap.Answer[quantity.Voltage]{}, err
	}
	return gas.Onset(s, l, g.Surface)
}

func fieldAlong(l shape.Line, onset gap.Result[quantity.Voltage]) (gap.Answer[quantity.Field], error) {
	if onset.Lack != nil {
		return gap.Answer[quantity.Field]{}, onset.Lack
	}
	a := gap.Answer[quantity.Field]{Value: l.Peak(onset.Value), Because: onset.Because, Sources: onset.Sources, Assumptions: onset.Assumptions}
	for _, b := range onset.Shown {
		a.Shown = append(a.Shown, gap.Beside[quantity.Field]{Value: l.Peak(b.Value), Source: b.Source})
	}
	return a, nil
}

func breakdownAlong(g gap.Gap, l shape.Line, sharp gap.Polarity, starts gap.Result[quantity.Voltage]) (gap.Answer[quantity.Voltage], error) {
	none := gap.Answer[quantity.Voltage]{}
	switch g.Medium {
	case gap.Vacuum:
		return vacuum.BreakdownAlong(g, l)
	case gap.Oil:
		return oil.BreakdownAlong(g, l)
	}
	if err := inGas(g); err != nil {
		return none, err
	}
	s, err := gas.StateOf(g)
	switch {
	case err != nil:
		return none, err
	case s.Gas != gap.AirGas && starts.Lack != nil:
		return none, lack.Of(starts.Lack)
	case s.Gas != gap.AirGas:
		return starts.Answer, nil
	}
	return oneSided(s, l, sharp, starts)
}

// AtEdge is what the field at a distance from a sharp edge or from the junction of an
// insulator with a conductor may reach: in vacuum the field at which smooth metal emits,
// in a gas the mean field at which plates that far apart break down.
func AtEdge(g gap.Gap, distance quantity.Length) (gap.Answer[quantity.Field], error) {
	none := gap.Answer[quantity.Field]{}
	if g.Medium == gap.Vacuum {
		_, sources := vacuum.Review(vacuum.EmissionField * 2)
		return gap.Answer[quantity.Field]{Value: vacuum.EmissionField, Because: "smooth metal in vacuum emits from there on", Sources: sources[:1]}, nil
	}
	if err := inGas(g); err != nil {
		return none, err
	}
	s, err := gas.StateOf(g)
	if err != nil {
		return none, err
	}
	v, err := gas.UniformBreakdown(s, distance)
	if err != nil {
		return none, err
	}
	return gap.Answer[quantity.Field]{
		Value:   quantity.Field(float64(v.Value) / float64(distance)),
		Because: "plates " + quantity.Text(distance) + " apart break down there", Sources: v.Sources, Assumptions: v.Assumptions,
	}, nil
}
