package chain_test

import (
	"fmt"
	"math"
	"os"
	"path/filepath"
	"strings"
	"testing"
	"unicode"

	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/hv/quantity"
)

func TestDeclarationsHaveNoFlaws(t *testing.T) {
	for _, flaw := range document.Flaws(&chain.Chain{}) {
		t.Error(flaw)
	}
}

// described are the sound descriptions that come with the project.
func described(t testing.TB) map[string][]byte {
	t.Helper()
	files, err := filepath.Glob("../../testdata/chains/*.toml")
	if err != nil || len(files) == 0 {
		t.Fatalf("no descriptions: %v", err)
	}
	all := map[string][]byte{}
	for _, name := range files {
		if all[name], err = os.ReadFile(name); err != nil {
			t.Fatal(err)
		}
	}
	return all
}

func TestSoundDescriptionsHaveNoFaults(t *testing.T) {
	for name, data := range described(t) {
		if _, faults := chain.Read(data); faults != nil {
			t.Errorf("%s:\n%v", name, faults)
		}
	}
}

// small is the least that is a whole chain.
const small = `format = 1
[drive]
frequency = "38 kHz"
peak = "1.75 kV"
[multiplier]
polarity = "negative"
stages = 3
coupling_capacitor = { value = "10 uF" }
smoothing_capacitor = { value = ["1 nF", "2 nF", "3 nF"] }
[[load]]
name = "monitor"
at = "output"
current = "10 uA"
`

func sound(t testing.TB, text string) *chain.Chain {
	t.Helper()
	c, faults := chain.Read([]byte(text))
	if faults != nil {
		t.Fatal(faults)
	}
	return c
}

func TestReadFillsTheChain(t *testing.T) {
	c := sound(t, small)
	if c.Multiplier.CouplingCapacitor.Value.V[0] != 1e-5 {
		t.Errorf("10 uF is %v", c.Multiplier.CouplingCapacitor.Value.V)
	}
	if got := c.Multiplier.SmoothingCapacitor.Value.V; len(got) != 3 || got[2] != 3e-9 {
		t.Errorf("three values: %v", got)
	}
	if !c.Multiplier.Negative() || c.Multiplier.Symmetrical() || c.Drive.Peak.V != 1750 || c.Loads[0].Current.V != 1e-5 {
		t.Errorf("read %+v", c)
	}
	if c.Regulation != nil || c.Gun.IsFitted() || c.Drive.Unbalance.Set() {
		t.Error("absent tables are there")
	}
	if at := c.Loads[0].At.Place; at != (document.Place{Key: "load.at", Line: 12, Column: 6}) {
		t.Errorf("place of load.at: %+v", at)
	}
}

func TestSpacingsAloneAreAWholeDescription(t *testing.T) {
	c := sound(t, "format = 1\n[site]\naltitude = '240 m'\n[[spacing]]\nname = 'bushing'\nmedium = 'air'\nvoltage = '20 kV'\nclearance = '60 mm'\n")
	if c.Spacings[0].Voltage.V != 20e3 || c.Site.Altitude.V != 240 {
		t.Errorf("read %+v", c)
	}
}

func TestNodes(t *testing.T) {
	symmetrical := strings.NewReplacer("stages = 3", "stages = 2\ntopology = 'symmetrical'", `["1 nF", "2 nF", "3 nF"]`, `"1 nF"`).Replace(small)
	for _, row := range []struct{ name, text, want string }{
		{"spacings alone", "format = 1\n[[spacing]]\nname = 'a'\nmedium = 'air'\nvoltage = '1 kV'\n", "ground mains"},
		{"half-wave", small, "ground mains drive foot coupling.1 stage.1 coupling.2 stage.2 coupling.3 stage.3 multiplier supply output"},
		{"symmetrical", symmetrical, "ground mains drive drive.a drive.b foot coupling.a.1 coupling.b.1 stage.1 coupling.a.2 coupling.b.2 stage.2 multiplier supply output"},
		{"column", small + `
[[filter]]
resistor = { value = "1 Mohm" }
[[filter]]
resistor = { value = "1 Mohm" }
[divider]
upper = { value = "1 Gohm" }
lower = { value = "1 Mohm" }
[gun]
[heater]
[[part]]
name = "limiter"
kind = "resistor"
from = "output"
to = "gun.inner"
value = "22 kohm"
`, "ground mains drive foot coupling.1 stage.1 coupling.2 stage.2 coupling.3 stage.3 multiplier filter.1 filter.2 supply output control cathode heater.a heater.b divider.tap gun.inner"},
		{"heater on the output", small + "[heater]\n", "ground mains drive foot coupling.1 stage.1 coupling.2 stage.2 coupling.3 stage.3 multiplier supply output cathode heater.a heater.b"},
	} {
		if got := strings.Join(sound(t, row.text).Nodes(), " "); got != row.want {
			t.Errorf("%s:\ngot  %s\nwant %s", row.name, got, row.want)
		}
	}
}

func TestPartValues(t *testing.T) {
	part := func(kind, value string) *chain.Part {
		text := fmt.Sprintf("%s[[part]]\nname = 'p'\nkind = '%s'\nfrom = 'output'\nto = 'new'\nvalue = '%s'\n", small, kind, value)
		return &sound(t, text).Parts[0]
	}
	if r, err := part("resistor", "22 kΩ").Ohms(); err != nil || r != 22e3 {
		t.Error(r, err)
	}
	if c, err := part("capacitor", "470 pF").Farads(); err != nil || c != 470e-12 {
		t.Error(c, err)
	}
	if l, err := part("inductor", "3 mH").Henries(); err != nil || l != 3e-3 {
		t.Error(l, err)
	}
	for _, kind := range []string{"spark gap", "varistor"} {
		if v, err := part(kind, "1.2 kV").Strikes(); err != nil || v != 1200 {
			t.Error(v, err)
		}
	}
	if _, err := part("resistor", "22 kohm").Farads(); err == nil {
		t.Error("a resistance was read as a capacitance")
	}
	var absent chain.Part
	if _, err := absent.Ohms(); err == nil {
		t.Error("no value was read as a resistance")
	}
}

func ExampleRead() {
	_, faults := chain.Read([]byte(`format = 1
[drive]
frequency = "38 KHz"
peak      = "1,75 kV"
[multiplier]
polarity            = "negative"
stages              = 6
coupling_capacitor  = { value = "2.2 nF" }
smoothing_capacitor = { value = ["2.2 nF", "2.2 nF"] }
[[load]]
name    = "monitor"
at      = "outptu"
current = "10 uA"
`))
	fmt.Println(faults)
	// Output:
	// line 3, column 13: drive.frequency: "38 KHz": unknown unit "KHz"; upper and lower case matter: write "kHz"
	// line 4, column 13: drive.peak: "1,75 kV": a decimal comma; write a decimal point, as in "1.5 kV"
	// line 9, column 33: multiplier.smoothing_capacitor.value: 2 values for 6 stages; give one value, or 6, from the grounded end
	// line 12, column 11: load.at: "outptu" is no node of this chain; was "output" meant? nodes: ground, mains, drive, foot, coupling.1, stage.1, coupling.2, stage.2, coupling.3, stage.3, coupling.4, stage.4, coupling.5, stage.5, coupling.6, stage.6, multiplier, supply, output
}

// FuzzRead reads any bytes: it must come to an end without panic, and every fault
// must have a place, words and a code:
//
//	go test -fuzz FuzzRead ./hv/chain
func FuzzRead(f *testing.F) {
	for _, data := range described(f) {
		f.Add(data)
	}
	f.Add([]byte(small))
	for _, text := range faulty {
		f.Add([]byte(text))
	}
	f.Fuzz(func(t *testing.T, data []byte) {
		c, faults := chain.Read(data)
		line, column := 1, 1
		for _, fault := range faults {
			if fault.Line < 1 || fault.Column < 1 || fault.What == "" || fault.Remedy == "" || fault.Code == "" {
				t.Errorf("incomplete: %+v", fault)
			}
			if strings.ContainsFunc(fault.Error(), unicode.IsControl) {
				t.Errorf("more than one line: %q", fault.Error())
			}
			if fault.Line < line || fault.Line == line && fault.Column < column {
				t.Errorf("out of order: %v", fault)
			}
			line, column = fault.Line, fault.Column
		}
		if faults == nil {
			finite(t, c)
		}
	})
}

// finite fails where a chain without faults holds what cannot be computed with.
func finite(t *testing.T, c *chain.Chain) {
	if c.Drive != nil && (c.Drive.Peak.V <= 0 || math.IsInf(float64(c.Drive.Peak.V), 0) || math.IsNaN(float64(c.Drive.Peak.V))) {
		t.Errorf("peak %v", c.Drive.Peak.V)
	}
	if c.Multiplier != nil && (c.Drive == nil || c.Multiplier.Stages.V < 1 || c.Multiplier.CouplingCapacitor == nil) {
		t.Errorf("a multiplier without what it needs: %+v", c.Multiplier)
	}
	for i := range c.Parts {
		if p := &c.Parts[i]; p.Dimension() == quantity.Resistance(0).Dimension() {
			if r, err := p.Ohms(); err != nil || r <= 0 {
				t.Errorf("part %q: %v, %v", p.Name.V, r, err)
			}
		}
	}
}

// BenchmarkRead reads a description of about 200 lines.
func BenchmarkRead(b *testing.B) {
	text := small
	for i := 0; strings.Count(text, "\n") < 200; i++ {
		text += fmt.Sprintf("[[spacing]]\nname = 'gap %d'\nfrom = 'output'\nto = 'ground'\nmedium = 'air'\nclearance = '60 mm'\ncreepage = '150 mm'\nshape = { kind = 'coaxial', inner_radius = '3 mm', outer_radius = '63 mm' }\n", i)
	}
	b.SetBytes(int64(len(text)))
	for b.Loop() {
		if _, faults := chain.Read([]byte(text)); faults != nil {
			b.Fatal(faults)
		}
	}
}
