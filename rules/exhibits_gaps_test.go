package rules_test

import (
	"fmt"
	"math"
	"slices"
	"strings"
	"testing"

	"kilovet/hv/quantity"
	"kilovet/insulation/shape"
	"kilovet/rules"
	"kilovet/rules/exhibit"
)

func gapCurvesOf(r *rules.Review) (all []exhibit.Curve) {
	for _, c := range r.Curves {
		if c.ID == "spacing.field" {
			all = append(all, c)
		}
	}
	return all
}

// summed is the voltage that the fields of a line add up to.
func summed(l exhibit.Line) float64 {
	var places []shape.Sample
	for _, p := range l.Points {
		places = append(places, shape.Sample{Along: quantity.Length(p.X), Field: quantity.Field(p.Y)})
	}
	return float64(shape.Across(places))
}

// Each line begins with the field that the table names and carries its voltage.
func TestFieldsOfGapsAreThoseThatAreJudged(t *testing.T) {
	r := reviewed(t, described(t, "column"))
	curves := gapCurvesOf(r)
	if len(curves) < 4 {
		t.Fatalf("%d curves", len(curves))
	}
	for _, c := range curves {
		if got, want := c.Lines[0].Points[0].Y, figureOf(t, r, "spacing.field_peak", c.Subject); math.Abs(got/want-1) > 1e-9 {
			t.Errorf("%s begins at %g V/m, its peak is %g V/m", c.Subject, got, want)
		}
		for i, id := range []string{"spacing.voltage", "spacing.onset_estimate"} {
			if got, want := summed(c.Lines[i]), figureOf(t, r, id, c.Subject); math.Abs(got/want-1) > 0.005 {
				t.Errorf("%s: line %d carries %g V, %s is %g V", c.Subject, i, got, id, want)
			}
		}
	}
}

// The gap nearest to its onset comes first; like ones are drawn once and named.
func TestLikeGapsAreDrawnOnce(t *testing.T) {
	curves := gapCurvesOf(reviewed(t, described(t, "column")))
	var subjects []string
	for _, c := range curves {
		subjects = append(subjects, c.Subject)
	}
	want := "columns to the enclosure; gun feedthrough, air side; stages 1 to 3; drive lead to the enclosure; control electrode to cathode leads"
	if got := strings.Join(subjects, "; "); got != want {
		t.Errorf("drawn are %s", got)
	}
	if !strings.Contains(curves[2].Note, "it stands for stages 3 to 4, stages 4 to 6 too") {
		t.Error(curves[2].Note)
	}
}

// Of many gaps a few are drawn, and the first says how many are not.
func TestFewOfManyGapsAreDrawn(t *testing.T) {
	text := string(described(t, "spacings"))
	for i := range 20 {
		text += fmt.Sprintf("\n[[spacing]]\nname = \"gap %d\"\nvoltage = \"3 kV\"\nmedium = \"air\"\nclearance = \"%d mm\"\ncreepage = \"90 mm\"\nmaterial = \"alumina\"\nshape = { kind = \"sphere-plane\", radius = \"8 mm\" }\n", i, 20+i)
	}
	curves := gapCurvesOf(reviewed(t, []byte(text)))
	if len(curves) != 6 || !strings.Contains(curves[0].Note, "the 6 nearest to what they stand are drawn, 15 more are not") {
		t.Errorf("%d curves; %s", len(curves), curves[0].Note)
	}
}

// Media without a law of onset are drawn up to their breakdown, those without either alone.
func TestFieldsInOtherMedia(t *testing.T) {
	head := "format = 1\n[[spacing]]\nname = \"gap\"\nvoltage = \"10 kV\"\nclearance = \"6 mm\"\nshape = { kind = \"sphere-plane\", radius = \"8 mm\" }\n"
	for _, c := range []struct{ more, line, note string }{
		{"medium = \"oil\"\noil_test = \"60 kV\"\n", "where it breaks down", ""},
		{"medium = \"vacuum\"\n", "where it emits or breaks down", ""},
		{"medium = \"solid\"\n", "", "what it stands is not known"},
	} {
		curves := gapCurvesOf(reviewed(t, []byte(head+c.more)))
		switch {
		case len(curves) != 1:
			t.Errorf("%s: %d curves", c.more, len(curves))
		case c.line == "" && (len(curves[0].Lines) != 1 || !strings.Contains(curves[0].Note, c.note)):
			t.Errorf("%s: %v", c.more, curves[0].Note)
		case c.line != "" && (len(curves[0].Lines) != 2 || !strings.Contains(curves[0].Lines[1].Name, c.line) || len(curves[0].Levels) > 0):
			t.Errorf("%s: %v; %s", c.more, curves[0].Lines[len(curves[0].Lines)-1].Name, curves[0].Note)
		}
	}
}

// Of many paths the nearest to the curve are marked, the longest path of the vessel among
// them, and how many are not is said.
func TestFewOfManyPathsAreMarked(t *testing.T) {
	text := string(described(t, "column"))
	for i := range 40 {
		text += fmt.Sprintf("\n[[spacing]]\nname = \"gap %d\"\nvoltage = \"3 kV\"\nmedium = \"air\"\nclearance = \"%d mm\"\n", i, 2+i)
	}
	c := reviewed(t, []byte(text)).Curves
	at := slices.IndexFunc(c, func(c exhibit.Curve) bool { return c.ID == "vacuum.paschen" })
	if at < 0 {
		t.Fatal("no curve")
	}
	var names []string
	for _, m := range c[at].Marks {
		names = append(names, m.Name)
	}
	if len(names) != 12 || names[0] != "longest path at its permit" || !slices.Contains(names, "gap 0") || slices.Contains(names, "gap 39") || !strings.HasSuffix(c[at].Note, "Of the paths the 12 nearest to the curve are marked, 37 more are not.") {
		t.Errorf("%v; %s", names, c[at].Note)
	}
}
