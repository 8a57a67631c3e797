package evidence

import (
	"errors"
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

// FieldUnder is the field of an arrangement with its electrodes at the potentials of
// the condition: a node at its highest over a period of the drive.
func (e *Evidence) FieldUnder(f *chain.Field) (*field.Field, error) {
	s, err := e.FieldOf(f)
	if err != nil {
		return nil, err
	}
	potentials := map[string]quantity.Voltage{}
	for _, el := range f.Electrodes {
		v := el.Voltage.V
		if el.Node.Set() {
			if v, err = e.highestSigned(el.Node.V); err != nil {
				return nil, err
			}
		}
		potentials[el.Name.V] = v
	}
	return s.Under(potentials)
}

// highestSigned is the potential of a node where it is farthest from ground.
func (e *Evidence) highestSigned(node string) (quantity.Voltage, error) {
	s, err := e.swing(node, "ground")
	if -s.Least > s.Greatest {
		return s.Least, err
	}
	return s.Greatest, err
}

// FieldPeak is the greatest field on an electrode over all states and corners, and
// where and when it stands.
func (e *Evidence) FieldPeak(f *chain.Field, electrode string) (field.Peak, Condition, error) {
	conditions := []Condition{{State: Working}}
	if slices.ContainsFunc(f.Electrodes, func(el chain.Electrode) bool { return el.Node.Set() }) {
		conditions = Ratings()
	}
	var most field.Peak
	var under Condition
	for i, c := range conditions {
		at, err := e.Under(c).FieldUnder(f)
		if err != nil {
			return most, c, err
		}
		p, err := at.Peak(electrode)
		if err != nil {
			return most, c, err
		}
		if i == 0 || p.Strength > most.Strength {
			most, under = p, c
		}
	}
	return most, under, nil
}
