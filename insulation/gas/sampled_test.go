package gas_test

import (
	"math"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/gas"
	"kilovet/insulation/shape"
)

// Whatever a computed line looks like, also one that rises from its start, its onset is a
// voltage or a lack.
func TestOnsetOfAnyComputedLine(t *testing.T) {
	air := gas.State{Gas: gap.AirGas, Pressure: 101325, Temperature: 293.15}
	chance.Check(t, func(rt *rapid.T) {
		var list []shape.Sample
		x := 0.0
		for range rapid.IntRange(3, 40).Draw(rt, "places") {
			e := math.Exp(rapid.Float64Range(0, 18).Draw(rt, "ln E"))
			list = append(list, shape.Sample{Along: quantity.Length(x), Field: quantity.Field(e)})
			x += math.Exp(rapid.Float64Range(-12, -3).Draw(rt, "ln step"))
		}
		l, err := shape.Sampled(list, shape.Across(list))
		if err != nil {
			rt.Fatal(err)
		}
		a, err := gas.Onset(air, l, gap.Smooth)
		switch {
		case err != nil && lack.Of(err) == nil:
			rt.Fatalf("no lack: %v", err)
		case err == nil && !(a.Value > 0 && !math.IsInf(float64(a.Value), 0)):
			rt.Fatalf("onset %v", a.Value)
		}
	})
}
