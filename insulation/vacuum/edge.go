package vacuum

import (
	"fmt"
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/solve"
)

// EdgeExponent is the exponent m of the field E ~ r^m near the edge where an insulator
// of a relative permittivity meets a flat electrode in vacuum, at a distance r; the
// angle is that inside the insulator, between its surface and the electrode, above 0
// and under 180 degrees. Under 90 degrees m is positive and the junction is shielded;
// at 90 it is 0; above 90 degrees the field rises without limit towards the junction,
// which at the negative electrode starts a flashover.
func EdgeExponent(permittivity float64, angle quantity.Angle) (gap.Answer[quantity.Fraction], error) {
	none := gap.Answer[quantity.Fraction]{}
	switch {
	case !quantity.AtLeast(permittivity, 1):
		return none, lack.Because("the relative permittivity of the insulator is not given, 1 or more")
	case angle <= 0 || angle >= math.Pi:
		return none, lack.Range("an insulator meets its electrode at more than 0 and less than 180 degrees, asked for %s", quantity.Text(angle))
	}
	n, err := potentialExponent(permittivity, float64(angle))
	if err != nil {
		return none, err
	}
	a := gap.Answer[quantity.Fraction]{
		Value:   quantity.Fraction(n - 1),
		Because: fmt.Sprintf("insulator at %.3g degrees to its electrode", float64(angle)*180/math.Pi),
		Sources: []gap.Source{{Text: "potential of two wedges on a plane electrode", Mark: gap.Derived, Governs: true}},
	}
	switch {
	case quantity.Equal(float64(angle), math.Pi/2):
		a.Value, a.Because = 0, a.Because+": the field is even at the junction"
	case a.Value < 0:
		a.Because += ": the field rises without limit towards the junction"
	case a.Value > 0:
		a.Because += ": the junction is shielded"
	}
	return a, nil
}

// potentialExponent is the least n > 0 of the potentials r^n sin nθ in vacuum and
// insulator whose flux passes the surface between them: sin nπ + K sin n(π − 2α) = 0,
// K = (ε − 1)/(ε + 1) (derived). It lies between 1/2 and 3/2.
func potentialExponent(permittivity, angle float64) (float64, error) {
	k := (permittivity - 1) / (permittivity + 1)
	return solve.Rise(0.5, 1.5, func(n float64) (float64, error) {
		return -math.Sin(n*math.Pi) - k*math.Sin(n*(math.Pi-2*angle)), nil
	})
}
