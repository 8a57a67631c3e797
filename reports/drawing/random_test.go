package drawing

import (
	"fmt"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chain"
	"kilovet/hv/chance"
	"kilovet/rules/diagram"
	"kilovet/rules/evidence"
)

// anyChain describes a chain with parts in any combination; a class-2 ceramic of
// unknown capacitance spares the computing.
func anyChain(t *rapid.T) string {
	pick := func(label string, of ...string) string { return rapid.SampledFrom(of).Draw(t, label) }
	some := func(label string, most int, text func(i int) string) string {
		var all strings.Builder
		for i := range rapid.IntRange(0, most).Draw(t, label) {
			all.WriteString(text(i))
		}
		return all.String()
	}
	node := func() string {
		return pick("node", "multiplier", "supply", "output", "stage.1", "coupling.1", "filter.1")
	}
	text := fmt.Sprintf("format = 1\n[drive]\nfrequency = \"38 kHz\"\npeak = \"1.5 kV\"\n%s%s", pick("resistance", "", "resistance = \"900 ohm\"\n"), pick("inductance", "", "inductance = \"1 mH\"\n"))
	text += fmt.Sprintf("[multiplier]\npolarity = \"negative\"\ntopology = %q\nstages = %d\ncoupling_capacitor = { value = \"1 nF\", dielectric = \"X7R\" }\nsmoothing_capacitor.value = \"2 nF\"\n",
		pick("topology", "half-wave", "symmetrical"), rapid.IntRange(1, 20).Draw(t, "stages"))
	text += "[[filter]]\nresistor.value = \"1 Mohm\"\n" + some("filters", 4, func(int) string {
		return "[[filter]]\nresistor = { value = \"1 Mohm\", count = 12, strings = 3 }\n" + pick("capacitor", "", "capacitor.value = \"1 nF\"\n")
	})
	text += pick("cable", "", "[cable]\nlength = \"1 m\"\ncapacitance = \"100 pF/m\"\n", "[cable]\nlength = \"1 m\"\ngun_end_resistor.value = \"47 kohm\"\n")
	text += pick("divider", "", "[divider]\nupper.value = \"1 Gohm\"\nlower.value = \"1 Mohm\"\n",
		"[divider]\nsenses = \"supply\"\nupper = { value = \"1 Gohm\", count = 10 }\nlower.value = \"1 Mohm\"\nmeter.resistance = \"10 Mohm\"\nclamp = { voltage = \"90 V\", kind = \"gas tube\" }\n")
	text += pick("gun", "", "[gun]\nemission = \"60 uA\"\n", "[gun]\nfitted = false\n")
	text += pick("bias", "", "[bias]\nkind = \"fixed\"\nvoltage = \"300 V\"\n", "[bias]\nkind = \"fixed\"\nvoltage = \"300 V\"\nfed = \"cathode\"\nresistor.value = \"4.7 Mohm\"\nbypass.value = \"1 nF\"\nclamp.voltage = \"1 kV\"\n")
	text += pick("heater", "", "[heater]\nvoltage = \"2 V\"\n", "[heater]\nvoltage = \"2 V\"\ncapacitance_to_ground = \"60 pF\"\ncentre_resistors.value = [\"22 ohm\", \"22 ohm\"]\nfeed = { kind = \"isolation transformer\", capacitance = \"45 pF\", screen = true, common_mode = \"115 V\" }\n")
	text += some("loads", 3, func(i int) string {
		return fmt.Sprintf("[[load]]\nname = \"load number %d\"\nat = %q\ncurrent = \"1 uA\"\n", i, node())
	})
	return text + some("parts", 3, func(i int) string {
		return fmt.Sprintf("[[part]]\nname = \"p%d\"\nkind = \"resistor\"\nvalue = \"22 kohm\"\nfrom = %q\nto = %q\n", i, node(), pick("to", "ground", "elsewhere", "output"))
	})
}

// Whatever the chain, every part is drawn, no text covers another and no wire crosses
// one.
func TestAnyChainIsDrawn(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		text := anyChain(t)
		c, faults := chain.Read([]byte(text))
		if len(faults) > 0 {
			t.Skip(faults.Error()) // a node that this chain has not got
		}
		d := diagram.Of(evidence.New(c), nil)
		if rapid.Bool().Draw(t, "marked") {
			d = diagram.Of(evidence.New(c), against(d))
		}
		if rapid.Bool().Draw(t, "known") {
			for _, n := range d.Nodes() {
				n.Potential = "-20.12 kV"
			}
		}
		p, err := schematic(d)
		if err != nil {
			t.Fatal(err)
		}
		for _, flaw := range append(p.covered(), p.crossed()...) {
			t.Errorf("%s\n%s", flaw, text)
		}
		for _, part := range d.Parts() {
			if bodies[part.Kind].draw == nil {
				t.Errorf("%s, a %s, has no symbol", part.Name, part.Kind)
			}
		}
	})
}
