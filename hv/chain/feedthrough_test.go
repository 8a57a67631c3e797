package chain_test

import (
	"fmt"
	"slices"
	"strings"
	"testing"
)

const lead = `format = 1
[[feedthrough]]
name = "lead"
voltage = "20 kV"
plate_thickness = "10 mm"
pin = { radius = "3 mm" }
hole = { radius = "20 mm", edge_radius = "2 mm" }
`

// told lists the spacings of the one feedthrough of a text: name, medium, clearance and
// creepage in millimetres.
func told(t *testing.T, text string) []string {
	t.Helper()
	var all []string
	for _, s := range sound(t, text).Feedthroughs[0].Spacings() {
		all = append(all, fmt.Sprintf("%s, %s, %.4g, %.4g", strings.TrimPrefix(s.Name.V, "lead: "), s.Medium.V, 1e3*float64(s.Clearance.V), 1e3*float64(s.Creepage.V)))
	}
	return all
}

func TestSpacingsOfAFeedthrough(t *testing.T) {
	for keys, want := range map[string][]string{
		"air_side = { length = \"60 mm\" }\n":    {"air side, air, 60, 60", "pin to plate, air, 17, 0", "edge of the hole, air, 17, 0"},
		"vacuum_side = { length = \"60 mm\" }\n": {"pin to plate, vacuum, 17, 0", "edge of the hole, vacuum, 17, 0"},
		"sleeve = { material = \"alumina\" }\nair_side = { length = \"60 mm\", clearance = \"55 mm\", ribs = { count = 5, depth = \"4 mm\", width = \"3 mm\" } }\nvacuum_side = { length = \"40 mm\", shape = { kind = \"plates\" } }\nstrip = { length = \"90 mm\" }\n": {
			"air side, air, 55, 100", "vacuum side, vacuum, 0, 40", "vacuum side, electrodes, vacuum, 40, 0", "cable strip, air, 90, 90", "sleeve, solid, 17, 0"},
		"sleeve = { material = \"alumina\", inner_radius = \"4 mm\", outer_radius = \"15 mm\" }\nair_side = { length = \"60 mm\", creepage = \"85 mm\" }\n": {
			"air side, air, 60, 85", "sleeve, solid, 11, 0"},
	} {
		if got := told(t, lead+keys); !slices.Equal(got, want) {
			t.Errorf("%s\ngot  %q\nwant %q", keys, got, want)
		}
	}
}

// Every spacing made from a feedthrough has the voltage, the class and a place in it; its
// nodes are those of pin and plate.
func TestSpacingsKeepWhatTheyComeFrom(t *testing.T) {
	text := strings.NewReplacer("format = 1\n", whole, "voltage = \"20 kV\"", "node = \"cathode\"\nalso = [\"heater.a\"]\ninsulation = \"functional\"").Replace(lead) + "air_side = { length = \"60 mm\" }\n"
	f := &sound(t, text).Feedthroughs[0]
	for _, s := range f.Spacings() {
		if s.From.V != "cathode" || s.To.V != "ground" || s.Also.V[0] != "heater.a" || s.Insulation.V != "functional" || s.Of != f {
			t.Errorf("%s: from %q to %q, also %v, %q", s.Name.V, s.From.V, s.To.V, s.Also.V, s.Insulation.V)
		}
		if !s.To.Set() || !s.Clearance.Set() || !strings.HasPrefix(s.Clearance.Key, "feedthrough.") {
			t.Errorf("%s: its clearance stands at %+v", s.Name.V, s.Clearance.Place)
		}
	}
}

func TestAnnuliOfASleeve(t *testing.T) {
	for keys, want := range map[string][2]bool{
		`sleeve = { material = "alumina" }`:                                                  {false, false},
		`sleeve = { material = "alumina", inner_radius = "3 mm", outer_radius = "20 mm" }`:   {false, false},
		`sleeve = { material = "alumina", inner_radius = "3.2 mm", inner_gap = "air" }`:      {true, false},
		`sleeve = { material = "alumina", outer_radius = "19 mm", outer_gap = "vacuum" }`:    {false, true},
		`sleeve = { material = "alumina", inner_radius = "3.2 mm", outer_radius = "19 mm" }`: {true, true},
	} {
		f := sound(t, lead+keys+"\nair_side = { length = \"60 mm\" }\n").Feedthroughs[0]
		if got := [2]bool{f.HasInnerGap(), f.HasOuterGap()}; got != want {
			t.Errorf("%s: %v, want %v", keys, got, want)
		}
	}
}
