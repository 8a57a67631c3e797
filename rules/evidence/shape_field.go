package evidence

import (
	"slices"

	"kilovet/hv/chain"
	"kilovet/hv/quantity"
	"kilovet/insulation/field"
	"kilovet/rules/build"
)

// shapes are the arrangements of the spacings whose shape is to be worked out, at the
// highest voltage across them.
func (e *Evidence) shapes() (all []*build.Arrangement) {
	for _, s := range e.Spacings() {
		if !s.Shape.IsComputed() {
			continue
		}
		v, _, _, err := e.across(s)
		a := build.Shape(s, max(v.Peak, leastDrawn))
		if err != nil {
			a.Err = err
		}
		all = append(all, a)
	}
	return all
}

// leastDrawn is the voltage at which a gap without any is drawn.
const leastDrawn quantity.Voltage = 1

// shapeOrHole is the arrangement that was built from the shape of a spacing or, for the
// gaps of a bare feedthrough, from its dimensions, with the electrodes on which the peak
// of the gap is looked for, all where none is named; nil for none.
func (e *Evidence) shapeOrHole(s *chain.Spacing) (f *build.Arrangement, on []string) {
	all := e.Arrangements()
	if i := slices.IndexFunc(all, func(a *build.Arrangement) bool { return a.Gap == s }); i >= 0 {
		return all[i], nil
	}
	if s.Of == nil || s.Of.Sleeve != nil {
		return nil, nil
	}
	part, known := map[string]string{s.Of.Name.V + ": " + chain.PinGap: build.Pin, s.Of.Name.V + ": " + chain.EdgeGap: build.Plate}[s.Name.V]
	i := slices.IndexFunc(all, func(a *build.Arrangement) bool {
		return a.From == build.FromFeedthrough && a.Of == s.Of.Name.V && a.Medium.V == s.Medium.V && a.Err == nil
	})
	if !known || i < 0 {
		return nil, nil
	}
	return all[i], []string{part}
}

// looked are the electrodes of a named field on which the peak of a spacing is looked
// for: those at its nodes, all where it has a voltage.
func looked(f *build.Arrangement, s *chain.Spacing) (on []string) {
	for _, el := range f.Electrodes {
		if !s.From.Set() || slices.Contains(append(ends(s), s.To.V), el.Node.V) {
			on = append(on, el.Name.V)
		}
	}
	return on
}

// worstLine is the critical line with the greatest field of those from some electrodes
// through the medium, from all where none is named.
func (e *Evidence) worstLine(f *build.Arrangement, on []string) (most Critical, err error) {
	if on == nil {
		s, err := e.FieldOf(f)
		if err != nil {
			return most, err
		}
		on = s.Electrodes()
	}
	for _, name := range on {
		c, err := e.Critical(f, e.ClearOfEdges(f, Where{Electrode: name, Body: field.Medium}))
		if err != nil {
			return c, err
		}
		if most.Field == nil || c.Strength.Onset.Lack == nil && c.Peak.Strength > most.Peak.Strength {
			most = c
		}
	}
	return most, nil
}
