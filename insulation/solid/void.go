package solid

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/gas"
)

// Cavity is the shape of a void in solid insulation.
type Cavity string

// The shapes of voids.
const (
	FlatVoid        Cavity = "flat"      // across the field: a delamination; the worst
	SphericalVoid   Cavity = "spherical" // a bubble
	CylindricalVoid Cavity = "cylindrical"
)

// FieldFactor is the field in a void over that in the solid around it under AC or at once
// after a step: flat ε, sphere 3ε/(2ε + 1), cylinder across the field 2ε/(ε + 1). Real
// bubbles are nearer to spheres; the flat void is two to three times more pessimistic.
// Under DC the field in a void follows the resistivities and discharges come seldom.
func FieldFactor(c Cavity, permittivity float64) (float64, error) {
	if permittivity < 1 {
		return 0, lack.Because("the relative permittivity of the solid is not given, 1 or more")
	}
	switch c {
	case FlatVoid:
		return permittivity, nil // Naidu and Kamaraju, High Voltage Engineering, ex. 4.2
	case SphericalVoid:
		return 3 * permittivity / (2*permittivity + 1), nil // electrostatics, memory
	case CylindricalVoid:
		return 2 * permittivity / (permittivity + 1), nil // electrostatics, memory
	}
	return 0, lack.Range("no field is known in a void of the shape %q", string(c))
}

// Void is a void in a flat wall.
type Void struct {
	Cavity       Cavity
	Size         quantity.Length // along the field
	Wall         quantity.Length // thickness of the insulation, void included
	Permittivity float64
}

// largestRound is the part of a wall that a round void may take: in a larger one its
// images in the electrodes count.
const largestRound = 1.0 / 3

// Inception is the peak voltage across the wall at which discharges start in the void,
// whose gas stands a field: V = E t (1 + (d − t)/(ε t)) of a flat void t thick in a wall
// of d, E d over the field factor of a small round one.
func (c Void) Inception(stands quantity.Field) (quantity.Voltage, error) {
	factor, err := FieldFactor(c.Cavity, c.Permittivity)
	if err != nil {
		return 0, err
	}
	e, t, d := float64(stands), float64(c.Size), float64(c.Wall)
	switch {
	case t <= 0 || d <= 0 || e <= 0:
		return 0, lack.Because("the size of the void, the wall or what its gas stands is not given")
	case t >= d:
		return 0, lack.Range("a void of %s does not lie in a wall of %s", quantity.Text(c.Size), quantity.Text(c.Wall))
	case c.Cavity == FlatVoid:
		return quantity.Voltage(e * t * (1 + (d-t)/(c.Permittivity*t))), nil // Naidu and Kamaraju, High Voltage Engineering, ex. 4.2
	case t > largestRound*d:
		return 0, lack.Range("a round void takes up to a third of its wall, asked for %s in %s", quantity.Text(c.Size), quantity.Text(c.Wall))
	}
	return quantity.Voltage(e * d / factor), nil
}

// TextbookVoidField is what the books let the air of a void stand, peak. Small voids
// stand more: up to a centimetre it is a lower bound.
const TextbookVoidField quantity.Field = 3e6

// VoidField is what the gas of a void stands between plates of its size, per metre:
// 8.5 kV/mm of 0.1 mm of air. Estimates by Paschen's law were found far off (Montanari
// and Myneni, Technologies 14 (2026) 299), so it is an assumption; beside it the 3 kV/mm
// of the books.
func VoidField(s gas.State, size quantity.Length) (gap.Answer[quantity.Field], error) {
	v, err := gas.UniformBreakdown(s, size)
	if err != nil {
		return gap.Answer[quantity.Field]{}, err
	}
	return gap.Answer[quantity.Field]{
		Value: quantity.Field(float64(v.Value) / float64(size)), Because: v.Because + " of " + quantity.Text(size),
		Sources:     v.Sources,
		Assumptions: append(v.Assumptions, "the gas in a void breaks down as between metal plates, which measurements doubt"),
		Shown: []gap.Beside[quantity.Field]{{Value: TextbookVoidField, Source: gap.Source{
			Text: "3 kV/mm peak in voids, Naidu and Kamaraju, High Voltage Engineering, ex. 4.2", Mark: gap.Read}}},
	}, nil
}

// WorstVoid is the size of flat void between two that starts to discharge at the lowest
// voltage in a wall, and that voltage: small ones stand a higher field, large ones take
// up less of the solid's. The least over sixty sizes on a logarithmic scale.
func WorstVoid(s gas.State, wall quantity.Length, permittivity float64, from, to quantity.Length) (quantity.Length, quantity.Voltage, error) {
	if from <= 0 || to <= from || to >= wall {
		return 0, 0, lack.Range("voids from %s to %s do not lie in a wall of %s", quantity.Text(from), quantity.Text(to), quantity.Text(wall))
	}
	const sizes = 60
	var worst quantity.Length
	least := quantity.Voltage(math.Inf(1))
	for i := range sizes {
		size := from * quantity.Length(math.Pow(float64(to/from), float64(i)/(sizes-1)))
		e, err := VoidField(s, size)
		if err != nil {
			return 0, 0, err
		}
		v, err := Void{FlatVoid, size, wall, permittivity}.Inception(e.Value)
		if err != nil {
			return 0, 0, err
		}
		if v < least {
			worst, least = size, v
		}
	}
	return worst, least, nil
}
