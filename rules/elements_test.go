package rules_test

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"kilovet/rules"
	"kilovet/rules/exhibit"
)

// figuresOf are all figures of the working state with an id, by subject.
func figuresOf(r *rules.Review, id string) map[string]float64 {
	all := map[string]float64{}
	for _, f := range r.Figures {
		if f.ID == id && f.State == "working" {
			all[f.Subject] = f.Value
		}
	}
	return all
}

// TestEnergyBalance: what all parts take up is what drive, heater supply and fixed bias
// feed in, through the whole tool.
func TestEnergyBalance(t *testing.T) {
	for _, name := range []string{"column", "positive"} {
		r := reviewed(t, described(t, name))
		sum := 0.0
		for subject, v := range figuresOf(r, "loss.power") {
			if subject != "" {
				sum += v
			}
		}
		within(t, name+": all parts", figureOf(t, r, "loss.power", ""), sum, 1e-12)
		within(t, name+": what is fed in", figureOf(t, r, "multiplier.input_power", "")+figureOf(t, r, "loss.fed_besides", ""), sum, 1e-6)
	}
}

// TestChargeBalance: every diode of a half-wave ladder passes the current that leaves its
// top, those of both halves of a symmetrical one together.
func TestChargeBalance(t *testing.T) {
	r := reviewed(t, described(t, "column"))
	load := figureOf(t, r, "part.current", "filter.1.resistor")
	means := figuresOf(r, "diode.current_mean")
	if len(means) != 12 {
		t.Fatalf("%d diodes", len(means))
	}
	for name, i := range means {
		within(t, name, i, load, 1e-6)
	}
	r = reviewed(t, described(t, "positive"))
	load = figureOf(t, r, "part.current", "filter.1.resistor")
	means = figuresOf(r, "diode.current_mean")
	for k := 1; k <= 6; k++ {
		both := means[fmt.Sprintf("multiplier.diode.a.%d", k)] + means[fmt.Sprintf("multiplier.diode.b.%d", k)]
		within(t, fmt.Sprintf("diodes %d of both halves", k), both, load, 1e-6)
	}
}

// TestOneStage: without load a stage holds the peak of the drive on its coupling
// capacitor and twice that on its smoothing capacitor and, in reverse, on both diodes.
func TestOneStage(t *testing.T) {
	r := reviewed(t, []byte(stiff+"[[load]]\nname = \"l\"\nat = \"output\"\ncurrent = \"100 uA\"\n"))
	for id, want := range map[[2]string]float64{
		{"capacitor.mean", "multiplier.coupling_capacitor.1"}:  2500,
		{"capacitor.mean", "multiplier.smoothing_capacitor.1"}: 5000,
		{"capacitor.peak", "multiplier.smoothing_capacitor.1"}: 5000,
		{"diode.reverse_peak", "multiplier.diode.1"}:           5000,
		{"diode.reverse_peak", "multiplier.diode.2"}:           5000,
	} {
		within(t, id[0]+" "+id[1], figureOf(t, r, id[0], id[1]), want, 1e-4)
	}
	within(t, "mean current", figureOf(t, r, "diode.current_mean", "multiplier.diode.2"), 100e-6, 1e-6)
}

// TestEveryNodeHasItsWaveform: each node and each diode is drawn once, and the swing of
// the line is that of the node.
func TestEveryNodeHasItsWaveform(t *testing.T) {
	r := reviewed(t, described(t, "column"))
	lines := map[string]exhibit.Line{}
	for _, c := range r.Curves {
		if c.ID == "multiplier.waveform" {
			continue
		}
		for _, l := range c.Lines {
			name, _, _ := strings.Cut(l.Name, " (")
			lines[name] = l
		}
	}
	for _, name := range []string{"drive", "coupling.1", "coupling.6", "stage.1", "stage.6", "filter.1", "output", "cathode", "divider.tap", "multiplier.diode.1", "multiplier.diode.12"} {
		if _, there := lines[name]; !there {
			t.Errorf("%s is not drawn", name)
		}
	}
	low, high := span(lines["stage.6"])
	within(t, "swing of the top", high-low, figureOf(t, r, "multiplier.ripple", ""), 0.01)
	_, high = span(lines["multiplier.diode.12"])
	within(t, "peak of the last diode", high, figureOf(t, r, "diode.current_peak", "multiplier.diode.12"), 0.01)
}

func span(l exhibit.Line) (low, high float64) {
	low, high = math.Inf(1), math.Inf(-1)
	for _, p := range l.Points {
		low, high = math.Min(low, p.Y), math.Max(high, p.Y)
	}
	return low, high
}

// TestTheGapIsExplained: the causes add up to the drop, and what the closed form leaves
// out is said where it counts: this ladder's strays take more than its load.
func TestTheGapIsExplained(t *testing.T) {
	r := reviewed(t, described(t, "column"))
	sum := figureOf(t, r, "multiplier.drop_load", "") + figureOf(t, r, "multiplier.drop_stray", "") + figureOf(t, r, "multiplier.drop_source", "")
	within(t, "sum of the causes", sum, figureOf(t, r, "multiplier.drop", ""), 1e-9)
	for _, table := range r.Tables {
		if table.ID != "multiplier.closed_form" {
			continue
		}
		for _, words := range []string{"R f C is 0.03", "strays, junctions and leakage 630", "of the drive's swing"} {
			if !strings.Contains(table.Note, words) {
				t.Errorf("%q is not in %q", words, table.Note)
			}
		}
		within(t, "like with like", *table.Rows[2][3].Value, 1, 0.02)
		return
	}
	t.Error("there is no comparison")
}
