package shape_test

import (
	"math"
	"testing"

	"kilovet/hv/quantity"
	"kilovet/insulation/shape"
)

// The places run from one electrode to the other, their fields are those of the line, and
// add up to the voltage across it.
func TestPlacesCarryTheWholeVoltage(t *testing.T) {
	const volts = 20e3
	for _, c := range all {
		for _, r := range []quantity.Length{10e-6, 1e-3, 50e-3} {
			l := of(t, c.kind, r, 20e-3, c.symmetric)
			places := l.Places(volts, 200)
			if first, last := places[0].Along, places[len(places)-1].Along; first != 0 || math.Abs(float64(last-l.Gap())) > 1e-12 {
				t.Errorf("%s, %v: from %v to %v", c.kind, r, first, last)
			}
			for i, p := range places {
				if i > 0 && p.Along <= places[i-1].Along {
					t.Errorf("%s, %v: place %d at %v does not go on", c.kind, r, i, p.Along)
				}
				if want := float64(l.PerVolt(p.Along)) * volts; math.Abs(float64(p.Field)/want-1) > 1e-12 {
					t.Errorf("%s, %v: %v at %v, want %v", c.kind, r, p.Field, p.Along, want)
				}
			}
			if sum := shape.Across(places); !l.Bound() && math.Abs(float64(sum)/volts-1) > 2e-3 {
				t.Errorf("%s, %v: the fields add up to %v", c.kind, r, sum)
			}
		}
	}
}
