package vacuum

import (
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/shape"
)

// Onset is the voltage at which a vacuum gap begins to carry current: the field at the
// electrode reaches 10 kV/mm, where smooth surfaces emit measurably, 5 kV/mm on metal
// that is not known to be polished, or, in long gaps, the breakdown itself. Without a
// shape there is a lack.
func Onset(g gap.Gap) (gap.Answer[quantity.Voltage], error) {
	x, err := even(g)
	if err != nil {
		return gap.Answer[quantity.Voltage]{}, err
	}
	return onset(g, x)
}

// OnsetAlong is Onset of a critical line whose field was computed; of the gap its
// surfaces are read.
func OnsetAlong(g gap.Gap, l shape.Line) (gap.Answer[quantity.Voltage], error) {
	if err := inRange(l.Gap()); err != nil {
		return gap.Answer[quantity.Voltage]{}, err
	}
	return onset(g, quantity.Length(1/float64(l.PerVolt(0))))
}

func onset(g gap.Gap, x quantity.Length) (gap.Answer[quantity.Voltage], error) {
	s, err := stateOf(g)
	if err != nil {
		return gap.Answer[quantity.Voltage]{}, err
	}
	breaks := s.applied(law(x))
	field, source := s.calm()
	emits := quantity.Voltage(float64(field) * float64(x))
	if emits > breaks.Value {
		breaks.Because += ", before emission is measurable"
		return breaks, nil
	}
	beta, err := EmissionOnset(smoothBeta)
	if err != nil {
		return gap.Answer[quantity.Voltage]{}, err
	}
	return gap.Answer[quantity.Voltage]{
		Value: emits, Because: "cold emission is to be reckoned with from " + quantity.Text(field),
		Sources:     []gap.Source{source.Governing(), longSource},
		Assumptions: s.assumed,
		Shown:       []gap.Beside[quantity.Voltage]{{Value: quantity.Voltage(float64(beta.Value) * float64(x)), Source: beta.Sources[0]}},
	}, nil
}

// ClearanceForOnset is the gap whose onset is at a voltage, sharpest radius kept.
func ClearanceForOnset(g gap.Gap, v quantity.Voltage) (quantity.Length, error) {
	s, err := stateOf(g)
	if err != nil {
		return 0, err
	}
	return gapOf(g, s.evenAtOnset(v))
}

// evenAtOnset is the even length at which emission or breakdown begins at a voltage.
func (s state) evenAtOnset(v quantity.Voltage) quantity.Length {
	field, _ := s.calm()
	return max(evenAt(v/s.factor()), quantity.Length(float64(v)/float64(field)))
}

// ClearanceNeeded is the gap in vacuum at which the peak voltage only just brings no
// emission and no breakdown, and never under the shortest gap of the laws; no printed
// table is behind it. Beside it stands the gap at which polished electrodes would stay
// comfortable without polish, where there is one.
func ClearanceNeeded(g gap.Gap, v gap.Voltages) (gap.Answer[quantity.Length], error) {
	none := gap.Answer[quantity.Length]{}
	closest, _ := reach(g)
	at, err := Onset(withGap(g, closest))
	if err != nil {
		return none, err
	}
	a := gap.Answer[quantity.Length]{Value: closest}
	if at.Value < v.Peak {
		if a.Value, err = ClearanceForOnset(g, v.Peak); err != nil {
			return none, err
		}
		if at, err = Onset(withGap(g, a.Value)); err != nil {
			return none, err
		}
	}
	a.Because, a.Sources, a.Assumptions = quantity.Text(v.Peak)+" peak: "+at.Because, at.Sources, at.Assumptions
	a.Shown = calmGap(g, v.Peak)
	return a, nil
}

// calmGap is the gap at which the electrodes need no care; none where that is what
// judges, and where they are too sharp for it at any distance.
func calmGap(g gap.Gap, v quantity.Voltage) []gap.Beside[quantity.Length] {
	s, err := stateOf(g)
	if err != nil || !s.smooth {
		return nil
	}
	x := max(s.evenAtOnset(v), quantity.Length(float64(v)/float64(ComfortableField)))
	d, err := gapOf(g, x)
	if err != nil {
		return nil
	}
	return []gap.Beside[quantity.Length]{{Value: d, Source: comfortableSource}}
}
