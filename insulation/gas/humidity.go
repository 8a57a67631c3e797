package gas

import (
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

const gramPerCubicMetre quantity.Humidity = 1e-3

// moisture is a humidity factor 1 + slope (h/δ − reference), h in g/m³. Moist air is
// stronger; more than the reference gets no credit, and drier than 1 g/m³, where the
// data end, counts as that.
type moisture struct {
	slope, reference float64
	source           gap.Source
}

var (
	// ofUniform is that of sphere gaps, IEC 60052: the reference read, the slope from memory.
	ofUniform = moisture{0.002, 8.5, gap.Source{Text: "IEC 60052, humidity 1 + 0.002 (h/δ − 8.5)", Mark: gap.Memory}}
	// ofSharp is that of rod gaps at DC, IEC 60060-1 and 60052, for h/δ of 1 to 13 g/m³.
	ofSharp = moisture{0.014, 11, gap.Source{Text: "IEC 60052, rod gaps, humidity 1 + 0.014 (h/δ − 11)", Mark: gap.Memory}}
)

// applied multiplies an answer by the factor where the humidity of the air is known.
func (m moisture) applied(s State, a gap.Answer[quantity.Voltage]) gap.Answer[quantity.Voltage] {
	if s.Humidity == nil || s.Gas != gap.AirGas {
		return a
	}
	h := float64(*s.Humidity/gramPerCubicMetre) / float64(s.Density())
	factor := quantity.Voltage(1 + m.slope*(min(max(h, 1), m.reference)-m.reference))
	a.Value *= factor
	a.Sources = append(a.Sources, m.source)
	for i := range a.Shown {
		a.Shown[i].Value *= factor
	}
	return a
}
