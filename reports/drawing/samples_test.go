package drawing

import (
	"fmt"
	"os"
	"path/filepath"
	"sync"
	"testing"

	"kilovet/hv/chain"
	"kilovet/rules/diagram"
	"kilovet/rules/evidence"
	"kilovet/rules/rule"
)

// diagrams are drawn in every test: two whole chains, one folded with parts in unusual
// places, one of a single stage, and all of them with something against every part.
func diagrams(t testing.TB) map[string]*diagram.Diagram {
	all := map[string]*diagram.Diagram{}
	for name, e := range evidences() {
		all[name] = diagram.Of(e, nil)
		all[name+"_marked"] = diagram.Of(e, against(all[name]))
	}
	for _, d := range all { // layout, not physics, is what is tested
		d.Unknown = ""
		if d.Gun != nil && d.Gun.Emission != nil {
			d.Gun.Emission.Value = "60 µA"
		}
		for i, n := range d.Nodes() {
			n.Potential = fmt.Sprintf("-%d.%d kV", i%10+10, i%7+11)
		}
	}
	if len(all) != 8 {
		t.Fatalf("%d diagrams", len(all))
	}
	return all
}

// evidences remember what was computed for one test.
var evidences = sync.OnceValue(func() map[string]*evidence.Evidence {
	all := map[string]*evidence.Evidence{}
	for name, text := range map[string]string{"column": file("column.toml"), "positive": file("positive.toml"), "folded": folded, "single": single} {
		c, faults := chain.Read([]byte(text))
		if len(faults) > 0 {
			panic(faults)
		}
		all[name] = evidence.New(c)
	}
	return all
})

func file(name string) string {
	data, err := os.ReadFile(filepath.Join("../../testdata/chains", name))
	if err != nil {
		panic(err)
	}
	return string(data)
}

// against finds fault with every part and node, with one verdict after the other.
func against(d *diagram.Diagram) []rule.Finding {
	var all []rule.Finding
	add := func(subject string) {
		v := []rule.Verdict{rule.Fails, rule.Unassessed, rule.Marginal}[len(all)%3]
		all = append(all, rule.Finding{Rule: "resistor.voltage", Subject: subject, Verdict: v})
	}
	for _, p := range d.Parts() {
		add(p.Name)
	}
	for _, n := range d.Nodes() {
		add(n.Name)
	}
	return all
}

const folded = `format = 1
[drive]
frequency = "38 kHz"
peak = "1.5 kV"
inductance = "3 mH"
resistance = "3 ohm"
[multiplier]
polarity = "negative"
stages = 9
coupling_capacitor.value = "1 nF"
smoothing_capacitor.value = "2 nF"
[[filter]]
resistor.value = "1 Mohm"
[[filter]]
resistor.value = "2 Mohm"
capacitor.value = "1 nF"
[[load]]
name = "a load that hangs low"
at = "stage.1"
resistance = "1 Gohm"
[[load]]
name = "monitor"
at = "multiplier"
current = "1 uA"
[[bleeder]]
at = "coupling.2"
resistor.value = "1 Gohm"
[divider]
senses = "stage.1"
upper.value = "1 Gohm"
lower.value = "1 Mohm"
clamp = { voltage = "90 V", kind = "varistor", leakage = "1 nA" }
[bias]
kind = "fixed"
voltage = "300 V"
fed = "cathode"
clamp = { voltage = "1 kV", kind = "zener" }
[gun]
emission = "1 uA"
[heater]
supply = "dc"
voltage = "2 V"
feed.kind = "battery"
[[part]]
name = "limiter"
kind = "resistor"
from = "output"
to = "gun.inner"
value = "22 kohm"
[[part]]
name = "choke"
kind = "inductor"
from = "gun.inner"
to = "stage.2"
value = "22 mH"
[[part]]
name = "guard"
kind = "spark gap"
from = "ground"
to = "supply"
value = "9 kV"
[[part]]
name = "clamp"
kind = "diode"
from = "output"
to = "filter.1"
`

const single = `format = 1
[drive]
frequency = "38 kHz"
peak = "1.5 kV"
[multiplier]
polarity = "positive"
stages = 1
coupling_capacitor.value = "1 nF"
smoothing_capacitor.value = "2 nF"
[heater]
supply = "ac"
voltage = "2 V"
frequency = "50 Hz"
feed = { kind = "isolation transformer", common_mode = "115 V" }
`
