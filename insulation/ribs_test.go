package insulation_test

import (
	"strings"
	"testing"

	"kilovet/hv/quantity"
	"kilovet/insulation"
	"kilovet/insulation/gap"
)

// IEC 60664-1 Table F.5, pollution degree 3, group I, 5 kV: 63 mm, with a rib of size 50.4
// (in brackets, read). The size, a quarter of the 63 mm high and a fifth thick, is from
// memory: 15.75 and 12.6 mm.
func TestFiguresInBracketsTakeRibsOfSize(t *testing.T) {
	base := bench()
	base.Material, base.PollutionDegree, base.Creepage = "PTFE", 3, 55e-3
	v := gap.Voltages{Peak: 5e3, LongTerm: 5e3}
	for name, c := range map[string]struct {
		ribs     gap.Ribs
		creepage quantity.Length
		degree   int
		want     quantity.Length
		assumed  bool
		shown    bool
	}{
		"no rib":              {gap.Ribs{}, 55e-3, 3, 63e-3, false, false},
		"of size":             {gap.Ribs{Count: 1, Depth: 15.8e-3, Width: 5e-3, Thickness: 12.7e-3}, 55e-3, 3, 50.4e-3, true, true},
		"too low":             {gap.Ribs{Count: 1, Depth: 15.7e-3, Width: 5e-3, Thickness: 12.7e-3}, 55e-3, 3, 63e-3, false, true},
		"too thin":            {gap.Ribs{Count: 1, Depth: 15.8e-3, Width: 5e-3, Thickness: 12.5e-3}, 55e-3, 3, 63e-3, false, true},
		"thickness not given": {gap.Ribs{Count: 1, Depth: 15.8e-3, Width: 5e-3}, 55e-3, 3, 63e-3, false, true},
		"long enough without": {gap.Ribs{Count: 1, Depth: 15.8e-3, Width: 5e-3, Thickness: 12.7e-3}, 64e-3, 3, 63e-3, false, true},
		"bridged, so short":   {gap.Ribs{Count: 1, Depth: 15.8e-3, Width: 1.4e-3, Thickness: 12.7e-3}, 64e-3, 3, 50.4e-3, true, true},
		"another degree":      {gap.Ribs{Count: 1, Depth: 15.8e-3, Width: 5e-3, Thickness: 12.7e-3}, 20e-3, 2, 25e-3, false, false},
	} {
		g := base
		g.Ribs, g.Creepage, g.PollutionDegree = c.ribs, c.creepage, c.degree
		a, err := insulation.CreepageNeeded(g, v)
		if err != nil {
			t.Fatal(err)
		}
		shown := false
		for _, b := range a.Shown {
			shown = shown || strings.Contains(b.Source.Text, "F.5")
		}
		if !quantity.Equal(a.Value, c.want) || (len(a.Assumptions) > 0) != c.assumed || shown != c.shown {
			t.Errorf("%s: %v, assumptions %v, shown %v; want %v", name, a.Value, a.Assumptions, a.Shown, c.want)
		}
	}
	g := base
	g.Insulation, g.Creepage = gap.Reinforced, 110e-3
	g.Ribs = gap.Ribs{Count: 1, Depth: 32e-3, Width: 5e-3, Thickness: 26e-3}
	if a, err := insulation.CreepageNeeded(g, v); err != nil || !quantity.Equal(a.Value, 2*50.4e-3) {
		t.Errorf("reinforced: %v (%v), want twice the figure in brackets", a.Value, err)
	}
}
