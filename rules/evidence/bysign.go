package evidence

import (
	"math"
	"strings"

	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Worst is the largest value over every state and corner of the tolerances, that by the
// sign of each part's sensitivity included.
//
// The corner by sign is sought for the largest of the others alone, in its state: each
// described part with a tolerance is taken to its high end by itself, at the drive of the
// nominal chain, which says whether it raises or lowers the value, and all are then taken
// together to the end that raises it. Where regulation holds a node, what counts is the
// value against the voltage of that node. That is a solution a part, shared among all
// values of the state, and one for the corner; not every combination. All capacitors of
// one column are one part. With a fault it is the value under that.
func Worst[Q ~float64](e *Evidence, names []string, value func(*Evidence, string) (Q, error)) (Extreme[Q], error) {
	most, err := Largest(e, e.Ratings(), names, value)
	if err != nil || e.failed() {
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
	at.Corner = Nominal
	base, held, err := against(e.Under(at), most.Name, value)
	if err != nil {
		return Nominal, err
	}
	if at.Peak, err = e.Under(at).Peak(); err != nil {
		return Nominal, err
	}
	var high, low []string
	for _, part := range e.toleranced() {
		at.Corner = alone(part)
		v, now, err := against(e.Under(at), most.Name, value)
		if err != nil {
			return Nominal, err
		}
		switch change := v*rescaled(float64(held/now), most.Value) - base; {
		case math.Abs(change) <= indifferent*math.Abs(base):
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

// rescaled is how a value goes with the drive when all goes in proportion: powers and
// energies as its square.
func rescaled[Q ~float64](drive float64, of Q) float64 {
	switch any(of).(type) {
	case quantity.Power, quantity.Energy:
		return drive * drive
	}
	return drive
}

// against is a value with the magnitude of the voltage it counts against: that of the node
// which regulation holds, or one.
func against[Q ~float64](e *Evidence, name string, value func(*Evidence, string) (Q, error)) (v float64, held quantity.Voltage, err error) {
	q, err := value(e, name)
	if err != nil || e.chain.Regulation == nil || e.condition.State == Lost {
		return float64(q), 1, err
	}
	u, err := e.Potential(e.chain.Divider.Senses.Or("output"))
	if err == nil && u == 0 {
		err = lack.Failed("the node that regulation holds is at ground")
	}
	return float64(q), magnitude(u), err
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
	t, _ := toleranceOf(el)
	return t.V
}

// PartOf is the described part of an element: "multiplier.diode.a.3" is one of
// "multiplier.diode".
func PartOf(element string) string {
	if fields := strings.Split(element, "."); fields[0] == "multiplier" || strings.HasPrefix(element, "heater.centre_resistors") {
		return strings.Join(fields[:2], ".")
	}
	return element
}
