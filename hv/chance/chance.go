// Package chance draws what the tests of properties are given: the same cases at every run, so
// that what a commit passes it passes again. Others are drawn with -rapid.seed=N, more of them
// with -rapid.checks=N: go test ./ripple/network -run TestAnyLadder -rapid.seed=7 -rapid.checks=5000
package chance

import (
	"flag"

	"pgregory.net/rapid"
)

// seed is that of all draws where the command line names none.
const seed = "1"

// Check tries a property on a hundred cases that it draws, or as many as the command line says.
// It panics where the library knows no seed.
func Check(t rapid.TB, property func(*rapid.T)) {
	t.Helper()
	if f := flag.Lookup("rapid.seed"); f.Value.String() == f.DefValue {
		if err := f.Value.Set(seed); err != nil {
			t.Fatal(err)
		}
	}
	rapid.Check(t, property)
}
