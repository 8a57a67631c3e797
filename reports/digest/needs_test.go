package digest_test

import (
	"testing"

	"kilovet/reports/digest"
	"kilovet/rules/rule"
)

// A key that the remedy names is not told again; one that only begins or ends like a word
// of it is.
func TestLackingIsWhatTheRemedyDoesNotName(t *testing.T) {
	for _, c := range []struct {
		remedy, want string
		missing      []string
	}{
		{"give drive.peak_limit", "", []string{"drive.peak_limit"}},
		{"Give drive.peak_limit.", "", []string{"drive.peak_limit"}},
		{"give site.altitude, drive.peak", "", []string{"site.altitude", "drive.peak"}},
		{"give drive.peak_limit", "drive.peak", []string{"drive.peak"}},
		{"give drive.peak", "drive.peak_limit", []string{"drive.peak", "drive.peak_limit"}},
		{"give spacing.shape.radius", "spacing.shape, shape.radius", []string{"spacing.shape", "shape.radius"}},
		{"", "gun, cable.length", []string{"gun", "cable.length"}},
		{"fit the gun; give cable.length.", "", []string{"gun", "cable.length"}},
		{"", "", nil},
	} {
		if got := digest.Lacking(rule.Finding{Remedy: c.remedy, Missing: c.missing}); got != c.want {
			t.Errorf("%q lacking %v: %q, want %q", c.remedy, c.missing, got, c.want)
		}
	}
}

// What the reason lists is not listed again; a word of it is no list.
func TestLackingIsNotToldTwice(t *testing.T) {
	missing := []string{"site.altitude", "drive.peak"}
	for because, want := range map[string]string{
		"site.altitude, drive.peak not given":      "",
		"7 s; site.altitude, drive.peak not given": "",
		"site.altitude and drive.peak":             "site.altitude, drive.peak",
		"site.altitude not given":                  "site.altitude, drive.peak",
	} {
		if got := digest.Lacking(rule.Finding{Because: because, Remedy: "give both of these", Missing: missing}); got != want {
			t.Errorf("%q: %q, want %q", because, got, want)
		}
	}
}
