package rules_test

import (
	"fmt"
	"regexp"
	"strconv"
	"strings"
	"testing"

	"kilovet/rules/rule"
)

// sharpRod is a rod with a flat end at a distance from the floor of a can, its edge rounded
// by a radius where there is one.
func sharpRod(radius, gap, edge, volts float64) []byte {
	end := fmt.Sprintf(`{ from = ["0 mm", "%[2]g mm"] }, { to = ["%[1]g mm", "%[2]g mm"] }`, radius, gap)
	if edge > 0 {
		end = fmt.Sprintf(`{ from = ["0 mm", "%[2]g mm"] }, { to = ["%[3]g mm", "%[2]g mm"] }, { to = ["%[1]g mm", "%[4]g mm"], centre = ["%[3]g mm", "%[4]g mm"], turn = "left" }`, radius, gap, radius-edge, gap+edge)
	}
	return rodEnding(end, radius, 80, volts)
}

func named(t *testing.T, remedy, dimension string) float64 {
	t.Helper()
	m := regexp.MustCompile(regexp.QuoteMeta(dimension) + ` of ([0-9.]+) (mm|µm) in place of`).FindStringSubmatch(remedy)
	if m == nil {
		t.Fatalf("no %s in %q", dimension, remedy)
	}
	v, err := strconv.ParseFloat(m[1], 64)
	if err != nil {
		t.Fatal(err)
	}
	if m[2] == "µm" {
		v /= 1000
	}
	return v
}

func ofRule(t *testing.T, text []byte, id, subject string) (all []rule.Finding) {
	t.Helper()
	for _, f := range reviewed(t, text).Findings {
		if f.Rule == id && strings.HasPrefix(f.Subject, subject) {
			all = append(all, f)
		}
	}
	return all
}

// just reports whether a finding is at its limit or little below.
func just(f rule.Finding) bool { return f.Margin != nil && *f.Margin >= 0 && *f.Margin < 0.15 }

// A sharp edge whose field is too strong is told the radius that is enough for it, and the
// dimensions that are: then its rod is just within the rule.
func TestASharpEdgeNamesItsRadius(t *testing.T) {
	const volts = 25
	before := ofRule(t, sharpRod(5, 10, 0, volts), "field.edge", "gap/rod")
	if len(before) != 1 || before[0].Verdict != rule.Fails {
		t.Fatalf("%+v", before)
	}
	edge := named(t, before[0].Remedy, "edge radius of rod at r 5 mm, z 10 mm")
	rounded := sharpRod(5, 10, edge, volts)
	if left := ofRule(t, rounded, "field.edge", "gap/rod"); len(left) > 0 {
		t.Errorf("still an edge: %+v", left)
	}
	if after := ofRule(t, rounded, "field.strength", "gap/rod"); len(after) != 1 || !just(after[0]) {
		t.Errorf("rounded by %g mm: %+v", edge, after)
	}
	for dimension, text := range map[string][]byte{
		"radius of rod":            sharpRod(named(t, before[0].Remedy, "radius of rod"), 10, 0, volts),
		"distance of rod from can": sharpRod(5, named(t, before[0].Remedy, "distance of rod from can"), 0, volts),
	} {
		if after := ofRule(t, text, "field.edge", "gap/rod"); len(after) != 1 || !just(after[0]) {
			t.Errorf("%s: %+v", dimension, after)
		}
	}
}

// An insulator that is used too hard is told which dimension is enough.
func TestASolidNamesADimension(t *testing.T) {
	around := func(pin float64) []byte {
		text := strings.Replace(string(described(t, "plate")), "[[field.boundary]]", `[[field.dielectrics]]
name         = "disc"
permittivity = 9.4
resistivity  = "1e12 ohm m"
material     = "alumina"
profile      = [{ from = ["4 mm", "30 mm"] }, { to = ["50 mm", "30 mm"] }, { to = ["50 mm", "36 mm"] }, { to = ["4 mm", "36 mm"] }, { to = ["4 mm", "30 mm"] }]

[[field.boundary]]`, 1)
		return []byte(strings.ReplaceAll(text, `["4 mm"`, fmt.Sprintf(`["%g mm"`, pin)))
	}
	before := ofRule(t, around(4), "field.solid", "gun lead-through/disc")
	if len(before) != 1 || before[0].Verdict != rule.Fails {
		t.Fatalf("%+v", before)
	}
	pin := named(t, before[0].Remedy, "radius of pin")
	if after := ofRule(t, around(pin), "field.solid", "gun lead-through/disc"); len(after) != 1 || !just(after[0]) {
		t.Errorf("pin of %g mm: %+v", pin, after)
	}
}

// Of several places above their limit the farthest is told what to do, the others that it
// comes first.
func TestTheFarthestAboveItsLimitComesFirst(t *testing.T) {
	over, referred := 0, 0
	for _, f := range ofRule(t, rodAt(5, 3, 30, 60), "field.strength", "gap/") {
		if f.Margin != nil && *f.Margin < 0 {
			over++
			if strings.Contains(f.Remedy, "first, which is farther above its limit") {
				referred++
			}
		}
	}
	if over != 2 || referred != 1 {
		t.Errorf("%d above their limit, %d of them referred to the other", over, referred)
	}
}
