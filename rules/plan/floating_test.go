package plan_test

import (
	"strings"
	"testing"
)

const floatingMeter = `
[[instrument]]
name = "bias voltmeter"
at = "cathode"
to = "control"
resistance = "1 Gohm"
accuracy = "3 %"
rated_voltage = "400 V"
`

// A voltmeter across the bias resistor shows nothing without emission, whatever arithmetic
// leaves of two equal potentials, and up to a ten-thousandth of what it hangs at by itself;
// with emission it shows the drop, 60 µA through 4.7 Mohm (by hand, the meter's own gigohm
// beside it).
func TestAMeterAtHighVoltage(t *testing.T) {
	p := planned(t, described(t, "column", floatingMeter))
	for _, s := range p.Steps {
		r := s.Readings[1]
		if !strings.Contains(s.Name, "filament on") {
			if r.Value != 0 || r.Low != 0 {
				t.Errorf("%s: %g V from %g V, want none", s.Name, r.Value, r.Low)
			}
			near(t, s.Name, r.High, 1e-4*float64(max(s.Output, -s.Output)), 0.01)
			continue
		}
		near(t, s.Name, r.Value, 60e-6*4.7e6, 0.01)
	}
	if len(p.Open) != 0 {
		t.Errorf("open: %q", p.Open)
	}
	if said := strings.Join(p.Before, "\n"); !strings.Contains(said, "bias voltmeter stands at high voltage itself") {
		t.Errorf("nothing is said of a meter at high voltage: %q", said)
	}
}

// A voltmeter that a step would overload leaves the plan open.
func TestAMeterRatedForLess(t *testing.T) {
	p := planned(t, described(t, "column", strings.Replace(floatingMeter, "400 V", "200 V", 1)))
	if said := strings.Join(p.Open, "\n"); !strings.Contains(said, "filament on, 100 %: bias voltmeter: rated for 200 V") {
		t.Errorf("open: %q", said)
	}
	p = planned(t, described(t, "column", strings.Replace(floatingMeter, `rated_voltage = "400 V"`, "", 1)))
	if said := strings.Join(p.Takes, "\n"); !strings.Contains(said, "the bias voltmeter stands what it is put to") {
		t.Errorf("taken: %q", said)
	}
}
