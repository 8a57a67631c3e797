package circuit

import "kilovet/hv/quantity"

// Uneven says how the elements of a resistor of several strings are no longer alike.
type Uneven struct {
	Lost  int     // strings that are open
	Odd   bool    // one element of one string has another value
	Times float64 // that many times the value of the others
}

// OneOff is the circuit with one element of a resistor at a number of times its value; 0
// is a short of one of several.
func (c *Circuit) OneOff(name string, times float64) *Circuit {
	return c.With(name, func(e *Element) {
		was := e.conductance()
		e.Uneven.Odd, e.Uneven.Times = true, times
		e.Resistance *= quantity.Resistance(was / e.conductance())
	})
}

// elements are the number in series and the number of strings that carry current.
func (e *Element) elements() (count, strings float64) {
	if e.ResistorPart == nil {
		return 1, 1
	}
	n, s := e.ResistorPart.Elements()
	return float64(n), float64(s - e.Uneven.Lost)
}

// odd is the resistance of the string with the odd element, in elements.
func (e *Element) odd(count float64) float64 { return count - 1 + e.Uneven.Times }

// conductance of all strings together, in that of one element.
func (e *Element) conductance() float64 {
	n, s := e.elements()
	if !e.Uneven.Odd {
		return s / n
	}
	return (s-1)/n + 1/e.odd(n)
}

// Share is the largest part of a resistor's voltage that stands across any one element.
func (e *Element) Share() float64 {
	n, _ := e.elements()
	if !e.Uneven.Odd {
		return 1 / n
	}
	return max(1/n, 1/e.odd(n), e.Uneven.Times/e.odd(n))
}

// Heat is the largest part of a resistor's power that any one element turns into heat.
func (e *Element) Heat() float64 {
	n, s := e.elements()
	if !e.Uneven.Odd {
		return 1 / (n * s)
	}
	odd := e.odd(n)
	most := max(1, e.Uneven.Times) / (odd * odd)
	if s > 1 {
		most = max(most, 1/(n*n))
	}
	return most / e.conductance()
}
