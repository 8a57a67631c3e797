package evidence

import (
	"errors"
	"maps"

	"kilovet/hv/lack"
	"kilovet/hv/profile"
	"kilovet/hv/quantity"
	"kilovet/insulation/field"
	"kilovet/rules/build"
)

// FieldOf is the solved field of an arrangement, for one volt on each electrode in turn.
func (e *Evidence) FieldOf(f *build.Arrangement) (*field.Solution, error) {
	return remember(e.Under(Condition{}), "field "+f.Name.V, func() (*field.Solution, error) { return solve(f) })
}

func solve(f *build.Arrangement) (*field.Solution, error) { return solveBy(f, field.Solve) }

func solveBy(f *build.Arrangement, by func(field.Arrangement) (*field.Solution, error)) (*field.Solution, error) {
	if f.Err != nil {
		return nil, f.Err
	}
	s := sketchOf(&f.Field)
	if len(s.faults) > 0 {
		return nil, spoilt(s.faults)
	}
	solution, err := by(s.Arrangement)
	var wrong profile.Faults
	if errors.As(err, &wrong) {
		return nil, spoilt(wrong)
	}
	return solution, err
}

// spoilt says that outlines make no figure. Reading a description finds it first.
func spoilt(wrong profile.Faults) error {
	return lack.Failed("the outlines do not make a figure: %s", wrong[0].Error())
}

// SettledOf is the field of an arrangement long after a direct voltage was switched on,
// when the resistivities decide.
func (e *Evidence) SettledOf(f *build.Arrangement) (*field.Solution, error) {
	return remember(e.Under(Condition{}), "settled field "+f.Name.V, func() (*field.Solution, error) {
		s, err := e.FieldOf(f)
		if err != nil {
			return nil, err
		}
		return s.Settled()
	})
}

// extremes are the potentials of an arrangement at the extremes of its nodes over a
// period of the drive, every combination of them: what swings in step is taken to swing
// against each other too, on the cautious side.
func (e *Evidence) extremes(f *build.Arrangement) ([]map[string]quantity.Voltage, error) {
	cases := []map[string]quantity.Voltage{{}}
	nodes := map[string]bool{}
	for _, el := range f.Electrodes {
		name := el.Name.V
		if !el.Node.Set() {
			each(cases, name, el.Voltage.V)
			continue
		}
		if nodes[name] {
			continue // a further piece of the same electrode
		}
		nodes[name] = true
		least, greatest, err := e.span(el.Node.V)
		if err != nil {
			return nil, err
		}
		other := copies(cases)
		each(cases, name, least)
		if !quantity.Equal(least, greatest) {
			each(other, name, greatest)
			cases = append(cases, other...)
		}
	}
	if len(cases) > mostCases {
		return nil, lack.Range("a field with more than four electrodes at nodes that swing is not judged")
	}
	return cases, nil
}

// mostCases bounds the combinations of extremes.
const mostCases = 16

// span is between what potentials a node swings to ground: the mains between both peaks of
// its live conductor.
func (e *Evidence) span(node string) (least, greatest quantity.Voltage, err error) {
	if node == "ground" {
		return 0, 0, nil
	}
	if e.OnMains(node) {
		peak, err := e.Touched(node)
		return -peak, peak, err
	}
	w, err := e.swing(node, "ground")
	return w.Least, w.Greatest, err
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

// FieldReadings are the readings at a point over all states and corners; none where the
// field cannot be had or the point lies outside it.
func (e *Evidence) FieldReadings(f *build.Arrangement, at profile.Point) []field.Reading {
	cases, err := e.fieldCases(f)
	if err != nil {
		return nil
	}
	var all []field.Reading
	for _, c := range cases {
		if c.Settled {
			continue
		}
		readings, err := c.Field.At(at)
		if err != nil {
			return nil
		}
		all = append(all, readings...)
	}
	return all
}
