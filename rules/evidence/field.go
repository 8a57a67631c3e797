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
		s := sketchOf(f)
		if len(s.faults) > 0 {
			return nil, spoilt(s.faults)
		}
		solution, err := field.Solve(s.Arrangement)
		var wrong profile.Faults
		if errors.As(err, &wrong) {
			return nil, spoilt(wrong)
		}
		return solution, err
	})
}

// spoilt says that outlines make no figure. Reading a description finds it first.
func spoilt(wrong profile.Faults) error {
	return lack.Failed("the outlines do not make a figure: %s", wrong[0].Error())
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
