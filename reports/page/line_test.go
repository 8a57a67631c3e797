package page

import (
	"strings"
	"testing"
)

// A text that is cut keeps whole words: half of "23 kV" would be another voltage.
func TestShortenedTextEndsBetweenWords(t *testing.T) {
	for at := mostReason - 10; at <= mostReason; at++ {
		before := strings.Repeat("a", at-1)
		got := shortened(before + " 12345678 kV of the 23 kV it is set to")
		if rest := strings.TrimSuffix(strings.TrimPrefix(got, before), "…"); rest != "" && rest != " 12345678" || !strings.HasSuffix(got, "…") {
			t.Errorf("cut after %d: %q", at, got[at-1:])
		}
	}
	if whole := "1.5 kV DC"; shortened(whole) != whole {
		t.Errorf("%q is cut", whole)
	}
}
