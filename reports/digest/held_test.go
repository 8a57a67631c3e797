package digest_test

import (
	"slices"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/reports/digest"
)

func TestANumberKeepsItsUnit(t *testing.T) {
	for text, want := range map[string][]string{
		"reaches 3.5 kV of the 8 kV rated":       {"reaches", "3.5 kV", "of", "the", "8 kV", "rated"},
		"4.7 MΩ (4.606 MΩ to 4.794 MΩ)":          {"4.7 MΩ", "(4.606 MΩ", "to", "4.794 MΩ)"},
		"≤ 4e-5 mbar, then":                      {"≤", "4e-5 mbar,", "then"},
		"≥ -20 kV; 100 %, done":                  {"≥", "-20 kV;", "100 %,", "done"},
		"at 1 µGy/h.":                            {"at", "1 µGy/h."},
		"IEC 60664-1:2020 Table F.8 10 20 kV x":  {"IEC", "60664-1:2020", "Table", "F.8", "10", "20 kV", "x"},
		"at 1672 Pa m and 1e12 Ω m":              {"at", "1672 Pa m", "and", "1e12 Ω m"},
		"12 elements of stage.6 in 24 positions": {"12", "elements", "of", "stage.6", "in", "24", "positions"},
		"":                                       nil, "7": {"7"}, "kV 7": {"kV", "7"},
	} {
		if got := digest.Held(text); !slices.Equal(got, want) {
			t.Errorf("%q: %q, want %q", text, got, want)
		}
	}
}

// Both ways of taking a text apart agree.
func TestPartsAsHeld(t *testing.T) {
	word := rapid.SampledFrom([]string{"3", "-4.5e-6", "(2", "kV", "mbar,", "Pa", "m", "F.8", "%", "x"})
	chance.Check(t, func(t *rapid.T) {
		s := strings.Join(rapid.SliceOfN(word, 1, 8).Draw(t, "words"), " ")
		want := digest.Held(s)
		var got []string
		from := 0
		for i := range len(s) {
			if s[i] == ' ' && digest.Parts(s, i) {
				got, from = append(got, s[from:i]), i+1
			}
		}
		if got = append(got, s[from:]); !slices.Equal(got, want) {
			t.Fatalf("%q: %q and %q", s, got, want)
		}
	})
}
