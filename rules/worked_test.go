package rules_test

import (
	"bytes"
	"math"
	"regexp"
	"strings"
	"testing"

	"kilovet/rules"
	"kilovet/rules/rule"
)

// figureOf finds a figure of the working state.
func figureOf(t *testing.T, r *rules.Review, id, subject string) float64 {
	t.Helper()
	for _, f := range r.Figures {
		if f.ID == id && f.Subject == subject && (f.State == "working" || f.State == "") {
			return f.Value
		}
	}
	t.Fatalf("%s %s is not listed", id, subject)
	return 0
}

func within(t *testing.T, what string, got, want, tolerance float64) {
	t.Helper()
	if math.Abs(got-want) > tolerance*math.Abs(want) {
		t.Errorf("%s = %.8g, want %.8g within %g", what, got, want, tolerance)
	}
}

const stiff = `format = 1
[drive]
waveform = "sine"
frequency = "50 kHz"
peak = "2.5 kV"
[multiplier]
topology = "half-wave"
polarity = "negative"
stages = 1
coupling_capacitor = { value = "1 uF" }
smoothing_capacitor = { value = "1 uF" }
diode = { rated_voltage = "10 kV", forward_drop = "0 V", resistance = "1 ohm" }
`

// TestSelfBiasedGun: common practice, no source: 2 Mohm at 200 µA stand about 400 V,
// so that the cathode of a 5 kV gun is about 4.6 kV below its earthed anode; 10 Mohm at
// 100 µA make 1 kV.
func TestSelfBiasedGun(t *testing.T) {
	for _, c := range []struct {
		resistor, emission string
		bias               float64
	}{{"2 Mohm", "200 uA", 400}, {"10 Mohm", "100 uA", 1000}} {
		r := reviewed(t, []byte(stiff+`
[bias]
kind = "self"
resistor = { value = "`+c.resistor+`" }
[gun]
emission = "`+c.emission+`"
`))
		within(t, "bias", figureOf(t, r, "bias.voltage", ""), c.bias, 1e-9)
		within(t, "control electrode", figureOf(t, r, "potential", "control"), -5000, 1e-3)
		within(t, "cathode", figureOf(t, r, "potential", "cathode"), -5000+c.bias, 1e-3)
		within(t, "beam energy", figureOf(t, r, "beam.energy", ""), 5000-c.bias, 1e-3)
	}
}

// TestDischargeOfOneCapacitor: t = R C ln(U/60 V); smoothing and coupling capacitor
// together, since the diode from one to the other conducts.
func TestDischargeOfOneCapacitor(t *testing.T) {
	r := reviewed(t, []byte(strings.Replace(stiff, "1 uF\" }\ndiode", "1 nF\" }\ndiode", 1)+`
[[bleeder]]
at = "output"
resistor = { value = "1 Gohm" }
permanent = true
`))
	// The coupling capacitor of 1 µF holds 2.5 kV and feeds the output below that.
	slow := 1e9 * (1e-6 + 1e-9) * math.Log(2500/60.)
	fast := 1e9 * 1e-9 * math.Log(2)
	within(t, "time", figureOf(t, r, "stored.discharge_time", "output"), fast+slow, 1e-2)
}

// TestUnpluggedPathsDoNotCount: the same bleeder not marked permanent discharges nothing.
func TestUnpluggedPathsDoNotCount(t *testing.T) {
	r := reviewed(t, []byte(stiff+`
[[bleeder]]
at = "output"
resistor = { value = "1 Gohm" }
[access]
waiting_time = "1 h"
`))
	for _, f := range r.Figures {
		if f.ID == "stored.discharge_time" && f.Subject == "output" {
			t.Errorf("the output is said to be discharged after %g s", f.Value)
		}
	}
	for _, f := range r.Findings {
		if f.Rule == "discharge.waiting_time" && f.Verdict != rule.Fails {
			t.Errorf("what never discharges %s", f.Verdict)
		}
	}
}

// TestClassTwoNeedsItsValueAtVoltage: without it no figure rests on the capacitance.
func TestClassTwoNeedsItsValueAtVoltage(t *testing.T) {
	data := strings.Replace(stiff, `smoothing_capacitor = { value = "1 uF" }`, `smoothing_capacitor = { value = "1 uF", dielectric = "X7R" }`, 1)
	r := reviewed(t, []byte(data+"[[load]]\nname = \"l\"\nat = \"output\"\ncurrent = \"10 uA\"\n"))
	for _, f := range r.Figures {
		if strings.HasPrefix(f.ID, "multiplier.") && f.ID != "multiplier.no_load" && f.ID != "multiplier.stages_for_most_output" {
			t.Errorf("%s is listed all the same", f.ID)
		}
	}
	if r.Verdict != rule.Unassessed && r.Verdict != rule.Fails {
		t.Errorf("the review %s", r.Verdict)
	}
}

// TestAbsentTablesNeverPass takes one table after another out of the sound column:
// what a rule needs is then unassessed or fails.
func TestAbsentTablesNeverPass(t *testing.T) {
	data := described(t, "column")
	for _, table := range []string{"site", "access", "protection", "vacuum", "regulation", "heater"} {
		cut := regexp.MustCompile(`(?ms)^\[`+table+`\]\n.*?^\[`).ReplaceAll(data, []byte("["))
		if bytes.Equal(cut, data) {
			t.Fatalf("there is no [%s]", table)
		}
		r := reviewed(t, cut)
		passes := r.Verdict == rule.Meets || r.Verdict == rule.Marginal
		if optional := table == "regulation"; passes != optional {
			t.Errorf("without [%s] the review %s", table, r.Verdict)
		}
	}
}

// TestRectifierOnTheBareDrive hangs a diode on the drive itself, with nothing in series
// with the source: 1 kohm of diode and 9 kohm of burden at 1 kV peak carry a half sine,
// whose mean at the burden is 0.9 V/π and whose power is V²/4R.
func TestRectifierOnTheBareDrive(t *testing.T) {
	r := reviewed(t, []byte(`format = 1
[drive]
waveform = "sine"
frequency = "25 kHz"
peak = "1 kV"
[multiplier]
topology = "half-wave"
polarity = "positive"
stages = 1
coupling_capacitor = { value = "10 nF" }
smoothing_capacitor = { value = "10 nF" }
diode = { rated_voltage = "8 kV", forward_drop = "0 V", resistance = "100 ohm" }
[[part]]
name = "rectifier"
kind = "diode"
from = "drive"
to = "half"
forward_drop = "0 V"
resistance = "1 kohm"
rated_voltage = "8 kV"
[[part]]
name = "burden"
kind = "resistor"
from = "half"
to = "ground"
value = "9 kohm"
`))
	within(t, "mean at the burden", figureOf(t, r, "potential", "half"), 0.9*1000/math.Pi, 1e-5)
	within(t, "current", figureOf(t, r, "part.current", "part.burden"), 1000/math.Pi/10e3, 1e-5)
	within(t, "input power", figureOf(t, r, "multiplier.input_power", ""), 1000*1000/4./10e3, 1e-3)
}

// TestWhatIsLeftOutNeverHelps: a spacing that does not say what it has to do, electrodes
// without a shape that a sharp one against a plane would not stand, and a vacuum that
// only a spacing tells of are never better than when they are described.
func TestWhatIsLeftOutNeverHelps(t *testing.T) {
	const gap = `
format = 1
[site]
altitude = "310 m"
air_temperature = "35 degC"
pollution_degree = 2
[[spacing]]
name = "strip"
voltage = "20 kV"
medium = "air"
clearance = "45 mm"
creepage = "400 mm"
material = "PTFE"
insulation = "basic"
`
	of := func(text, rule string) string {
		for _, f := range reviewed(t, []byte(text)).Findings {
			if f.Rule == rule {
				return string(f.Verdict)
			}
		}
		return "none"
	}
	unsaid := strings.Replace(gap, "insulation = \"basic\"\n", "", 1)
	for _, id := range []string{"spacing.clearance", "spacing.creepage"} {
		if is := of(gap, id); is != "meets" {
			t.Errorf("%s of basic insulation %s", id, is)
		}
		if is := of(unsaid, id); is != "marginal" {
			t.Errorf("%s of a class that is not said %s", id, is)
		}
	}
	if is := of(gap, "spacing.breakdown"); is != "marginal" {
		t.Errorf("electrodes without a shape: breakdown %s", is)
	}
	held := stiff + "[[load]]\nname = \"l\"\nat = \"output\"\ncurrent = \"10 uA\"\n[[spacing]]\nname = \"inside\"\nfrom = \"output\"\nto = \"ground\"\nmedium = \"vacuum\"\nclearance = \"30 mm\"\ncreepage = \"60 mm\"\nmaterial = \"alumina\"\ninsulation = \"basic\"\n"
	if is := of(held, "vacuum.permit"); is != "unassessed" {
		t.Errorf("the permit of a vacuum that a spacing tells of %s", is)
	}
}
