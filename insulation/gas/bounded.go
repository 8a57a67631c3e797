package gas

import (
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/shape"
)

// uniformSF6 is the streamer criterion from 0.1 mm at normal density on, and under it what is
// known from below.
func uniformSF6(s State, d quantity.Length) (gap.Answer[quantity.Voltage], error) {
	if !quantity.AtLeast(quantity.Length(s.Density())*d, shortestUniform) {
		return fromBelow(s, d, SF6.critical, SF6.Source)
	}
	plates, err := shape.Of(gap.Shape{Kind: gap.Plates}, d)
	if err != nil {
		return gap.Answer[quantity.Voltage]{}, err
	}
	return Onset(s, plates, gap.Smooth)
}

// criticalCO2 is the field of carbon dioxide at normal density at or under which electrons are
// attached faster than they ionise: 75 Td times 2.504e25 molecules a cubic metre. What is
// remembered lies between 78 and 86 Td.
const criticalCO2 quantity.Field = 75e-21 * 2.504e25

var sourceCO2 = gap.Source{Text: "critical field of carbon dioxide, some 80 Td, here 75 Td or 18.8 kV/cm at normal density", Mark: gap.Memory}

// uniformCO2 is what is known from below: no law of its breakdown past the minimum is known
// here.
func uniformCO2(s State, d quantity.Length) (gap.Answer[quantity.Voltage], error) {
	return fromBelow(s, d, criticalCO2, sourceCO2)
}

// fromBelow is what plates in a gas stand at least: no gap breaks down under the lowest
// voltage measured, which is the answer itself at its minimum and left of it, and none
// where the field is the critical one or less, since there is nothing ionised.
func fromBelow(s State, d quantity.Length, critical quantity.Field, source gap.Source) (gap.Answer[quantity.Voltage], error) {
	m, err := MeasuredMinimum(s.Gas)
	if err != nil {
		return gap.Answer[quantity.Voltage]{}, err
	}
	least := quantity.Voltage(critical * quantity.Field(s.Density()) * quantity.Field(d))
	if least <= m.Voltage {
		return remembered(s.Gas, m.Source, gap.Answer[quantity.Voltage]{
			Value: m.Voltage, Because: "lowest breakdown voltage of " + string(s.Gas) + " at any pressure and gap",
			Sources: []gap.Source{m.Governing()}, AtLeast: s.reduced(d) > m.At,
		}), nil
	}
	return remembered(s.Gas, source, gap.Answer[quantity.Voltage]{
		Value:   least,
		Because: "the field is the critical one of " + string(s.Gas) + ", under which nothing is ionised; no law of its breakdown between plates is known at this pressure and distance",
		Sources: []gap.Source{source.Governing(), m.Source}, AtLeast: true,
	}), nil
}
