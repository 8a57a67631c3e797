package lack_test

import (
	"errors"
	"fmt"
	"testing"

	"kilovet/hv/lack"
)

func TestOf(t *testing.T) {
	missing := lack.Key("gun.cutoff", "gun.emission")
	for _, row := range []struct {
		err  error
		kind lack.Kind
		keys int
		why  string
	}{
		{missing, lack.Missing, 2, "gun.cutoff, gun.emission not given"},
		{fmt.Errorf("emission: %w", missing), lack.Missing, 2, "gun.cutoff, gun.emission not given"},
		{errors.Join(errors.New("other"), missing), lack.Missing, 2, "gun.cutoff, gun.emission not given"},
		{lack.Because("the dielectric loses capacitance", "filter.capacitor.value_at_voltage"), lack.Missing, 1, "the dielectric loses capacitance"},
		{lack.Range("%d mm is beyond the last row", 3000), lack.Outside, 0, "3000 mm is beyond the last row"},
		{lack.Failed("no steady state after %d periods", 40), lack.NotReached, 0, "no steady state after 40 periods"},
	} {
		l := lack.Of(row.err)
		if l == nil || l.Kind != row.kind || len(l.Keys) != row.keys || l.Error() != row.why {
			t.Errorf("%v: %+v", row.err, l)
		}
	}
}

func TestOfOtherErrors(t *testing.T) {
	for _, err := range []error{nil, errors.New("disk full")} {
		if l := lack.Of(err); l != nil {
			t.Errorf("%v holds a lack: %v", err, l)
		}
	}
}
