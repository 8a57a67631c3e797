package rules_test

import (
	"math"
	"strings"
	"testing"

	"kilovet/rules"
	"kilovet/rules/exhibit"
	"kilovet/rules/rule"
)

// columnWith reviews the built-in column with swaps, each of a text and what stands in its
// place.
func columnWith(t *testing.T, swaps ...string) *rules.Review {
	t.Helper()
	return reviewed(t, []byte(columnText(t, swaps...)))
}

// columnText is the built-in column with swaps.
func columnText(t *testing.T, swaps ...string) string {
	t.Helper()
	text := string(described(t, "column"))
	for i := 0; i < len(swaps); i += 2 {
		if strings.Count(text, swaps[i]) != 1 {
			t.Fatalf("%q does not stand once in the column", swaps[i])
		}
		text = strings.Replace(text, swaps[i], swaps[i+1], 1)
	}
	return text
}

// number is a figure of the working state or of none; NaN where it is not listed.
func number(r *rules.Review, id, subject string) float64 {
	for _, f := range r.Figures {
		if f.ID == id && f.Subject == subject && (f.State == "" || f.State == "working") {
			return f.Value
		}
	}
	return math.NaN()
}

func nearly(t *testing.T, what string, got, want, relative float64) {
	t.Helper()
	if !(math.Abs(got-want) <= relative*math.Abs(want)) {
		t.Errorf("%s: %.9g, want %.9g within %g", what, got, want, relative)
	}
}

func verdictOf(r *rules.Review, id, subject string) rule.Verdict {
	for _, f := range r.Findings {
		if f.Rule == id && f.Subject == subject {
			return f.Verdict
		}
	}
	return ""
}

func rowOf(r *rules.Review, table, first string) []exhibit.Cell {
	for _, t := range r.Tables {
		if t.ID != table {
			continue
		}
		for _, row := range t.Rows {
			if row[0].Text == first {
				return row
			}
		}
	}
	return nil
}

// The law through 60 µA at 282 V below a cutoff of 420 V, worked out by hand (derived): L =
// n Vb/(Vc − Vb) = 2·282/138, to the voltage n Vc/(Vc − Vb)/(1 + L).
func TestOperatingPointOfTheColumn(t *testing.T) {
	r := columnWith(t)
	nearly(t, "loop gain", number(r, "gun.loop_gain", ""), 2*282.0/138, 1e-6)
	nearly(t, "to the voltage", number(r, "gun.emission_to_voltage", ""), 2*420.0/138/(1+2*282.0/138), 1e-6)
	nearly(t, "at a fixed bias", number(r, "gun.emission_to_voltage_fixed", ""), 2*420.0/138, 1e-6)
	nearly(t, "bypass corner", number(r, "gun.loop_corner", ""), 1/(2*math.Pi*4.7e6*1e-9), 1e-6)
	needed := number(r, "gun.resistor_needed", "")
	nearly(t, "both laws with the needed resistor", 560e-6*math.Pow(1-needed*60e-6/420, 2), 60e-6, 1e-6)
	nearly(t, "headroom", number(r, "gun.headroom", ""), 138, 1e-9)
}

// Cathode-fed and control-fed guns with a fixed bias of the same size differ by that bias.
func TestFixedBiasFedEitherWay(t *testing.T) {
	control := columnWith(t, `kind     = "self"`, "kind = \"fixed\"\nvoltage = \"282 V\"")
	cathode := columnWith(t, `kind     = "self"`, "kind = \"fixed\"\nvoltage = \"282 V\"", `fed      = "control"`, `fed = "cathode"`)
	nearly(t, "energies", number(cathode, "beam.energy", "")-number(control, "beam.energy", ""), 282, 1e-6)
	for _, r := range []*rules.Review{control, cathode} {
		if g := number(r, "gun.loop_gain", ""); g != 0 {
			t.Errorf("a fixed bias has a loop gain of %g", g)
		}
		nearly(t, "to the voltage", number(r, "gun.emission_to_voltage", ""), 2*420.0/138, 1e-6)
	}
}

// An earthed cathode on a positive supply accelerates to the anode, less the bias that its
// resistor makes; Richardson, load line and blur are as before.
func TestEarthedCathode(t *testing.T) {
	r := columnWith(t, `polarity  = "negative"`, `polarity = "positive"`, `fitted              = true`, "fitted = true\nearthed = \"cathode\"")
	nearly(t, "anode", number(r, "potential", "anode"), 20000, 1e-6)
	nearly(t, "cathode", number(r, "potential", "cathode"), 282, 1e-6)
	nearly(t, "energy", number(r, "beam.energy", ""), 19718, 1e-6)
	if math.IsNaN(number(r, "beam.blur_total", "")) {
		t.Error("no spot")
	}
	wrong := columnWith(t, `fitted              = true`, "fitted = true\nearthed = \"cathode\"")
	if v := verdictOf(wrong, "beam.blur", "beam"); v != rule.Unassessed {
		t.Errorf("the wrong polarity is %q", v)
	}
}

// A diode gun follows its voltage by Child's law and has no bias to speak of.
func TestDiodeGunReviewed(t *testing.T) {
	text := string(described(t, "column"))
	from, to := strings.Index(text, "[bias]"), strings.Index(text, "[gun]")
	text = text[:from] + text[to:]
	for _, line := range []string{`cutoff              = "420 V"`, "exponent            = 2.0", `emission            = "60 uA"`} {
		text = strings.Replace(text, line, "", 1)
	}
	r := reviewed(t, []byte(text))
	nearly(t, "its own law, below the cathode's limit of 523 uA", number(r, "gun.emission", ""), 522.84e-6*math.Pow(1+math.Pow(522.84/560, 10), -0.1), 1e-3)
	nearly(t, "all of the output's voltage", number(r, "beam.energy", ""), number(r, "output.mean", ""), 1e-12)
	if s := number(r, "gun.emission_to_voltage", ""); !(s > 0 && s < 1.5) {
		t.Errorf("near its limit the emission follows the voltage by %g", s)
	}
	for _, p := range r.PassedOver {
		if p.Rule == "gun.regulation" {
			return
		}
	}
	t.Error("a diode gun regulates")
}

// A gun not yet fitted leaves the supply to be reviewed and says what is left out.
func TestGunNotFitted(t *testing.T) {
	r := columnWith(t, "fitted              = true", "fitted = false")
	if !math.IsNaN(number(r, "beam.energy", "")) || number(r, "gun.emission", "") != 0 {
		t.Error("a beam without a gun")
	}
	if rowOf(r, "beam.left_out", "emission, operating point, beam and spot") == nil {
		t.Error("what was left out is not said")
	}
}

// A chain without a gun says so; ions keep energy, blur and paths.
func TestIonsOnThePositiveSupply(t *testing.T) {
	bare := reviewed(t, described(t, "positive"))
	if rowOf(bare, "beam.left_out", "emission, bias and operating point") == nil {
		t.Error("a chain without a gun does not say what was left out")
	}
	ions := reviewed(t, append(described(t, "positive"), []byte(`
[beam]
particle = "ion"
mass_number = 40
charge_number = 2
chromatic_aberration = "50 mm"
spherical_aberration = "200 mm"
half_angle = "2 mrad"
source_image = "1 um"
energy_width = "5 eV"
blur_allowance = "2 um"
exposure = "10 s"
`)...))
	nearly(t, "twice the charge", number(ions, "beam.energy", ""), 2*number(ions, "output.mean", ""), 1e-9)
	if v := verdictOf(ions, "beam.blur", "beam"); v != rule.Meets {
		t.Errorf("blur %q", v)
	}
	if !(number(ions, "path.voltage", "drive.1/filter") > 0) {
		t.Error("no path to the ions")
	}
	if rowOf(ions, "beam.left_out", "emission, bias and heater") == nil {
		t.Error("what was left out is not said")
	}
}

// What the table of remedies says comes true when it is written into the description.
func TestRemediesComeTrue(t *testing.T) {
	leaky := []string{`pickup_to_output      = "0.05 pF"`, `pickup_to_output      = "2 pF"`}
	r := columnWith(t, leaky...)
	if v := verdictOf(r, "beam.disturbance", "cathode"); v != rule.Fails {
		t.Fatalf("2 pF of pickup: %q", v)
	}
	row := rowOf(r, "beam.remedies", "multiplier.pickup_to_output")
	if row == nil {
		t.Fatal("no remedy by less pickup")
	}
	cured := columnWith(t, leaky[0], `pickup_to_output = "`+row[2].Text+`"`)
	nearly(t, "spot", number(cured, "beam.blur_total", ""), 12e-9, 0.01)
	nearly(t, "as the table says", number(cured, "beam.blur_total", ""), *row[4].Value, 1e-3)
	weak := []string{`pickup_to_output      = "0.05 pF"`, `pickup_to_output = "0 pF"`, `bypass_capacitance = "0.2 pF"`, `bypass_capacitance = "0 pF"`, `{ value = "1 Mohm", count = 4`, `{ value = "10 kohm", count = 1`}
	r = columnWith(t, weak...)
	for part, key := range map[string][2]string{
		"filter.1.resistor":     {`{ value = "1 Mohm", count = 4`, `{ count = 1, value = "%"`},
		"filter.1.capacitor":    {`capacitor = { value = "470 pF"`, `capacitor = { value = "%"`},
		"drive.frequency":       {`frequency  = "25 kHz"`, `frequency = "%"`},
		"multiplier capacitors": {`smoothing_capacitor = { value = "2.2 nF"`, `smoothing_capacitor = { value = "%"`},
	} {
		row := rowOf(r, "beam.remedies", part)
		if row == nil || strings.Contains(row[2].Text, "not") {
			t.Errorf("%s: %v", part, row)
			continue
		}
		swaps := append([]string(nil), weak...)
		becomes := strings.Replace(key[1], "%", row[2].Text, 1)
		if part == "filter.1.resistor" {
			swaps[5] = becomes
		} else {
			swaps = append(swaps, key[0], becomes)
		}
		if part == "multiplier capacitors" {
			swaps = append(swaps, `coupling_capacitor  = { value = "2.2 nF"`, `coupling_capacitor = { value = "`+row[2].Text+`"`)
		}
		nearly(t, part, number(columnWith(t, swaps...), "beam.blur_total", ""), 12e-9, 0.01)
	}
}

// The bypass that quietens the bias costs the loop: a tenfold bypass ends it a decade
// earlier.
func TestBypassCostsTheLoop(t *testing.T) {
	few, many := columnWith(t), columnWith(t, `bypass   = { value = "1 nF"`, `bypass = { value = "10 nF"`)
	nearly(t, "corner", number(many, "gun.loop_corner", ""), number(few, "gun.loop_corner", "")/10, 1e-9)
	if !(number(many, "bias.ripple", "") < number(few, "bias.ripple", "")/5) {
		t.Error("ten times the bypass does not quieten the bias")
	}
}

// Hand calculation (derived): both arms of the divider drift 50 ppm/K, worst against each
// other, over half a kelvin: 50 ppm of 19.7 kV.
func TestDriftOfTheDivider(t *testing.T) {
	r := columnWith(t, `air_temperature      = "35 degC"`, "air_temperature = \"35 degC\"\ntemperature_change = \"0.5 K\"", `dwell                = "1 ms"`, "dwell = \"1 ms\"\nfield_width = \"100 um\"")
	nearly(t, "drift", number(r, "path.voltage", "divider/temperature"), 50e-6*19718, 2e-4)
	nearly(t, "relative", number(r, "beam.drift", ""), 50e-6, 2e-4)
	nearly(t, "edge: half the field, κ/2 of it", number(r, "beam.drift_edge", ""), 50e-6*1.0189/2*50e-6, 1e-3)
	nearly(t, "focus", number(r, "beam.drift_focus", ""), 9e-3*1.0189*50e-6, 1e-3)
}

// An AC heater with centre resistors of 1 % swings its tip by δ/2 of its voltage; without
// them by half of it.
func TestTipOfAnACHeater(t *testing.T) {
	r := columnWith(t, `supply  = "dc"`, `supply = "ac"`)
	nearly(t, "balanced", number(r, "path.voltage", "heater/tip"), 2*1.9*math.Sqrt2*0.005, 1e-6)
	nearly(t, "at the mains", number(r, "path.frequency", "heater/tip"), 50, 1e-12)
	bare := columnWith(t, `supply  = "dc"`, `supply = "ac"`, `centre_resistors = { value = ["22 ohm", "22 ohm"], tolerance = "1 %" }`, "")
	nearly(t, "one leg the return", number(bare, "path.voltage", "heater/tip"), 1.9*math.Sqrt2, 1e-6)
	if v := verdictOf(bare, "heater.balance", "heater"); v == "" || v == rule.Unassessed {
		t.Errorf("balance %q", v)
	}
}

// The parts of one harmonic are what reaches the cathode of it.
func TestPathsAddUpToTheRipple(t *testing.T) {
	r := columnWith(t)
	filter, pickup := number(r, "path.voltage", "drive.1/filter"), number(r, "path.voltage", "drive.1/pickup")
	whole := 2 * number(r, "cathode.ripple_fundamental", "")
	if whole < math.Abs(filter-pickup)*(1-1e-9) || whole > (filter+pickup)*(1+1e-9) {
		t.Errorf("%g is no sum of %g and %g", whole, filter, pickup)
	}
}
