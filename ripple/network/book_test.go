package network

import (
	"math"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/hv/quantity"
)

// Whatever a cubic does over a step, the range holds it, and touches it where it grew.
func TestRangeHoldsTheCubic(t *testing.T) {
	chance.Check(t, func(r *rapid.T) {
		volts := rapid.Float64Range(-1e4, 1e4)
		y := samples{volts.Draw(r, "start"), volts.Draw(r, "first"), volts.Draw(r, "second"), volts.Draw(r, "end")}
		middle, half := volts.Draw(r, "middle"), rapid.Float64Range(0, 3e4).Draw(r, "half")
		s := Stress{Least: quantity.Voltage(middle - half), Greatest: quantity.Voltage(middle + half)}
		least, greatest := s.Least, s.Greatest
		s.look(false, y[0], y[1], y[2], y[3])
		p, low, high := y.polynomial(false), math.Inf(1), math.Inf(-1)
		for i := range 1001 {
			v := p.at(float64(i) / 1000)
			low, high = math.Min(low, v), math.Max(high, v)
		}
		const rounding, between = 1e-9, 0.5 // V; a thousandth of a step from a turn
		if float64(s.Least) > low+rounding || float64(s.Greatest) < high-rounding {
			r.Fatalf("%v does not hold %g to %g", s, low, high)
		}
		if s.Least < least && float64(s.Least) < low-between || s.Greatest > greatest && float64(s.Greatest) > high+between {
			r.Fatalf("%v is wider than %g to %g", s, low, high)
		}
	})
}

// The current of a capacitance is its slope: of a cubic exactly.
func TestChargingIsTheSlope(t *testing.T) {
	p := cubic{3, -5, 7, 11}
	page := page{step: &step{}, rate: 10}
	y1, y2, y3 := page.charging(2, p.at(0), p.at(node1), p.at(node2), p.at(1))
	for i, y := range []float64{y1, y2, y3} {
		near(t, "slope", y, 20*p.slope([3]float64{node1, node2, 1}[i]), 1e-12)
	}
}
