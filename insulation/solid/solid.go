// Package solid knows what solid insulation stands: strength by material and thickness,
// working stress, layers under alternating and under lasting voltage, voids, sleeves
// with an annulus of gas or vacuum, and coaxial cables.
//
// A permittivity is not a strength, a film is not a sheet, and a distribution by
// permittivity is not the one that stays: under DC the field wanders to the best
// insulator within seconds to days.
package solid

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/shape"
	"kilovet/insulation/solve"
)

// vacuumPermittivity ε₀ in F/m, 8.8541878128(13)e-12 (CODATA 2018).
const vacuumPermittivity = 8.8541878128e-12

// withThickness is the gap with another thickness, its shape moved along.
func withThickness(g gap.Gap, t quantity.Length) gap.Gap {
	g.Clearance = t
	if g.Shape != nil {
		s := shape.WithGap(*g.Shape, t)
		g.Shape = &s
	}
	return g
}

// thicknessWhere finds the thickness between two at which a voltage that rises with it
// takes a value. What the thickest does not reach and the thinnest exceeds is a lack.
func thicknessWhere(thin, thick quantity.Length, want quantity.Voltage, of func(quantity.Length) (quantity.Voltage, error)) (quantity.Length, error) {
	x, err := solve.Level(float64(thin), float64(thick), float64(want), func(t float64) (float64, error) {
		v, err := of(quantity.Length(t))
		return float64(v), err
	}, func() error {
		return lack.Range("even %s, the thinnest that is known, stands more than %s", quantity.Text(thin), quantity.Text(want))
	}, func() error {
		return lack.Range("even %s, the thickest that is known, stands less than %s", quantity.Text(thick), quantity.Text(want))
	})
	return quantity.Length(x), err
}
