package solid

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// positive refuses sizes that are not given.
func positive(sizes ...float64) error {
	for _, s := range sizes {
		if !(s > 0) {
			return lack.Because("a size of the cable is not given")
		}
	}
	return nil
}

func ratio(inner, outer quantity.Length) (float64, error) {
	if err := positive(float64(inner), float64(outer)); err != nil {
		return 0, err
	}
	if outer <= inner {
		return 0, lack.Range("the outer radius must exceed the inner one")
	}
	return math.Log(float64(outer / inner)), nil
}

// CoaxialCapacitance is C = 2π ε₀ ε/ln(R/r) for each metre. The often printed 24 ε/log₁₀
// pF/m is 0.65 % low.
func CoaxialCapacitance(permittivity float64, inner, outer quantity.Length) (quantity.LinearCapacitance, error) {
	l, err := ratio(inner, outer)
	if err == nil {
		err = positive(permittivity)
	}
	if err != nil {
		return 0, err
	}
	return quantity.LinearCapacitance(2 * math.Pi * vacuumPermittivity * permittivity / l), nil // Mehta, Principles of Power System, ch. 11
}

// RadialResistance is the insulation resistance of a length of cable, R = ρ ln(R/r)/(2π
// l); the longer the cable the lower.
func RadialResistance(rho quantity.Resistivity, inner, outer, length quantity.Length) (quantity.Resistance, error) {
	l, err := ratio(inner, outer)
	if err == nil {
		err = positive(float64(rho), float64(length))
	}
	if err != nil {
		return 0, err
	}
	return quantity.Resistance(float64(rho) * l / (2 * math.Pi * float64(length))), nil // Mehta, Principles of Power System, ex. 11.1
}

// LeakageResistance is what lets a capacitance fall from one voltage to another in a
// time, R = t/(C ln(V₀/V₁)).
func LeakageResistance(c quantity.Capacitance, before, after quantity.Voltage, t quantity.Time) (quantity.Resistance, error) {
	if err := positive(float64(c), float64(after), float64(t)); err != nil {
		return 0, err
	}
	if before <= after {
		return 0, lack.Range("a leak lowers the voltage: %s to %s", quantity.Text(before), quantity.Text(after))
	}
	return quantity.Resistance(float64(t) / (float64(c) * math.Log(float64(before/after)))), nil // Wadhwa, High Voltage Engineering, ex. 6.4
}

// OuterRadius is that of coaxial insulation whose field at the conductor is a limit, R = r
// exp(V/(E r)).
func OuterRadius(v quantity.Voltage, limit quantity.Field, inner quantity.Length) (quantity.Length, error) {
	if err := positive(float64(v), float64(limit), float64(inner)); err != nil {
		return 0, err
	}
	return inner * quantity.Length(math.Exp(float64(v)/(float64(limit)*float64(inner)))), nil // Ray, Electrical Power Systems, ex. 6.2
}

// BestConductor is the conductor for which the sheath of a limited field is smallest, r =
// V/E, and that sheath, R = e r. The optimum is flat: 8 % of radius are 0.4 % of field.
func BestConductor(v quantity.Voltage, limit quantity.Field) (inner, outer quantity.Length, err error) {
	if err := positive(float64(v), float64(limit)); err != nil {
		return 0, 0, err
	}
	inner = quantity.Length(float64(v) / float64(limit)) // Gupta, Elements of Power System, ex. 11.6
	return inner, inner * math.E, nil
}

// Ply is a material of graded insulation: its relative permittivity and the highest
// field it may take.
type Ply struct {
	Permittivity float64
	Limit        quantity.Field
}

// Grade divides the room between two radii among plies, from the conductor outwards, so
// that under alternating or switched voltage all reach their limits together: ε E r is
// the same at every inner face. Plies whose ε E does not fall outwards, and room that
// ends before the last of them begins, are a lack.
func Grade(inner, outer quantity.Length, plies []Ply) (Wall, error) {
	if _, err := ratio(inner, outer); err != nil {
		return Wall{}, err
	}
	w := Wall{InnerRadius: inner}
	from := inner
	for i, p := range plies {
		if err := positive(p.Permittivity, float64(p.Limit)); err != nil {
			return Wall{}, err
		}
		to := outer
		if i+1 < len(plies) {
			next := plies[i+1]
			if err := positive(next.Permittivity, float64(next.Limit)); err != nil {
				return Wall{}, err
			}
			to = from * quantity.Length(p.Permittivity*float64(p.Limit)/(next.Permittivity*float64(next.Limit))) // Abdel-Salam et al., High-Voltage Engineering, ex. 12.1
		}
		if to <= from || to > outer {
			return Wall{}, lack.Range("plies in this order do not all reach their limits within %s", quantity.Text(outer))
		}
		w.Layers = append(w.Layers, Layer{Thickness: to - from, Permittivity: p.Permittivity})
		from = to
	}
	return w, nil
}
