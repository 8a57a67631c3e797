package xray

import (
	"slices"
	"strings"

	"kilovet/hv/lack"
)

// Target is what the electrons stop in: its atomic number, and the lines it can add
// to the continuum.
type Target struct {
	Name string
	Z    float64
	// Note says what the atomic number stands for where the target is no element.
	Note string

	series []series
}

// series is a family of characteristic lines: the edge that electrons must pass and
// its main lines, in keV.
type series struct {
	edge  float64
	lines [2]float64
}

// stops lists the targets. Edges and lines (the strongest α and the strongest of the
// harder ones) are from memory of the usual tables; lines below 3.5 keV pass no wall,
// and the K lines of the heavy elements, about a tenth of the continuum they stand in,
// lie within the factor of two.
func stops() []Target {
	iron := []series{{7.112, [2]float64{6.404, 7.058}}}
	return []Target{
		{Name: "graphite", Z: 6},
		{Name: "aluminium", Z: 13},
		{Name: "silicon", Z: 14},
		{Name: "titanium", Z: 22, series: []series{{4.966, [2]float64{4.511, 4.932}}}},
		{Name: "chromium", Z: 24, series: []series{{5.989, [2]float64{5.415, 5.947}}}},
		{Name: "iron", Z: 26, series: iron},
		{Name: "steel", Z: 26, series: iron, Note: "as iron"},
		{Name: "stainless steel", Z: 26, series: iron, Note: "as iron; the mean over 18 % chromium and 10 % nickel is 25.9"},
		{Name: "nickel", Z: 28, series: []series{{8.333, [2]float64{7.478, 8.265}}}},
		{Name: "copper", Z: 29, series: []series{{8.979, [2]float64{8.048, 8.905}}}},
		{Name: "brass", Z: 30, series: []series{{9.659, [2]float64{8.639, 9.572}}}, Note: "as zinc, the heavier part"},
		{Name: "zinc", Z: 30, series: []series{{9.659, [2]float64{8.639, 9.572}}}},
		{Name: "molybdenum", Z: 42, series: []series{{20.000, [2]float64{17.479, 19.608}}}},
		{Name: "rhodium", Z: 45, series: []series{{23.220, [2]float64{20.216, 22.724}}}},
		{Name: "silver", Z: 47, series: []series{{25.514, [2]float64{22.163, 24.942}}}},
		{Name: "tin", Z: 50, series: []series{{29.200, [2]float64{25.271, 28.486}}}},
		{Name: "tantalum", Z: 73, series: []series{{9.881, [2]float64{8.146, 10.895}}}},
		{Name: "tungsten", Z: 74, series: []series{{10.207, [2]float64{8.398, 11.286}}}},
		{Name: "platinum", Z: 78, series: []series{{11.564, [2]float64{9.442, 12.942}}}},
		{Name: "gold", Z: 79, series: []series{{11.919, [2]float64{9.713, 13.382}}}},
		{Name: "lead", Z: 82, series: []series{{13.035, [2]float64{10.552, 14.764}}}},
		{Name: "alumina", Z: 13, Note: "as aluminium, the heavier part"},
		{Name: "borosilicate glass", Z: 14, Note: "as silicon, its heaviest part"},
		{Name: "glass", Z: 20, series: []series{{4.038, [2]float64{3.691, 4.013}}}, Note: "as calcium, the heaviest part of soda-lime glass"},
		{Name: "acrylic", Z: 8, Note: "as oxygen, its heaviest part"},
	}
}

// FindTarget finds a target by its word, whatever its case; an unknown one is a lack
// that names the known ones.
func FindTarget(word string) (Target, error) {
	name := plain(word)
	if name == "carbon" {
		name = "graphite"
	}
	all := stops()
	i := slices.IndexFunc(all, func(t Target) bool { return t.Name == name })
	if i < 0 {
		return Target{}, lack.Range("no yield is known of a target of %q; known are %s", word, strings.Join(Targets(), ", "))
	}
	return all[i], nil
}

// Targets lists the known targets.
func Targets() []string {
	var names []string
	for _, t := range stops() {
		names = append(names, t.Name)
	}
	return names
}
