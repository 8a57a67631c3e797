package network

import (
	"strings"
	"testing"
)

// TestUnreachedSaysWhy gives a search a budget that no ladder of this size can do with.
func TestUnreachedSaysWhy(t *testing.T) {
	c := build(t, examples()["30 stages with strays"])
	_, err := Steady(c, Options{Most: 300})
	if err == nil {
		t.Fatal("reached in 300 steps")
	}
	for _, word := range []string{"the periodic state was not reached because after ", " periods the voltage of ", " still changes by ", "V in each"} {
		if !strings.Contains(err.Error(), word) {
			t.Errorf("%q does not say %q", err, word)
		}
	}
}

// TestSleepersAreRoused holds what a search costs whose first guess leaves a diode asleep.
func TestSleepersAreRoused(t *testing.T) {
	if w := steady(t, build(t, examples()["6 stages with filter and bias"])).Work; w.Products > 30 {
		t.Errorf("%+v", w)
	}
}
