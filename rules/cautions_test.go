package rules_test

import (
	"slices"
	"strings"
	"testing"

	"kilovet/rules"
)

const supply = "format = 1\n[drive]\nfrequency = \"38 kHz\"\npeak = \"1 kV\"\n[multiplier]\npolarity = \"negative\"\nstages = 2\n" +
	"coupling_capacitor.value = \"1 nF\"\nsmoothing_capacitor.value = \"1 nF\"\n"

func gapIn(medium, more string) string {
	return "format = 1\n[[spacing]]\nname = \"gap\"\nvoltage = \"10 kV\"\nmedium = \"" + medium + "\"\n" + more
}

// Each caution stands where it concerns the chain, and not elsewhere.
func TestCautionsConcernTheChain(t *testing.T) {
	ordinary(t)
	always := []string{"people"}
	supplied := []string{"people", "stored charge", "earthing rod", "meters", "interlocks", "ozone"}
	for _, c := range []struct {
		name, text string
		want       []string
	}{
		{"a gap in air", gapIn("air", ""), append(always, "ozone")},
		{"a printed board", gapIn("printed board", ""), append(always, "ozone")},
		{"a gap in oil", gapIn("oil", ""), append(always, "oil")},
		{"a solid", gapIn("solid", ""), always},
		{"a gap in vacuum", gapIn("vacuum", ""), append(always, "x-rays", "vacuum")},
		{"a gap in nitrogen", gapIn("gas", "gas = \"nitrogen\"\npressure = \"2 bar\"\n"), append(always, "pressure")},
		{"a gap in sulphur hexafluoride", gapIn("gas", "gas = \"sulphur hexafluoride\"\npressure = \"2 bar\"\n"), append(always, "sulphur hexafluoride", "pressure")},
		{"a supply", supply, supplied},
		{"a supply in oil", strings.Replace(supply, "stages", "medium = \"oil\"\nstages", 1), append(slices.Clone(supplied), "oil")},
		{"with a gun", supply + "[gun]\nemission = \"10 uA\"\n", append(slices.Clone(supplied), "x-rays", "vacuum", "filament")},
		{"with a heater", supply + "[heater]\nsupply = \"dc\"\n", append(slices.Clone(supplied), "heater", "filament")},
		{"with a beryllium window", supply + "[[target]]\nname = \"anode\"\nmaterial = \"copper\"\n[[shield]]\nname = \"window\"\ntarget = \"anode\"\nlayers = [{ material = \"beryllium\", thickness = \"1 mm\" }]\n",
			append(slices.Clone(supplied), "x-rays", "beryllium")},
	} {
		chain, faults := rules.Read([]byte(c.text))
		if len(faults) > 0 {
			t.Fatalf("%s: %v", c.name, faults)
		}
		var got []string
		for _, caution := range rules.Run(chain, nil, rules.Program{}).Cautions {
			got = append(got, caution.Subject)
		}
		if !slices.Equal(got, c.want) {
			t.Errorf("%s: %v, want %v", c.name, got, c.want)
		}
	}
}
