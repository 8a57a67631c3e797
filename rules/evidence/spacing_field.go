package evidence

import (
	"fmt"
	"slices"

	"kilovet/hv/chain"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation"
	"kilovet/insulation/gap"
	"kilovet/insulation/shape"
	"kilovet/rules/build"
)

// byField puts the computed field of a gap in the place of the closed shape where the
// description names one, asks for it or gives sizes that have no closed form; what the
// shape gives stands beside it.
func (e *Evidence) byField(s *chain.Spacing, x *Spacing) {
	f, c, err := e.criticalOf(s)
	if f == nil && err == nil {
		return
	}
	closed := x.Assessment
	x.Computed = true
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
	closedBy := "no closed shape"
	if x.Gap.Shape != nil {
		closedBy = "closed shape, " + string(x.Gap.Shape.Kind) + f.ClosedFor()
	}
	x.Assessment.FieldPeak = gap.Result[quantity.Field]{Answer: gap.Answer[quantity.Field]{
		Value:   c.Line.Peak(x.Voltages.Peak),
		Because: fmt.Sprintf("computed field of %s, utilisation factor %.3g", f.Name.V, float64(c.Line.Utilisation())),
		Sources: []gap.Source{{Text: "computed field of the described arrangement", Mark: gap.Derived, Governs: true}},
		Shown:   besides(closed.FieldPeak, closedBy), Assumptions: f.Assumed,
	}}
	by.Onset.Assumptions = slices.Concat(by.Onset.Assumptions, f.Assumed)
	by.FieldLimit.Assumptions = slices.Concat(by.FieldLimit.Assumptions, f.Assumed)
	by.Breakdown.Assumptions = slices.Concat(by.Breakdown.Assumptions, f.Assumed)
	by.Onset.Shown = append(by.Onset.Shown, besides(closed.Onset, closedBy)...)
	by.FieldLimit.Shown = append(by.FieldLimit.Shown, besides(closed.FieldLimit, closedBy)...)
	by.Breakdown.Shown = append(by.Breakdown.Shown, besides(closed.Breakdown, closedBy)...)
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

// criticalOf is the critical line of the arrangement that judges a spacing: the named one
// from that of the electrodes at the spacing's nodes that bears the greater field, or the
// one built from its shape. No arrangement, and no error, where the closed shape judges.
func (e *Evidence) criticalOf(s *chain.Spacing) (*build.Arrangement, Critical, error) {
	if !s.Field.Set() {
		f, on := e.shapeOrHole(s)
		if f == nil {
			return nil, Critical{}, nil
		}
		c, err := e.worstLine(f, on)
		return f, c, err
	}
	f := e.Arrangement(s.Field.V)
	if f == nil {
		return nil, Critical{}, lack.Range("there is no arrangement %s", s.Field.V)
	}
	if medium := f.Medium.Or("vacuum"); medium != s.Medium.V {
		return f, Critical{}, lack.Range("the field %s is that of %s, the gap is in %s", s.Field.V, medium, s.Medium.V)
	}
	on := looked(f, s)
	if len(on) == 0 {
		return f, Critical{}, lack.Range("no electrode of %s is at %s or %s", s.Field.V, s.From.V, s.To.V)
	}
	c, err := e.worstLine(f, on)
	return f, c, err
}

func ends(s *chain.Spacing) []string { return append([]string{s.From.V}, s.Also.V...) }

// CriticalLine is the line from the more highly stressed electrode of a spacing to the
// other along which its field is highest, computed where the spacing is judged by a
// computed field, else that of its shape.
func (e *Evidence) CriticalLine(s *chain.Spacing) (shape.Line, error) {
	if f, c, err := e.criticalOf(s); f != nil || err != nil {
		return c.Line, err
	}
	if s.Shape == nil {
		return shape.Line{}, lack.Key("spacing.shape")
	}
	return shape.Of(*shapeOf(s.Shape), s.Clearance.V)
}
