package rules_test

import (
	"math"
	"strings"
	"testing"
)

const emitting = `
[[filter]]
resistor = { value = "1 Mohm" }
capacitor = { value = "1 nF" }
bypass_capacitance = "0 F"
[gun]
emission = "100 uA"
`

// TestLoadStep: 100 µA through 1 Mohm of filter hold the output 100 V below the 5 kV of a
// stiff stage; in an open loop the step goes from one to the other, 95 % of the way in
// ln 20 times R C = 1 ms.
func TestLoadStep(t *testing.T) {
	r := reviewed(t, []byte(stiff+emitting))
	within(t, "without emission", figureOf(t, r, "step.removed", ""), 5000, 1e-3)
	within(t, "with emission", figureOf(t, r, "step.applied", ""), 4900, 1e-3)
	within(t, "settling", figureOf(t, r, "step.settling", ""), 1e-3*math.Log(20), 0.03)
	within(t, "settling with emission", figureOf(t, r, "step.applied_settling", ""), 1e-3*math.Log(20), 0.03)
}

// TestNoStepWithoutEmission: where no gun draws current nothing comes and goes.
func TestNoStepWithoutEmission(t *testing.T) {
	for _, f := range reviewed(t, described(t, "positive")).Figures {
		if strings.HasPrefix(f.ID, "step.") {
			t.Errorf("%s is listed", f.ID)
		}
	}
}

// TestRegulationCarriesTheDividersError: the set voltage over 1 ± error.
func TestRegulationCarriesTheDividersError(t *testing.T) {
	r := reviewed(t, described(t, "column"))
	wrong := figureOf(t, r, "divider.error", "")
	within(t, "least", figureOf(t, r, "regulation.least", ""), 20e3/(1+wrong), 1e-9)
	within(t, "most", figureOf(t, r, "regulation.most", ""), 20e3/(1-wrong), 1e-9)
}

// TestStartOnARamp: with the drive rising slowly against the multiplier 95 % of the output
// come at 95 % of the ramp, and the current of a diode on the way up is far below that of
// full drive at once, on which the rating is judged without a ramp.
func TestStartOnARamp(t *testing.T) {
	data := strings.ReplaceAll(stiff, `value = "1 uF"`, `value = "1 nF"`)
	data = strings.Replace(data, `resistance = "1 ohm"`, `resistance = "20 ohm", surge_current = "10 A"`, 1) + "[[load]]\nname = \"l\"\nat = \"output\"\ncurrent = \"1 uA\"\n"
	atOnce := reviewed(t, []byte(data))
	ramped := reviewed(t, []byte(strings.Replace(data, `peak = "2.5 kV"`, "peak = \"2.5 kV\"\nramp = \"50 ms\"", 1)))
	within(t, "rise on the ramp", figureOf(t, ramped, "start.ramped_rise_time", ""), 0.95*50e-3, 0.02)
	within(t, "full drive is shown all the same", figureOf(t, ramped, "start.part_current", "multiplier.diode.1"), figureOf(t, atOnce, "start.part_current", "multiplier.diode.1"), 1e-9)
	provided := map[string]float64{}
	for _, f := range append(atOnce.Findings, ramped.Findings...) {
		if f.Rule == "start.diode_current" {
			provided[f.Under] = f.Provided.Value
		}
	}
	if i := provided["start on the ramp"]; !(i > 0 && i < provided["start at full drive"]/2) {
		t.Errorf("judged: %v", provided)
	}
}
