package insulation

import (
	"fmt"
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

// inHand is what the flashover of a tested surface must have in hand over the peak: 80 %
// of it are used, as of breakdown (common practice).
const inHand = 1.25

// alongTested is the length of a surface in oil, gas or at a joint of solids whose
// flashover, from a tested pair in the same medium, is a quarter above the peak. Longer
// surfaces gain with the root of their length, as was found in vacuum, shorter ones lose
// in proportion: both cautious. Never under the clearance needed. Without a tested pair
// there is a lack: no table of such surfaces was found that could be read.
func alongTested(g gap.Gap, v gap.Voltages) (gap.Answer[quantity.Length], error) {
	t := g.Tested
	if t.Voltage <= 0 || t.Length <= 0 {
		return gap.Answer[quantity.Length]{}, lack.Because(fmt.Sprintf("no figure of %s was found: give the flashover of a tested one", surfacesIn(g)), "spacing.tested_voltage", "spacing.tested_length")
	}
	ratio := inHand * float64(v.Peak/t.Voltage)
	a := gap.Answer[quantity.Length]{
		Value:   t.Length * quantity.Length(math.Max(ratio, ratio*ratio)),
		Because: fmt.Sprintf("%s peak along a surface of which %s flashed over at %s", quantity.Text(v.Peak), quantity.Text(t.Length), quantity.Text(t.Voltage)),
		Sources: []gap.Source{
			{Text: "tested: " + quantity.Text(t.Voltage) + " over " + quantity.Text(t.Length) + ", as the description says", Mark: gap.Read, Governs: true},
			{Text: "80 % of the flashover are used; it grows with the root of a longer length", Mark: gap.Practice},
		},
		Assumptions: []string{"the flashover of " + surfacesIn(g) + " grows as the root of a longer length than the tested one"},
	}
	stepped := g
	stepped.Insulation = gap.Basic // the voltages are those of its class already
	if c, err := ClearanceNeeded(stepped, v); err == nil && c.Value > a.Value {
		return raised(a, c), nil
	}
	return a, nil
}

// surfacesIn says what a surface in the medium of a gap is.
func surfacesIn(g gap.Gap) string {
	if g.Medium == gap.Solid {
		return "joints of solids"
	}
	return "surfaces in " + named(g)
}

// named is the medium in words, the gas by its name.
func named(g gap.Gap) string {
	if g.Medium == gap.InGas {
		return string(g.Filling())
	}
	return string(g.Medium)
}

// noWeaker are the gases that stand no less than air in a uniform field: nitrogen as air
// within 1 % (G. G. Raju, Dielectrics in Electric Fields, ch. 8, read), sulphur
// hexafluoride more than twice (its critical field against that of air).
func noWeaker(g gap.Gas) bool { return g == gap.Nitrogen || g == gap.SulphurHexafluoride }

const (
	normalPressure quantity.Pressure = 101325
	// tablePressure is that of the air which the printed tables hold for, 2000 m.
	tablePressure quantity.Pressure = 80e3
)

// alongInGas is the creepage of a surface in a gas other than air: from a tested pair
// where one was given; else, in nitrogen and sulphur hexafluoride at 80 kPa or
// above, as in air of the same pollution degree, which tracks no less. In other gases, and
// in thinner ones, there is a lack.
func alongInGas(g gap.Gap, v gap.Voltages) (gap.Answer[quantity.Length], error) {
	if g.Tested.Voltage > 0 || !noWeaker(g.Filling()) || !quantity.AtLeast(g.TruePressure(), tablePressure) {
		return alongTested(g, v.For(g.Class()))
	}
	group, source, err := groupOf(g)
	if err != nil {
		return gap.Answer[quantity.Length]{}, err
	}
	inAir := g
	inAir.Medium, inAir.Gas, inAir.Pressure = gap.Air, gap.AirGas, 0
	if inAir.Altitude == nil {
		inAir.Altitude = new(quantity.Length)
	}
	a, err := creepageOf(inAir, v, group, source)
	a.Assumptions = append(a.Assumptions, "a surface in "+string(g.Filling())+" at 800 mbar or above needs what it needs in air of the same pollution degree")
	return a, err
}
