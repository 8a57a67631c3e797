// Package chance draws what the tests of properties are given: the same cases at every run, so
// that what a commit passes it passes again. Others are drawn with -rapid.seed=N, at random with
// -rapid.seed=0, more of them with -rapid.checks=N:
// go test ./ripple/network -run TestAnyLadder -rapid.seed=7 -rapid.checks=5000
package chance

import (
	"flag"
	"sync"

	"pgregory.net/rapid"
)

// seed is that of all draws where neither the command line nor the environment names one.
const seed = "1"

var settled = sync.OnceValue(func() error { return settle(flag.CommandLine) })

// Check tries a property on a hundred cases that it draws, in a short run on twenty, or on as
// many as the command line says. It panics where the library knows no seed.
func Check(t rapid.TB, property func(*rapid.T)) {
	t.Helper()
	if err := settled(); err != nil {
		t.Fatal(err)
	}
	rapid.Check(t, property)
}

// settle sets the seed unless one is named.
func settle(flags *flag.FlagSet) error {
	named := false
	flags.Visit(func(f *flag.Flag) { named = named || f.Name == "rapid.seed" })
	if f := flags.Lookup("rapid.seed"); !named && f.Value.String() == "0" {
		return f.Value.Set(seed)
	}
	return nil
}
