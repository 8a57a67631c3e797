package evidence

import (
	"fmt"
	"math"
	"math/cmplx"

	"kilovet/hv/lack"
	"kilovet/hv/parallel"
	"kilovet/hv/profile"
	"kilovet/hv/quantity"
	"kilovet/insulation"
	"kilovet/insulation/field"
	"kilovet/insulation/gap"
	"kilovet/insulation/vacuum"
	"kilovet/rules/build"
)

// Answer is what a dimension of an arrangement does to a greatest field.
type Answer struct {
	build.Dimension
	Power  float64         // the field goes with the dimension to this power, about
	Needed quantity.Length // the dimension at which the rule is just met
	Err    error           // why there is none; also where the rule is met already
}

// Bounds of a search for a dimension: solutions, and how far from the present value.
const (
	mostTries    = 4
	resizedMost  = 4.0
	littleStep   = 1.02
	leastPower   = 0.03
	mostMoves    = 6    // dimensions of a described arrangement that are tried
	justMet      = 0.97 // of what is allowed, from which a dimension serves
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
		return answersFor(f, weak, e.demanded)
	})
}

// demand is a field over what a rule allows there.
type demand func(*build.Arrangement, Stress, Where) (float64, error)

// answersFor are those of all dimensions for a place and what is asked of it.
func answersFor(f *build.Arrangement, weak Weak, of demand) ([]Answer, error) {
	asked, err := of(f, weak.Stress, weak.Where)
	if err != nil {
		return nil, err
	}
	list := nearest(f.Dimensions, weak.At)
	all := make([]Answer, len(list))
	parallel.Each(len(list), func(i int) { all[i] = answer(list[i], weak, asked, of) })
	return all, nil
}

// nearest leaves out the dimensions of a described arrangement that lie farthest from
// the weakest point, and those of no length.
func nearest(all []build.Dimension, at profile.Point) (list []build.Dimension) {
	far := func(d build.Dimension) float64 {
		if d.Near == nil {
			return 0
		}
		return cmplx.Abs(*d.Near - complex(float64(at.R), float64(at.Z)))
	}
	for _, d := range all {
		closer := 0
		for _, other := range all {
			if other.Near != nil && far(other) < far(d) {
				closer++
			}
		}
		if d.Value > 0 && (d.Near == nil || closer < mostMoves) {
			list = append(list, d)
		}
	}
	return list
}

// tried is an arrangement with another dimension.
type tried struct {
	strength quantity.Field
	demand   float64 // of what is allowed
}

func answer(d build.Dimension, weak Weak, asked float64, of demand) Answer {
	a := Answer{Dimension: d}
	v := d.Value * littleStep
	t, err := try(d, v, weak, (*field.Solution).Moved, field.Fine, of)
	if err != nil {
		v = d.Value / littleStep
		if t, err = try(d, v, weak, (*field.Solution).Moved, field.Fine, of); err != nil {
			a.Err = err
			return a
		}
	}
	way := math.Log(float64(v / d.Value))
	a.Power = math.Log(float64(t.strength/weak.Strength)) / way
	power := math.Log(t.demand/asked) / way
	switch {
	case asked <= 1:
		a.Err = lack.Failed(nothingAsked)
	case math.Abs(power) < leastPower:
		a.Err = lack.Failed("it changes too little")
	default:
		a.Needed, a.Err = search(d, weak, asked, power, of)
	}
	return a
}

// search goes by the power law and corrects it by what the solutions give.
func search(d build.Dimension, weak Weak, asked, power float64, of demand) (quantity.Length, error) {
	last, demand := float64(d.Value), asked
	for range mostTries {
		aim := math.Sqrt(justMet) // between what serves and what is allowed
		next := last * math.Pow(aim/demand, 1/power)
		if !(next < resizedMost*float64(d.Value) && next > float64(d.Value)/resizedMost) {
			return 0, lack.Range("not even a fourth or four times as much is enough")
		}
		t, err := try(d, quantity.Length(next), weak, (*field.Solution).MovedFar, field.Rough, of)
		if err != nil {
			return 0, err
		}
		if t.demand <= 1 && t.demand >= justMet*justMet {
			return quantity.Length(next), nil
		}
		if p := math.Log(t.demand/demand) / math.Log(next/last); math.Abs(p) > leastPower && p*power > 0 {
			power = p
		}
		last, demand = next, t.demand
	}
	return 0, lack.Failed("not found within %d solutions", mostTries)
}

// mover is a way to the field of outlines with other lengths.
type mover func(*field.Solution, field.Arrangement, field.Aim) (*field.Solution, error)

// try solves an arrangement with another dimension under the same voltages.
func try(d build.Dimension, v quantity.Length, weak Weak, by mover, aim field.Aim, of demand) (tried, error) {
	f := d.With(v)
	s, err := solveBy(f, func(a field.Arrangement) (*field.Solution, error) { return by(weak.Field.Solution, a, aim) })
	if err != nil {
		return tried{}, err
	}
	at, err := s.Under(weak.potentials)
	if err != nil {
		return tried{}, err
	}
	p, err := weak.Where.find(at)
	if err != nil {
		return tried{}, err
	}
	stress := Stress{Peak: p, Field: at, Under: weak.Under, Settled: weak.Settled, potentials: weak.potentials}
	asked, err := of(f, stress, weak.Where)
	return tried{p.Strength, asked}, err
}

// demanded is a field over what its rule allows there.
func (e *Evidence) demanded(f *build.Arrangement, p Stress, w Where) (float64, error) {
	if !Open(f, p.Body) {
		return e.demandedSolid(f, p)
	}
	g := e.Filling(f, p.Body)
	if g.Medium == gap.Vacuum {
		return float64(p.Strength / vacuum.EmissionField), nil
	}
	limit, _, err := insulation.Ionising(g)
	if err != nil || p.Strength <= limit {
		return float64(p.Strength / limit), err
	}
	traced, err := p.Field.Within(p.Peak)
	if err != nil {
		return 0, err
	}
	l, reversed, err := lineOf(traced)
	if err != nil {
		return 0, err
	}
	volts, polarity := across(traced, w, f)
	onset, err := insulation.StrengthAlong(g, l, sharpEnd(polarity, reversed)).Onset.Get()
	return float64(volts / onset), err
}

func (e *Evidence) demandedSolid(f *build.Arrangement, p Stress) (float64, error) {
	for i := range f.Dielectrics {
		if d := &f.Dielectrics[i]; d.Name.V == p.Body {
			u, err := useOf(p, d)
			if err != nil {
				return 0, err
			}
			return float64(p.Strength / u.allowed()), nil
		}
	}
	return 0, lack.Failed("there is no %s", p.Body)
}

// Text says what to do, empty where nothing helps.
func (a Answer) Text() string {
	if a.Err != nil {
		return ""
	}
	return fmt.Sprintf("%s of %s in place of %s", a.Name, quantity.Text(a.Needed), quantity.Text(a.Value))
}
