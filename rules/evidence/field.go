package evidence

import (
	"errors"
	"maps"
	"slices"

	"kilovet/hv/chain"
	"kilovet/hv/lack"
	"kilovet/hv/profile"
	"kilovet/hv/quantity"
	"kilovet/insulation/field"
)

// FieldOf is the solved field of a described arrangement, for one volt on each
// electrode in turn.
func (e *Evidence) FieldOf(f *chain.Field) (*field.Solution, error) {
	return remember(e.Under(Condition{}), "field "+f.Name.V, func() (*field.Solution, error) {
		a, err := arrangement(f)
		if err != nil {
			return nil, err
		}
		s, err := field.Solve(a)
		var wrong profile.Faults
		if errors.As(err, &wrong) {
			return nil, lack.Failed("the outlines do not make a figure: %s", wrong[0].Error())
		}
		return s, err
	})
}

// arrangement turns a described field into outlines; pieces of one name are one electrode.
func arrangement(f *chain.Field) (field.Arrangement, error) {
	var a field.Arrangement
	for _, el := range f.Electrodes {
		p, err := outline(el.Name.V, el.Profile)
		if err != nil {
			return a, err
		}
		i := slices.IndexFunc(a.Electrodes, func(x field.Electrode) bool { return x.Name == el.Name.V })
		if i < 0 {
			i = len(a.Electrodes)
			a.Electrodes = append(a.Electrodes, field.Electrode{Name: el.Name.V})
		}
		a.Electrodes[i].Profiles = append(a.Electrodes[i].Profiles, p)
	}
	for _, d := range f.Dielectrics {
		p, err := outline(d.Name.V, d.Profile)
		if err != nil {
			return a, err
		}
		a.Dielectrics = append(a.Dielectrics, field.Dielectric{Name: d.Name.V, Permittivity: d.Permittivity.V, Resistivity: d.Resistivity.V, Profile: p})
	}
	for _, b := range f.Boundary {
		p, err := outline("boundary", b.Profile)
		if err != nil {
			return a, err
		}
		kind := field.Natural
		if b.Kind.V == "earth" {
			kind = field.Earth
		}
		a.Boundaries = append(a.Boundaries, field.Boundary{Kind: kind, Profile: p})
	}
	return a, nil
}

// outline builds a profile from the strokes of the description.
func outline(name string, strokes []chain.Stroke) (profile.Profile, error) {
	var list []profile.Stroke
	for _, s := range strokes {
		one := profile.Stroke{From: point(s.From.V), To: point(s.To.V), Centre: point(s.Centre.V)}
		if s.Turn.V == "right" {
			one.Turn = profile.Right
		} else if s.Turn.V == "left" {
			one.Turn = profile.Left
		}
		list = append(list, one)
	}
	p, err := profile.New(name, list)
	var wrong profile.Faults
	if errors.As(err, &wrong) {
		return p, lack.Failed("%s", wrong[0].Error())
	}
	return p, err
}

func point(rz []quantity.Length) *profile.Point {
	if len(rz) != 2 {
		return nil
	}
	return &profile.Point{R: rz[0], Z: rz[1]}
}

// FieldsUnder are the fields of an arrangement at the extremes of its nodes over a period
// of the drive, every combination of them: what swings in step is taken to swing
// against each other too, on the cautious side.
func (e *Evidence) FieldsUnder(f *chain.Field) ([]*field.Field, error) {
	s, err := e.FieldOf(f)
	if err != nil {
		return nil, err
	}
	cases := []map[string]quantity.Voltage{{}}
	nodes := map[string]bool{}
	for _, el := range f.Electrodes {
		name := el.Name.V
		if !el.Node.Set() {
			each(cases, name, el.Voltage.V)
			continue
		}
		w, err := e.swing(el.Node.V, "ground")
		if err != nil {
			return nil, err
		}
		if nodes[name] {
			continue // a further piece of the same electrode
		}
		nodes[name] = true
		other := copies(cases)
		each(cases, name, w.Least)
		each(other, name, w.Greatest)
		cases = append(cases, other...)
	}
	if len(nodes) > mostNodes {
		return nil, lack.Range("a field with more than %d electrodes at nodes is not judged", mostNodes)
	}
	return under(s, cases)
}

// mostNodes bounds the combinations of extremes.
const mostNodes = 4

func under(s *field.Solution, cases []map[string]quantity.Voltage) ([]*field.Field, error) {
	var all []*field.Field
	for _, potentials := range cases {
		f, err := s.Under(potentials)
		if err != nil {
			return nil, err
		}
		all = append(all, f)
	}
	return all, nil
}

func each(cases []map[string]quantity.Voltage, name string, v quantity.Voltage) {
	for _, c := range cases {
		c[name] = v
	}
}

func copies(cases []map[string]quantity.Voltage) []map[string]quantity.Voltage {
	all := make([]map[string]quantity.Voltage, len(cases))
	for i, c := range cases {
		all[i] = maps.Clone(c)
	}
	return all
}

// FieldPeak is the greatest field on an electrode over all states and corners, and
// where and when it stands.
func (e *Evidence) FieldPeak(f *chain.Field, electrode string) (field.Peak, Condition, error) {
	var most field.Peak
	var under Condition
	for i, c := range e.conditionsOf(f) {
		fields, err := e.Under(c).FieldsUnder(f)
		if err != nil {
			return most, c, err
		}
		for j, at := range fields {
			p, err := at.Peak(electrode)
			if err != nil {
				return most, c, err
			}
			if i+j == 0 || p.Strength > most.Strength {
				most, under = p, c
			}
		}
	}
	return most, under, nil
}

// FieldReadings are the readings at a point over all states and corners; none where the
// field cannot be had or the point lies outside it.
func (e *Evidence) FieldReadings(f *chain.Field, at profile.Point) []field.Reading {
	var all []field.Reading
	for _, c := range e.conditionsOf(f) {
		fields, err := e.Under(c).FieldsUnder(f)
		if err != nil {
			return nil
		}
		for _, x := range fields {
			readings, err := x.At(at)
			if err != nil {
				return nil
			}
			all = append(all, readings...)
		}
	}
	return all
}

// conditionsOf are the conditions under which a field differs: one where no electrode
// is at a node.
func (e *Evidence) conditionsOf(f *chain.Field) []Condition {
	if slices.ContainsFunc(f.Electrodes, func(el chain.Electrode) bool { return el.Node.Set() }) {
		return Ratings()
	}
	return []Condition{{State: Working}}
}
