package evidence

import (
	"kilovet/hv/quantity"
	"kilovet/insulation"
	"kilovet/insulation/field"
	"kilovet/insulation/solid"
	"kilovet/insulation/vacuum"
	"kilovet/rules/build"
)

// Weak is a greatest field and the share it takes of what the body there stands.
type Weak struct {
	Stress
	Where Where
	Share quantity.Fraction
}

// Weakest is the place of an arrangement that takes the largest share: of the field at
// which vacuum emits, gas ionises, or a fourth of a solid's strength; of the strongest
// field where none of these is known.
func (e *Evidence) Weakest(f *build.Arrangement) (Weak, error) {
	return remember(e.Under(Condition{}), "weakest "+f.Name.V, func() (Weak, error) {
		s, err := e.FieldOf(f)
		if err != nil {
			return Weak{}, err
		}
		var worst Weak
		for _, w := range places(f, s) {
			w = e.ClearOfEdges(f, w)
			p, err := e.Stress(f, w)
			if err != nil {
				continue
			}
			share := e.used(f, p)
			if worst.Field == nil || share > worst.Share || share == 0 && worst.Share == 0 && p.Strength > worst.Strength {
				worst = Weak{p, w, share}
			}
		}
		if worst.Field == nil {
			_, err = e.fieldCases(f)
		}
		return worst, err
	})
}

// places are all surfaces on which a field is judged.
func places(f *build.Arrangement, s *field.Solution) (all []Where) {
	for _, name := range s.Electrodes() {
		for _, body := range s.Facing(name) {
			if Open(f, body) {
				all = append(all, Where{Electrode: name, Body: body})
			}
		}
	}
	for _, body := range s.Bodies() {
		if !Open(f, body) {
			all = append(all, Where{Body: body})
		}
	}
	if f.Medium.V == "air" || f.Medium.V == "gas" {
		for _, name := range s.Bare() {
			all = append(all, Where{Beside: name})
		}
	}
	return all
}

// used is the share of what a body stands; 0 where that is not known.
func (e *Evidence) used(f *build.Arrangement, p Stress) quantity.Fraction {
	for i := range f.Dielectrics {
		if d := &f.Dielectrics[i]; d.Name.V == p.Body && !d.Fill.Set() {
			u, err := e.SolidUse(f, d)
			if err != nil {
				return 0
			}
			return quantity.Fraction(p.Strength/u.Stands.Value) / solid.Published.Of
		}
	}
	g := e.Filling(f, p.Body)
	if g.Medium == "vacuum" {
		return quantity.Fraction(p.Strength / vacuum.EmissionField)
	}
	limit, _, err := insulation.Ionising(g)
	if err != nil {
		return 0
	}
	return quantity.Fraction(p.Strength / limit)
}
