package diagram_test

import (
	"fmt"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"

	"kilovet/hv/chain"
	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
	"kilovet/rules/diagram"
	"kilovet/rules/evidence"
	"kilovet/rules/rule"
)

// read reads a description that must be sound.
func read(t testing.TB, text string) *chain.Chain {
	t.Helper()
	c, faults := chain.Read([]byte(text))
	if len(faults) > 0 {
		t.Fatal(faults)
	}
	return c
}

func file(t testing.TB, name string) string {
	t.Helper()
	data, err := os.ReadFile(filepath.Join("../../testdata/chains", name))
	if err != nil {
		t.Fatal(err)
	}
	return string(data)
}

// small is a multiplier to which a test adds its rest.
const small = `format = 1
[drive]
frequency = "38 kHz"
peak = "1.5 kV"
[multiplier]
polarity = "positive"
stages = 2
coupling_capacitor.value = "1 nF"
smoothing_capacitor.value = ["2 nF", "3 nF"]
`

// chains are descriptions with every kind of part in usual and unusual places.
func chains(t testing.TB) map[string]string {
	return map[string]string{
		"column": file(t, "column.toml"), "positive": file(t, "positive.toml"), "small": small,
		"loose": small + `
[[filter]]
resistor.value = "1 Mohm"
[[filter]]
resistor.value = "2 Mohm"
capacitor.value = "1 nF"
[[load]]
name = "low"
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
[[part]]
name = "limiter"
kind = "resistor"
from = "output"
to = "gun.inner"
value = "22 kohm"
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
`,
		"fed at the cathode": small + `
[bias]
kind = "fixed"
voltage = "300 V"
fed = "cathode"
[gun]
emission = "1 uA"
[heater]
supply = "dc"
voltage = "2 V"
feed.kind = "battery"
`,
		"heater alone": small + `
[heater]
supply = "ac"
voltage = "2 V"
frequency = "50 Hz"
feed = { kind = "isolation transformer", common_mode = "115 V" }
`,
	}
}

func draw(t testing.TB, text string, findings ...rule.Finding) (*diagram.Diagram, *evidence.Evidence) {
	t.Helper()
	e := evidence.New(read(t, text))
	return diagram.Of(e, findings), e
}

// Every element of the circuit but strays and the leakage of clamps is in the diagram
// once, between the nodes it joins.
func TestEveryElementHasItsPlace(t *testing.T) {
	for name, text := range chains(t) {
		d, e := draw(t, text)
		count := map[string]int{}
		for _, p := range d.Parts() {
			count[p.Name]++
			if p.Kind == "" {
				t.Errorf("%s: %s is of no kind", name, p.Name)
			}
		}
		for _, el := range e.Layout().Elements {
			hidden := el.Role == circuit.Stray && !slices.Contains([]string{"heater.feed", "heater.capacitance_to_ground"}, el.Name) || strings.HasSuffix(el.Name, ".clamp.leakage")
			if n := count[el.Name]; hidden && n != 0 || !hidden && n != 1 {
				t.Errorf("%s: %s is drawn %d times", name, el.Name, n)
			}
			delete(count, el.Name)
		}
		delete(count, "heater.feed") // of no stated capacitance
		if len(count) > 0 {
			t.Errorf("%s: drawn but not in the circuit: %v", name, count)
		}
	}
}

func TestPartsJoinTheirNodes(t *testing.T) {
	for name, text := range chains(t) {
		d, e := draw(t, text)
		for _, p := range d.Parts() {
			el := e.Layout().Element(p.Name)
			if el == nil {
				continue
			}
			if from, to := el.Ends(); p.From != from || p.To != to {
				t.Errorf("%s: %s runs from %s to %s, want %s to %s", name, p.Name, p.From, p.To, from, to)
			}
		}
	}
}

// What is drawn in one line is one line in the circuit: each piece begins where the
// last ended.
func TestRailIsOneLine(t *testing.T) {
	for name, text := range chains(t) {
		d, e := draw(t, text)
		at, _ := e.Layout().Node("multiplier")
		for _, s := range d.Rail {
			switch {
			case s.Series == nil || s.Series.Kind == diagram.Cable:
			default:
				from, to := e.Layout().Element(s.Series.Name).From, e.Layout().Element(s.Series.Name).To
				if from != at {
					t.Errorf("%s: %s does not go on from the rail", name, s.Series.Name)
				}
				at = to
			}
			if n, ok := e.Layout().Node(s.Node.Name); ok && n != at {
				t.Errorf("%s: %s is not on the rail", name, s.Node.Name)
			}
			for _, h := range s.Hanging {
				hangs(t, e.Layout(), at, h)
			}
		}
	}
}

// hangs follows what hangs at a node down to ground.
func hangs(t *testing.T, c *circuit.Circuit, at circuit.Node, h diagram.Hanging) {
	t.Helper()
	last := at
	for _, p := range h.Parts {
		el := c.Element(p.Name)
		last, at = at, other(t, el, at)
	}
	for _, p := range h.Beside {
		if el := c.Element(p.Name); other(t, el, last) != circuit.Ground {
			t.Errorf("%s is not beside %s", p.Name, h.Parts[len(h.Parts)-1].Name)
		}
	}
	if at != circuit.Ground {
		t.Errorf("%s does not end at ground", h.Parts[0].Name)
	}
}

func other(t *testing.T, el *circuit.Element, at circuit.Node) circuit.Node {
	t.Helper()
	switch at {
	case el.From:
		return el.To
	case el.To:
		return el.From
	}
	t.Errorf("%s does not hang at node %d", el.Name, at)
	return circuit.Ground
}

func TestLadderHasItsStages(t *testing.T) {
	for name, want := range map[string]struct{ columns, stages int }{"column": {1, 6}, "positive": {2, 3}, "small": {1, 2}} {
		d, _ := draw(t, chains(t)[name])
		l := d.Ladder
		if len(l.Columns) != want.columns || len(l.Smoothing) != want.stages || len(l.Stages) != want.stages {
			t.Errorf("%s: %d columns, %d stages", name, len(l.Columns), len(l.Stages))
		}
		for _, c := range l.Columns {
			for _, parts := range [][]diagram.Part{c.Coupling, c.Lower, c.Upper} {
				if len(parts) != want.stages {
					t.Errorf("%s: %d parts a column, want %d", name, len(parts), want.stages)
				}
			}
		}
	}
}

func TestValuesAreThoseOfTheDescription(t *testing.T) {
	d, _ := draw(t, chains(t)["column"])
	got := map[string]string{}
	for _, p := range d.Parts() {
		got[p.Name] = p.Value
	}
	for name, want := range map[string]string{
		"drive.source": "1.85 kV peak, 25 kHz", "drive.resistance": "600 Ω", "multiplier.coupling_capacitor.3": "2.2 nF", "multiplier.diode.4": "",
		"filter.1.resistor": "4 × 1 MΩ", "filter.1.capacitor": "470 pF", "cable": "1.5 m, 157.5 pF", "divider.lower": "200 kΩ, 2 strings",
		"bleeder.1": "4 × 500 MΩ, 2 strings", "divider.meter": "10 MΩ", "divider.clamp": "90 V", "bias.clamp": "1.2 kV", "gun": "60 µA",
		"heater.supply": "1.9 V, 2.4 A", "heater.feed": "45 pF, screened", "mains": "115 V", "heater.centre_resistors.1": "22 Ω", "heater.capacitance_to_ground": "60 pF",
	} {
		if got[name] != want {
			t.Errorf("%s: %q, want %q", name, got[name], want)
		}
	}
	small, _ := draw(t, chains(t)["small"])
	if v := small.Ladder.Smoothing[1].Value; v != "3 nF" {
		t.Errorf("of a list each stage has its own: %s", v)
	}
}

func TestNodesBearTheirMeanPotential(t *testing.T) {
	d, e := draw(t, chains(t)["column"])
	seen := 0
	for _, n := range d.Nodes() {
		if n.Potential == "" {
			continue
		}
		seen++
		v, err := e.Potential(n.Name)
		if err != nil || quantity.Text(v) != n.Potential {
			t.Errorf("%s: %s, want %v (%v)", n.Name, n.Potential, v, err)
		}
	}
	if seen < 15 || d.Unknown != "" {
		t.Errorf("%d nodes with a potential; %s", seen, d.Unknown)
	}
}

func TestWhyPotentialsAreNotKnown(t *testing.T) {
	d, _ := draw(t, strings.Replace(small, `coupling_capacitor.value = "1 nF"`, `coupling_capacitor = { value = "1 nF", dielectric = "X7R" }`, 1))
	if d.Unknown == "" || d.Ladder.Stages[0].Potential != "" {
		t.Errorf("%q: %q", d.Ladder.Stages[0].Potential, d.Unknown)
	}
}

func finding(id, subject string, v rule.Verdict) rule.Finding {
	return rule.Finding{Rule: id, Subject: subject, Verdict: v}
}

func TestMarks(t *testing.T) {
	d, _ := draw(t, chains(t)["column"],
		finding("resistor.voltage", "filter.1.resistor", rule.Marginal), finding("capacitor.voltage", "bias.bypass", rule.Meets),
		finding("diode.reverse_voltage", "multiplier.diode", rule.Unassessed), finding("touch.voltage", "divider.tap", rule.Fails),
		finding("resistor.power", "filter.1.resistor", rule.Unassessed), finding("divider.error", "divider", rule.Marginal),
		finding("spacing.creepage", "lid", rule.Fails), finding("x", "", rule.Fails))
	want := []diagram.Mark{
		{1, rule.Fails, "divider.tap", []string{"touch.voltage"}},
		{2, rule.Unassessed, "filter.1.resistor", []string{"resistor.voltage", "resistor.power"}},
		{3, rule.Unassessed, "multiplier.diode", []string{"diode.reverse_voltage"}},
		{4, rule.Marginal, "divider", []string{"divider.error"}},
	}
	if diff := cmp.Diff(want, d.Marks); diff != "" || d.Elsewhere != 2 {
		t.Errorf("%d elsewhere: %s", d.Elsewhere, diff)
	}
	marked := map[int][]string{}
	for _, p := range d.Parts() {
		marked[p.Mark] = append(marked[p.Mark], p.Name)
	}
	for _, n := range d.Nodes() {
		if n.Mark > 0 {
			marked[n.Mark] = append(marked[n.Mark], n.Name)
		}
	}
	if len(marked[3]) != 12 || !slices.Equal(marked[1], []string{"divider.tap"}) || !slices.Equal(marked[2], []string{"filter.1.resistor"}) || !slices.Equal(marked[4], []string{"divider.upper"}) {
		t.Errorf("%v", marked)
	}
}

// A group is marked on a part that has no mark of its own, and hides a lesser one only.
func TestMarksDoNotHideEachOther(t *testing.T) {
	for _, c := range []struct {
		findings []rule.Finding
		want     string
	}{
		{[]rule.Finding{finding("resistor.voltage", "divider.upper", rule.Fails), finding("divider.error", "divider", rule.Marginal)}, "divider.upper 1, divider.lower 2, divider.meter 0, divider.clamp 0"},
		{[]rule.Finding{finding("resistor.voltage", "divider.upper", rule.Marginal), finding("divider.error", "divider", rule.Fails)}, "divider.upper 2, divider.lower 1, divider.meter 0, divider.clamp 0"},
		{[]rule.Finding{finding("resistor.voltage", "divider.upper", rule.Unassessed), finding("resistor.voltage", "divider.lower", rule.Unassessed), finding("divider.meter_voltage", "divider.meter", rule.Marginal),
			finding("divider.clamp", "divider.clamp", rule.Marginal), finding("divider.error", "divider", rule.Fails)}, "divider.upper 1, divider.lower 3, divider.meter 4, divider.clamp 5"},
		{[]rule.Finding{finding("resistor.voltage", "divider.upper", rule.Fails), finding("resistor.voltage", "divider.lower", rule.Fails), finding("divider.meter_voltage", "divider.meter", rule.Fails),
			finding("divider.clamp", "divider.clamp", rule.Fails), finding("divider.error", "divider", rule.Marginal)}, "divider.upper 1, divider.lower 2, divider.meter 3, divider.clamp 4"},
	} {
		d, _ := draw(t, chains(t)["column"], c.findings...)
		var got []string
		for _, p := range d.Parts() {
			if strings.HasPrefix(p.Name, "divider.") {
				got = append(got, fmt.Sprint(p.Name, " ", p.Mark))
			}
		}
		if text := strings.Join(got, ", "); text != c.want {
			t.Errorf("%v: %s", c.findings, text)
		}
	}
}

func TestGun(t *testing.T) {
	all := chains(t)
	column, _ := draw(t, all["column"])
	cathode, _ := draw(t, all["fed at the cathode"])
	heater, _ := draw(t, all["heater alone"])
	none, _ := draw(t, all["positive"])
	switch {
	case none.Gun != nil:
		t.Error("a gun where there is none")
	case column.Gun.FedCathode || column.Gun.Same || len(column.Gun.Bias) != 3 || len(column.Gun.Heater.Centre) != 2 || column.Gun.Emission == nil:
		t.Errorf("column: %+v", column.Gun)
	case !cathode.Gun.FedCathode || cathode.Gun.Heater.Supply.Kind != diagram.Battery || cathode.Gun.Heater.Feed != nil || cathode.Gun.Bias[0].Kind != diagram.Direct:
		t.Errorf("fed at the cathode: %+v", cathode.Gun)
	case !heater.Gun.Same || heater.Gun.Emission != nil || heater.Gun.Heater.Supply.Kind != diagram.Alternating || heater.Gun.Heater.Feed.Kind != diagram.Transformer:
		t.Errorf("heater alone: %+v", heater.Gun)
	}
}

func TestNoDiagramWithoutASupply(t *testing.T) {
	if d, _ := draw(t, file(t, "spacings.toml")); d != nil {
		t.Errorf("%+v", d)
	}
}

// A capacitance that is not given is not drawn as none.
func TestWhatIsNotGivenIsNotNought(t *testing.T) {
	d, _ := draw(t, small+"\n[cable]\nlength = \"2 m\"\n")
	for _, p := range d.Parts() {
		if p.Name == "cable" && p.Value != "2 m" {
			t.Errorf("the cable is drawn as %q", p.Value)
		}
	}
}
