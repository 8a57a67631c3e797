package evidence

import (
	"fmt"
	"slices"

	"kilovet/hv/chain"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation"
	"kilovet/insulation/field"
	"kilovet/insulation/gap"
)

// byField puts the computed field of a gap in the place of the closed shape where the
// description names one; what the shape gives stands beside it.
func (e *Evidence) byField(s *chain.Spacing, x *Spacing) {
	if !s.Field.Set() {
		return
	}
	closed := x.Assessment
	c, err := e.criticalOf(s)
	if err != nil {
		none := lack.Of(err)
		x.Assessment.FieldPeak = gap.Result[quantity.Field]{Lack: none}
		x.Assessment.Strength = insulation.Strength{Onset: gap.Result[quantity.Voltage]{Lack: none}, FieldLimit: gap.Result[quantity.Field]{Lack: none}, Breakdown: gap.Result[quantity.Voltage]{Lack: none}}
		return
	}
	if x.Voltages.Sharp == gap.Unknown && s.From.Set() {
		if steady, err := e.polarityOf(s, "from"); err == nil && steady != gap.Unknown {
			x.Voltages.Sharp = c.Sharp // the computed field tells which end is the sharper
		}
	}
	by := insulation.StrengthAlong(x.Gap, c.Line, x.Voltages.Sharp)
	shape := "no closed shape"
	if x.Gap.Shape != nil {
		shape = "closed shape, " + string(x.Gap.Shape.Kind)
	}
	x.Assessment.FieldPeak = gap.Result[quantity.Field]{Answer: gap.Answer[quantity.Field]{
		Value:   c.Line.Peak(x.Voltages.Peak),
		Because: fmt.Sprintf("computed field of %s, utilisation factor %.3g", s.Field.V, float64(c.Line.Utilisation())),
		Sources: []gap.Source{{Text: "computed field of the described arrangement", Mark: gap.Derived, Governs: true}},
		Shown:   besides(closed.FieldPeak, shape),
	}}
	by.Onset.Shown = append(by.Onset.Shown, besides(closed.Onset, shape)...)
	by.FieldLimit.Shown = append(by.FieldLimit.Shown, besides(closed.FieldLimit, shape)...)
	by.Breakdown.Shown = append(by.Breakdown.Shown, besides(closed.Breakdown, shape)...)
	if c.Traced.Closed {
		by.Breakdown = closed.Breakdown // an insulator stands in the way of the line
	}
	x.Assessment.Strength = by
}

// besides is a result of another way, shown and not judged.
func besides[Q quantity.Number](r gap.Result[Q], how string) []gap.Beside[Q] {
	if r.Lack != nil {
		return nil
	}
	return []gap.Beside[Q]{{Value: r.Value, Source: gap.Source{Text: how, Mark: gap.Derived}}}
}

// criticalOf is the critical line of the named arrangement from that of the electrodes
// at the spacing's nodes that bears the greater field; of any where it has none.
func (e *Evidence) criticalOf(s *chain.Spacing) (Critical, error) {
	f := e.Arrangement(s.Field.V)
	if f == nil {
		return Critical{}, lack.Range("there is no arrangement %s", s.Field.V)
	}
	if medium := f.Medium.Or("vacuum"); medium != s.Medium.V {
		return Critical{}, lack.Range("the field %s is that of %s, the gap is in %s", s.Field.V, medium, s.Medium.V)
	}
	var most Critical
	for _, el := range f.Electrodes {
		if s.From.Set() && !slices.Contains(append(ends(s), s.To.V), el.Node.V) {
			continue
		}
		c, err := e.Critical(f, e.ClearOfEdges(f, Where{Electrode: el.Name.V, Body: field.Medium}))
		if err != nil {
			return c, err
		}
		if most.Field == nil || c.Strength.Onset.Lack == nil && c.Peak.Strength > most.Peak.Strength {
			most = c
		}
	}
	if most.Field == nil {
		return most, lack.Range("no electrode of %s is at %s or %s", s.Field.V, s.From.V, s.To.V)
	}
	return most, nil
}

func ends(s *chain.Spacing) []string { return append([]string{s.From.V}, s.Also.V...) }
