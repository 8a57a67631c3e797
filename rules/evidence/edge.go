package evidence

import (
	"fmt"
	"strings"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/field"
	"kilovet/insulation/gap"
	"kilovet/rules/build"
)

// EdgeDistance is where the field is judged before a sharp edge or a junction, at which
// it has no greatest value, unless there is less room.
const EdgeDistance quantity.Length = 0.1e-3

// roomShare is the part of the gap beside an edge, or of the thickness of what has it, at
// which the field is judged at most: nothing there is rounded or filled any wider.
const roomShare = 0.25

// JudgedAt is where the field is judged before an edge of an arrangement.
func (e *Evidence) JudgedAt(f *build.Arrangement, edge field.Edge) (quantity.Length, error) {
	s, err := e.FieldOf(f)
	if err != nil {
		return 0, err
	}
	return min(EdgeDistance, roomShare*s.Room(edge)), nil
}

// EdgeDistances are those at which it is shown.
func EdgeDistances() []quantity.Length {
	return []quantity.Length{EdgeDistance / 2, EdgeDistance, 5 * EdgeDistance, 10 * EdgeDistance}
}

// EdgeStress is the greatest field at a distance from an edge or junction, over all
// states and corners and both distributions, in what is no solid.
type EdgeStress struct {
	Reading  field.Reading
	Strength quantity.Field
	Exponent float64 // of the distribution in which it stands
	Polarity gap.Polarity
	Under    Condition
	Settled  bool

	in fieldCase
}

// Text says under what it stands, in words.
func (s EdgeStress) Text() string { return Stress{Under: s.Under, Settled: s.Settled}.Text() }

// AtEdge is the field at a distance from an edge of the electrostatic field.
func (e *Evidence) AtEdge(f *build.Arrangement, edge field.Edge, distance quantity.Length) (EdgeStress, error) {
	key := fmt.Sprintf("edge %s %v %v", f.Name.V, edge.At, float64(distance))
	return remember(e.Under(Condition{}), key, func() (EdgeStress, error) {
		cases, err := e.fieldCases(f)
		if err != nil {
			return EdgeStress{}, err
		}
		var most EdgeStress
		found := false
		for _, c := range cases {
			same, there := alikeEdge(c.Field, edge)
			if !there {
				continue
			}
			r, reads, err := strongest(f, c, same, distance)
			if err != nil {
				return EdgeStress{}, err
			}
			if reads && (!found || r.Strength() > most.Strength) {
				most = EdgeStress{r, r.Strength(), same.Exponent, polarityAt(c, same), c.Under, c.Settled, c}
				found = true
			}
		}
		if !found {
			return most, lack.Failed("at %v only solids meet", edge.At)
		}
		return most, nil
	})
}

// EdgeName names an edge by its electrodes and place.
func EdgeName(x field.Edge) string {
	what := strings.Join(x.Electrodes, ", ")
	if what == "" {
		what = strings.Join(x.Bodies, ", ")
	}
	return fmt.Sprintf("%s at r %s, z %s", what, quantity.Text(x.At.R), quantity.Text(x.At.Z))
}

// samePlace is the distance at which two edges are one.
const samePlace quantity.Length = 1e-9

// alikeEdge is the edge of another field at the same place between the same bodies.
func alikeEdge(f *field.Field, edge field.Edge) (field.Edge, bool) {
	for _, other := range f.Edges() {
		if other.At.Distance(edge.At) <= samePlace && len(other.Bodies) == len(edge.Bodies) && other.Bodies[0] == edge.Bodies[0] {
			return other, true
		}
	}
	return field.Edge{}, false
}

// polarityAt is the sign of the electrode at an edge against all others.
func polarityAt(c fieldCase, edge field.Edge) gap.Polarity {
	if len(edge.Electrodes) == 0 {
		return gap.Unknown
	}
	here := c.potentials[edge.Electrodes[0]]
	polarity := gap.Unknown
	for _, v := range c.potentials {
		switch {
		case v > here && polarity == gap.Unknown:
			polarity = gap.Negative
		case v < here:
			return gap.Positive
		}
	}
	return polarity
}
