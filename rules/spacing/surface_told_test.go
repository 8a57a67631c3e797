package spacing_test

import (
	"fmt"
	"slices"
	"testing"

	"kilovet/rules/rule"
)

// A material, tracking index or ribs in vacuum, oil or another gas tell of a surface: without
// its length it is unassessed. Where nothing tells of one there is none, and a solid has no surface.
func TestASurfaceWithoutALengthIsNotPassedOver(t *testing.T) {
	const size = "voltage = \"20 kV\"\ninsulation = \"basic\"\nclearance = \"20 mm\"\nshape = { kind = \"plates\" }\n"
	along := func(more string) (rule.Finding, bool) {
		f, there := findings(t, site(0)+fmt.Sprintf("[[spacing]]\nname = \"g\"\n%s%s", size, more))["spacing.creepage | g"]
		return f, there
	}
	for _, medium := range []string{"medium = \"vacuum\"\n", "medium = \"oil\"\n", "medium = \"gas\"\ngas = \"nitrogen\"\npressure = \"2 bar\"\n"} {
		for _, told := range []string{"material = \"alumina\"\n", "cti = \"600 V\"\n", "ribs = { count = 3, depth = \"5 mm\", width = \"5 mm\" }\n"} {
			f, there := along(medium + told)
			if !there || f.Verdict != rule.Unassessed || len(f.Missing) == 0 || told[0] == 'm' && !slices.Contains(f.Missing, "spacing.creepage") {
				t.Errorf("%s%s: %v %s, missing %v: %s", medium, told, there, f.Verdict, f.Missing, f.Because)
			}
		}
		if f, there := along(medium); there {
			t.Errorf("%s: %s: %s", medium, f.Verdict, f.Because)
		}
	}
	if f, there := along("medium = \"solid\"\nmaterial = \"alumina\"\n"); there {
		t.Errorf("solid: %s: %s", f.Verdict, f.Because)
	}
}
