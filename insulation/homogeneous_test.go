package insulation_test

import (
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/insulation"
	"kilovet/insulation/gap"

	"kilovet/hv/quantity"
)

// What is needed between electrodes of a radius does not ask how far apart they are: case B
// and the factor of the frequency take the radius beside the clearance that is needed.
func TestAWiderGapNeedsNoMore(t *testing.T) {
	chance.Check(t, func(rt *rapid.T) {
		g := bench()
		g.Altitude = new(quantity.Length(rapid.Float64Range(0, 6000).Draw(rt, "altitude")))
		g.ImpulseTested = rapid.Bool().Draw(rt, "tested")
		g.Shape = &gap.Shape{Kind: gap.SpherePlane, Radius: quantity.Length(rapid.Float64Range(0.1e-3, 50e-3).Draw(rt, "radius"))}
		v := gap.Voltages{Peak: quantity.Voltage(rapid.Float64Range(100, 60e3).Draw(rt, "peak"))}
		if rapid.Bool().Draw(rt, "fast") {
			v.Alternating, v.Frequency = v.Peak/2, quantity.Frequency(rapid.Float64Range(31e3, 5e6).Draw(rt, "frequency"))
		}
		g.Clearance = quantity.Length(rapid.Float64Range(0.1e-3, 0.1).Draw(rt, "clearance"))
		near, err := insulation.ClearanceNeeded(g, v)
		g.Clearance *= quantity.Length(rapid.Float64Range(1, 50).Draw(rt, "wider"))
		far, err2 := insulation.ClearanceNeeded(g, v)
		if err == nil && (err2 != nil || !quantity.Equal(near.Value, far.Value)) {
			rt.Fatalf("%v (%v) over %v: %v, then %v (%v)", v, g.Shape, g.Clearance, near.Value, far.Value, err2)
		}
	})
}

// A table of case B asks for 8 mm at 20 kV; a factor of the altitude raises that over the
// radius, and case A holds.
func TestTheRadiusIsThatOfTheWholeNeed(t *testing.T) {
	g := bench()
	g.Clearance, g.ImpulseTested, g.Shape = 60e-3, true, &gap.Shape{Kind: gap.SpherePlane, Radius: 9e-3}
	near(t, "2000 m", float64(clearance(t, g, gap.Voltages{Peak: 20e3}).Value), 8e-3, 1e-12)
	g.Altitude = new(quantity.Length(4000)) // 1.29, IEC 60664-1 Table A.2
	near(t, "4000 m", float64(clearance(t, g, gap.Voltages{Peak: 20e3}).Value), 1.29*34e-3, 1e-9)
}
