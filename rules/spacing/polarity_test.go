package spacing_test

import (
	"fmt"
	"strings"
	"testing"

	"kilovet/rules/rule"
)

// supplied is a chain of either polarity with a point against the wall and one node that
// changes its sign.
func supplied(polarity, at, side string) string {
	key := ""
	if side != "" {
		key = fmt.Sprintf("sharper_electrode = %q\n", side)
	}
	return site(100) + fmt.Sprintf(`[drive]
waveform = "sine"
frequency = "38 kHz"
peak = "2 kV"
[multiplier]
topology = "half-wave"
polarity = %q
stages = 5
coupling_capacitor = { value = "2 nF", rated_voltage = "6 kV" }
smoothing_capacitor = { value = "2 nF", rated_voltage = "6 kV" }
diode = { rated_voltage = "8 kV" }
[[load]]
name = "bleed"
at = "output"
resistance = "1 Gohm"
[[spacing]]
name = "g"
from = %q
to = "ground"
medium = "air"
clearance = "60 mm"
creepage = "300 mm"
material = "PTFE"
%sshape = { kind = "point-plane", tip_radius = "0.5 mm" }
`, polarity, at, key)
}

// A point on a negative node stands as much as needles, on a positive one, on the earthed
// side of a negative node, where its side is not described and where the drive changes its
// sign it is judged as positive.
func TestPolarityComesFromTheNodes(t *testing.T) {
	stands := func(polarity, at, side string) (float64, string) {
		f, ok := findings(t, supplied(polarity, at, side))["spacing.breakdown | g"]
		if !ok || f.Needed == nil {
			t.Fatalf("%s %s %s: %+v", polarity, at, side, f)
		}
		return f.Needed.Value, f.Because
	}
	negative, because := stands("negative", "output", "from")
	if !strings.Contains(because, "sharper electrode is negative") {
		t.Error(because)
	}
	unknown, because := stands("negative", "output", "")
	if !strings.Contains(because, "taken as positive, the worse") {
		t.Error(because)
	}
	if !(negative > 1.3*unknown) {
		t.Errorf("negative %g V, unknown %g V", negative, unknown)
	}
	for _, c := range [][3]string{{"negative", "output", "to"}, {"positive", "output", "from"}} {
		if v, because := stands(c[0], c[1], c[2]); v != unknown || !strings.Contains(because, "sharper electrode is positive") {
			t.Errorf("%v: %g V, want %g: %s", c, v, unknown, because)
		}
	}
	if v, _ := stands("positive", "output", "to"); v != negative {
		t.Errorf("the earthed side of a positive node: %g V, want %g", v, negative)
	}
	if v, because := stands("negative", "drive", "from"); v != unknown || !strings.Contains(because, "the worse") {
		t.Errorf("a node that changes its sign: %g V: %s", v, because)
	}
}

// Where a voltage is stated the polarity is too, and what it would change is said.
func TestPolarityIsStatedBesideAVoltage(t *testing.T) {
	at := func(key string) rule.Finding {
		return findings(t, site(100)+"[[spacing]]\nname = \"g\"\nvoltage = \"20 kV\"\nmedium = \"air\"\nclearance = \"40 mm\"\n"+key+"shape = { kind = \"point-plane\", tip_radius = \"0.5 mm\" }\n")["spacing.breakdown | g"]
	}
	unknown, positive, negative := at(""), at("sharper_electrode = \"positive\"\n"), at("sharper_electrode = \"negative\"\n")
	if unknown.Needed.Value != positive.Needed.Value || negative.Needed.Value <= positive.Needed.Value {
		t.Errorf("unknown %v, positive %v, negative %v", unknown.Needed, positive.Needed, negative.Needed)
	}
	if !strings.Contains(unknown.Remedy, "say spacing.sharper_electrode") || strings.Contains(positive.Remedy, "sharper_electrode") {
		t.Errorf("%q, %q", unknown.Remedy, positive.Remedy)
	}
}
