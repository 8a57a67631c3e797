package rules_test

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"kilovet/rules"
	"kilovet/rules/exhibit"
	"kilovet/rules/rule"
)

// bare is a lead-through of a pin in vacuum, by its dimensions in millimetres.
func bare(pin, hole, edge, volts float64, more string) string {
	return fmt.Sprintf(`format = 1
title = "lead"
[[feedthrough]]
name = "lead"
voltage = "%g kV"
plate_thickness = "6 mm"
pin = { radius = "%.9g mm" }
hole = { radius = "%.9g mm", edge_radius = "%.9g mm" }
vacuum_side = { length = "17 mm" }
%s`, volts, pin, hole, edge, more)
}

func fieldFigure(r *rules.Review, id, subject string) float64 {
	for _, f := range r.Figures {
		if f.ID == id && f.Subject == subject {
			return f.Value
		}
	}
	return math.NaN()
}

// The feedthroughs of the reference cases, built from their dimensions: pin 3 mm, hole
// 10 mm, edge 3 mm, bare and with a sleeve of 3.5 to 7 mm that leaves an annulus of half
// a millimetre at the pin; independent finite elements, whose walls stand elsewhere.
func TestBuiltFeedthroughs(t *testing.T) {
	const sleeve = `sleeve = { material = "alumina", permittivity = 9.4, inner_radius = "3.5 mm", outer_radius = "7 mm", inner_gap = "vacuum", outer_gap = "vacuum" }`
	for _, c := range []struct {
		more       string
		pin, plate float64 // kV/mm for a kilovolt
	}{
		{"", 0.243279231, 0.140412546},
		{sleeve, 0.41148427, 0.26332614},
	} {
		r := reviewed(t, []byte(bare(3, 10, 3, 1, c.more)))
		if got := fieldFigure(r, "field.peak", "lead, vacuum side/pin") / 1e6; math.Abs(got/c.pin-1) > 5e-3 {
			t.Errorf("%q: pin %g, want %g", c.more, got, c.pin)
		}
		if got := fieldFigure(r, "field.peak", "lead, vacuum side/plate") / 1e6; math.Abs(got/c.plate-1) > 5e-3 {
			t.Errorf("%q: plate %g, want %g", c.more, got, c.plate)
		}
	}
}

func answersOf(r *rules.Review) map[string]float64 {
	needed := map[string]float64{}
	for _, table := range r.Tables {
		if table.ID != "field.answers" {
			continue
		}
		for _, row := range table.Rows {
			if v := row[3].Value; v != nil {
				needed[row[0].Text] = *v * 1e3
			}
		}
	}
	return needed
}

func strengthOf(r *rules.Review, subject string) rule.Finding {
	for _, f := range r.Findings {
		if f.Rule == "field.strength" && f.Subject == subject {
			return f
		}
	}
	return rule.Finding{}
}

// What an answer says is enough is enough, and not by much.
func TestAnswersMeetTheRule(t *testing.T) {
	const pin, hole, edge, volts = 3, 10, 2, 50
	r := reviewed(t, []byte(bare(pin, hole, edge, volts, "")))
	f := strengthOf(r, "lead, vacuum side/pin")
	if f.Verdict != rule.Fails || !strings.Contains(f.Remedy, "one of these is enough") {
		t.Fatalf("%s: %s", f.Verdict, f.Remedy)
	}
	needed := answersOf(r)
	if len(needed) == 0 {
		t.Fatal("no answers")
	}
	for name, v := range needed {
		var changed string
		switch name {
		case "pin radius":
			changed = bare(v, hole, edge, volts, "")
		case "hole radius":
			changed = bare(pin, v, edge, volts, "")
		case "edge radius of the hole", "plate thickness", "length of the vacuum side":
			t.Errorf("%s of %g mm: a bare pin has its field by its own radius and the hole's", name, v)
			continue
		default:
			t.Errorf("%s of %g mm cannot help", name, v)
			continue
		}
		after := strengthOf(reviewed(t, []byte(changed)), "lead, vacuum side/pin")
		if after.Provided == nil || after.Verdict == rule.Fails || after.Provided.Value < 0.9*after.Needed.Value {
			t.Errorf("%s of %g mm: %s, %s", name, v, after.Verdict, after.Because)
		}
	}
}

// The field of the same voltages goes with the size of a drawing to the power −1.
func TestFieldGoesWithTheSizeOfTheDrawing(t *testing.T) {
	r := reviewed(t, described(t, "plate"))
	for _, table := range r.Tables {
		if table.ID == "field.answers" {
			if p := table.Rows[0][2].Value; p == nil || math.Abs(*p+1) > 1e-6 {
				t.Errorf("power %v", p)
			}
			return
		}
	}
	t.Error("no answers")
}

// Pictures hold outlines, lines of potential and the weakest point, within the figure.
func TestFieldPictures(t *testing.T) {
	r := reviewed(t, described(t, "plate"))
	found := map[exhibit.Kind]int{}
	for _, c := range r.Curves {
		if c.ID != "field.picture" && c.ID != "field.weakest" {
			continue
		}
		for _, l := range c.Lines {
			found[l.Kind]++
			for _, p := range l.Points {
				if p.X < -1e-9 || p.X > 0.0501 || p.Y < -1e-9 || p.Y > 0.0601 {
					t.Errorf("%s: %s at %v", c.ID, l.Name, p)
				}
			}
		}
		if len(c.Areas) == 0 || len(c.Marks) == 0 || !strings.HasPrefix(c.Marks[0].Name, "weakest point") {
			t.Errorf("%s: %d areas, marks %v", c.ID, len(c.Areas), c.Marks)
		}
	}
	if found[exhibit.Outline] < 2 || found[exhibit.Equipotential] < 9 || found[exhibit.CriticalLine] == 0 {
		t.Errorf("%v", found)
	}
}

// brazed is a lead-through whose sleeve, 16 mm long beyond a plate of 8 mm,
// fills its hole of 6 mm and leaves a tenth of a millimetre at the pin of 2 mm.
func brazed(edge, joint string) []byte {
	return []byte(`format = 1
title = "lead"
[[feedthrough]]
name = "lead"
voltage = "1 kV"
plate_thickness = "8 mm"
pin = { radius = "2 mm" }
hole = { radius = "6 mm"` + edge + ` }
vacuum_side = { length = "16 mm" }
sleeve = { material = "alumina", permittivity = 9.4, inner_radius = "2.1 mm", inner_gap = "vacuum"` + joint + ` }
`)
}

// A sleeve that fills its hole: with a square edge against independent finite elements;
// with a rounded one it takes where the filling ends, and the more is filled the less
// field the wedge has.
func TestSleeveThatFillsItsHole(t *testing.T) {
	square := reviewed(t, brazed("", ""))
	for id, want := range map[string]float64{"field.peak lead, vacuum side/pin": 2.98648863e6, "field.edge lead, vacuum side/plate at r 6 mm, z 4 mm": 0.680956751e6, "field.exponent lead, vacuum side/plate": -0.46934592} {
		id, subject, _ := strings.Cut(id, " ")
		if got := fieldFigure(square, id, subject); !(math.Abs(got/want-1) < 2e-3) {
			t.Errorf("%s of %s %g, want %g", id, subject, got, want)
		}
	}
	const round = `, edge_radius = "2 mm"`
	if peak := fieldFigure(reviewed(t, brazed(round, "")), "field.peak", "lead, vacuum side/plate"); !math.IsNaN(peak) {
		t.Errorf("%g V/m in a wedge of no width", peak)
	}
	little := fieldFigure(reviewed(t, brazed(round, `, joint_width = "0.02 mm"`)), "field.peak", "lead, vacuum side/plate")
	much := fieldFigure(reviewed(t, brazed(round, `, joint_width = "0.5 mm"`)), "field.peak", "lead, vacuum side/plate")
	if !(much < 0.8*little && little < 4e6) {
		t.Errorf("%g V/m with little filled, %g with much", little, much)
	}
}
