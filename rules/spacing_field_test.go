package rules_test

import (
	"math"
	"strings"
	"testing"

	"kilovet/rules/rule"
)

// coaxialCell is a gap between cylinders of 3 and 23 mm in air, as a shape and as a field
// with natural ends, in which the exact field is that of the shape.
const coaxialCell = `format = 1
title = "cell"
[site]
altitude = "200 m"
air_temperature = "23 degC"
pollution_degree = 2
[[spacing]]
name = "cell"
voltage = "12 kV"
medium = "air"
clearance = "20 mm"
creepage = "60 mm"
material = "PTFE"
shape = { kind = "coaxial", inner_radius = "3 mm", outer_radius = "23 mm" }
FIELD
[[field]]
name = "cell"
medium = "air"
[[field.electrodes]]
name = "inner"
voltage = "12 kV"
profile = [{ from = ["3 mm", "0 mm"] }, { to = ["3 mm", "30 mm"] }]
[[field.electrodes]]
name = "outer"
voltage = "0 V"
profile = [{ from = ["23 mm", "0 mm"] }, { to = ["23 mm", "30 mm"] }]
[[field.boundary]]
kind = "natural"
profile = [{ from = ["3 mm", "0 mm"] }, { to = ["23 mm", "0 mm"] }]
[[field.boundary]]
kind = "natural"
profile = [{ from = ["3 mm", "30 mm"] }, { to = ["23 mm", "30 mm"] }]
`

// A spacing that names a field is judged by it; the closed shape stands beside it, and
// here says the same.
func TestSpacingByItsField(t *testing.T) {
	closed := reviewed(t, []byte(strings.Replace(coaxialCell, "FIELD", "", 1)))
	computed := reviewed(t, []byte(strings.Replace(coaxialCell, "FIELD", `field = "cell"`, 1)))
	for _, id := range []string{"spacing.field_peak", "spacing.onset_estimate", "spacing.breakdown_estimate"} {
		a, b := fieldFigure(closed, id, "cell"), fieldFigure(computed, id, "cell")
		if !(math.Abs(a/b-1) < 5e-3) {
			t.Errorf("%s: %g by the shape, %g by the field", id, a, b)
		}
	}
	for _, f := range computed.Findings {
		if f.Rule == "spacing.corona" {
			text := ""
			for _, s := range f.Sources {
				text += s.Text + "\n"
			}
			if !strings.Contains(text, "closed shape, coaxial") {
				t.Errorf("the shape is not shown: %s", text)
			}
			return
		}
	}
	t.Error("no corona finding")
}

// A gap in another medium than its field, or at other nodes, is not judged by it.
func TestSpacingByAForeignField(t *testing.T) {
	text := strings.Replace(coaxialCell, "FIELD", `field = "cell"`, 1)
	text = strings.Replace(text, "name = \"cell\"\nmedium = \"air\"", "name = \"cell\"\nmedium = \"vacuum\"", 1)
	for _, f := range reviewed(t, []byte(text)).Findings {
		if f.Rule == "spacing.breakdown" && f.Verdict != rule.Unassessed {
			t.Errorf("%s: %s", f.Verdict, f.Because)
		}
	}
}
