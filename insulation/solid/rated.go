package solid

import (
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

// Rated is a material with the strength that its maker states, measured at a thickness;
// zero: not said. Its fall with thickness is that of the material of that name where one
// is known, else the steepest that is known here.
func Rated(name string, strength quantity.Field, tested quantity.Length) Material {
	m, err := Find(name)
	if err != nil {
		m = Material{Name: name, Exponent: ceramics}
	}
	m.Strength = Span[quantity.Field]{strength, strength, gap.Source{Text: "strength as stated by its maker", Mark: gap.Read}}
	m.Tested, m.Thinnest, m.Others = tested, 0, nil
	return m
}
