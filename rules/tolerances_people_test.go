package rules_test

import (
	"strings"
	"testing"

	"kilovet/rules/rule"
)

// store is one stage that charges a large capacitor, a bleeder across it, and a rod.
const store = `format = 1
[drive]
waveform = "sine"
frequency = "25 kHz"
peak = "2.5 kV"
resistance = "1 ohm"
inductance = "0 H"
[multiplier]
topology = "half-wave"
polarity = "positive"
stages = 1
medium = "air"
coupling_capacitor = { value = "100 nF", rated_voltage = "10 kV", tolerance = "20 %", dielectric = "film" }
smoothing_capacitor = { value = "100 nF", rated_voltage = "10 kV", tolerance = "20 %", dielectric = "film" }
diode = { rated_voltage = "10 kV", forward_drop = "0 V", resistance = "1 ohm", capacitance = "0 F", leakage = "0 A", recovery_time = "0 s", rated_current = "1 A", surge_current = "100 A" }
[[bleeder]]
at = "supply"
resistor = { value = "100 Mohm", rated_voltage = "10 kV", rated_power = "2 W", tolerance = "10 %" }
permanent = true
[access]
enclosure = "interlocked"
touchable = []
waiting_time = "300 s"
earthing_rod = { resistance = "100 kohm", rated_voltage = "10 kV", rated_energy = "20 J" }
`

// By hand: one R C takes 1.1 · 1.2 times as long to come down with resistor and capacitor at
// the high ends of 10 % and 20 %; the figure of the discharge stays nominal. The energy is
// 1.2 times as much. A tolerance that is not given counts as none, which is said.
func TestDischargeAndRodTakeTolerances(t *testing.T) {
	r := reviewedWhole(t, []byte(store))
	nominal := figureOf(t, r, "stored.discharge_time", "")
	waiting, rod := findingOf(t, r, "discharge.waiting_time"), findingOf(t, r, "rod.energy")
	nearly(t, "time with everything high", waiting.Needed.Value/nominal, 1.1*1.2, 0.005)
	energy := figureOf(t, r, "stored.energy", "")
	nearly(t, "energy with everything high", rod.Provided.Value/energy, 1.2, 0.005)
	for _, f := range []rule.Finding{waiting, rod} {
		if f.Verdict != rule.Meets || !strings.Contains(f.Under, "tolerance") {
			t.Errorf("%s: %s under %q, want meets in a corner of the tolerances", f.Rule, f.Verdict, f.Under)
		}
	}
	bare := reviewedWhole(t, []byte(strings.ReplaceAll(strings.ReplaceAll(store, `, tolerance = "20 %"`, ""), `, tolerance = "10 %"`, "")))
	for id, said := range map[string]string{
		"discharge.waiting_time": "the values of multiplier.coupling_capacitor, multiplier.smoothing_capacitor and bleeder.1 are exact",
		"rod.energy":             "the values of multiplier.coupling_capacitor and multiplier.smoothing_capacitor are exact",
	} {
		f := findingOf(t, bare, id)
		if f.Verdict != rule.Marginal || !strings.Contains(strings.Join(f.Assumptions, "\n"), said) {
			t.Errorf("%s: %s, assuming %q, want marginal and %q", id, f.Verdict, f.Assumptions, said)
		}
	}
}
