package gas

import (
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/shape"
)

func uniformSF6(s State, d quantity.Length) (gap.Answer[quantity.Voltage], error) {
	plates, err := shape.Of(gap.Shape{Kind: gap.Plates}, d)
	if err != nil {
		return gap.Answer[quantity.Voltage]{}, err
	}
	return Onset(s, plates, gap.Smooth)
}
