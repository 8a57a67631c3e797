package spacing_test

import (
	"fmt"
	"math"
	"slices"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/rules/rule"
)

// anyGap is a spacing of any medium and shape over the whole range of sizes that people try.
type anyGap struct {
	medium, material, surface, shape, finish string
	altitude, voltage, clearance, creepage   float64 // m, V, mm
	radius, pressure                         float64 // mm, mbar
	conditioned, symmetric, tested           bool
	class, sharper                           string // sharper: in air, where one electrode is
}

var roundShapes = map[string]string{"rounded edge": "edge_radius", "point-plane": "tip_radius", "sphere-plane": "radius", "sphere-sphere": "radius", "cylinder-plane": "radius", "parallel cylinders": "radius"}

func (d anyGap) text() string {
	medium, gas, _ := strings.Cut(d.medium, ": ")
	b := site(d.altitude) + fmt.Sprintf("[[spacing]]\nname = \"g\"\nvoltage = \"%.9g V\"\nmedium = %q\nclearance = %s\n", d.voltage, medium, mm(d.clearance))
	if d.material != "" {
		b += fmt.Sprintf("creepage = %s\nmaterial = %q\n", mm(d.creepage), d.material)
	}
	switch key := roundShapes[d.shape]; {
	case d.shape == "sphere-sphere" && d.symmetric:
		b += fmt.Sprintf("shape = { kind = \"sphere-sphere\", radius = %s, earthed = false }\n", mm(d.radius))
	case key != "":
		b += fmt.Sprintf("shape = { kind = %q, %s = %s }\n", d.shape, key, mm(d.radius))
	case d.shape == "plates":
		b += "shape = { kind = \"plates\" }\n"
	case d.shape != "":
		b += fmt.Sprintf("shape = { kind = %q, inner_radius = %s, outer_radius = %s }\n", d.shape, mm(d.radius), mm(d.radius+d.clearance))
	}
	if d.class != "" {
		b += fmt.Sprintf("insulation = %q\n", d.class)
	}
	if d.sharper != "" && (medium == "air" || d.medium == "gas: air") && !slices.Contains([]string{"plates", "sphere-sphere", "parallel cylinders"}, d.shape) {
		b += fmt.Sprintf("sharper_electrode = %q\n", d.sharper)
	}
	if d.tested {
		b += "impulse_tested = true\n"
	}
	switch medium {
	case "gas":
		b += fmt.Sprintf("gas = %q\npressure = \"%.9g mbar\"\nelectrode_surface = %q\n", gas, d.pressure, d.surface)
	case "air":
		b += fmt.Sprintf("electrode_surface = %q\n", d.surface)
	case "vacuum":
		b += fmt.Sprintf("finish = %q\nconditioned = %v\nstressed_area = \"80 mm2\"\njunction_angle = \"80 deg\"\n", d.finish, d.conditioned)
	}
	return b
}

func drawAny(t *rapid.T) anyGap {
	decades := func(low, high float64, name string) float64 {
		return math.Pow(10, rapid.Float64Range(math.Log10(low), math.Log10(high)).Draw(t, name))
	}
	shapes := []string{"", "plates", "coaxial", "concentric spheres"}
	for s := range roundShapes {
		shapes = append(shapes, s)
	}
	slices.Sort(shapes)
	d := anyGap{
		medium:   rapid.SampledFrom([]string{"air", "air", "printed board", "vacuum", "oil", "solid", "gas: air", "gas: nitrogen", "gas: sulphur hexafluoride", "gas: helium", "gas: argon", "gas: hydrogen", "gas: carbon dioxide"}).Draw(t, "medium"),
		material: rapid.SampledFrom([]string{"FR-4", "PTFE", "alumina", ""}).Draw(t, "material"),
		surface:  rapid.SampledFrom([]string{"weathered", "stranded"}).Draw(t, "surface"),
		shape:    rapid.SampledFrom(shapes).Draw(t, "shape"),
		finish:   "machined", altitude: rapid.Float64Range(0, 9000).Draw(t, "altitude"),
		voltage: decades(100, 200e3, "voltage"), clearance: decades(0.05, 1500, "clearance"),
		radius: decades(0.02, 300, "radius"), pressure: decades(20, 8e3, "pressure"),
	}
	d.class = rapid.SampledFrom([]string{"", "functional", "basic", "reinforced"}).Draw(t, "class")
	d.sharper = rapid.SampledFrom([]string{"", "positive", "negative"}).Draw(t, "sharper")
	d.symmetric = rapid.Bool().Draw(t, "symmetric")
	d.tested = rapid.Bool().Draw(t, "tested")
	d.creepage = d.clearance * decades(1, 10, "creepage over clearance")
	return d
}

// One step to the better never makes a verdict worse, unassessed counted as worse than
// marginal: in every medium, with and without shape and surface, over all sizes. A fixed
// outer radius is another property (coaxial past R/r = e), and so are rarefied gases.
func TestNothingBetterIsJudgedWorseAnywhere(t *testing.T) {
	better := map[string]func(anyGap) anyGap{
		"clearance": func(d anyGap) anyGap { d.clearance *= 1.3; d.creepage = max(d.creepage, d.clearance); return d },
		"creepage":  func(d anyGap) anyGap { d.creepage *= 1.3; return d },
		"altitude":  func(d anyGap) anyGap { d.altitude /= 2; return d },
		"radius":    func(d anyGap) anyGap { d.radius *= 1.3; return d },
		"surface":   func(d anyGap) anyGap { d.surface = "smooth"; return d },
		"material": func(d anyGap) anyGap {
			if d.material == "FR-4" && d.medium != "solid" && d.medium != "vacuum" { // of a surface that tracks less
				d.material = "PTFE"
			}
			return d
		},
		"voltage": func(d anyGap) anyGap {
			if !strings.HasPrefix(d.medium, "gas: ") { // whose laws have holes between two voltages
				d.voltage /= 1.3
			}
			return d
		},
		"class": func(d anyGap) anyGap {
			if d.class == "reinforced" {
				d.class = "basic"
			}
			return d
		},
		"polarity": func(d anyGap) anyGap {
			if d.sharper == "positive" {
				d.sharper = "negative"
			}
			return d
		},
		"test":     func(d anyGap) anyGap { d.tested = true; return d },
		"symmetry": func(d anyGap) anyGap { d.symmetric = true; return d },
		"finish":   func(d anyGap) anyGap { d.finish = "polished"; return d },
		"both":     func(d anyGap) anyGap { d.finish, d.conditioned = "polished", true; return d },
	}
	names := []string{"clearance", "creepage", "altitude", "radius", "surface", "material", "finish", "both", "voltage", "class", "polarity", "symmetry", "test"}
	chance.Check(t, func(rt *rapid.T) {
		d := drawAny(rt)
		what := rapid.SampledFrom(names).Draw(rt, "better")
		base, after := findings(t, d.text()), findings(t, better[what](d).text())
		for key, was := range base {
			if is, there := after[key]; there && rule.Graver(is.Verdict, was.Verdict) {
				rt.Fatalf("a better %s: %s was %s (%s), is %s (%s)\n%s", what, key, was.Verdict, was.Because, is.Verdict, is.Because, d.text())
			}
		}
	})
}
