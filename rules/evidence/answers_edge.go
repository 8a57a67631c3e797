package evidence

import (
	"fmt"
	"slices"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation"
	"kilovet/insulation/field"
	"kilovet/rules/build"
)

// EdgeAnswers are those of all dimensions for the field before an edge, at the distance at
// which it is judged in each, the least change first.
func (e *Evidence) EdgeAnswers(f *build.Arrangement, edge field.Edge) ([]Answer, error) {
	return remember(e.Under(Condition{}), fmt.Sprintf("edge answers %s %v", f.Name.V, edge.At), func() ([]Answer, error) {
		distance, err := e.JudgedAt(f, edge)
		if err != nil {
			return nil, err
		}
		at, err := e.AtEdge(f, edge, distance)
		if err != nil {
			return nil, err
		}
		all := at.in.Field.Edges()
		i := slices.IndexFunc(all, func(x field.Edge) bool { return x.At.Distance(edge.At) <= samePlace })
		if i < 0 {
			return nil, lack.Failed("the edge was not found again")
		}
		return leastFirst(answersFor(f, at.in, edge.At, e.atEdge(i, len(all), all[i], at.Reading.Body)))
	})
}

// atEdge measures before the edge of a number out of so many, which with another dimension
// is elsewhere; where it has been rounded off, on the electrode that it was of.
func (e *Evidence) atEdge(i, of int, edge field.Edge, body string) measure {
	return func(f *build.Arrangement, c fieldCase) (tried, error) {
		all := c.Field.Edges()
		switch {
		case len(all) == of-1 && len(edge.Electrodes) > 0:
			return atPlace(clearIn(c, Where{Electrode: edge.Electrodes[0], Body: body}), e.demanded)(f, c)
		case len(all) != of || !slices.Equal(all[i].Bodies, edge.Bodies) || !slices.Equal(all[i].Electrodes, edge.Electrodes):
			return tried{}, lack.Failed("the outline then has other edges")
		}
		distance := min(EdgeDistance, roomShare*c.Field.Room(all[i]))
		r, found, err := strongest(f, c, all[i], distance)
		if err != nil {
			return tried{}, err
		}
		if !found {
			return tried{}, lack.Failed("only solids meet there")
		}
		limit, err := insulation.AtEdge(e.Filling(f, r.Body), distance)
		return tried{r.Strength(), float64(r.Strength() / limit.Value)}, err
	}
}

// clearIn looks clear of the edges that are left in a field where there is no peak for them.
func clearIn(c fieldCase, w Where) Where {
	if _, err := w.find(c.Field); err != nil {
		w.Distance = EdgeDistance
	}
	return w
}

// strongest is the strongest reading of a field at a distance from an edge in what is no
// solid, if there is any.
func strongest(f *build.Arrangement, c fieldCase, edge field.Edge, distance quantity.Length) (most field.Reading, found bool, err error) {
	readings, err := c.Field.Near(edge, distance)
	for _, r := range readings {
		if Open(f, r.Body) && (!found || r.Strength() > most.Strength()) {
			most, found = r, true
		}
	}
	return most, found, err
}
