package vacuum_test

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"kilovet/hv/chance"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/gas"
	"kilovet/insulation/vacuum"

	"pgregory.net/rapid"
)

const mbar quantity.Pressure = 100

func ExampleVessel_Permit() {
	p, _ := vacuum.Vessel{LongestPath: 0.3}.Permit()
	fmt.Println("freely up to", quantity.Text(p.Free.Value), "because of", p.Free.Because)
	fmt.Println("none above", quantity.Text(p.Crowded.Value))
	// Output:
	// freely up to 4.444e-5 mbar because of 0.001 Torr cm over a path of 300 mm
	// none above 4.444e-4 mbar
}

// Paths, the pressures of air's minimum (0.567 Torr cm) and of 0.001 Torr cm in mbar,
// worked out apart from this code (two to three digits).
func TestPressuresOfPaths(t *testing.T) {
	for _, row := range [][3]float64{
		{1, 7.56, 0.013}, {2, 3.78, 0.0067}, {5, 1.51, 0.0027}, {10, 0.756, 0.0013}, {20, 0.378, 0.00067},
		{50, 0.151, 0.00027}, {100, 0.0756, 0.00013}, {300, 0.0252, 4.4e-5}, {1000, 0.00756, 1.3e-5},
	} {
		s := vacuum.Vessel{LongestPath: quantity.Length(row[0] * mm)}
		worst, err := s.WorstPressure()
		if err != nil {
			t.Fatal(err)
		}
		p, err := s.Permit()
		if err != nil {
			t.Fatal(err)
		}
		marked(t, "worst", worst)
		marked(t, "free", p.Free)
		marked(t, "crowded", p.Crowded)
		near(t, "minimum", float64(worst.Value/mbar), row[1], 2e-3)
		near(t, "high voltage on", float64(p.Free.Value/mbar), row[2], 0.03)
		near(t, "none above", float64(p.Crowded.Value), 10*float64(p.Free.Value), 1e-12)
	}
}

// The air minimum, 327 V at 7.5 µm and one atmosphere (article of a supplier).
func TestWorstPressureOfTheAirMinimum(t *testing.T) {
	a, err := vacuum.Vessel{LongestPath: 7.5e-6}.WorstPressure()
	if err != nil {
		t.Fatal(err)
	}
	near(t, "pressure", float64(a.Value), 101325, 0.01)
}

// Abdel-Salam et al., ex. 4.9: α 39.8 /m, γ 0.0354, 0.133 kPa, E/p 12000 V/(m kPa): a path
// of 84.82 mm breaks down at 135.4 V. No gas is named; it is under air's least.
func TestLowPressurePathPublished(t *testing.T) {
	c := gas.Townsend{A: gas.PerPressureLength(39.8 / 133 * math.E), B: 12, Gamma: 0.0354, Most: 1e9}
	v, err := c.Voltage(133 * 0.08482)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "voltage", float64(v), 135.4, 1e-3)
}

// Left of the minimum the longer path breaks down first; right of it the shorter one.
func TestLeftOfTheMinimumMoreDistanceBreaksDownLower(t *testing.T) {
	shown := func(p quantity.Pressure, path quantity.Length) quantity.Voltage {
		a, err := vacuum.Vessel{LongestPath: path}.Strength(p)
		if err != nil || len(a.Shown) != 1 {
			t.Fatalf("%v: %v, shown %v", path, err, a.Shown)
		}
		return a.Shown[0].Value
	}
	for _, d := range []quantity.Length{86 * mm, 90 * mm} { // the constants end at E/p 800, 0.48 Torr cm
		if p := 0.0765 * mbar; !(shown(p, d) > shown(p, d+5*mm)) {
			t.Errorf("left: %v over %v, %v over 5 mm more", shown(p, d), d, shown(p, d+5*mm))
		}
	}
	strength := func(p quantity.Pressure, path quantity.Length) quantity.Voltage {
		a, err := vacuum.Vessel{LongestPath: path}.Strength(p)
		if err != nil {
			t.Fatal(err)
		}
		return a.Value
	}
	if !(strength(10*mbar, 50*mm) > strength(10*mbar, 20*mm)) {
		t.Error("right of the minimum more distance must stand more")
	}
}

// The pressure allowed falls as the path grows, and a longer path is worse at any product.
func TestPathsAndPressuresInvert(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		s := vacuum.Vessel{
			LongestPath: quantity.Length(rapid.Float64Range(1*mm, 5).Draw(t, "path")),
			GaugeFactor: rapid.Float64Range(0.2, 6).Draw(t, "gauge factor"),
		}
		p, err := s.Permit()
		if err != nil {
			t.Fatal(err)
		}
		back, err := s.PathFor(p.Free.Value, vacuum.Free)
		if err != nil || math.Abs(float64(back/s.LongestPath)-1) > 1e-9 {
			t.Fatalf("%v came back as %v (%v)", s.LongestPath, back, err)
		}
		longer := s
		longer.LongestPath *= 2
		q, _ := longer.Permit()
		if !quantity.Equal(p.Free.Value, 2*q.Free.Value) {
			t.Fatalf("twice the path: %v, then %v", p.Free.Value, q.Free.Value)
		}
	})
}

// A gauge that shows a third of the truth must be held to a third.
func TestGaugeFactorLowersReadings(t *testing.T) {
	plain := vacuum.Vessel{LongestPath: 0.3}
	helium := vacuum.Vessel{LongestPath: 0.3, GaugeFactor: 3}
	a, _ := plain.Permit()
	b, _ := helium.Permit()
	near(t, "permit", float64(a.Free.Value/b.Free.Value), 3, 1e-12)
	x, _ := plain.Band(20 * kV)
	y, _ := helium.Band(20 * kV)
	near(t, "band begins", float64(x.From/y.From), 3, 1e-9)
	near(t, "band ends", float64(x.To/y.To), 3, 1e-9)
	v, _ := plain.Strength(30 * mbar)
	w, _ := helium.Strength(10 * mbar)
	near(t, "strength", float64(v.Value), float64(w.Value), 1e-12)
}

// At the end of the band the path stands just the voltage.
func TestBandEndsWhereThePathStandsTheVoltage(t *testing.T) {
	for _, path := range []quantity.Length{20 * mm, 100 * mm, 300 * mm, 1} {
		for _, v := range []quantity.Voltage{400, 5 * kV, 20 * kV, 60 * kV} {
			s := vacuum.Vessel{LongestPath: path}
			b, err := s.Band(v)
			if err != nil {
				t.Fatal(err)
			}
			worst, _ := s.WorstPressure()
			if !b.Holds(worst.Value) || b.Holds(b.From) || b.Holds(b.To) || b.Holds(b.From/2) {
				t.Errorf("%v over %v: band %v to %v, worst %v", v, path, b.From, b.To, worst.Value)
			}
			if b.To >= 101325 {
				continue // the path does not stand it in open air
			}
			a, err := s.Strength(b.To)
			if err != nil {
				t.Fatal(err)
			}
			near(t, "strength at the end", float64(a.Value), float64(v), 1e-6)
			if len(b.Assumptions) != 1 || len(b.Sources) == 0 || !b.Sources[0].Governs {
				t.Errorf("%v over %v: %v %v", v, path, b.Assumptions, b.Sources)
			}
		}
	}
}

func TestBandIsEmptyUnderTheMinimum(t *testing.T) {
	b, err := vacuum.Vessel{LongestPath: 0.3}.Band(327)
	if err != nil || b.From != 0 || b.To != 0 || b.Holds(2.5) || b.Because == "" {
		t.Errorf("%+v (%v)", b, err)
	}
}

// Helium breaks down from 156 V on, air from 327 V.
func TestHeliumHasABandWhereAirHasNone(t *testing.T) {
	b, err := vacuum.Vessel{LongestPath: 0.3, Gas: gap.Helium}.Band(300)
	if err != nil || b.To <= b.From {
		t.Errorf("%+v (%v)", b, err)
	}
}

// Where the laws of a gas leave the end open it is taken at its highest, and said.
func TestBandOfAGasWithoutLawsThereIsSaid(t *testing.T) {
	for _, g := range []gap.Gas{gap.Helium, gap.Argon} {
		b, err := vacuum.Vessel{LongestPath: 0.3, Gas: g}.Band(20 * kV)
		if err != nil || len(b.Assumptions) != 2 || !quantity.Equal(b.To, 101325) {
			t.Errorf("%s: %+v (%v)", g, b, err)
		}
	}
	// Carbon dioxide stands it again at the latest where 18.78 kV/cm times density, its critical
	// field, is 20 kV over 300 mm: 3597 Pa.
	b, err := vacuum.Vessel{LongestPath: 0.3, Gas: gap.CarbonDioxide}.Band(20 * kV)
	if err != nil || len(b.Assumptions) != 2 || !strings.Contains(b.Assumptions[1], "from memory") {
		t.Errorf("carbon dioxide: %+v (%v)", b, err)
	}
	near(t, "carbon dioxide", float64(b.To), 3597, 1e-3)
	// Nitrogen has the law of air where its gap reaches 1 mm at normal density.
	b, err = vacuum.Vessel{LongestPath: 0.1, Gas: gap.Nitrogen}.Band(20 * kV)
	air, _ := vacuum.Vessel{LongestPath: 0.1}.Band(20 * kV)
	if err != nil || len(b.Assumptions) != 1 {
		t.Errorf("nitrogen: %+v (%v)", b, err)
	}
	near(t, "nitrogen as air", float64(b.To), float64(air.To), 1e-9)
	// At 3 kV, and in hydrogen, the constants are from memory: 275 pd/ln(8.8 pd/2.398) is 3 kV
	// at 58.6 Torr cm, 781 Pa over 100 mm.
	b, err = vacuum.Vessel{LongestPath: 0.1, Gas: gap.Nitrogen}.Band(3 * kV)
	if err != nil || len(b.Assumptions) != 2 || !strings.Contains(b.Assumptions[1], "from memory") {
		t.Errorf("nitrogen at 3 kV: %+v (%v)", b, err)
	}
	near(t, "nitrogen at 3 kV", float64(b.To), 781.1, 1e-3)
	b, err = vacuum.Vessel{LongestPath: 0.3, Gas: gap.Hydrogen}.Band(20 * kV)
	if err != nil || len(b.Assumptions) != 2 || !strings.Contains(b.Assumptions[1], "from memory") || b.To >= 101325 {
		t.Errorf("hydrogen: %+v (%v)", b, err)
	}
}

// The suppliers' limit for feedthroughs lies between the two products for a path of 300 mm.
func TestFeedthroughPressureBesideThePathRule(t *testing.T) {
	p, _ := vacuum.Vessel{LongestPath: 0.3}.Permit()
	if !(p.Free.Value < vacuum.FeedthroughPressure && vacuum.FeedthroughPressure < p.Crowded.Value) {
		t.Errorf("%v, %v, %v", p.Free.Value, vacuum.FeedthroughPressure, p.Crowded.Value)
	}
}

func TestVesselLacks(t *testing.T) {
	_, err := vacuum.Vessel{}.Permit()
	lacks(t, "no path", err, lack.Missing)
	_, err = vacuum.Vessel{}.Band(1 * kV)
	lacks(t, "no path", err, lack.Missing)
	_, err = vacuum.Vessel{LongestPath: 1, Gas: "steam"}.WorstPressure()
	lacks(t, "unknown gas", err, lack.Outside)
	_, err = vacuum.Vessel{LongestPath: 0.3, GaugeFactor: -1}.Permit()
	lacks(t, "gauge factor", err, lack.Missing)
	_, err = vacuum.Vessel{LongestPath: 0.3}.Strength(4e-5 * mbar)
	lacks(t, "no gas left", err, lack.Outside)
	_, err = vacuum.Vessel{}.PathFor(0, vacuum.Free)
	lacks(t, "no pressure", err, lack.Missing)
}

func TestCautionsAreMarkedAndDistinct(t *testing.T) {
	seen := map[string]bool{}
	for _, c := range append(vacuum.PumpDownCautions(), vacuum.JunctionCautions()...) {
		if c.Subject == "" || len(c.Text) < 30 || c.Source.Text == "" || c.Source.Mark == "" || seen[c.Subject] {
			t.Errorf("%+v", c)
		}
		seen[c.Subject] = true
	}
	for _, need := range []string{"helium", "ion gauge", "leak", "negative end first"} {
		if !seen[need] {
			t.Errorf("no caution about %s", need)
		}
	}
}
