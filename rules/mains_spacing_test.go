package rules_test

import (
	"math"
	"testing"

	"kilovet/rules/rule"
)

// A spacing from the mains is judged by the mains of the site where no heater feed joins the
// mains to the chain too: 230 V of overvoltage category 2 have an impulse of 2.5 kV, for which
// IEC 60664-1:2020 Tables F.1 and F.2 ask 1.5 mm in case A at pollution degree 2.
func TestASpacingFromTheMainsNeedsNoHeaterFeed(t *testing.T) {
	r := review(t, []byte(`
format = 1
title  = "mains terminal"

[site]
altitude             = "0 m"
air_temperature      = "25 degC"
pollution_degree     = 2
mains                = "230 V"
mains_frequency      = "50 Hz"
overvoltage_category = 2

[drive]
frequency  = "20 kHz"
peak       = "1 kV"
resistance = "10 ohm"

[multiplier]
polarity            = "negative"
stages              = 1
coupling_capacitor  = { value = "1 nF" }
smoothing_capacitor = { value = "1 nF" }
diode               = { forward_drop = "1 V" }

[[load]]
name    = "monitor"
at      = "output"
current = "10 uA"

[[spacing]]
name       = "mains terminal"
from       = "mains"
to         = "ground"
medium     = "air"
insulation = "basic"
clearance  = "3 mm"
creepage   = "5 mm"
cti        = "200 V"
`), "faults")
	f := found(t, r, "spacing.clearance", "mains terminal")
	if f.Verdict != rule.Meets || f.Needed == nil || math.Abs(f.Needed.Value-1.5e-3) > 1e-9 {
		t.Errorf("%+v", f)
	}
}
