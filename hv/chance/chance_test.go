package chance

import (
	"flag"
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
	if flag.Lookup("rapid.seed").Value.String() == "0" {
		t.Skip("draws at random were asked for")
	}
	if !slices.Equal(first, second) {
		t.Errorf("%v, then %v", first, second)
	}
	if slices.Sort(first); len(slices.Compact(first)) < 10 {
		t.Errorf("hardly any cases: %v", first)
	}
}

// A seed named on the command line stands, zero too, as does that of the environment, which is
// the flag's default.
func TestASeedThatIsNamedStands(t *testing.T) {
	for _, c := range []struct {
		environment uint64
		line        []string
		want        uint64
	}{
		{0, nil, 1},
		{7, nil, 7},
		{0, []string{"-rapid.seed=5"}, 5},
		{7, []string{"-rapid.seed=7"}, 7},
		{7, []string{"-rapid.seed=0"}, 0},
		{0, []string{"-rapid.seed=0"}, 0},
	} {
		flags := flag.NewFlagSet("test", flag.ContinueOnError)
		got := flags.Uint64("rapid.seed", c.environment, "")
		if err := flags.Parse(c.line); err != nil {
			t.Fatal(err)
		}
		if err := settle(flags); err != nil || *got != c.want {
			t.Errorf("%d, then %v: %d, %v", c.environment, c.line, *got, err)
		}
	}
}
