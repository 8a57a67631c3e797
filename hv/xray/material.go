package xray

import (
	"math"
	"slices"
	"strings"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Material is what a layer of a wall is made of.
type Material struct {
	Name string
	// Note says what stands in for it, or from where it is known; empty where the
	// table and the density are of the material itself.
	Note string
	// Mark says how its coefficients are known: "read" or "memory".
	Mark string

	density float64 // g/cm³
	parts   []part
	light   bool // scatter, not fluorescence, is what µen leaves out of µ
}

// part is a share by mass.
type part struct {
	share float64
	table table
}

// MassAttenuation is a mass attenuation coefficient in square metres per kilogram.
type MassAttenuation float64

func pure(t table) []part { return []part{{1, t}} }

// known lists the materials; densities of NIST's tables 1 and 2 unless noted.
func known() []Material {
	return []Material{
		{Name: "aluminium", density: 2.699, parts: pure(aluminiumTable), light: true},
		{Name: "alumina", density: 3.7, parts: []part{{0.53, aluminiumTable}, {0.47, waterTable}}, light: true,
			Note: "53 % aluminium by mass, water in place of the oxygen (attenuates a little less), 3.7 g/cm3 as technical ceramics have (memory)"},
		{Name: "iron", density: 7.874, parts: pure(ironTable)},
		{Name: "steel", density: 7.85, parts: pure(ironTable), Note: "as iron of 7.85 g/cm3"},
		{Name: "stainless steel", density: 7.7, parts: pure(ironTable),
			Note: "as iron of 7.7 g/cm3: 19 % chromium and 9 % nickel in 7.93 g/cm3 attenuate like that (chromium from memory)"},
		{Name: "copper", density: 8.96, parts: pure(copperTable)},
		{Name: "nickel", density: 8.902, parts: pure(nickelTable)},
		{Name: "molybdenum", density: 10.22, parts: pure(molybdenumTable)},
		{Name: "tungsten", density: 19.3, parts: pure(tungstenTable)},
		{Name: "lead", density: 11.35, parts: pure(leadTable)},
		{Name: "borosilicate glass", density: 2.23, parts: pure(borosilicateTable), light: true},
		{Name: "glass", density: 2.23, parts: pure(borosilicateTable), light: true, Note: "as borosilicate glass, the lightest of the usual ones"},
		{Name: "lead glass", density: 6.22, parts: pure(leadGlassTable),
			Note: "75 % lead by mass, 6.22 g/cm3 (memory); give a lighter one as the lead its maker states it is worth"},
		{Name: "acrylic", density: 1.19, parts: pure(acrylicTable), light: true},
		{Name: "water", density: 1, parts: pure(waterTable), light: true},
		{Name: "air", density: 0.001205, parts: pure(airTable), light: true, Note: "dry, 20 degC, sea level"},
		{Name: "beryllium", density: 1.848, parts: pure(berylliumTable), Mark: "memory", Note: "coefficients and density from memory"},
	}
}

// synonyms are other words for a material.
var synonyms = map[string]string{
	"aluminum": "aluminium", "mild steel": "steel", "stainless": "stainless steel", "borosilicate": "borosilicate glass",
	"pmma": "acrylic", "acrylic glass": "acrylic", "dry air": "air",
}

// FindMaterial finds a material by its word, whatever its case; an unknown one is a
// lack that names the known ones.
func FindMaterial(word string) (Material, error) {
	name := plain(word)
	all := known()
	i := slices.IndexFunc(all, func(m Material) bool { return m.Name == name })
	if i < 0 {
		return Material{}, lack.Range("no attenuation is known of %q; known are %s", word, strings.Join(Materials(), ", "))
	}
	m := all[i]
	if m.Mark == "" {
		m.Mark = "read"
	}
	return m, nil
}

func plain(word string) string {
	name := strings.ToLower(strings.Join(strings.Fields(word), " "))
	if other, ok := synonyms[name]; ok {
		return other
	}
	return name
}

// Materials lists the known materials.
func Materials() []string {
	var names []string
	for _, m := range known() {
		names = append(names, m.Name)
	}
	return names
}

// MassAttenuation is µ/ρ at a photon energy of 1 to 150 keV, else a lack. Between
// printed rows it is a straight line in logarithms, above 3 keV up to 4 % too high
// between rows and 1 % too low; at an edge it is that of the upper side.
func (m Material) MassAttenuation(e quantity.ElectronEnergy) (MassAttenuation, error) {
	if err := tabulated(e); err != nil {
		return 0, err
	}
	return MassAttenuation(m.mass(float64(e)/1e3, attenuation) / 10), nil // cm²/g to m²/kg
}

// HalfValueLayer is the thickness ln 2/µ that halves a beam of one photon energy.
func (m Material) HalfValueLayer(e quantity.ElectronEnergy) (quantity.Length, error) {
	if err := tabulated(e); err != nil {
		return 0, err
	}
	return quantity.Length(math.Ln2 / m.linear(float64(e)/1e3) / 100), nil
}

func tabulated(e quantity.ElectronEnergy) error {
	if !quantity.AtLeast(e, lowestEnergy*1e3) || !quantity.AtMost(e, highestEnergy*1e3) {
		return lack.Range("attenuation is tabulated from 1 to 150 keV, not at %s", quantity.Text(e))
	}
	return nil
}

// mass is a mass coefficient in cm²/g at an energy in keV.
func (m Material) mass(energy float64, of column) (sum float64) {
	x := math.Log(energy)
	for _, p := range m.parts {
		sum += p.share * math.Exp(p.table.at(energy, of).ln(x))
	}
	return sum
}

// linear is µ in 1/cm at an energy in keV.
func (m Material) linear(energy float64) float64 { return m.density * m.mass(energy, attenuation) }
