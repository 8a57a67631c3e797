package xray_test

import (
	"math"
	"testing"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/hv/xray"
)

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

// Lead behind ten half-value layers of lead (ASTM E94, same in USAF T.O. 33B-1-1 Table
// 6-28, read): 0.05, 0.15 and 0.24 mm at 50, 70 and 100 kV.
func TestLeadAtHeavyFiltration(t *testing.T) {
	lead := material(t, "lead")
	for kilovolts, want := range map[float64]quantity.Length{50: 0.05e-3, 70: 0.15e-3, 100: 0.24e-3} {
		s, w := stop(t, "tungsten", kilovolts, 1e-3), xray.Wall{Layers: []xray.Layer{{Material: lead, Thickness: 10 * want}}, Distance: 1}
		near(t, "lead", behind(t, s, w).HalfValue, want, 0.125)
	}
}

// 0.5 mR/h are 4.38 µGy/h (Canadian regulation, text pair, read).
func TestRoentgen(t *testing.T) {
	near(t, "0.5 mR", 0.5e-3*xray.KermaPerRoentgen, 4.38e-6, 1e-3)
	// 36 pA/kg are printed for 0.5 mR/h (specification of a cathode-ray tube, read): exactly
	// 2.58e-4 C/kg a roentgen, over an hour.
	near(t, "0.5 mR/h as a current", 0.5e-3*xray.KermaPerRoentgen/33.97/3600, 36e-12, 5e-3)
}
