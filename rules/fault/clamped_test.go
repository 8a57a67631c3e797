package fault_test

import (
	"math"
	"testing"

	"kilovet/rules/evidence"
)

// TestFirstSmoothingCapacitorShorted: the first two diodes clamp the first coupling node to
// their own drop and what their resistance adds at the current of its capacitor, and that
// alone drives the five stages above. What hangs on them draws next to nothing, and what
// state they are in hardly rests on what their diodes leak.
func TestFirstSmoothingCapacitorShorted(t *testing.T) {
	const ladder = `format = 1
[drive]
waveform = "sine"
frequency = "25 kHz"
peak = "1.85 kV"
peak_limit = "2 kV"
resistance = "600 ohm"
inductance = "0 H"
[regulation]
set = "20 kV"
[multiplier]
topology = "half-wave"
polarity = "negative"
stages = 6
coupling_capacitor = { value = "2.2 nF" }
smoothing_capacitor = { value = "2.2 nF" }
diode = { rated_voltage = "8 kV", forward_drop = "12 V", resistance = "60 ohm", capacitance = "1 pF", leakage = "50 nA" }
stray_between_columns = "0.5 pF"
stray_to_ground = "1 pF"
pickup_to_output = "0.05 pF"
[[filter]]
resistor = { value = "1 Mohm", count = 4 }
capacitor = { value = "470 pF" }
[divider]
upper = { value = "200 Mohm", count = 10 }
lower = { value = "200 kohm", strings = 2 }
meter = { resistance = "10 Mohm" }
`
	x := under(t, evidence.New(read(t, ladder)), "multiplier.smoothing_capacitor.1 shorted")
	reactance := 1 / (2 * math.Pi * 25e3 * 2.2e-9)
	current := (2000 - 12) / math.Hypot(reactance, 660)
	v, err := x.Potential("multiplier")
	near(t, "multiplier", v, err, -5*2*60*current, 0.08)
}
