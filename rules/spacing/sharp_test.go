package spacing_test

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"kilovet/rules/rule"
)

// Without a shape the side of the sharper electrode decides by its polarity: a positive one
// stands what Table F.8, case A, read backwards says (34 mm at 80 kPa and 20 °C: 20 kV), a
// negative one the AIEE needle gap (52 mm at 25 °C: 50 kV crest), neither on an assumption.
// Without a word it is the needle gap, on the assumption that both are sharp.
func TestSharpElectrodesWithoutAShape(t *testing.T) {
	at := func(kilovolts, millimetres float64, state, key string) rule.Finding {
		return findings(t, site(0)+fmt.Sprintf("[[spacing]]\nname = \"g\"\nvoltage = \"%g kV\"\nclearance = \"%g mm\"\n%s%s", kilovolts, millimetres, state, key))["spacing.breakdown | g"]
	}
	warm := "medium = \"air\"\npressure = \"1013.25 mbar\"\ntemperature = \"25 degC\"\n"
	thin := "medium = \"gas\"\ngas = \"air\"\npressure = \"800 mbar\"\ntemperature = \"20 degC\"\n"
	for _, c := range []struct {
		millimetres float64
		state, key  string
		stands      float64 // kV
		assumed     int
	}{
		{52, warm, "", 50, 1},
		{52, warm, "sharper_electrode = \"negative\"\n", 50, 0},
		{34, thin, "sharper_electrode = \"positive\"\n", 20, 0},
	} {
		f := at(0.6*c.stands, c.millimetres, c.state, c.key)
		if got := f.Needed.Value / 0.8e3; math.Abs(got/c.stands-1) > 1e-3 {
			t.Errorf("%g mm %q: %g kV, want %g: %s", c.millimetres, c.key, got, c.stands, f.Because)
		}
		if len(f.Assumptions) != c.assumed || f.Verdict != rule.Marginal {
			t.Errorf("%g mm %q: %s, %q", c.millimetres, c.key, f.Verdict, f.Assumptions)
		}
	}
	if f := at(20, 30, warm, "sharper_electrode = \"positive\"\n"); f.Verdict != rule.Fails || !strings.Contains(f.Because, "the sharper electrode is positive") {
		t.Errorf("20 kV over 30 mm at a positive point: %s: %s", f.Verdict, f.Because)
	}
	if f := at(20, 30, warm, "sharper_electrode = \"negative\"\n"); f.Verdict != rule.Marginal {
		t.Errorf("20 kV over 30 mm at a negative point: %s: %s", f.Verdict, f.Because)
	}
}

// Between nodes the polarity follows from the potentials, without a shape as with one.
func TestPolarityWithoutAShapeComesFromTheNodes(t *testing.T) {
	stands := func(polarity, at, side string) (float64, string) {
		text := strings.Replace(supplied(polarity, at, side), "shape = { kind = \"point-plane\", tip_radius = \"0.5 mm\" }\n", "", 1)
		f := findings(t, text)["spacing.breakdown | g"]
		if f.Needed == nil {
			t.Fatalf("%s %s %s: %+v", polarity, at, side, f)
		}
		return f.Needed.Value, f.Because
	}
	needles, _ := stands("negative", "output", "")
	positive, _ := stands("positive", "output", "from")
	if !(positive < 0.8*needles) {
		t.Errorf("a positive point %g V, needles %g V", positive, needles)
	}
	for _, c := range []struct {
		polarity, at, side, says string
		want                     float64
	}{
		{"negative", "output", "from", "the sharper electrode is negative", needles},
		{"negative", "output", "to", "the sharper electrode is positive", positive},
		{"positive", "output", "to", "the sharper electrode is negative", needles},
		{"negative", "drive", "from", "positive at times, the worse", positive},
	} {
		if v, because := stands(c.polarity, c.at, c.side); v != c.want || !strings.Contains(because, c.says) {
			t.Errorf("%+v: %g V: %s", c, v, because)
		}
	}
}
