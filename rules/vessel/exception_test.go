package vessel_test

import (
	"fmt"
	"testing"

	"kilovet/rules/rule"
)

// The third exception to "more distance is better": left of the Paschen minimum the longer
// path breaks down first, so that the pressure which permits 100 mm does not permit 10 m.
func TestLongerPathsInAVesselAreWorse(t *testing.T) {
	at := func(path string) rule.Finding {
		return permit(t, fmt.Sprintf("gas = \"air\"\npressure_permit = \"4e-5 mbar\"\nlongest_path = %q\n", path))
	}
	short, long, longest := at("100 mm"), at("1 m"), at("10 m")
	if !rule.Graver(long.Verdict, short.Verdict) || !rule.Graver(longest.Verdict, long.Verdict) || longest.Verdict != rule.Fails {
		t.Errorf("100 mm %s, 1 m %s, 10 m %s: %s", short.Verdict, long.Verdict, longest.Verdict, longest.Because)
	}
}
