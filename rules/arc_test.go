package rules_test

import (
	"strings"
	"testing"

	"kilovet/hv/chain"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
)

// filtered is a stiff single stage of 1 nF each behind a filter resistor.
func filtered(t *testing.T) []byte {
	t.Helper()
	data := strings.ReplaceAll(stiff, `value = "1 uF"`, `value = "1 nF"`)
	data = strings.Replace(data, "stages = 1\n", "stages = 1\npickup_to_output = \"0 F\"\n", 1)
	return []byte(data + `
[[filter]]
resistor = { value = "1 Mohm", rated_voltage = "10 kV", rated_pulse_voltage = "10 kV", rated_energy = "100 mJ", rated_power = "1 W" }
bypass_capacitance = "0 F"
`)
}

// TestArcOfOneStage: an arc behind the filter resistor of a single stage turns all that is
// stored into heat there: C U²/2 of the smoothing capacitor at twice the peak and of the
// coupling capacitor at the peak, 1 nF (5 kV)²/2 + 1 nF (2.5 kV)²/2 = 15.6 mJ; the
// resistor sees the full 5 kV and passes 5 mA.
func TestArcOfOneStage(t *testing.T) {
	r := reviewedWhole(t, filtered(t))
	for id, want := range map[string]float64{"arc.part_voltage": 5000, "arc.part_current": 5e-3, "arc.part_energy": 15.625e-3} {
		got := 0.0
		for _, f := range r.Figures {
			if f.ID == id && f.Subject == "filter.1.resistor" && f.State == "lost" {
				got = f.Value
			}
		}
		within(t, id, got, want, 5e-3)
	}
}

// TestArcsStayWithinTheirBounds: no resistor sees more than the full voltage of its
// higher end, none turns more into heat than a short would release and the drive adds in the 20
// periods for which the arc is followed.
func TestArcsStayWithinTheirBounds(t *testing.T) {
	for _, name := range []string{"column", "positive"} {
		c, faults := chain.Read(described(t, name))
		if len(faults) > 0 {
			t.Fatal(faults)
		}
		for _, condition := range evidence.LostCorners() {
			e := evidence.New(c).Under(condition)
			for _, part := range []string{"filter.1.resistor", "cable.gun_end_resistor", "bias.resistor"} {
				if e.Layout().Element(part) == nil {
					continue
				}
				v, err := e.ArcVoltage(part)
				full, err2 := e.ArcFullVoltage(part)
				w, err3 := e.ArcEnergy(part)
				all, err4 := e.ArcFullEnergy(part)
				standing, err5 := e.StandingPower(part)
				for _, err := range []error{err, err2, err3, err4, err5} {
					if err != nil {
						t.Fatalf("%s %s: %v", name, part, err)
					}
				}
				followed := quantity.Energy(float64(standing) * 20 / float64(c.Drive.Frequency.V))
				if !quantity.AtMost(v, full) || !quantity.AtMost(w, all+followed) {
					t.Errorf("%s %s: %v of %v, %v of %v and %v", name, part, v, full, w, all, followed)
				}
				if w <= 0 || v <= 0 {
					t.Errorf("%s %s: nothing", name, part)
				}
			}
		}
	}
}

// TestArcAtALooseResistor: a resistor in the lead beyond the output takes the full voltage
// of an arc at its far end, which one at the output would spare it.
func TestArcAtALooseResistor(t *testing.T) {
	r := reviewedWhole(t, append(filtered(t), []byte(`
[[part]]
name = "arc limiter"
kind = "resistor"
from = "output"
to = "gun.inner"
value = "100 kohm"
rated_pulse_voltage = "300 V"
[[load]]
name = "l"
at = "gun.inner"
current = "1 uA"
`)...))
	for _, f := range r.Findings {
		if f.Rule == "series.arc_voltage" && f.Subject == "part.arc limiter" {
			// 5 kV across 1 Mohm and 100 kohm leave the limiter a eleventh.
			within(t, "voltage of the limiter", f.Provided.Value, 5000./11, 1e-2)
			if f.Verdict != "fails" {
				t.Errorf("a limiter rated 300 V %s", f.Verdict)
			}
			return
		}
	}
	t.Error("the limiter is not judged")
}
