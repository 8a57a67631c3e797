package solid

import (
	"fmt"
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/shape"
	"kilovet/insulation/solve"
)

const (
	// untold is the specimen of a source that does not say its thickness: thinner than
	// the usual sheet of 3 mm, so that thick parts are judged low (practice).
	untold quantity.Length = 1e-3
	// thinnestOfAll is where films end.
	thinnestOfAll quantity.Length = 10e-6
	// mostScaled is how many times thicker than the specimen a part may be: two decades,
	// the reach of the pairs behind the exponents.
	mostScaled = 100
)

// specimen is the thickness at which the strength holds.
func (m Material) specimen() quantity.Length {
	if m.Tested == 0 {
		return untold
	}
	return m.Tested
}

// reach are the thinnest and thickest parts whose strength is known.
func (m Material) reach() (thin, thick quantity.Length) {
	if m.Thickest > 0 {
		return thinnestOfAll, m.Thickest
	}
	return thinnestOfAll, mostScaled * m.specimen()
}

// reach are those of a part; spheres closer than a ten-thousandth of their radius are
// plates.
func reach(g gap.Gap, m Material) (thin, thick quantity.Length) {
	thin, thick = m.reach()
	if g.Shape != nil {
		thin = max(thin, 1.0001e-4*g.Shape.Sharpest())
	}
	return thin, thick
}

// Strength is the short-time strength of a part of some thickness, E = E₁ (t/t₁)^−a from
// the specimen on. Thinner parts gain nothing unless their gain was measured. From 10 µm
// to a hundred times the specimen, or where the material's figures end; a blank strength
// and other thicknesses are a lack.
func Strength(m Material, t quantity.Length) (gap.Answer[quantity.Field], error) {
	none := gap.Answer[quantity.Field]{}
	if m.Strength.Least == 0 {
		return none, lack.Because("no strength of "+m.Name+" was read", "spacing.strength", "spacing.tested_thickness")
	}
	if thin, thick := m.reach(); !quantity.AtLeast(t, thin) || !quantity.AtMost(t, thick) {
		return none, lack.Range("the strength of %s is known from %s to %s, asked for %s", m.Name, quantity.Text(thin), quantity.Text(thick), quantity.Text(t))
	}
	scale := m.scale(t)
	a := gap.Answer[quantity.Field]{
		Value:   m.Strength.Least * quantity.Field(scale),
		Because: fmt.Sprintf("%s, %s at %s, %.3g times that at %s", m.Name, quantity.Text(m.Strength.Least), quantity.Text(m.specimen()), scale, quantity.Text(t)),
		Sources: []gap.Source{m.Strength.Source.Governing(), m.Exponent.Source},
	}
	a.Assumptions = append(a.Assumptions, m.Caveats...)
	if m.Tested == 0 {
		a.Assumptions = append(a.Assumptions, "the thickness of the specimen is not given by the source and taken as "+quantity.Text(untold))
	}
	if m.Strength.Source.Mark != gap.Read || m.Exponent.Source.Mark == gap.Memory {
		a.Assumptions = append(a.Assumptions, "strength or its fall with thickness is from memory")
	}
	for _, o := range m.Others {
		a.Shown = append(a.Shown, gap.Beside[quantity.Field]{Value: o.Value * quantity.Field(scale), Source: o.Source})
	}
	return a, nil
}

// scale is strength at a thickness over that of the specimen.
func (m Material) scale(t quantity.Length) float64 {
	return math.Pow(float64(max(t, m.floor())/m.specimen()), -m.Exponent.Least) // Zhao and Liu 2020
}

// floor is the thickness under which nothing more is gained.
func (m Material) floor() quantity.Length {
	if m.Thinnest > 0 {
		return m.Thinnest
	}
	return m.specimen()
}

// Breakdown is the short-time breakdown voltage of a solid part: its material's strength
// at its thickness, reached by the peak field of its shape. Where thickness no longer
// lowers that field as fast as it lowers the strength, more of it adds nothing. Without a
// shape the part is taken as a sheet between flat electrodes, as it was tested. Voids,
// edges that stick into the solid, age and heat are not in it.
func Breakdown(g gap.Gap) (gap.Answer[quantity.Voltage], error) {
	none := gap.Answer[quantity.Voltage]{}
	m, err := Of(g)
	if err != nil {
		return none, err
	}
	l, assumed, err := lineOf(g)
	if err != nil {
		return none, err
	}
	if _, err := Strength(m, l.Gap()); err != nil {
		return none, err
	}
	t, err := useful(g, m, l.Gap())
	if err != nil {
		return none, err
	}
	if l, _, err = lineOf(withThickness(g, t)); err != nil {
		return none, err
	}
	e, err := Strength(m, t)
	if err != nil {
		return none, err
	}
	perVolt := quantity.Voltage(l.PerVolt(0))
	a := gap.Answer[quantity.Voltage]{
		Value: quantity.Voltage(e.Value) / perVolt, Because: e.Because,
		Sources: e.Sources, Assumptions: append(assumed, e.Assumptions...),
	}
	for _, b := range e.Shown {
		a.Shown = append(a.Shown, gap.Beside[quantity.Voltage]{Value: quantity.Voltage(b.Value) / perVolt, Source: b.Source})
	}
	return a, nil
}

// useful is the part of a thickness beyond which more adds nothing: there the even length
// of the shape, 1/(peak field per volt), grows more slowly than the strength falls. A
// thicker wall stands at least what a thinner one does, its field being lower everywhere.
func useful(g gap.Gap, m Material, t quantity.Length) (quantity.Length, error) {
	least, _ := reach(g, m)
	if least = max(least, m.floor()); g.Shape == nil || g.Shape.Kind == gap.Plates || t <= least {
		return t, nil
	}
	surplus := func(t float64) (float64, error) { // of the strength's fall, over a millionth of the thickness
		const step = 1e-6
		thin, _, err := lineOf(withThickness(g, quantity.Length(t)))
		if err != nil {
			return 0, err
		}
		thick, _, err := lineOf(withThickness(g, quantity.Length(t*(1+step))))
		if err != nil {
			return 0, err
		}
		return m.Exponent.Least - math.Log(float64(thin.PerVolt(0)/thick.PerVolt(0)))/step, nil
	}
	if s, err := surplus(float64(t)); err != nil || s <= 0 {
		return t, err
	}
	if s, err := surplus(float64(least)); err != nil || s >= 0 {
		return least, err
	}
	best, err := solve.Rise(float64(least), float64(t), surplus)
	return quantity.Length(best), err
}

// lineOf is the critical line of a part, a sheet where no shape is given.
func lineOf(g gap.Gap) (shape.Line, []string, error) {
	if g.Shape != nil {
		l, err := shape.Of(*g.Shape, g.Clearance)
		return l, nil, err
	}
	l, err := shape.Of(gap.Shape{Kind: gap.Plates}, g.Clearance)
	return l, []string{"no shape is given: a sheet between flat electrodes"}, err
}

// ThicknessForBreakdown is the thickness whose breakdown is at a voltage, sharpest radius
// kept.
func ThicknessForBreakdown(g gap.Gap, v quantity.Voltage) (quantity.Length, error) {
	m, err := Of(g)
	if err != nil {
		return 0, err
	}
	thin, thick := reach(g, m)
	return thicknessWhere(thin, thick, v, func(t quantity.Length) (quantity.Voltage, error) {
		a, err := Breakdown(withThickness(g, t))
		return a.Value, err
	})
}
