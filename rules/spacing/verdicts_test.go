package spacing_test

import (
	"fmt"
	"regexp"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chain"
	"kilovet/hv/chance"
	"kilovet/rules/evidence"
	"kilovet/rules/rule"
	"kilovet/rules/spacing"
)

// findings judges a description by the rules of this family.
func findings(t testing.TB, text string) map[string]rule.Finding {
	t.Helper()
	c, faults := chain.Read([]byte(text))
	if faults != nil {
		t.Fatalf("%v\n%s", faults, text)
	}
	all := map[string]rule.Finding{}
	e := evidence.New(c)
	for _, r := range spacing.Rules() {
		for _, f := range r.Judge(e).Findings {
			all[f.Rule+" | "+f.Subject] = f
		}
	}
	return all
}

// site is the head of a description at an altitude.
func site(altitude float64) string {
	return fmt.Sprintf("format = 1\n[site]\naltitude = %q\nair_temperature = \"30 degC\"\npollution_degree = 2\n", fmt.Sprintf("%.6g m", altitude))
}

func mm(v float64) string { return fmt.Sprintf("%q", fmt.Sprintf("%.9g mm", v)) }

// gap is one drawn spacing whose keys can be bettered.
type drawn struct {
	medium, material, surface, shape, finish string
	altitude, voltage, clearance, creepage   float64 // m, V, mm
	radius                                   float64 // mm
	conditioned                              bool
}

func (d drawn) text() string {
	b := site(d.altitude) + fmt.Sprintf("[[spacing]]\nname = \"g\"\nvoltage = \"%.9g V\"\nmedium = %q\nclearance = %s\ncreepage = %s\nmaterial = %q\n", d.voltage, d.medium, mm(d.clearance), mm(d.creepage), d.material)
	if d.shape != "" {
		b += fmt.Sprintf("shape = { kind = %q, %s = %s }\n", d.shape, map[string]string{"rounded edge": "edge_radius", "point-plane": "tip_radius"}[d.shape]+strings.Repeat("radius", btoi(d.shape == "sphere-plane" || d.shape == "cylinder-plane")), mm(d.radius))
	}
	switch d.medium {
	case "air":
		b += fmt.Sprintf("electrode_surface = %q\n", d.surface)
	case "vacuum":
		b += fmt.Sprintf("finish = %q\nconditioned = %v\nstressed_area = \"80 mm2\"\njunction_angle = \"80 deg\"\n", d.finish, d.conditioned)
	}
	return b
}

func btoi(b bool) int {
	if b {
		return 1
	}
	return 0
}

func draw(t *rapid.T) drawn {
	return drawn{
		medium:   rapid.SampledFrom([]string{"air", "vacuum", "oil"}).Draw(t, "medium"),
		material: rapid.SampledFrom([]string{"FR-4", "PTFE"}).Draw(t, "material"),
		surface:  rapid.SampledFrom([]string{"weathered", "stranded"}).Draw(t, "surface"),
		shape:    rapid.SampledFrom([]string{"rounded edge", "sphere-plane", "cylinder-plane", "point-plane"}).Draw(t, "shape"),
		finish:   "machined", altitude: rapid.Float64Range(100, 4000).Draw(t, "altitude"),
		voltage: rapid.Float64Range(1e3, 40e3).Draw(t, "voltage"), clearance: rapid.Float64Range(3, 200).Draw(t, "clearance"),
		creepage: rapid.Float64Range(200, 600).Draw(t, "creepage"), radius: rapid.Float64Range(0.3, 30).Draw(t, "radius"),
	}
}

// A longer way, a lower place, a cleaner and rounder electrode, a better material, polish
// and conditioning never make a verdict of a spacing worse.
func TestNothingBetterIsJudgedWorse(t *testing.T) {
	chance.Check(t, func(rt *rapid.T) {
		d := draw(rt)
		base := findings(t, d.text())
		better := map[string]func(drawn) drawn{
			"clearance": func(d drawn) drawn { d.clearance *= 1.3; return d },
			"creepage":  func(d drawn) drawn { d.creepage *= 1.3; return d },
			"altitude":  func(d drawn) drawn { d.altitude /= 2; return d },
			"radius":    func(d drawn) drawn { d.radius *= 1.3; return d },
			"surface":   func(d drawn) drawn { d.surface = "smooth"; return d },
			"material":  func(d drawn) drawn { d.material = "PTFE"; return d },
			"finish":    func(d drawn) drawn { d.finish = "polished"; return d },
			"both":      func(d drawn) drawn { d.finish, d.conditioned = "polished", true; return d },
		}
		what := rapid.SampledFrom([]string{"clearance", "creepage", "altitude", "radius", "surface", "material", "finish", "both"}).Draw(rt, "better")
		after := findings(t, better[what](d).text())
		for key, was := range base {
			is, there := after[key]
			if there && rule.Graver(is.Verdict, was.Verdict) {
				rt.Fatalf("a better %s: %s was %s, is %s\n%s\n%s", what, key, was.Verdict, is.Verdict, is.Because, d.text())
			}
		}
	})
}

var resize = regexp.MustCompile(`make ([a-z_.]+) ([0-9.]+ [µmc]?m) or more`)

// applied puts the size that a remedy names in the place of the one that is there.
func applied(t *testing.T, text, remedy string) string {
	t.Helper()
	m := resize.FindStringSubmatch(remedy)
	if m == nil {
		t.Fatalf("no size in %q", remedy)
	}
	table, key, inner := m[1][:strings.LastIndex(m[1], ".")], m[1][strings.LastIndex(m[1], ".")+1:], ""
	if _, sub, nested := strings.Cut(table, "."); nested {
		inner = sub + ` *= *\{.*?`
	}
	at := regexp.MustCompile(`(?s)(\[\[` + strings.SplitN(table, ".", 2)[0] + `\]\].*?\b` + inner + `\b` + key + ` *= *)"[^"]*"`)
	if !at.MatchString(text) {
		t.Fatalf("no %s in\n%s", m[1], text)
	}
	return at.ReplaceAllString(text, `${1}"`+m[2]+`"`)
}

// Doing what a remedy says is enough: the finding then meets, or only its assumptions
// keep it marginal.
func TestRemediesAreEnough(t *testing.T) {
	lead := func(air, vacuum, outer, strip string) string {
		return site(310) + fmt.Sprintf(`[[feedthrough]]
name = "lead"
voltage = "20 kV"
pin = { radius = "12 mm" }
hole = { radius = %q }
sleeve = { material = "alumina", outer_radius = %q, strength = "17 kV/mm", tested_thickness = "3 mm" }
air_side = { length = %q, ribs = { count = 2, depth = "6 mm", width = "4 mm" } }
vacuum_side = { length = %q, junction_angle = "45 deg" }
strip = { length = %q, material = "polyethylene" }
`, outer, outer, air, vacuum, strip)
	}
	for name, c := range map[string]struct{ text, finding string }{
		"clearance in air":    {site(310) + "[[spacing]]\nname = \"g\"\nvoltage = \"20 kV\"\nmedium = \"air\"\nclearance = \"20 mm\"\ncreepage = \"400 mm\"\nmaterial = \"PTFE\"\n", "spacing.clearance | g"},
		"creepage in air":     {site(310) + "[[spacing]]\nname = \"g\"\nvoltage = \"20 kV\"\nmedium = \"air\"\nclearance = \"60 mm\"\ncreepage = \"90 mm\"\nmaterial = \"PTFE\"\n", "spacing.creepage | g"},
		"breakdown in air":    {site(310) + "[[spacing]]\nname = \"g\"\nvoltage = \"20 kV\"\nmedium = \"air\"\nclearance = \"20 mm\"\ncreepage = \"400 mm\"\nmaterial = \"PTFE\"\n", "spacing.breakdown | g"},
		"breakdown in vacuum": {site(310) + "[[spacing]]\nname = \"g\"\nvoltage = \"60 kV\"\nmedium = \"vacuum\"\nclearance = \"3 mm\"\nshape = { kind = \"rounded edge\", edge_radius = \"5 mm\" }\n", "spacing.breakdown | g"},
		"clearance in oil":    {site(310) + "[[spacing]]\nname = \"g\"\nvoltage = \"20 kV\"\nmedium = \"oil\"\nclearance = \"8 mm\"\nshape = { kind = \"rounded edge\", edge_radius = \"15 mm\" }\n", "spacing.clearance | g"},
		"air side":            {lead("30 mm", "200 mm", "26 mm", "400 mm"), "spacing.clearance | lead: air side"},
		"vacuum side":         {lead("90 mm", "30 mm", "26 mm", "400 mm"), "spacing.breakdown | lead: vacuum side"},
		"sleeve":              {lead("90 mm", "200 mm", "14 mm", "400 mm"), "spacing.clearance | lead: sleeve"},
		"strip":               {lead("90 mm", "200 mm", "26 mm", "90 mm"), "spacing.creepage | lead: cable strip"},
	} {
		t.Run(name, func(t *testing.T) {
			before := findings(t, c.text)[c.finding]
			if before.Verdict == rule.Meets || before.Verdict == "" {
				t.Fatalf("nothing to remedy: %+v", before)
			}
			text := applied(t, c.text, before.Remedy)
			if name == "sleeve" { // the hole follows
				text = strings.ReplaceAll(text, `hole = { radius = "14 mm" }`, `hole = { radius = "90 mm" }`)
				text = strings.ReplaceAll(text, `outer_radius`, `outer_gap = "vacuum", outer_radius`)
			}
			after := findings(t, text)[c.finding]
			if after.Verdict != rule.Meets && (after.Verdict != rule.Marginal || len(after.Assumptions) == 0 || *after.Margin < 0.099) {
				t.Errorf("%s\nafter it: %s, margin %v, %s", before.Remedy, after.Verdict, after.Margin, after.Because)
			}
		})
	}
}

// Narrow grooves count as bridged: the same ribs 0.8 mm apart at pollution degree 2, where
// X is 1 mm (IEC 61010-1 Table C.1), give their flanks away.
func TestNarrowGroovesAreBridged(t *testing.T) {
	with := func(width string) rule.Finding {
		return findings(t, site(310)+fmt.Sprintf(`[[spacing]]
name = "g"
voltage = "10 kV"
medium = "air"
clearance = "40 mm"
creepage = "160 mm"
material = "FR-4"
ribs = { count = 10, depth = "6 mm", width = %q }
`, width))["spacing.creepage | g"]
	}
	if wide, narrow := with("1.2 mm"), with("0.8 mm"); wide.Provided.Value != 0.16 || narrow.Provided.Value < 0.0399 || narrow.Provided.Value > 0.0401 || !strings.Contains(narrow.Because, "bridged") {
		t.Errorf("wide %v, narrow %v: %s", wide.Provided, narrow.Provided, narrow.Because)
	}
}

// What is not known of a feedthrough is unassessed, in its own keys.
func TestFeedthroughsFailClosed(t *testing.T) {
	all := findings(t, site(310)+`[[feedthrough]]
name = "lead"
voltage = "20 kV"
pin = { radius = "3 mm" }
hole = { radius = "22 mm" }
sleeve = { material = "unobtainium", inner_radius = "4 mm" }
air_side = { length = "60 mm" }
vacuum_side = { length = "60 mm" }
`)
	for key, missing := range map[string]string{
		"spacing.creepage | lead: air side":    "feedthrough.air_side.cti",
		"spacing.creepage | lead: vacuum side": "",
		"spacing.clearance | lead: sleeve":     "",
	} {
		f := all[key]
		if f.Verdict != rule.Unassessed || missing != "" && !strings.Contains(strings.Join(f.Missing, " "), "cti") {
			t.Errorf("%s: %s, missing %v: %s", key, f.Verdict, f.Missing, f.Because)
		}
	}
	if f := all["feedthrough.annulus | lead: pin to sleeve"]; f.Verdict != rule.Fails {
		t.Errorf("1 mm of air under 20 kV: %s %s", f.Verdict, f.Because)
	}
	if f := all["feedthrough.weakest | lead"]; f.Verdict != rule.Fails || !strings.Contains(f.Because, "pin to sleeve") {
		t.Errorf("weakest: %s %s", f.Verdict, f.Because)
	}
	for key, f := range all {
		if strings.Contains(f.Because+f.Remedy+strings.Join(f.Missing, " "), "spacing.") {
			t.Errorf("%s speaks in keys of a spacing: %s / %s / %v", key, f.Because, f.Remedy, f.Missing)
		}
	}
}

// An angle above 90 degrees at the negative electrode fails; behind a shield it is
// marginal, and so it is where none is given.
func TestJunctions(t *testing.T) {
	with := func(keys string) rule.Verdict {
		return findings(t, site(310)+"[[spacing]]\nname = \"g\"\nvoltage = \"20 kV\"\nmedium = \"vacuum\"\ncreepage = \"60 mm\"\nmaterial = \"alumina\"\n"+keys)["spacing.junction | g"].Verdict
	}
	for keys, want := range map[string]rule.Verdict{
		"junction_angle = \"45 deg\"\n": rule.Meets, "junction_angle = \"90 deg\"\n": rule.Meets, "junction_angle = \"91 deg\"\n": rule.Fails,
		"junction_angle = \"91 deg\"\nshielded = true\n": rule.Marginal, "": rule.Marginal,
	} {
		if got := with(keys); got != want {
			t.Errorf("%q: %s, want %s", keys, got, want)
		}
	}
}

// BenchmarkForty is the whole evidence of forty spacings with shapes, streamer integrals
// and all.
func BenchmarkForty(b *testing.B) {
	text := site(310)
	for i := range 40 {
		text += fmt.Sprintf("[[spacing]]\nname = \"g%d\"\nvoltage = \"%d V\"\nmedium = \"air\"\nclearance = \"%d mm\"\ncreepage = \"400 mm\"\nmaterial = \"PTFE\"\nshape = { kind = \"sphere-plane\", radius = \"%d mm\" }\n", i, 1000+500*i, 20+3*i, 2+i)
	}
	c, faults := chain.Read([]byte(text))
	if faults != nil {
		b.Fatal(faults)
	}
	for b.Loop() {
		e := evidence.New(c)
		for _, s := range e.Spacings() {
			if _, err := e.Spacing(s); err != nil {
				b.Fatal(err)
			}
		}
	}
}
