package chance

import (
	"slices"
	"testing"

	"pgregory.net/rapid"
)

// The same cases are drawn each time, and not always one.
func TestTheSameCasesAreDrawnEachTime(t *testing.T) {
	draw := func() (list []int) {
		Check(t, func(t *rapid.T) { list = append(list, rapid.Int().Draw(t, "any")) })
		return list
	}
	first, second := draw(), draw()
	if !slices.Equal(first, second) {
		t.Errorf("%v, then %v", first, second)
	}
	if slices.Sort(first); len(slices.Compact(first)) < 10 {
		t.Errorf("hardly any cases: %v", first)
	}
}
