package quantity

import (
	"strings"
	"testing"
)

// What a sentence says with a unit, and what only looks like it.
func TestMentions(t *testing.T) {
	for sentence, want := range map[string]string{
		"0.2 uSv/h at 0.1 m from the port at 23 kV, survey meter SM-2, 2025-03-04": "uSv/h m kV",
		"0.2 µGy/h": "uGy/h",
		"110 mm; 40 kV DC for 10 min, 2025-03-01, tester T-4": "mm kV min",
		"0.05 Ω at 25 A": "ohm A",
		"12 %":           "%",
		"0":              "",
		"none":           "",
		"3 of 5 tries":   "",
		"T-4 V, no. 7":   "",
		"2025-03-04":     "",
		"5 KV":           "",
	} {
		var units []string
		for _, m := range Mentions(sentence) {
			units = append(units, m.Unit)
		}
		if got := strings.Join(units, " "); got != want {
			t.Errorf("%q: %q, want %q", sentence, got, want)
		}
	}
}
