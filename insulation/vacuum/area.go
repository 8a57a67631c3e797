package vacuum

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

// decades of area over which the law is used: those worked out from it (practice).
const mostAreas = 100

// AreaFactor is by how much the breakdown field changes from a reference area to
// another, E ~ S^−0.24, the areas being those where the field is above 90 % of its
// peak: copper and stainless steel, ten times the area 0.575 times the field. The areas
// tested are not in the abstract, so ratios past 100 either way are a lack.
func AreaFactor(area, reference quantity.Area) (gap.Answer[quantity.Fraction], error) {
	var none gap.Answer[quantity.Fraction]
	if area <= 0 || reference <= 0 {
		return none, lack.Because("an area under stress is not given")
	}
	ratio := float64(area / reference)
	if !quantity.AtMost(math.Max(ratio, 1/ratio), mostAreas) {
		return none, lack.Range("the effect of area is known over a ratio of 100, asked for %.4g", ratio)
	}
	source := gap.Source{Text: "E ~ S^-0.24, Area effect on electric breakdown of copper and stainless steel electrodes in vacuum (1988), abstract", Mark: gap.Read}
	return gap.Answer[quantity.Fraction]{
		Value:   quantity.Fraction(math.Pow(ratio, -0.24)), // the abstract above
		Because: "a larger area holds more weak spots",
		Sources: []gap.Source{source.Governing()},
	}, nil
}
