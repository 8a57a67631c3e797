// Package fields judges by computed fields: electrodes, the gaps between them, sharp
// edges, junctions and solids of every arrangement that is described or built from a few
// dimensions.
package fields

import (
	"fmt"

	"kilovet/hv/quantity"
	"kilovet/insulation/field"
	"kilovet/rules/build"
	"kilovet/rules/evidence"
	"kilovet/rules/rule"
)

// Rules lists the rules of this family.
func Rules() []rule.Rule { return []rule.Rule{strength, breakdown, edge, junction, surface, solids} }

// none is why a rule about fields is passed over.
const none = "no field is described, and no feedthrough or gun by its dimensions"

// each judges every arrangement that has a field; where none has anything to judge the
// rule is passed over for the reason given. Where the field cannot be had the rule of
// strength says so, once.
func each(e *evidence.Evidence, id string, nothing string, judge func(*build.Arrangement, *field.Solution, rule.Finding) []rule.Finding) rule.Judgement {
	all := drawable(e)
	if len(all) == 0 {
		return rule.Over(none)
	}
	var j rule.Judgement
	for _, f := range all {
		start := rule.Finding{Rule: id, Concern: rule.Equipment, Relation: rule.AtMost, Place: f.Here()}
		s, err := e.FieldOf(f)
		switch {
		case err == nil:
			j.Findings = append(j.Findings, judge(f, s, start)...)
		case id == strengthID:
			start.Subject = f.Name.V
			j.Findings = append(j.Findings, start.Lacking(err))
		}
	}
	if len(j.Findings) == 0 {
		j.PassedOver = nothing
	}
	return j
}

// drawable leaves out feedthroughs and guns whose dimensions do not make a figure: what
// else is known of them is judged without one.
func drawable(e *evidence.Evidence) (all []*build.Arrangement) {
	for _, f := range e.Arrangements() {
		if f.Err == nil {
			all = append(all, f)
		}
	}
	return all
}

// taken is what is taken for granted about an arrangement: how it was built, what fills it, and how a
// direct voltage settles in it.
func taken(e *evidence.Evidence, f *build.Arrangement) []string {
	all := append([]string(nil), f.Assumed...)
	if f.Ideal != "" {
		all = append(all, f.Ideal)
	}
	if !f.Medium.Set() {
		all = append(all, "what fills "+f.Name.V+" is not given and taken as vacuum")
	}
	if _, err := e.SettledOf(f); err != nil && insulated(f) {
		all = append(all, f.Name.V+": how a direct voltage settles in its insulators is not judged: "+err.Error())
	}
	return all
}

func insulated(f *build.Arrangement) bool {
	for _, d := range f.Dielectrics {
		if !d.Fill.Set() {
			return true
		}
	}
	return false
}

// subject names an electrode of an arrangement, and the space beside it where that is
// not the medium.
func subject(f *build.Arrangement, electrode, body string) string {
	if body == field.Medium {
		return f.Name.V + "/" + electrode
	}
	return f.Name.V + "/" + electrode + ", " + body
}

// facing are the open spaces that an electrode borders.
func facing(f *build.Arrangement, s *field.Solution, electrode string) (open []string) {
	for _, body := range s.Facing(electrode) {
		if evidence.Open(f, body) {
			open = append(open, body)
		}
	}
	return open
}

// told says where a peak stands and how well it is known.
func told(s evidence.Stress, w evidence.Where) string {
	text := fmt.Sprintf("%s at r %s, z %s, good to %s", quantity.Text(s.Strength), quantity.Text(s.At.R), quantity.Text(s.At.Z), quantity.Text(s.Error))
	if w.Distance > 0 {
		text += ", " + quantity.Text(w.Distance) + " clear of sharp edges"
	}
	return text
}
