package xray_test

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/hv/xray"
)

// reporter is what a test and a property share.
type reporter interface {
	Helper()
	Errorf(format string, args ...any)
	Fatal(args ...any)
}

func near[Q ~float64](t reporter, what string, got, want Q, tolerance float64) {
	t.Helper()
	if !(math.Abs(float64(got-want)) <= tolerance*math.Abs(float64(want))) {
		t.Errorf("%s: got %.9g, want %.9g within %g", what, got, want, tolerance)
	}
}

func lacking(t reporter, what string, err error, kind lack.Kind) {
	t.Helper()
	if l := lack.Of(err); l == nil || l.Kind != kind {
		t.Errorf("%s: got %v, want a lack of kind %d", what, err, kind)
	}
}

// wall is made of words and millimetres.
func wall(t reporter, metres quantity.Length, layers ...any) xray.Wall {
	t.Helper()
	w := xray.Wall{Distance: metres}
	for i := 0; i < len(layers); i += 2 {
		w.Layers = append(w.Layers, xray.Layer{Material: material(t, layers[i].(string)), Thickness: quantity.Length(layers[i+1].(float64) * 1e-3)})
	}
	return w
}

func material(t reporter, word string) xray.Material {
	t.Helper()
	m, err := xray.FindMaterial(word)
	if err != nil {
		t.Fatal(err)
	}
	return m
}

func stop(t reporter, target string, kilovolts float64, current quantity.Current) xray.Stop {
	t.Helper()
	found, err := xray.FindTarget(target)
	if err != nil {
		t.Fatal(err)
	}
	return xray.Stop{Target: found, Voltage: quantity.Voltage(kilovolts * 1e3), Current: current}
}

func behind(t reporter, s xray.Stop, w xray.Wall) xray.Estimate {
	t.Helper()
	e, err := s.Behind(w)
	if err != nil {
		t.Fatal(err)
	}
	return e
}

// perHour is a kerma rate of µGy/h.
func perHour(micrograys float64) quantity.KermaRate {
	return quantity.KermaRate(micrograys * 1e-6 / 3600)
}

func ExampleStop_Behind() {
	anode, _ := xray.FindTarget("stainless steel")
	glass, _ := xray.FindMaterial("borosilicate glass")
	port := xray.Wall{Layers: []xray.Layer{{Material: glass, Thickness: 6e-3}}, Distance: 0.3}
	e, _ := xray.Stop{Target: anode, Voltage: 15e3, Current: 100e-6}.Behind(port)
	fmt.Println(quantity.Text(e.Rate), "from", quantity.Text(e.Low), "to", quantity.Text(e.Upper))
	fmt.Println("another", quantity.Text(e.HalfValue), "of glass halves it")
	// Output:
	// 1.249 µGy/h from 0.981 µGy/h to 2.497 µGy/h
	// another 476.3 µm of glass halves it
}

func ExampleStop_VoltageFor() {
	anode, _ := xray.FindTarget("iron")
	steel, _ := xray.FindMaterial("iron")
	column := xray.Wall{Layers: []xray.Layer{{Material: steel, Thickness: 2e-3}}, Distance: 0.3}
	v, _ := xray.Stop{Target: anode, Current: 100e-6}.VoltageFor(column, 1e-6/3600)
	fmt.Println("1 µGy/h is reached at", quantity.Text(v))
	// Output: 1 µGy/h is reached at 38.38 kV
}

// Yields of tungsten. Kirkpatrick and Wiedmann, Phys. Rev. 67 (1945), and W. W.
// Nicholas, NBS RP235: 0.00414 and 0.0039 at 40 kV (read); they agree to 6 %, and the
// textbook coefficient lies 17 % below the latter. A teaching page prints 0.666 % at
// 100 kV with 0.9e-9.
func TestYieldOfTungsten(t *testing.T) {
	near(t, "Kirkpatrick and Wiedmann", xray.Yield(xray.Coefficient, 74, 40e3), 0.00414, 2e-3)
	near(t, "Nicholas", xray.Yield(xray.Coefficient, 74, 40e3), 0.0039, 0.07)
	if low := xray.Yield(xray.LowCoefficient, 74, 40e3); !(low < 0.85*0.0039) {
		t.Errorf("1.1e-9 must lie well below Nicholas, not at %v", low)
	}
	near(t, "teaching page", xray.Yield(0.9e-9, 74, 100e3), 0.00666, 1e-3)
	near(t, "1.1e-9 (derived)", xray.Yield(xray.LowCoefficient, 74, 100e3), 0.00814, 1e-3)
}

// Gold at 2.35 MeV gave 7.4 % (measurement, read in its abstract): the law is far too
// high there, and the estimate refuses to go there.
func TestLinearLawEndsFarBelowARestEnergy(t *testing.T) {
	if over := xray.Yield(xray.LowCoefficient, 79, 2.35e6) / 0.074; !(over > 2.5) {
		t.Errorf("the linear law must fail at 2.35 MeV, not by %v only", over)
	}
	_, err := stop(t, "gold", 2350, 1e-6).Behind(wall(t, 1, "lead", 1.0))
	lacking(t, "2.35 MV", err, lack.Outside)
}

// Tube output in mSv/(mA s) at 1 m, tungsten (University of Groningen course data sheet,
// read): the textbook coefficient gives 1.06 to 1.75 times that, the default never less
// and at most 2.3 times.
func TestTubeOutputOfGroningen(t *testing.T) {
	for kilovolts, row := range map[float64][3]float64{50: {0.07, 0.05, 0.03}, 70: {0.15, 0.09, 0.05}, 90: {0.20, 0.13, 0.08}} {
		for i, published := range row {
			e := behind(t, stop(t, "tungsten", kilovolts, 1e-3), wall(t, 1, "aluminium", float64(i+1), "air", 1000.0))
			if ratio := float64(e.Low) * 1e3 / published; !(ratio > 1.05 && ratio < 1.76) {
				t.Errorf("%g kV, %d mm: 1.1e-9 gives %.3f times the published figure", kilovolts, i+1, ratio)
			}
			if ratio := float64(e.Rate) * 1e3 / published; !(ratio >= 1 && ratio < 2.6) {
				t.Errorf("%g kV, %d mm: %.3f times the published figure", kilovolts, i+1, ratio)
			}
		}
	}
}

// ISO quality N-30: 30 kV, tungsten, 7 mm beryllium and 4 mm aluminium, 1 m: 1.897
// µGy/(mA s), mean 24.5 keV, half-value layers 1.16 and 1.26 mm Al (header of a published
// spectrum file, a tube model; read). 1.1e-9 is 20 % low here: the trap that made 1.4e-9
// the default.
func TestN30(t *testing.T) {
	s, w := stop(t, "tungsten", 30, 1e-3), wall(t, 1, "beryllium", 7.0, "aluminium", 4.0, "air", 1000.0)
	e := behind(t, s, w)
	near(t, "rate", e.Rate, 1.897e-6, 0.03)
	if e.Rate < 1.897e-6 || e.Low > 0.85*1.897e-6 {
		t.Errorf("rate %v must not be low, %v must", e.Rate, e.Low)
	}
	near(t, "mean energy", e.MeanEnergy, 24.5e3, 0.02)
	first, second, err := s.HalfValueLayers(w, material(t, "aluminium"))
	if err != nil {
		t.Fatal(err)
	}
	near(t, "first", first, 1.16e-3, 0.06)
	near(t, "second", second, 1.26e-3, 0.05)
}

// A small tube, measured with a chamber (open laboratory log, read); window and target
// unknown. With 4 mm beryllium the best estimate lies above every reading; with 1 mm,
// unfiltered, up to eight times: the negative control of an open beam.
func TestSmallTube(t *testing.T) {
	for kilovolts, published := range map[float64]float64{20: 0.374, 30: 0.564, 40: 0.615, 50: 0.640} {
		s := stop(t, "tungsten", kilovolts, 1e-3)
		thick := behind(t, s, wall(t, 0.1, "beryllium", 4.0, "air", 100.0))
		thin := behind(t, s, wall(t, 0.1, "beryllium", 1.0, "air", 100.0))
		if ratio := float64(thick.Rate) * 1e3 / 100 / published; !(ratio > 1) {
			t.Errorf("%g kV behind 4 mm: %.2f of the reading", kilovolts, ratio)
		}
		if ratio := float64(thin.Rate) * 1e3 / 100 / published; !(ratio > 2.6) {
			t.Errorf("%g kV behind 1 mm: %.2f, an open beam must not agree", kilovolts, ratio)
		}
	}
}

// beam is a published radiation quality: filter and half-value layers in mm.
type beam struct {
	code      string
	kilovolts float64
	filter    []any
	in        string
	first     float64
	second    float64 // 0: not published
}

// Half-value layers of filtered tungsten beams (NIST calibration service, Table VIII.6,
// read): within 15 %, real beams usually slightly harder. Inherent filtration is from
// memory: 1 mm beryllium for the soft beams, 4 mm aluminium for the hard ones.
func TestHalfValueLayersOfFilteredBeams(t *testing.T) {
	soft := func(mm float64) []any { return []any{"beryllium", 1.0, "aluminium", mm, "air", 1000.0} }
	hard := func(mm float64) []any { return []any{"aluminium", 4.0, "copper", mm, "air", 1000.0} }
	for _, b := range []beam{
		{"HK20", 20, soft(0.15), "aluminium", 0.128, 0.170},
		{"HK30", 30, soft(0.52), "aluminium", 0.408, 0.596},
		{"NS10", 10, soft(0.095), "aluminium", 0.049, 0.061},
		{"NS15", 15, soft(0.49), "aluminium", 0.153, 0.167},
		{"NS20", 20, soft(0.90), "aluminium", 0.324, 0.351},
		{"NS25", 25, soft(2.04), "aluminium", 0.691, 0.762},
		{"NS30", 30, soft(4.02), "aluminium", 1.154, 1.396},
		{"LK10", 10, soft(0.30), "aluminium", 0.061, 0},
		{"LK20", 20, soft(2.04), "aluminium", 0.441, 0},
		{"LK30", 30, []any{"aluminium", 3.98, "copper", 0.18, "air", 1000.0}, "aluminium", 1.492, 0},
		{"NS40", 40, hard(0.21), "copper", 0.082, 0.094},
		{"NS60", 60, hard(0.6), "copper", 0.241, 0.271},
		{"NS80", 80, hard(2.0), "copper", 0.590, 0.620},
		{"NS100", 100, hard(5.0), "copper", 1.14, 1.24},
		{"WS60", 60, hard(0.3), "copper", 0.179, 0.206},
		{"WS80", 80, hard(0.529), "copper", 0.337, 0.440},
		{"WS110", 110, hard(2.0295), "copper", 0.97, 1.13},
	} {
		first, second, err := stop(t, "tungsten", b.kilovolts, 1e-3).HalfValueLayers(wall(t, 1, b.filter...), material(t, b.in))
		if err != nil {
			t.Fatal(err)
		}
		near(t, b.code, first*1e3, quantity.Length(b.first), 0.12)
		if b.second > 0 {
			near(t, b.code+" second", second*1e3, quantity.Length(b.second), 0.145)
		}
	}
}

// Unfiltered tungsten beams (PTB catalogue of unfiltered X-ray spectra, 2020: computed
// from measured spectra): behind 4 mm beryllium the continuum agrees to 15 kV; from 20
// kV on the L lines, which it has not, make the real beam softer.
func TestOpenBeamsAreNotTheModels(t *testing.T) {
	for _, row := range []struct{ kilovolts, mean, first, reckoned float64 }{
		{10, 7.96, 0.0422, 0.0437}, {15, 10.2, 0.0746, 0.0745}, {20, 11.75, 0.0863, 0.0982}, {25, 13.27, 0.0948, 0.1161},
		{30, 14.7, 0.0995, 0.1298}, {40, 17.55, 0.1056, 0.1493}, {50, 20.33, 0.1095, 0.1626},
	} {
		s, w := stop(t, "tungsten", row.kilovolts, 1e-3), wall(t, 1, "beryllium", 4.0, "air", 1000.0)
		first, _, err := s.HalfValueLayers(w, material(t, "aluminium"))
		if err != nil {
			t.Fatal(err)
		}
		near(t, "mean energy", float64(behind(t, s, w).MeanEnergy), row.mean*1e3, 0.04)
		near(t, "reckoned once more (derived)", float64(first)*1e3, row.reckoned, 2e-3)
		over := float64(first)*1e3/row.first - 1
		if agrees := math.Abs(over) < 0.04; agrees != (row.kilovolts <= 15) {
			t.Errorf("%g kV: %.1f %% off", row.kilovolts, 100*over)
		}
		if e := behind(t, s, w); row.kilovolts > 15 && !(e.Lines > e.Rate) {
			t.Errorf("%g kV: the lines must show in the upper figure", row.kilovolts)
		}
	}
}

// Half-value layers of one photon energy against beams of narrow spectrum at their mean
// energies (ISO 4037, energies from memory; NIST's layers read).
func TestHalfValueLayersOfMeanEnergies(t *testing.T) {
	for _, row := range []struct {
		energy quantity.ElectronEnergy
		in     string
		want   float64
	}{
		{16e3, "aluminium", 0.324}, {20e3, "aluminium", 0.691}, {24e3, "aluminium", 1.154},
		{33e3, "copper", 0.082}, {48e3, "copper", 0.241}, {65e3, "copper", 0.590}, {83e3, "copper", 1.14},
	} {
		got, err := material(t, row.in).HalfValueLayer(row.energy)
		if err != nil {
			t.Fatal(err)
		}
		if ratio := float64(got) * 1e3 / row.want; !(ratio > 0.96 && ratio < 1.21) {
			t.Errorf("%v eV in %s: %.3f of the table", row.energy, row.in, ratio)
		}
	}
}

// Lead behind ten half-value layers of lead (ASTM E94, same in USAF T.O. 33B-1-1 Table
// 6-28, read): 0.05, 0.15 and 0.24 mm at 50, 70 and 100 kV.
func TestLeadAtHeavyFiltration(t *testing.T) {
	lead := material(t, "lead")
	for kilovolts, want := range map[float64]quantity.Length{50: 0.05e-3, 70: 0.15e-3, 100: 0.24e-3} {
		s, w := stop(t, "tungsten", kilovolts, 1e-3), xray.Wall{Layers: []xray.Layer{{Material: lead, Thickness: 10 * want}}, Distance: 1}
		near(t, "lead", behind(t, s, w).HalfValue, want, 0.125)
	}
}

// Rates once reckoned with 1.1e-9 by another program (derived, not published): 100 µA on
// iron, 0.3 m of air, µGy/h.
func TestRatesReckonedElsewhere(t *testing.T) {
	kilovolts := []float64{10, 15, 20, 30, 40, 50}
	for _, c := range []struct {
		material string
		mm       float64
		rates    [6]float64
	}{
		{"borosilicate glass", 3, [6]float64{0.00604, 100, 2120, 20700, 55600, 100000}},
		{"borosilicate glass", 6, [6]float64{1.83e-08, 0.912, 150, 4700, 18100, 38400}},
		{"iron", 1, [6]float64{1.68e-15, 4.54e-15, 1.84e-07, 0.951, 107, 942}},
		{"iron", 2, [6]float64{5.36e-34, 1.45e-33, 7.92e-17, 0.000423, 1.88, 68.7}},
		{"iron", 3, [6]float64{2.27e-52, 6.17e-52, 5.9e-26, 3.13e-07, 0.052, 7.51}},
		{"lead", 1, [6]float64{2.15e-64, 4.43e-31, 1.56e-30, 3.4e-14, 8.23e-06, 0.0287}},
	} {
		for i, want := range c.rates {
			e := behind(t, stop(t, "iron", kilovolts[i], 100e-6), wall(t, 0.3, c.material, c.mm, "air", 300.0))
			tolerance := 0.006
			if want < 1e-10 { // carried by the last electronvolts below an edge, as printed
				tolerance = 0.06
			}
			near(t, fmt.Sprintf("%g mm %s at %g kV", c.mm, c.material, kilovolts[i]), e.Low, perHour(want), tolerance)
		}
	}
}

// Voltages once found with 1.1e-9 for 1 µGy/h in the same place (derived).
func TestVoltagesReckonedElsewhere(t *testing.T) {
	for _, c := range []struct {
		material string
		mm, want float64
	}{
		{"glass", 3, 11.8}, {"glass", 6, 15.1}, {"glass", 10, 18.1}, {"aluminium", 1, 9.97}, {"aluminium", 3, 14.6},
		{"iron", 1, 30.1}, {"iron", 2, 38.8}, {"iron", 3, 45.0}, {"iron", 5, 54.3}, {"copper", 2, 45.3},
		{"lead", 1, 57.9}, {"lead", 2, 75.1}, {"lead", 3, 87.3}, {"lead glass", 6, 82.0},
	} {
		s, w := stop(t, "iron", 0, 100e-6), wall(t, 0.3, c.material, c.mm, "air", 300.0)
		v, err := s.VoltageFor(w, perHour(1)*quantity.KermaRate(xray.Coefficient/xray.LowCoefficient))
		if err != nil {
			t.Fatal(err)
		}
		near(t, fmt.Sprint(c.mm, " mm ", c.material), v, quantity.Voltage(c.want*1e3), 0.005)
		s.Voltage = v
		near(t, "there", behind(t, s, w).Low, perHour(1), 1e-6)
	}
}

// Lead is a worse shield just above its K edge of 88 keV than below; a line from the
// printed 80 to 100 keV would miss both sides.
func TestNoLineAcrossAnEdge(t *testing.T) {
	lead := material(t, "lead")
	below, _ := lead.MassAttenuation(87.9e3)
	above, _ := lead.MassAttenuation(88.1e3)
	near(t, "below", below, 0.1916, 0.003) // NIST: 1.910 cm²/g at the edge
	near(t, "above", above, 0.7662, 0.003) // 7.683 cm²/g
	at, _ := lead.MassAttenuation(88.00e3)
	near(t, "at the edge", at, 0.7683, 1e-9)
	across := 0.2419 * math.Pow(0.5549/0.2419, math.Log(88.0/80)/math.Log(100.0/80))
	if across < 1.4*float64(below) || across > 0.6*float64(above) {
		t.Errorf("a line across the edge gives %v", across)
	}
}

// NIST's printed rows come back, edges and ends too.
func TestPrintedRows(t *testing.T) {
	for _, row := range []struct {
		material string
		energy   quantity.ElectronEnergy
		want     xray.MassAttenuation // m²/kg
	}{
		{"aluminium", 1e3, 118.5}, {"aluminium", 30e3, 0.1128}, {"aluminium", 150e3, 0.01378}, {"iron", 60e3, 0.1205}, {"iron", 7.112e3, 40.76},
		{"copper", 8.979e3, 27.84}, {"molybdenum", 20e3, 8.054}, {"tungsten", 69.53e3, 1.123}, {"nickel", 10e3, 20.9}, {"air", 100e3, 0.01541},
		{"water", 15e3, 0.1673}, {"acrylic", 20e3, 0.05714}, {"borosilicate glass", 50e3, 0.03022}, {"lead glass", 88e3, 0.5824}, {"lead", 150e3, 0.2014},
	} {
		got, err := material(t, row.material).MassAttenuation(row.energy)
		if err != nil {
			t.Fatal(err)
		}
		near(t, row.material, got, row.want, 1e-9)
	}
	for _, outside := range []quantity.ElectronEnergy{999, 150.1e3, 0, quantity.ElectronEnergy(math.NaN())} {
		_, err := material(t, "lead").MassAttenuation(outside)
		lacking(t, "outside the tables", err, lack.Outside)
		_, err = material(t, "lead").HalfValueLayer(outside)
		lacking(t, "outside the tables", err, lack.Outside)
	}
}

// Stainless steel as iron of 7.7 g/cm³: 69 % iron, 19 % chromium, 9 % nickel, 2 %
// manganese in 7.93 g/cm³ (NIST's chromium and manganese from memory, cm²/g).
func TestStainlessSteelAsIron(t *testing.T) {
	for energy, others := range map[quantity.ElectronEnergy][2]float64{15e3: {45.71, 52.0}, 30e3: {6.434, 7.141}, 60e3: {0.9639, 1.06}, 100e3: {0.3166, 0.337}} {
		iron, _ := material(t, "iron").MassAttenuation(energy)
		nickel, _ := material(t, "nickel").MassAttenuation(energy)
		alloy := 7930 * (0.69*float64(iron) + 0.19*others[0]/10 + 0.09*float64(nickel) + 0.02*others[1]/10)
		half, err := material(t, "stainless steel").HalfValueLayer(energy)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "attenuation", math.Ln2/float64(half), alloy, 0.015)
	}
}

// 0.5 mR/h are 4.38 µGy/h (Canadian regulation, text pair, read).
func TestRoentgen(t *testing.T) {
	near(t, "0.5 mR", 0.5e-3*xray.KermaPerRoentgen, 4.38e-6, 1e-3)
}

func TestWordsOfMaterialsAndTargets(t *testing.T) {
	for word, name := range map[string]string{"Stainless  Steel": "stainless steel", "aluminum": "aluminium", "PMMA": "acrylic", " lead glass ": "lead glass", "AIR": "air"} {
		if m := material(t, word); m.Name != name || m.Mark == "" {
			t.Errorf("%q is %+v", word, m.Name)
		}
	}
	for word, z := range map[string]float64{"stainless steel": 26, "Copper": 29, "carbon": 6, "tungsten": 74, "aluminum": 13} {
		if s := stop(t, word, 20, 0); s.Target.Z != z {
			t.Errorf("%q has Z %v", word, s.Target.Z)
		}
	}
	_, err := xray.FindMaterial("unobtainium")
	lacking(t, "material", err, lack.Outside)
	if err == nil || !strings.Contains(err.Error(), "aluminium") || !strings.Contains(err.Error(), "lead glass") {
		t.Errorf("the known ones must be named: %v", err)
	}
	_, err = xray.FindTarget("cheese")
	lacking(t, "target", err, lack.Outside)
	if err == nil || !strings.Contains(err.Error(), "tungsten") {
		t.Errorf("the known ones must be named: %v", err)
	}
	for _, name := range xray.Materials() {
		material(t, name)
	}
	for _, name := range xray.Targets() {
		stop(t, name, 20, 0)
	}
}

func TestOutsideTheModel(t *testing.T) {
	s, w := stop(t, "iron", 20, 1e-4), wall(t, 0.3, "glass", 3.0)
	nan := math.NaN()
	for _, kilovolts := range []float64{0.5, 1, 150.1, -20, 0, nan, math.Inf(1)} {
		_, err := stop(t, "iron", kilovolts, 1e-4).Behind(w)
		lacking(t, fmt.Sprint(kilovolts, " kV"), err, lack.Outside)
	}
	for _, current := range []quantity.Current{-1e-6, quantity.Current(nan), quantity.Current(math.Inf(1))} {
		_, err := stop(t, "iron", 20, current).Behind(w)
		lacking(t, "current", err, lack.Outside)
	}
	for what, bad := range map[string]xray.Wall{
		"no distance": wall(t, 0, "glass", 3.0), "no thickness": wall(t, 0.3, "glass", 0.0), "NaN": wall(t, 0.3, "glass", nan),
		"no material": {Layers: []xray.Layer{{Thickness: 1}}, Distance: 1},
	} {
		_, err := s.Behind(bad)
		lacking(t, what, err, lack.Outside)
		_, _, err = s.HalfValueLayers(bad, material(t, "lead"))
		lacking(t, what, err, lack.Outside)
	}
	_, err := s.Behind(wall(t, 0.3))
	lacking(t, "no wall", err, lack.Missing)
	_, err = xray.Stop{Voltage: 20e3}.Behind(w)
	lacking(t, "no target", err, lack.Outside)
}

func TestInversionsFailClosed(t *testing.T) {
	s, w := stop(t, "iron", 20, 1e-4), wall(t, 0.3, "glass", 3.0)
	for _, rate := range []quantity.KermaRate{0, -1, quantity.KermaRate(math.NaN())} {
		_, err := s.VoltageFor(w, rate)
		lacking(t, "rate", err, lack.Outside)
		_, err = s.ThicknessFor(w, material(t, "lead"), rate)
		lacking(t, "rate", err, lack.Outside)
	}
	_, err := s.VoltageFor(wall(t, 0.3, "lead", 30.0), perHour(1))
	lacking(t, "never reached", err, lack.Outside)
	_, err = s.VoltageFor(wall(t, 0.3, "beryllium", 0.001), 1e-300)
	lacking(t, "reached below the model", err, lack.Outside)
	_, err = s.ThicknessFor(w, xray.Material{}, perHour(1))
	lacking(t, "no material", err, lack.Outside)
	_, err = stop(t, "iron", 20, 0).VoltageFor(w, perHour(1))
	lacking(t, "no current", err, lack.Outside)
}

// A rate too small for a number is zero, and the rest still holds.
func TestRateBelowAllNumbers(t *testing.T) {
	e := behind(t, stop(t, "iron", 5, 1e-4), wall(t, 0.3, "lead", 10.0))
	if e.Rate != 0 || !(e.MeanEnergy > 3e3 && e.MeanEnergy < 5e3) || !(e.HalfValue > 0) {
		t.Errorf("%+v", e)
	}
}

// In light walls the upper figure takes in scatter; twice the best estimate is its floor.
func TestUpperFigure(t *testing.T) {
	for _, c := range []struct {
		kilovolts float64
		material  string
		mm        float64
		scatter   bool
	}{{60, "acrylic", 100, true}, {60, "aluminium", 20, true}, {60, "stainless steel", 3, false}, {20, "glass", 6, false}} {
		e := behind(t, stop(t, "iron", c.kilovolts, 1e-4), wall(t, 0.3, c.material, c.mm))
		if over := float64((e.Upper - e.Lines) / e.Rate); (over > xray.Band*(1+1e-9)) != c.scatter || !quantity.AtLeast(over, xray.Band) {
			t.Errorf("%g mm %s: upper figure %.3f times the rate", c.mm, c.material, over)
		}
		near(t, "low", e.Low, e.Rate*1.1/1.4, 1e-12)
	}
}

// drawn is any stop before any wall.
func drawn(t *rapid.T) (xray.Stop, xray.Wall) {
	s := stop(t, rapid.SampledFrom(xray.Targets()).Draw(t, "target"), rapid.Float64Range(3, 140).Draw(t, "kilovolts"), 1e-4)
	w := xray.Wall{Distance: 0.3}
	for range rapid.IntRange(1, 3).Draw(t, "layers") {
		name := rapid.SampledFrom(xray.Materials()).Draw(t, "material")
		w.Layers = append(w.Layers, xray.Layer{Material: material(t, name), Thickness: quantity.Length(math.Pow(10, rapid.Float64Range(-5, -2).Draw(t, "log thickness")))})
	}
	return s, w
}

// More voltage, more rate; a further layer, less; four times nearer, sixteen times;
// proportional to the current; order and cutting of layers change nothing.
func TestRatesFollow(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s, w := drawn(t)
		e := behind(t, s, w)
		if e.Rate < 1e-250 {
			t.Skip("too little to compare")
		}
		higher, doubled, nearer := s, s, w
		higher.Voltage *= 1.05
		doubled.Current *= 2
		nearer.Distance /= 4
		if up := behind(t, higher, w); !(up.Rate > e.Rate && up.Upper > e.Upper*(1-1e-9)) {
			t.Errorf("%v at more voltage, %v before", up, e)
		}
		near(t, "current", behind(t, doubled, w).Rate, 2*e.Rate, 1e-12)
		near(t, "distance", behind(t, s, nearer).Upper, 16*e.Upper, 1e-12)
		extra := xray.Layer{Material: material(t, rapid.SampledFrom(xray.Materials()).Draw(t, "extra")), Thickness: 1e-4}
		thicker := w
		thicker.Layers = append([]xray.Layer{extra}, w.Layers...)
		if down := behind(t, s, thicker); !(down.Rate < e.Rate) {
			t.Errorf("%v behind more, %v before", down.Rate, e.Rate)
		}
		cut := xray.Wall{Distance: w.Distance}
		for i := range w.Layers {
			half := w.Layers[len(w.Layers)-1-i]
			half.Thickness /= 2
			cut.Layers = append(cut.Layers, half, half)
		}
		near(t, "cut and turned", behind(t, s, cut).Rate, e.Rate, 1e-9)
		if !(float64(e.MeanEnergy) < float64(s.Voltage)) || !(e.MeanEnergy > 1e3) {
			t.Errorf("mean energy %v at %v V", e.MeanEnergy, s.Voltage)
		}
	})
}

// What the inversions and half-value layers find, the estimate confirms.
func TestInversionsRoundTrip(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s, w := drawn(t)
		e := behind(t, s, w)
		if e.Rate < 1e-250 {
			t.Skip("too little to compare")
		}
		v, err := s.VoltageFor(w, e.Rate)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "voltage", v, s.Voltage, 1e-6)
		m := material(t, rapid.SampledFrom(xray.Materials()).Draw(t, "added"))
		share := quantity.KermaRate(math.Pow(10, rapid.Float64Range(-6, 0).Draw(t, "log share")))
		x, err := s.ThicknessFor(w, m, e.Rate*share)
		if err != nil {
			t.Fatal(err)
		}
		with := w
		with.Layers = append(append([]xray.Layer{}, w.Layers...), xray.Layer{Material: m, Thickness: x + 1e-15})
		near(t, "thickness", behind(t, s, with).Rate, e.Rate*share, 1e-6)
		first, second, err := s.HalfValueLayers(w, m)
		if err != nil {
			t.Fatal(err)
		}
		with.Layers[len(w.Layers)].Thickness = first
		near(t, "half", behind(t, s, with).Rate, e.Rate/2, 1e-4)
		with.Layers[len(w.Layers)].Thickness = first + second
		near(t, "quarter", behind(t, s, with).Rate, e.Rate/4, 1e-4)
		if !(second >= first*(1-1e-9)) {
			t.Errorf("second half-value layer %v before the first %v", second, first)
		}
	})
}

// Nothing more is needed where the rate is kept already.
func TestNoThicknessNeeded(t *testing.T) {
	x, err := stop(t, "iron", 10, 1e-4).ThicknessFor(wall(t, 0.3, "steel", 3.0), material(t, "lead"), perHour(1))
	if err != nil || x != 0 {
		t.Errorf("%v, %v", x, err)
	}
}

// A shield is worth well under a millisecond.
func BenchmarkBehind(b *testing.B) {
	anode, _ := xray.FindTarget("stainless steel")
	steel, _ := xray.FindMaterial("stainless steel")
	glass, _ := xray.FindMaterial("glass")
	s := xray.Stop{Target: anode, Voltage: 30e3, Current: 1e-4}
	w := xray.Wall{Layers: []xray.Layer{{Material: steel, Thickness: 1e-3}, {Material: glass, Thickness: 6e-3}}, Distance: 0.3}
	for b.Loop() {
		if _, err := s.Behind(w); err != nil {
			b.Fatal(err)
		}
	}
}
