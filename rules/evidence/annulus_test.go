package evidence_test

import (
	"math"
	"testing"

	"kilovet/hv/chain"
	"kilovet/rules/evidence"
)

const gapped = `format = 1
[site]
altitude = "240 m"
air_temperature = "30 degC"
pollution_degree = 2
[[feedthrough]]
name = "lead"
voltage = "9 kV"
plate_thickness = "12 mm"
pin = { radius = "10 mm" }
hole = { radius = "26 mm", edge_radius = "2 mm" }
sleeve = { material = "alumina", permittivity = 9.4, outer_radius = "25.5 mm", outer_gap = "air" }
air_side = { length = "60 mm" }
vacuum_side = { length = "120 mm" }
`

// The field of a feedthrough is that of its own sizes: of one with another hole nothing was
// computed, and its annulus keeps the proportion of the described one to its layers.
func TestAnotherSizeKeepsTheProportionOfTheField(t *testing.T) {
	c, faults := chain.Read([]byte(gapped))
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	e := evidence.New(c)
	f := &c.Feedthroughs[0]
	is := e.Annuli(f)[0]
	if is.Field.Lack != nil || is.Field.Value < 1.1*is.Switched {
		t.Fatalf("%v by the field, %v by layers: no case to judge by", is.Field, is.Switched)
	}
	wide, hole := *f, *f.Hole
	hole.Radius.V = 26.2e-3
	wide.Hole = &hole
	would := e.Annuli(&wide)[0]
	if was, now := float64(is.Field.Value/is.Switched), float64(would.Field.Value/would.Switched); math.Abs(now/was-1) > 1e-9 {
		t.Errorf("%g times its layers' share, the described one %g times", now, was)
	}
}
