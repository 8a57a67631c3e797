package rules

import (
	"cmp"
	"fmt"
	"slices"
	"strings"

	"kilovet/hv/quantity"
	"kilovet/insulation"
	"kilovet/insulation/gap"
	"kilovet/insulation/shape"
	"kilovet/rules/evidence"
	"kilovet/rules/exhibit"
)

// stressed is a spacing with the line along which its field is highest, and the voltage at
// which it gives way.
type stressed struct {
	name string
	evidence.Spacing
	line shape.Line
	ends gap.Result[quantity.Voltage] // a discharge starts or, where no law tells, it breaks down
	how  string                       // it ends
	like []string                     // names of like gaps with no more across them
}

// used is the part of what the gap stands that is across it, 0 where that is not known.
func (s stressed) used() float64 {
	if s.ends.Lack != nil {
		return 0
	}
	return float64(s.Voltages.Peak / s.ends.Value)
}

// mostGaps is how many spacings have a picture of their field.
const mostGaps = 6

// gapCurves show, for the spacings that are nearest to what they stand, the field along
// the gap against the one at which it gives way; of like gaps that with the highest
// voltage stands for all.
func gapCurves(e *evidence.Evidence) []exhibit.Curve {
	all := stressedGaps(e)
	var curves []exhibit.Curve
	for _, s := range all[:min(mostGaps, len(all))] {
		curves = append(curves, gapCurve(s))
	}
	if rest := len(all) - len(curves); rest > 0 {
		curves[0].Note += fmt.Sprintf("; of the gaps whose shape is described the %d nearest to what they stand are drawn, %d more are not", len(curves), rest)
	}
	return curves
}

// stressedGaps are the spacings whose field is known, like ones once, the nearest to what
// they stand first and those of which that is not known last.
func stressedGaps(e *evidence.Evidence) []stressed {
	var all []stressed
	for _, s := range e.Spacings() {
		x, err := e.Spacing(s)
		line, err2 := e.CriticalLine(s)
		if first(err, err2) != nil || x.Voltages.Peak <= 0 {
			continue
		}
		next := stressed{name: s.Name.V, Spacing: x, line: line, ends: x.Assessment.Onset, how: givesWay(x.Gap.Medium)}
		if next.ends.Lack != nil && x.Assessment.Breakdown.Lack == nil {
			next.ends, next.how = x.Assessment.Breakdown, "it breaks down"
		}
		all = append(all, next)
	}
	slices.SortStableFunc(all, func(a, b stressed) int { return cmp.Compare(b.used(), a.used()) })
	var each []stressed
	for _, s := range all {
		if i := slices.IndexFunc(each, s.isLike); i >= 0 {
			each[i].like = append(each[i].like, s.name)
			continue
		}
		each = append(each, s)
	}
	return each
}

func givesWay(m gap.Medium) string {
	if m == gap.Vacuum {
		return "it emits or breaks down"
	}
	return "a discharge starts"
}

// isLike reports whether two gaps have the same medium, shape and strength.
func (s stressed) isLike(t stressed) bool {
	a, b := s.Gap, t.Gap
	if a.Shape == nil || b.Shape == nil || s.Computed || t.Computed || s.ends.Lack != nil || t.ends.Lack != nil {
		return false
	}
	return a.Medium == b.Medium && a.Filling() == b.Filling() && *a.Shape == *b.Shape && s.how == t.how && quantity.Equal(s.ends.Value, t.ends.Value)
}

// gapCurve is the field of a spacing along its line, at the voltage across it and at the
// one at which it gives way.
func gapCurve(s stressed) exhibit.Curve {
	c := exhibit.Curve{
		ID: "spacing.field", Subject: s.name, Chapter: exhibit.Spacings, Title: "Field against strength", Basis: "insulation",
		X: exhibit.Axis{What: "distance from the more highly stressed electrode", Unit: "m"}, Y: exhibit.Axis{What: "field", Unit: "V/m", Log: true},
		Lines: []exhibit.Line{fieldLine(s.line, "at the "+quantity.Text(s.Voltages.Peak)+" across it", s.Voltages.Peak)},
		Note:  "Highest voltage: " + s.Under.Text() + "; " + s.lineWords(),
	}
	if s.ends.Lack == nil {
		c.Lines = append(c.Lines, fieldLine(s.line, "at "+quantity.Text(s.ends.Value)+", where "+s.how, s.ends.Value))
	} else {
		c.Note += "; what it stands is not known: " + s.ends.Lack.Error()
	}
	if e, _, err := insulation.Ionising(s.Gap); err == nil {
		c.Levels = []exhibit.Level{{Name: "no ionisation below", Value: float64(e)}}
	}
	if len(s.like) > 0 {
		c.Note += "; it stands for " + strings.Join(s.like, ", ") + " too, which are alike and bear no more"
	}
	return c
}

func (s stressed) lineWords() string {
	if s.Computed {
		return "along the critical line of the computed field"
	}
	return "along the critical line of the ideal shape, " + string(s.Gap.Shape.Kind)
}

func fieldLine(l shape.Line, name string, v quantity.Voltage) exhibit.Line {
	line := exhibit.Line{Name: name}
	for _, p := range l.Places(v, usualPoints/2) {
		line.Points = append(line.Points, exhibit.Point{X: float64(p.Along), Y: float64(p.Field)})
	}
	return line
}
