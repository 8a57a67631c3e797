package spacing_test

import (
	"fmt"
	"strings"
	"testing"
)

// A remedy that serves only one of gap and surface in vacuum says so. By the square root from 10 kV
// at 10 mm, alumina over 300 mm stands 54.8 kV, of which 80 % are less than 60.7 kV; a sphere of
// 0.25 mm in one of 0.59 mm at 20 kV/mm and less stands under 3.13 kV / 0.5 at any distance, and one
// of 1.5 mm before a plane bears less than 16.2 kV at work.
func TestRemedyForOneOfTwoSaysSo(t *testing.T) {
	for _, c := range []struct{ voltage, shape, clearance, creepage, says string }{
		{"60.7 kV", `kind = "cylinder-plane", radius = "46 mm"`, "1 mm", "2.6 mm", "for the surface no one length is enough"},
		{"16.2 kV", `kind = "sphere-plane", radius = "1.5 mm"`, "0.05 mm", "0.14 mm", "for the gap no one size is enough"},
		{"3.13 kV", `kind = "concentric spheres", inner_radius = "0.25 mm", outer_radius = "0.593 mm"`, "0.343 mm", "1.4 mm", "for the gap no one size is enough"},
	} {
		text := site(100) + fmt.Sprintf("[[spacing]]\nname = \"g\"\nvoltage = %q\nmedium = \"vacuum\"\ninsulation = \"basic\"\nmaterial = \"alumina\"\nclearance = %q\ncreepage = %q\nshape = { %s }\n", c.voltage, c.clearance, c.creepage, c.shape)
		if f := findings(t, text)["spacing.breakdown | g"]; !strings.Contains(f.Remedy, c.says) {
			t.Errorf("%s: %s", c.voltage, f.Remedy)
		}
	}
}
