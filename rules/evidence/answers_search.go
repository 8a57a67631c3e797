package evidence

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/field"
	"kilovet/rules/build"
)

// Bounds of a search for a dimension: solutions, and how far from the present value.
const (
	mostTries   = 4
	resizedMost = 4.0
	littleStep  = 1.02
	leastPower  = 0.03
	justMet     = 0.97                // of what is allowed, from which a dimension serves
	sharpPower  = -0.4                // of the radius of an edge: between that of a right angle, −1/3, and of a sheet, −1/2
	roundest    = 1000 * EdgeDistance // to which a sharp edge is rounded at most
)

func answer(d build.Dimension, c fieldCase, now tried, by measure) Answer {
	a := Answer{Dimension: d}
	if !(d.Value > 0) {
		a.Needed, a.Err = roundedOff(d, c, now, by)
		return a
	}
	v := d.Value * littleStep
	t, err := try(d, v, c, (*field.Solution).Moved, field.Fine, by)
	if err != nil {
		v = d.Value / littleStep
		if t, err = try(d, v, c, (*field.Solution).Moved, field.Fine, by); err != nil {
			a.Err = err
			return a
		}
	}
	way := math.Log(float64(v / d.Value))
	a.Power = math.Log(float64(t.strength/now.strength)) / way
	power := math.Log(t.demand/now.demand) / way
	switch {
	case now.demand <= 1:
		a.Err = lack.Failed(nothingAsked)
	case math.Abs(power) < leastPower:
		a.Err = lack.Failed("it changes too little")
	default:
		a.Needed, a.Err = search(d, c, now.demand, power, by)
	}
	return a
}

// search goes by the power law and corrects it by what the solutions give.
func search(d build.Dimension, c fieldCase, asked, power float64, by measure) (quantity.Length, error) {
	return track(d, c, float64(d.Value), asked, power, by, func(next float64) error {
		if next < resizedMost*float64(d.Value) && next > float64(d.Value)/resizedMost {
			return nil
		}
		return lack.Range("not even a fourth or four times as much is enough")
	})
}

// roundedOff searches the radius of an edge that was sharp, from the field at the distance
// at which that is judged, which a radius as long has about.
func roundedOff(d build.Dimension, c fieldCase, now tried, by measure) (quantity.Length, error) {
	if now.demand <= 1 {
		return 0, lack.Failed(nothingAsked)
	}
	return track(d, c, float64(EdgeDistance), now.demand, sharpPower, by, func(next float64) error {
		if next <= float64(roundest) {
			return nil
		}
		return lack.Range("not even %s is enough", quantity.Text(roundest))
	})
}

// track follows a power law from a length and what is asked there to a length that serves.
func track(d build.Dimension, c fieldCase, last, asked, power float64, by measure, within func(float64) error) (quantity.Length, error) {
	way := power
	for range mostTries {
		aim := math.Sqrt(justMet) // between what serves and what is allowed
		next := last * math.Pow(aim/asked, 1/power)
		if err := within(next); err != nil {
			return 0, err
		}
		t, err := try(d, quantity.Length(next), c, (*field.Solution).MovedFar, field.Rough, by)
		if err != nil {
			return 0, err
		}
		if t.demand <= 1 && t.demand >= justMet*justMet {
			return quantity.Length(next), nil
		}
		if p := math.Log(t.demand/asked) / math.Log(next/last); math.Abs(p) > leastPower && p*way > 0 {
			power = p
		}
		last, asked = next, t.demand
	}
	return 0, lack.Failed("not found within %d solutions", mostTries)
}

// mover is a way to the field of outlines with other lengths.
type mover func(*field.Solution, field.Arrangement, field.Aim) (*field.Solution, error)

// try solves an arrangement with another dimension under the same voltages.
func try(d build.Dimension, v quantity.Length, c fieldCase, move mover, aim field.Aim, by measure) (tried, error) {
	f := d.With(v)
	s, err := solveBy(f, func(a field.Arrangement) (*field.Solution, error) { return move(c.Field.Solution, a, aim) })
	if err != nil {
		return tried{}, err
	}
	at := c
	if at.Field, err = s.Under(c.potentials); err != nil {
		return tried{}, err
	}
	return by(f, at)
}
