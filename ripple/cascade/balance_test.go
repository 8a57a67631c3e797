package cascade

import (
	"fmt"
	"math"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/hv/quantity"
)

// unit is a cascade in which one period's load moves every capacitor by one volt:
// 1 A, 1 Hz, 1 F. climb is linear, so its range does not matter here.
func unit(n int) Cascade { return Cascade{Peak: 1e6, Frequency: 1}.WithEqual(n, 1) }

var kinds = []struct {
	name                string
	symmetrical, square bool
}{
	{"half-wave, sine", false, false},
	{"half-wave, square", false, true},
	{"symmetrical, sine", true, false},
	{"symmetrical, square", true, true},
}

func near(t *testing.T, what string, got, want, tolerance float64) {
	t.Helper()
	if !(math.Abs(got-want) <= tolerance*math.Abs(want)) {
		t.Errorf("%s: %.9g, want %.9g within %g", what, got, want, tolerance)
	}
}

func TestEveryPeriodReturnsItsCharge(t *testing.T) {
	for _, kind := range kinds {
		c := Cascade{Symmetrical: kind.symmetrical, Square: kind.square}
		for m := 1.0; m <= 60; m++ {
			b := c.balance(m)
			near(t, kind.name+": smoothing capacitor", b.rise, b.first+b.fall+b.second, 1e-12)
			columns, pulses := 1.0, 1.0
			if kind.symmetrical {
				columns = 2
			}
			near(t, kind.name+": charge lifted by the coupling columns", columns*(b.pulse+b.hold)*pulses, m, 1e-12)
		}
	}
}

// The sums over the column are the polynomials of the package comment, to 60 stages.
func TestEqualCapacitorsGiveThePolynomials(t *testing.T) {
	for n := 1; n <= 60; n++ {
		x := float64(n)
		rows := []struct{ maximum, mean, minimum, ripple float64 }{
			{2*x*x*x/3 + x*x/4 + x/12, 2*x*x*x/3 + x*x/2 + x/3, 2*x*x*x/3 + 3*x*x/4 + 7*x/12, x * (x + 1) / 2},
			{2*x*x*x/3 + x/12, 2*x*x*x/3 + x*x/4 + 7*x/48, 2*x*x*x/3 + x*x/2 + x/3, x*(x+1)/2 - x/4},
			{x*x*x/6 + x*x/4 + x/12, x*x*x/6 + x*x/4 + x/3, x*x*x/6 + x*x/4 + 7*x/12, x / 2},
			{x*x*x/6 + x*x/8 - x/24, x*x*x/6 + x*x/8 + x/12, x*x*x/6 + x*x/8 + 5*x/24, x / 4},
		}
		for i, kind := range kinds {
			c := unit(n)
			c.Symmetrical, c.Square = kind.symmetrical, kind.square
			s := c.climb(1)
			what := fmt.Sprintf("%s, %d stages: ", kind.name, n)
			near(t, what+"drop of the maximum", float64(s.DropOfMaximum()), rows[i].maximum, 1e-8)
			near(t, what+"drop of the mean", float64(s.Drop()), rows[i].mean, 1e-8)
			near(t, what+"drop of the minimum", float64(s.DropOfMinimum()), rows[i].minimum, 1e-8)
			near(t, what+"ripple", float64(s.Ripple.PeakToPeak()), rows[i].ripple, 1e-9)
			near(t, what+"cubic of the optimum", c.meanDrop().at(x), rows[i].mean, 1e-12)
		}
	}
}

// Unequal capacitors, half-wave and symmetrical: the sums over the stages written
// out (derived by charge balance).
func TestUnequalCapacitorsGiveTheSums(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		c := anyCascade(t)
		c.Square = false
		s := c.climb(1)
		var ripple, maximum float64
		for k := range c.Smoothing {
			m := float64(c.Stages() - k)
			p, q := float64(c.perPeriod(1, c.Coupling[k])), float64(c.perPeriod(1, c.Smoothing[k]))
			if c.Symmetrical {
				ripple, maximum = ripple+q/2, maximum+m*m*p/2
			} else {
				ripple, maximum = ripple+m*q, maximum+m*m*p+(m-1)*(m-.5)*q
			}
		}
		for _, row := range []struct {
			what      string
			got, want float64
		}{
			{"ripple", float64(s.Ripple.PeakToPeak()), ripple},
			{"drop of the maximum", float64(s.DropOfMaximum()), maximum},
			{"drop of the mean", float64(s.Drop()), maximum + ripple/2},
			{"drop of the minimum", float64(s.DropOfMinimum()), maximum + ripple},
		} {
			if math.Abs(row.got-row.want) > 1e-9*math.Max(row.want, float64(s.NoLoad)) {
				t.Errorf("%s %g, want %g", row.what, row.got, row.want)
			}
		}
	})
}

// anyCascade draws a cascade with capacitors within a decade and no strays.
func anyCascade(t *rapid.T) Cascade {
	c := Cascade{
		Symmetrical: rapid.Bool().Draw(t, "symmetrical"),
		Peak:        quantity.Voltage(rapid.Float64Range(500, 5000).Draw(t, "peak")),
		Frequency:   quantity.Frequency(rapid.Float64Range(50, 1e5).Draw(t, "frequency")),
		ForwardDrop: quantity.Voltage(rapid.Float64Range(0, 20).Draw(t, "forward drop")),
	}
	n := rapid.IntRange(1, 12).Draw(t, "stages")
	for range n {
		c.Coupling = append(c.Coupling, quantity.Capacitance(rapid.Float64Range(3e-10, 3e-9).Draw(t, "coupling")))
		c.Smoothing = append(c.Smoothing, quantity.Capacitance(rapid.Float64Range(3e-10, 3e-9).Draw(t, "smoothing")))
	}
	return c
}

// anyLoad draws a load that takes up to 0.3 of the no-load voltage and empties no
// capacitor.
func anyLoad(t *rapid.T, c Cascade) quantity.Current {
	share := rapid.Float64Range(0.01, 0.3).Draw(t, "share of the no-load voltage")
	s := c.climb(1)
	load := quantity.Current(share * float64(s.NoLoad/s.Drop()))
	if c.climb(load).lowest() <= 0 {
		t.Skip("a capacitor empties")
	}
	return load
}

// A first coupling capacitor of twice the others takes n²/2 from the drop: it
// carries one peak only, so that it costs no higher voltage class.
func TestFirstCouplingCapacitorDoubled(t *testing.T) {
	for n := 1; n <= 12; n++ {
		c := unit(n)
		c.Coupling[0] = 2
		x := float64(n)
		near(t, "drop of the mean", float64(c.climb(1).Drop()), 2*x*x*x/3+x/3, 1e-9)
		book, err := c.TextbookDrop(1)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "textbook drop", float64(book), 2*x*x*x/3-x/6, 1e-9)
	}
}

// Capacitors in the ratio of the charge they carry, n C at the bottom to C at the top.
func TestTaperedCapacitors(t *testing.T) {
	for n := 1; n <= 12; n++ {
		c, harmonic := unit(n), 0.0
		for k := range n {
			c.Coupling[k] = quantity.Capacitance(n - k)
			c.Smoothing[k] = quantity.Capacitance(n - k)
			harmonic += 1 / float64(k+1)
		}
		s, x := c.climb(1), float64(n)
		near(t, "ripple", float64(s.Ripple.PeakToPeak()), x, 1e-9)
		near(t, "drop of the mean", float64(s.Drop()), x*x+harmonic/2, 1e-9)
		book, _ := c.TextbookDrop(1)
		near(t, "textbook drop", float64(book), x*x, 1e-9)
	}
}

func TestDoubler(t *testing.T) {
	c := Cascade{Peak: 1e4, Frequency: 50, Coupling: []quantity.Capacitance{2e-8}, Smoothing: []quantity.Capacitance{5e-8}}
	s, err := c.Loaded(1e-4)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "drop of the mean I/f (1/P + 1/2S)", float64(s.Drop()), 1e-4/50*(1/2e-8+1/1e-7), 1e-9)
	near(t, "ripple I/(f S)", float64(s.Ripple.PeakToPeak()), 1e-4/50/5e-8, 1e-9)
}

// The textbook drop lies n(n−1)/4 above the drop of the maximum and n/2 below that
// of the mean, in q/C.
func TestTextbookDropIsNeitherMaximumNorMean(t *testing.T) {
	for n := 1; n <= 20; n++ {
		c, x := unit(n), float64(n)
		book, err := c.TextbookDrop(1)
		if err != nil {
			t.Fatal(err)
		}
		s := c.climb(1)
		near(t, "polynomial", float64(book), 2*x*x*x/3+x*x/2-x/6, 1e-12)
		near(t, "against the maximum", float64(book-s.DropOfMaximum())+1, x*(x-1)/4+1, 1e-8)
		near(t, "against the mean", float64(s.Drop()-book), x/2, 1e-8)
	}
}

// Everything the load does is proportional to I/(f C).
func TestScalesWithTheLoadOverFrequencyAndCapacitance(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		c := anyCascade(t)
		load := anyLoad(t, c)
		base := c.climb(load)
		factor := rapid.Float64Range(0.1, 10).Draw(t, "factor")
		faster, larger := c, c
		faster.Frequency *= quantity.Frequency(factor)
		larger.Coupling, larger.Smoothing = scaled(c.Coupling, factor), scaled(c.Smoothing, factor)
		more := c.climb(load / quantity.Current(factor))
		for _, s := range []State{faster.climb(load), larger.climb(load), more} {
			same(t, s.Drop()*quantity.Voltage(factor), base.Drop(), base.NoLoad)
			same(t, s.Ripple.PeakToPeak()*quantity.Voltage(factor), base.Ripple.PeakToPeak(), base.NoLoad)
		}
	})
}

func scaled(list []quantity.Capacitance, by float64) []quantity.Capacitance {
	var out []quantity.Capacitance
	for _, c := range list {
		out = append(out, c*quantity.Capacitance(by))
	}
	return out
}

func same(t *rapid.T, got, want, scale quantity.Voltage) {
	t.Helper()
	if math.Abs(float64(got-want)) > 1e-9*float64(scale) {
		t.Errorf("%g, want %g", got, want)
	}
}

func TestWithoutLoad(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		c := anyCascade(t)
		s, err := c.Loaded(0)
		if err != nil {
			t.Fatal(err)
		}
		want, _ := c.NoLoad()
		same(t, s.Output.Mean, want, want)
		same(t, s.Ripple.PeakToPeak(), 0, want)
		for k := range s.Smoothing {
			same(t, s.Smoothing[k].Maximum, 2*(c.Peak-c.ForwardDrop), want)
			same(t, s.DiodeReverse[2*k], 2*c.Peak-c.ForwardDrop, want)
			same(t, s.DiodeReverse[2*k+1], 2*c.Peak-c.ForwardDrop, want)
		}
		same(t, s.Coupling[0].Mean, c.Peak-c.ForwardDrop, want)
	})
}
