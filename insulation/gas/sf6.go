package gas

import (
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/shape"
)

// uniformSF6 is the streamer criterion from 0.1 mm at normal density on, and under it what is
// known from below: where the field is under the critical one nothing is ionised, and no gap
// breaks down under the lowest voltage measured.
func uniformSF6(s State, d quantity.Length) (gap.Answer[quantity.Voltage], error) {
	if quantity.AtLeast(quantity.Length(s.Density())*d, shortestUniform) {
		plates, err := shape.Of(gap.Shape{Kind: gap.Plates}, d)
		if err != nil {
			return gap.Answer[quantity.Voltage]{}, err
		}
		return Onset(s, plates, gap.Smooth)
	}
	m, err := MeasuredMinimum(gap.SulphurHexafluoride)
	if err != nil {
		return gap.Answer[quantity.Voltage]{}, err
	}
	a := remembered(gap.SulphurHexafluoride, m.Source, gap.Answer[quantity.Voltage]{
		Value: m.Voltage, Because: "lowest breakdown voltage of sulphur hexafluoride at any pressure and gap",
		Sources: []gap.Source{m.Governing()}, AtLeast: s.reduced(d) > m.At,
	})
	critical, source, err := Critical(s)
	if least := critical * quantity.Field(d); quantity.Voltage(least) > a.Value {
		a.Value = quantity.Voltage(least)
		a.Because = "the field is the critical one of sulphur hexafluoride, under which nothing is ionised; its figures of breakdown begin at 0.1 mm at normal density"
		a.Sources = []gap.Source{source.Governing(), m.Source}
		a.Assumptions = nil
	}
	return a, err
}
