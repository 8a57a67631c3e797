package table

import (
	"fmt"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

// mainsRows is IEC 60664-1:2020 Table F.1: line-to-neutral voltage up to and
// including, V; rated impulse voltage, V, of overvoltage categories I to IV. The
// rows above 1000 V were added in 2020.
var mainsRows = [][]float64{
	{50, 330, 500, 800, 1500},
	{100, 500, 800, 1500, 2500},
	{150, 800, 1500, 2500, 4000},
	{300, 1500, 2500, 4000, 6000},
	{600, 2500, 4000, 6000, 8000},
	{1000, 4000, 6000, 8000, 12000},
	{1250, 4000, 6000, 8000, 12000},
	{1500, 6000, 8000, 10000, 15000},
}

var mains = [4]*Column[quantity.Voltage, quantity.Voltage]{
	mainsColumn(1), mainsColumn(2), mainsColumn(3), mainsColumn(4),
}

func mainsColumn(category int) *Column[quantity.Voltage, quantity.Voltage] {
	source := printed(fmt.Sprintf("F.1, overvoltage category %d", category))
	return Of(source, "line-to-neutral voltage", mainsRows, category, volt, volt)
}

// RatedImpulse is the impulse voltage that equipment fed from a mains of the given
// line-to-neutral r.m.s. voltage must withstand (Table F.1, no interpolation). Past
// 1500 V there is a lack.
func RatedImpulse(lineToNeutral quantity.Voltage, category int) (Reading[quantity.Voltage], error) {
	var none Reading[quantity.Voltage]
	switch {
	case lineToNeutral <= 0:
		return none, lack.Key("site.mains")
	case category == 0:
		return none, lack.Key("site.overvoltage_category")
	case category < 1 || category > 4:
		return none, lack.Range("overvoltage categories run from 1 to 4, not %d", category)
	}
	return mains[category-1].Step(lineToNeutral)
}

// preferredImpulses are the preferred rated impulse voltages, V (IEC 60664-1, read
// with Table F.2).
var preferredImpulses = []quantity.Voltage{330, 500, 800, 1500, 2500, 4000, 6000, 8000, 12000}

// ReinforcedImpulse is the impulse voltage that reinforced insulation is dimensioned
// for: the next preferred value above the basic one, or 160 % of it where it is not
// in the series or ends it (the step read, the 160 % from memory).
func ReinforcedImpulse(basic quantity.Voltage) Reading[quantity.Voltage] {
	for i, u := range preferredImpulses[:len(preferredImpulses)-1] {
		if quantity.Equal(u, basic) {
			return Reading[quantity.Voltage]{Value: preferredImpulses[i+1], Rows: "next step",
				Source: gap.Source{Text: "IEC 60664-1, reinforced insulation takes the next preferred impulse, in Texas Instruments SLUAAR5", Mark: gap.Read}}
		}
	}
	return Reading[quantity.Voltage]{Value: 1.6 * basic, Rows: "160 %",
		Source: gap.Source{Text: "IEC 60664-1, reinforced insulation takes 160 % of an impulse outside the preferred series", Mark: gap.Memory}}
}
