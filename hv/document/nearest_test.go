package document

import (
	"testing"
	"unicode/utf8"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
)

func TestNearest(t *testing.T) {
	among := []string{"frequency", "peak", "peak_limit", "rated_voltage", "voltage", "stages", "sine", "square"}
	for _, row := range []struct{ word, want string }{
		{"Peak", "peak"}, {"peek", "peak"}, {"peaklimit", "peak_limit"}, {"peak_limits", "peak_limit"}, {"frequncy", "frequency"}, {"freq", "frequency"},
		{"stagse", "stages"}, {"volt", "voltage"}, {"rated", "rated_voltage"}, {"sin", "sine"}, {"SQUARE", "square"},
		{"temperature", ""}, {"x", ""}, {"", ""}, {"st", ""},
	} {
		got, ok := Nearest(row.word, among)
		if ok != (row.want != "") || ok && got != row.want {
			t.Errorf("%q: %q, %v; want %q", row.word, got, ok, row.want)
		}
	}
}

func TestSlips(t *testing.T) {
	for _, row := range []struct {
		a, b string
		want int
	}{{"", "", 0}, {"abc", "", 3}, {"kitten", "sitting", 3}, {"ab", "ba", 1}, {"abcd", "acbd", 1}, {"ca", "abc", 3}, {"µm", "um", 1}} {
		if got := slips([]rune(row.a), []rune(row.b)); got != row.want {
			t.Errorf("%q, %q: %d, want %d", row.a, row.b, got, row.want)
		}
	}
}

// TestSlipsAreADistance: nothing to itself, the same both ways, at most the longer
// word, and at least the difference of the lengths.
func TestSlipsAreADistance(t *testing.T) {
	word := rapid.SliceOfN(rapid.RuneFrom([]rune("abcµ")), 0, 8)
	chance.Check(t, func(t *rapid.T) {
		a, b := word.Draw(t, "a"), word.Draw(t, "b")
		d := slips(a, b)
		longer, shorter := max(len(a), len(b)), min(len(a), len(b))
		if d != slips(b, a) || d > longer || d < longer-shorter || slips(a, a) != 0 {
			t.Errorf("slips(%q, %q) = %d", string(a), string(b), d)
		}
	})
}

// TestCursor holds the place of any offset, asked for in any order, against counting.
func TestCursor(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		text := string(rapid.SliceOfN(rapid.RuneFrom([]rune("aµ\n€")), 0, 40).Draw(t, "text"))
		c := newCursor(text)
		for range 8 {
			offset := len(string([]rune(text)[:rapid.IntRange(0, utf8.RuneCountInString(text)).Draw(t, "characters")]))
			want := Place{Line: 1, Column: 1}
			for i, r := range text {
				switch {
				case i >= offset:
				case r == '\n':
					want = Place{Line: want.Line + 1, Column: 1}
				default:
					want.Column++
				}
			}
			if got := c.at(offset); got != want {
				t.Fatalf("%q at %d: %+v, want %+v", text, offset, got, want)
			}
		}
	})
}
