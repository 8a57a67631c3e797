package rules_test

import (
	"fmt"
	"testing"

	"kilovet/rules/rule"
)

const post = `format = 1
[site]
altitude = "0 m"
air_temperature = "20 degC"
pollution_degree = 2
[[field]]
name = "post"
medium = "vacuum"
[[field.electrodes]]
name = "top"
voltage = "-5 kV"
profile = [{ from = ["0 mm", "40 mm"] }, { to = ["30 mm", "40 mm"] }, { to = ["30 mm", "50 mm"] }, { to = ["0 mm", "50 mm"] }]
[[field.electrodes]]
name = "bottom"
%s
profile = [{ from = ["0 mm", "0 mm"] }, { to = ["30 mm", "0 mm"] }, { to = ["30 mm", "-10 mm"] }, { to = ["0 mm", "-10 mm"] }]
[[field.dielectrics]]
name = "ceramic"
permittivity = 9.4
resistivity = "1e12 ohm m"
material = "alumina"
profile = [{ from = ["0 mm", "0 mm"] }, { to = ["15 mm", "0 mm"] }, { to = ["15 mm", "%s"] }, { to = ["0 mm", "%[2]s"] }, { to = ["0 mm", "0 mm"] }]
`

// A post between electrodes is judged along its surface by a spacing with its field, or by
// nobody, which is said; one that touches a single electrode, or electrodes at the same
// potential, joins nothing.
func TestASurfaceThatJoinsElectrodesIsAskedFor(t *testing.T) {
	const along = "[[spacing]]\nname = \"along\"\nvoltage = \"5 kV\"\nmedium = \"vacuum\"\nclearance = \"40 mm\"\ncreepage = \"40 mm\"\nmaterial = \"alumina\"\nfield = \"post\"\n"
	for _, c := range []struct {
		bottom, height, more string
		asked                bool
	}{
		{`voltage = "0 V"`, "40 mm", "", true},
		{`voltage = "0 V"`, "40 mm", along, false},
		{`voltage = "0 V"`, "30 mm", "", false},
		{`voltage = "-5 kV"`, "40 mm", "", false},
	} {
		asked := false
		for _, f := range reviewed(t, []byte(fmt.Sprintf(post, c.bottom, c.height)+c.more)).Findings {
			if f.Rule == "field.surface" {
				asked = f.Verdict == rule.Unassessed && f.Subject == "post/ceramic"
			}
		}
		if asked != c.asked {
			t.Errorf("%s, %s high, %q: asked for %v", c.bottom, c.height, c.more, asked)
		}
	}
}

// Two insulators one on the other join the electrodes that each alone does not, the same
// material or not; with a gap between them they do not.
func TestStackedInsulatorsJoinElectrodes(t *testing.T) {
	const cap = `[[field.dielectrics]]
name = "cap"
permittivity = %s
resistivity = "1e12 ohm m"
material = "PTFE"
profile = [{ from = ["0 mm", "%[2]s"] }, { to = ["12 mm", "%[2]s"] }, { to = ["12 mm", "40 mm"] }, { to = ["0 mm", "40 mm"] }, { to = ["0 mm", "%[2]s"] }]
`
	for _, c := range []struct {
		permittivity, foot string
		asked              bool
	}{{"2.1", "25 mm", true}, {"9.4", "25 mm", true}, {"2.1", "28 mm", false}} {
		text := fmt.Sprintf(post, `voltage = "0 V"`, "25 mm") + fmt.Sprintf(cap, c.permittivity, c.foot)
		asked := ""
		for _, f := range reviewed(t, []byte(text)).Findings {
			if f.Rule == "field.surface" {
				asked += f.Subject
			}
		}
		if want := map[bool]string{true: "post/ceramic and cap"}[c.asked]; asked != want {
			t.Errorf("%v: asked for %q, want %q", c, asked, want)
		}
	}
}
