package evidence

import (
	"math"
	"strings"

	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
)

// Worst is the largest value over every state and corner of the tolerances, that by the
// sign of each part's sensitivity included.
//
// The corner by sign is sought for the largest of the others alone, in its state: each
// described part with a tolerance is taken to its high end by itself, which says whether
// it raises or lowers the value, and all are then taken together to the end that raises
// it. That is a solution a part and one more, shared among all values of the state; not
// every combination. All capacitors of one column are one part.
func Worst[Q ~float64](e *Evidence, names []string, value func(*Evidence, string) (Q, error)) (Extreme[Q], error) {
	most, err := Largest(e, Ratings(), names, value)
	if err != nil {
		return most, err
	}
	return BySign(e, most, value)
}

// BySign raises a largest value to that in the corner by the sign of each part's
// sensitivity, where that is larger.
func BySign[Q ~float64](e *Evidence, most Extreme[Q], value func(*Evidence, string) (Q, error)) (Extreme[Q], error) {
	corner, err := cornerBySign(e, most, value)
	if err != nil || corner == Nominal {
		return most, err
	}
	at := most.Under
	at.Corner = corner
	v, err := value(e.Under(at), most.Name)
	if err == nil && float64(v) > (1+indifferent)*float64(most.Value) {
		most.Value, most.Under = v, at
	}
	return most, err
}

// indifferent is the relative change below which a part's whole tolerance does not matter.
const indifferent = 1e-4

// cornerBySign takes each part to the end that raises a value.
func cornerBySign[Q ~float64](e *Evidence, most Extreme[Q], value func(*Evidence, string) (Q, error)) (Corner, error) {
	at := most.Under
	at.Corner = alone("")
	base, err := value(e.Under(at), most.Name)
	if err != nil {
		return Nominal, err
	}
	var high, low []string
	for _, part := range e.toleranced() {
		at.Corner = alone(part)
		v, err := value(e.Under(at), most.Name)
		if err != nil {
			return Nominal, err
		}
		switch change := float64(v - base); {
		case math.Abs(change) <= indifferent*math.Abs(float64(base)):
		case change > 0:
			high = append(high, part)
		default:
			low = append(low, part)
		}
	}
	if len(low) == 0 && most.Under.Corner == AllHigh || len(high) == 0 && most.Under.Corner == AllLow {
		return Nominal, nil // the corner it is from
	}
	return together(high, low), nil
}

// toleranced names the described parts whose value has a tolerance, in the order of the
// circuit.
func (e *Evidence) toleranced() []string {
	var names []string
	seen := map[string]bool{}
	all := e.Layout().Elements
	for i := range all {
		name := PartOf(all[i].Name)
		if !seen[name] && tolerance(&all[i]) > 0 {
			seen[name] = true
			names = append(names, name)
		}
	}
	return names
}

func tolerance(el *circuit.Element) quantity.Fraction {
	switch {
	case el.ResistorPart != nil:
		return el.ResistorPart.Tolerance.V
	case el.CapacitorPart != nil:
		return el.CapacitorPart.Tolerance.V
	case el.LoosePart != nil:
		return el.LoosePart.Tolerance.V
	}
	return 0
}

// PartOf is the described part of an element: "multiplier.diode.a.3" is one of
// "multiplier.diode".
func PartOf(element string) string {
	if fields := strings.Split(element, "."); fields[0] == "multiplier" || strings.HasPrefix(element, "heater.centre_resistors") {
		return strings.Join(fields[:2], ".")
	}
	return element
}
