package evidence

import (
	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/solid"
	"kilovet/rules/build"
)

// SolidUse is the greatest field in an insulator beside the strength of its material at
// the length of field line through it from there.
type SolidUse struct {
	Stress
	Where   Where
	Through quantity.Length
	Stands  gap.Answer[quantity.Field]
}

// SolidUse of an insulator of an arrangement. Where its strength is not known the field
// still stands beside the lack.
func (e *Evidence) SolidUse(f *build.Arrangement, d *chain.Dielectric) (SolidUse, error) {
	u := SolidUse{Where: e.ClearOfEdges(f, Where{Body: d.Name.V})}
	var err error
	if u.Stress, err = e.Stress(f, u.Where); err != nil {
		return u, err
	}
	used, err := useOf(u.Stress, d)
	used.Where = u.Where
	return used, err
}

// allowed is the part of the strength that may be used.
func (u SolidUse) allowed() quantity.Field {
	return u.Stands.Value * quantity.Field(solid.Published.Of)
}

// useOf is the strength beside a field in an insulator.
func useOf(p Stress, d *chain.Dielectric) (u SolidUse, err error) {
	u.Stress = p
	line, err := p.Field.Within(p.Peak)
	if err != nil {
		return u, err
	}
	u.Through = line.Points[len(line.Points)-1].Along
	m, err := material(d)
	if err != nil {
		return u, err
	}
	u.Stands, err = solid.Strength(m, u.Through)
	return u, err
}

// material of an insulator: with its maker's strength where that is stated.
func material(d *chain.Dielectric) (solid.Material, error) {
	switch {
	case d.Strength.Set():
		return solid.Rated(d.Material.Or("its material"), d.Strength.V, d.TestedThickness.V), nil
	case !d.Material.Set():
		return solid.Material{}, document.Need(d.Material)
	}
	return solid.Find(d.Material.V)
}
