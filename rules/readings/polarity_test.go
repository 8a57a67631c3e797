package readings

import (
	"slices"
	"testing"

	"kilovet/rules/evidence"
	"kilovet/rules/fault"
)

// seen is the form of a specimen with a polarity in its first step.
func (w workbench) seen(s specimen, polarity string) *Comparison {
	w.Helper()
	f := s.read(w, w.e, w.p, 4)
	f.Steps[0].Polarity.V, f.Steps[0].Polarity.Line = polarity, 1
	c, err := Of(w.e, w.p, f)
	if err != nil {
		w.Fatal(err)
	}
	return c
}

// A reversed ladder reads as a sound one does, since readings are magnitudes; the polarity
// tells it, points to it first, and nothing else is looked for.
func TestAReversedLadderIsToldByItsPolarity(t *testing.T) {
	w := newWorkbench(t)
	every := fault.Of(w.e)
	i := slices.IndexFunc(every, func(f fault.Fault) bool { return f.Name == fault.LadderReversed })
	specimen := specimen{every[i].Change(), 7}
	if c := w.compared(specimen); c.Sign != Untaken {
		t.Errorf("without a polarity: %d", c.Sign)
	}
	c := w.seen(specimen, "positive")
	if c.Sound || c.Sign != Reversed || len(c.Suspects) != 1 || c.Suspects[0].Names[0] != fault.LadderReversed || c.Tried != 0 {
		t.Errorf("with the polarity: %+v", c)
	}
}

// A polarity that is right leaves a sound chain sound, and clears the reversed ladder where
// readings deviate.
func TestARightPolarityClearsTheReversedLadder(t *testing.T) {
	ordinary(t)
	w := newWorkbench(t)
	if c := w.seen(specimen{seed: 3}, "negative"); !c.Sound || c.Sign != Proved {
		t.Errorf("healthy: %+v", c)
	}
	wrong := specimen{evidence.Fault{Edit: resistance("bleeder.1", 0.42)}, 102}
	c := w.seen(wrong, "negative")
	if !named(c, "bleeder.1") {
		t.Errorf("bleeder: %s", told(c))
	}
	for _, s := range c.Suspects {
		if slices.Contains(s.Names, fault.LadderReversed) {
			t.Errorf("the reversed ladder is named: %v", s.Names)
		}
	}
}
