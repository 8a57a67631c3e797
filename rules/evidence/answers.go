package evidence

import (
	"cmp"
	"fmt"
	"math/cmplx"
	"slices"

	"kilovet/hv/lack"
	"kilovet/hv/parallel"
	"kilovet/hv/profile"
	"kilovet/hv/quantity"
	"kilovet/rules/build"
)

// Answer is what a dimension of an arrangement does to a greatest field.
type Answer struct {
	build.Dimension
	Power  float64         // the field goes with the dimension to this power, about; 0 for a sharp edge
	Needed quantity.Length // the dimension at which the rule is just met
	Err    error           // why there is none; also where the rule is met already
}

const (
	mostMoves    = 6                 // dimensions of a described arrangement that are tried
	besideEdge   = 10 * EdgeDistance // where what is judged is judged for an edge
	nothingAsked = "the rule is met"
)

// Answers are those of all dimensions of an arrangement for its weakest point, at the
// voltages under which it is weakest. At most five solutions a dimension.
func (e *Evidence) Answers(f *build.Arrangement) ([]Answer, error) {
	return remember(e.Under(Condition{}), "answers "+f.Name.V, func() ([]Answer, error) {
		weak, err := e.Weakest(f)
		if err != nil {
			return nil, err
		}
		if weak.Field == nil || !(weak.Strength > 0) {
			return nil, lack.Failed("no weakest point is known")
		}
		return answersFor(f, weak.setting(), weak.At, atPlace(weak.Where, e.demanded))
	})
}

// PlaceAnswers are those for the greatest field at any place, the least change first.
func (e *Evidence) PlaceAnswers(f *build.Arrangement, w Where) ([]Answer, error) {
	return remember(e.Under(Condition{}), fmt.Sprintf("answers %s %v", f.Name.V, w), func() ([]Answer, error) {
		p, err := e.Stress(f, w)
		if err != nil {
			return nil, err
		}
		return leastFirst(answersFor(f, p.setting(), p.At, atPlace(w, e.demanded)))
	})
}

// leastFirst sorts answers by how much they change.
func leastFirst(all []Answer, err error) ([]Answer, error) {
	slices.SortStableFunc(all, func(a, b Answer) int { return cmp.Compare(a.change(), b.change()) })
	return all, err
}

// change is how much a dimension changes, as a length; endless where there is no answer.
func (a Answer) change() quantity.Length {
	const endless = 1e9
	if a.Err != nil {
		return endless
	}
	return max(a.Needed-a.Value, a.Value-a.Needed)
}

// measure is the field at the place that is asked for, and over what a rule allows there.
type measure func(*build.Arrangement, fieldCase) (tried, error)

// tried is what an arrangement, perhaps with another dimension, has at a place.
type tried struct {
	strength quantity.Field
	demand   float64 // of what is allowed
}

// demand is a field over what a rule allows there.
type demand func(*build.Arrangement, Stress, Where) (float64, error)

// atPlace measures the greatest field somewhere.
func atPlace(w Where, of demand) measure {
	return func(f *build.Arrangement, c fieldCase) (tried, error) {
		p, err := w.find(c.Field)
		if err != nil {
			return tried{}, err
		}
		asked, err := of(f, Stress{p, c.Field, c.Under, c.Settled, c.potentials}, w)
		return tried{p.Strength, asked}, err
	}
}

// setting is the field that a greatest field stands in.
func (s Stress) setting() fieldCase {
	return fieldCase{Field: s.Field, Under: s.Under, Settled: s.Settled, potentials: s.potentials}
}

// answersFor are those of all dimensions near a place for what is measured there.
func answersFor(f *build.Arrangement, c fieldCase, at profile.Point, by measure) ([]Answer, error) {
	now, err := by(f, c)
	if err != nil {
		return nil, err
	}
	list := nearest(f.Dimensions, at)
	all := make([]Answer, len(list))
	parallel.Each(len(list), func(i int) { all[i] = answer(list[i], c, now, by) })
	return all, nil
}

// nearest leaves out the dimensions of a described arrangement that lie farthest from
// the weakest point, and sharp edges that are not where it is.
func nearest(all []build.Dimension, at profile.Point) (list []build.Dimension) {
	far := func(d build.Dimension) float64 {
		if d.Near == nil {
			return 0
		}
		return cmplx.Abs(*d.Near - complex(float64(at.R), float64(at.Z)))
	}
	all = slices.DeleteFunc(slices.Clone(all), func(d build.Dimension) bool {
		return !(d.Value > 0) && !(d.Near != nil && far(d) <= float64(besideEdge))
	})
	for _, d := range all {
		closer := 0
		for _, other := range all {
			if other.Near != nil && far(other) < far(d) {
				closer++
			}
		}
		if d.Near == nil || closer < mostMoves {
			list = append(list, d)
		}
	}
	return list
}

// Text says what to do, empty where nothing helps.
func (a Answer) Text() string {
	if a.Err != nil {
		return ""
	}
	was := quantity.Text(a.Value)
	if !(a.Value > 0) {
		was = "a sharp edge"
	}
	return fmt.Sprintf("%s of %s in place of %s", a.Name, quantity.Text(a.Needed), was)
}
