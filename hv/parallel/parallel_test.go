package parallel_test

import (
	"strings"
	"testing"

	"kilovet/hv/parallel"
)

func TestEachDoesEverything(t *testing.T) {
	const n = 1000
	done := make([]int, n)
	parallel.Each(n, func(i int) { done[i]++ })
	for i, times := range done {
		if times != 1 {
			t.Fatalf("piece %d was done %d times", i, times)
		}
	}
	parallel.Each(0, func(int) { t.Error("there is nothing to do") })
}

// Pieces that wait for one another, as rules that need the same solution do.
func TestDoBeginsAll(t *testing.T) {
	ready := make(chan bool)
	parallel.Do(func() { <-ready }, func() { <-ready }, func() { close(ready) })
}

func TestPanicsComeOut(t *testing.T) {
	defer func() {
		what, _ := recover().(string)
		if !strings.HasPrefix(what, "broken") || !strings.Contains(what, "TestPanicsComeOut") {
			t.Errorf("what comes out is %q", what)
		}
	}()
	parallel.Each(3, func(i int) {
		if i == 1 {
			panic("broken")
		}
	})
	t.Error("nothing came out")
}
