package rules_test

import (
	"bytes"
	"math"
	"testing"

	"kilovet/rules"
	"kilovet/rules/exhibit"
)

func decayOf(t *testing.T, r *rules.Review) exhibit.Curve {
	t.Helper()
	for _, c := range r.Curves {
		if c.ID == "energy.decay" {
			return c
		}
	}
	t.Fatal("there is no curve of the decay")
	return exhibit.Curve{}
}

// The lines fall to 60 V when the table of nodes says, and never rise.
func TestDecayFallsWhenTheTableSays(t *testing.T) {
	r := reviewed(t, described(t, "column"))
	c, table := decayOf(t, r), tableOf(t, r, "energy.nodes")
	if len(c.Lines) < 4 {
		t.Errorf("%d lines", len(c.Lines))
	}
	for _, l := range c.Lines {
		name := l.Name
		if name == "multiplier" {
			name = "stage.6"
		}
		want := *lineOf(t, table, name)[5].Value
		i := 1
		for ; i < len(l.Points) && l.Points[i].Y > 60; i++ {
			if l.Points[i].Y > l.Points[i-1].Y*(1+1e-9) {
				t.Errorf("%s rises at %g s", l.Name, l.Points[i].X)
			}
		}
		a, b := l.Points[i-1], l.Points[i]
		got := a.X + (b.X-a.X)*math.Log(a.Y/60)/math.Log(a.Y/b.Y)
		if math.Abs(got-want) > 0.01*want {
			t.Errorf("%s falls to 60 V at %g s, the table says %g s", l.Name, got, want)
		}
	}
}

// Where nothing permanent leads the charge away the lines go on to the end.
func TestWhatStaysIsDrawnToTheEnd(t *testing.T) {
	c := decayOf(t, reviewed(t, bytes.ReplaceAll(described(t, "column"), []byte("permanent = true"), []byte("permanent = false"))))
	for _, l := range c.Lines {
		first, last := l.Points[0], l.Points[len(l.Points)-1]
		if l.Name == "output" && (last.Y < 0.5*first.Y || last.X <= first.X) {
			t.Errorf("from %v to %v", first, last)
		}
	}
}
