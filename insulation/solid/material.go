package solid

import (
	"fmt"
	"slices"
	"strings"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

// Span is a figure of a material from its least to its most; zero where it is blank.
type Span[Q ~float64] struct {
	Least, Most Q
	Source      gap.Source
}

// Material is a solid insulator as its sources describe it. Blank figures are zero.
type Material struct {
	Name string
	also []string // other names

	// Strength is the short-time strength, the low end judging. It is used against peak
	// and DC as printed, though most sources measured rms: cautious by √2.
	Strength Span[quantity.Field]
	// Tested is the thickness of the specimen; zero where the source does not say.
	Tested quantity.Length
	// Thinnest is down to where thin pieces were seen to gain strength; zero: none.
	Thinnest quantity.Length
	// Thickest is where the figures end; zero: a hundred times the specimen.
	Thickest quantity.Length
	// Exponent is a of E ~ t^−a.
	Exponent     Span[float64]
	Permittivity Span[float64]
	Resistivity  Span[quantity.Resistivity]
	// Others are strengths that other sources give.
	Others []gap.Beside[quantity.Field]
	// Caveats hold wherever the strength judges.
	Caveats []string
}

// Find is the material of a name, upper or lower case, with spaces or hyphens. A name
// that is not known is a lack.
func Find(name string) (Material, error) {
	if strings.TrimSpace(name) == "" {
		return Material{}, lack.Key("spacing.material")
	}
	given := plain(name)
	for _, m := range materials {
		if plain(m.Name) == given || slices.Contains(m.also, given) {
			return m, nil
		}
	}
	why := fmt.Sprintf("no strength of %s is known here: give spacing.strength and spacing.tested_thickness of its maker, or one that is known: %s", name, strings.Join(known(), ", "))
	return Material{}, lack.Because(why, "spacing.strength", "spacing.tested_thickness")
}

// known are the names of the materials whose strength is known.
func known() []string {
	var all []string
	for _, m := range materials {
		if m.Strength.Least > 0 {
			all = append(all, m.Name)
		}
	}
	return all
}

// steepest is the fastest fall of strength with thickness among the known materials, for
// those whose own is not known.
var steepest = span(0.42, 0.42, remember("E ~ t^-0.42, the steepest of the known materials"))

// Of is the material of a part: the one of its name, with the strength and specimen that
// were given for it in place of the printed ones. A name that is not known needs a
// strength.
func Of(g gap.Gap) (Material, error) {
	m, err := Find(g.Material)
	if g.Strength <= 0 {
		return m, err
	}
	if err != nil {
		m = Material{Name: g.Material, Exponent: steepest}
		if m.Name == "" {
			m.Name = "the solid"
		}
	}
	if m.Exponent.Least == 0 { // a material of which only other figures are known
		m.Exponent = steepest
	}
	m.Strength = Span[quantity.Field]{Least: g.Strength, Most: g.Strength, Source: read("strength given in the description")}
	m.Tested, m.Thinnest, m.Thickest, m.Others, m.Caveats = g.Specimen, 0, 0, nil, nil
	return m, nil
}

// Materials are all that are known, by name.
func Materials() []Material { return slices.Clone(materials) }

func plain(name string) string {
	split := func(r rune) bool { return r == ' ' || r == '-' || r == '_' }
	return strings.Join(strings.FieldsFunc(strings.ToLower(name), split), " ")
}

// Relaxation is how long charge stays inside the material, ρ ε, from the least of both:
// seconds of borosilicate to days of PTFE. Blank figures are a lack.
func (m Material) Relaxation() (quantity.Time, error) {
	switch {
	case m.Permittivity.Least == 0:
		return 0, lack.Range("no permittivity of %s was read", m.Name)
	case m.Resistivity.Least == 0:
		return 0, lack.Range("no resistivity of %s was read", m.Name)
	}
	return quantity.Time(float64(m.Resistivity.Least) * vacuumPermittivity * m.Permittivity.Least), nil // electrostatics
}
