package rules_test

import (
	"math"
	"testing"
)

// A rod of 100 kohm behind a filter of 5 Mohm: the ladder, 10 nF in both columns, comes
// through both, 5.1 Mohm, and 60 V at the rod are 60 · 5.1/0.1 = 3060 V on the ladder. From
// 10 kV to 5 kV that is 10 nF, below it the diode lets the other column follow: 20 nF.
func TestTheRodBehindAFilterWaitsForTheLadder(t *testing.T) {
	r := reviewed(t, []byte(`format = 1
[drive]
waveform = "sine"
frequency = "50 kHz"
peak = "5 kV"
peak_limit = "5 kV"
[multiplier]
topology = "half-wave"
polarity = "positive"
stages = 1
coupling_capacitor = { value = "10 nF" }
smoothing_capacitor = { value = "10 nF" }
diode = { rated_voltage = "20 kV" }
[[filter]]
resistor = { value = "5 Mohm" }
capacitor = { value = "100 pF" }
[[bleeder]]
at = "output"
resistor = { value = "1 Gohm" }
permanent = true
[access]
touchable = ["output"]
earthing_rod = { resistance = "100 kohm" }
`))
	rod := lineOf(t, tableOf(t, r, "energy.rod"), "filter.1")
	within(t, "rod time", *rod[3].Value, 5.1e6*(10e-9*math.Log(2)+20e-9*math.Log(5000/3060.)), 2e-2)
}
