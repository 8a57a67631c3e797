package circuit

import (
	"fmt"
	"slices"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
)

// shape writes a circuit out, so that two can be compared.
func shape(c *Circuit) string {
	s := fmt.Sprint(c.Negative, c.names)
	for _, e := range c.Elements {
		s += fmt.Sprintln(e.Name, e.Kind, e.From, e.To, e.Resistance, e.Capacitance, e.Inductance, e.Wave, e.Rectifier, e.Current, e.Strikes)
	}
	return s
}

func TestEditsLeaveTheCircuitAlone(t *testing.T) {
	c := build(whole())
	before := shape(c)
	c.Open("multiplier.diode.3")
	c.OpenString("bleeder.1")
	c.Short("multiplier.smoothing_capacitor.2")
	c.Join("arc", "cathode", "ground")
	c.With("filter.1.resistor", func(e *Element) { e.Resistance *= 2 })
	c.Each(func(e *Element) bool { e.Resistance = 1; return e.Kind == Resistor })
	c.Reverse("multiplier.diode.1")
	if shape(c) != before {
		t.Error("an edit changed the circuit it was made from")
	}
}

func TestOpenRemovesOneElement(t *testing.T) {
	c := build(whole())
	open := c.Open("multiplier.diode.3")
	if open.Element("multiplier.diode.3") != nil || len(open.Elements) != len(c.Elements)-1 || open.Nodes() != c.Nodes() {
		t.Error("more or less than one diode went")
	}
}

func TestOpenLinkPartsItsNodes(t *testing.T) {
	c := build(whole()).Open("supply terminal")
	a, _ := c.Node("filter.2")
	b, _ := c.Node("supply")
	if a == b {
		t.Error("filter.2 is still the supply terminal")
	}
}

func TestOpenString(t *testing.T) {
	c := build(whole())
	if got := c.OpenString("bleeder.1").Element("bleeder.1").Resistance; !alike(float64(got), 8e9) {
		t.Errorf("one of two strings left: %g ohm, want 8 Gohm", got)
	}
	if c.OpenString("divider.upper").Element("divider.upper") != nil {
		t.Error("a string alone conducts with one element open")
	}
	if c.OpenString("divider.meter").Element("divider.meter") != nil {
		t.Error("a meter conducts when open")
	}
}

func TestShortJoinsTheEnds(t *testing.T) {
	c := build(whole()).Short("multiplier.smoothing_capacitor.2")
	wantSame(t, c, "stage.1", "stage.2")
	if c.Element("multiplier.smoothing_capacitor.2") != nil {
		t.Error("the shorted capacitor is still there")
	}
}

func TestJoinToGroundIsGround(t *testing.T) {
	for _, ends := range [][2]string{{"cathode", "ground"}, {"ground", "cathode"}} {
		wantSame(t, build(whole()).Join("arc", ends[0], ends[1]), "ground", "cathode", "foot")
	}
}

// Two edits of one circuit do not see each other's new nodes.
func TestJoinsAreIndependent(t *testing.T) {
	c := build(whole()).Open("divider.meter")
	one, two := c.Join("x", "ground", "first"), c.Join("y", "ground", "second")
	if slices.Contains(one.Names(), "second") || slices.Contains(two.Names(), "first") {
		t.Error("one circuit names the other's node")
	}
	wantSame(t, one, "ground", "first")
	wantSame(t, two, "ground", "second")
}

func TestReverseTurnsADiodeRound(t *testing.T) {
	c := build(whole())
	e, r := c.Element("multiplier.diode.1"), c.Reverse("multiplier.diode.1").Element("multiplier.diode.1")
	if e.From != r.To || e.To != r.From {
		t.Errorf("from %d to %d became from %d to %d", e.From, e.To, r.From, r.To)
	}
	from, to := e.Ends()
	if rf, rt := r.Ends(); rf != to || rt != from {
		t.Errorf("ends %s, %s", rf, rt)
	}
}

// An edit that keeps everything keeps everything; nodes and labels always agree.
func TestNodesAndLabelsAgree(t *testing.T) {
	c := build(whole())
	chance.Check(t, func(r *rapid.T) {
		names := c.Names()
		edited := c.Each(func(*Element) bool { return true })
		if shape(edited) != shape(c) {
			r.Fatal("nothing was edited, yet something changed")
		}
		edited = edited.Join("j", rapid.SampledFrom(names).Draw(r, "a"), rapid.SampledFrom(names).Draw(r, "b")).
			Open(rapid.SampledFrom(c.Elements).Draw(r, "element").Name)
		total := 0
		for n := range edited.Nodes() {
			for _, label := range edited.Labels(Node(n)) {
				total++
				if got, ok := edited.Node(label); !ok || got != Node(n) {
					r.Fatalf("%s is labelled %d and found at %d", label, n, got)
				}
			}
		}
		if total != len(edited.Names()) || edited.Labels(Ground)[0] != "ground" {
			r.Fatalf("%d labels for %d names, ground is %v", total, len(edited.Names()), edited.Labels(Ground))
		}
	})
}
