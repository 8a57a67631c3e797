package pdf

import (
	"fmt"
	"strings"
	"sync"
	"unicode/utf8"

	"codeberg.org/go-fonts/dejavu/dejavusans"
	"codeberg.org/go-fonts/dejavu/dejavusansbold"
	"golang.org/x/image/font"
	"golang.org/x/image/font/sfnt"
	"golang.org/x/image/math/fixed"

	"kilovet/reports/digest"
)

const family = "dejavu"

// face is one of the two cuts of the type.
type face int

const (
	regular face = iota
	bold
)

// cuts are the cuts of the type.
var cuts = [2][]byte{dejavusans.TTF, dejavusansbold.TTF}

// points is millimetres per point.
const points = 25.4 / 72

// fonts measures text and knows which glyphs there are.
type fonts struct {
	faces  [2]*sfnt.Font
	widths [2]map[rune]float64 // in em; absent glyphs are negative
	plain  [2][128]float64     // the same of the first runes; of those that are no letters nought
	buffer sfnt.Buffer
	lock   sync.Mutex // of widths and buffer, which all painters ask for

	wrapped map[wanted][]set
}

func newFonts() (*fonts, error) {
	f := &fonts{widths: [2]map[rune]float64{{}, {}}, wrapped: map[wanted][]set{}}
	for i, data := range cuts {
		parsed, err := sfnt.Parse(data)
		if err != nil {
			return nil, fmt.Errorf("pdf: font: %w", err)
		}
		f.faces[i] = parsed
		for r := ' '; r <= '~'; r++ {
			f.plain[i][r] = f.advance(face(i), r)
		}
	}
	return f, nil
}

// guard makes a text fit for a face: on one line, and with every rune the library
// or the face does not know replaced visibly.
func (f *fonts) guard(c face, s string) string {
	if plain(s) {
		return s
	}
	return strings.Map(func(r rune) rune {
		if r > 0xFFFF || f.em(c, r) < 0 {
			return utf8.RuneError
		}
		return r
	}, digest.Clean(s))
}

// plain reports whether a text holds nothing but signs that every face has.
func plain(s string) bool {
	for i := range len(s) {
		if s[i] < ' ' || s[i] > '~' {
			return false
		}
	}
	return true
}

// em is the advance of a rune in em; negative where the face has no glyph.
func (f *fonts) em(c face, r rune) float64 {
	if r >= ' ' && r <= '~' {
		return f.plain[c][r]
	}
	f.lock.Lock()
	defer f.lock.Unlock()
	w, known := f.widths[c][r]
	if !known {
		w = f.advance(c, r)
		f.widths[c][r] = w
	}
	return w
}

func (f *fonts) advance(c face, r rune) float64 {
	parsed := f.faces[c]
	index, err := parsed.GlyphIndex(&f.buffer, r)
	if err != nil || index == 0 {
		return -1
	}
	units := parsed.UnitsPerEm()
	w, err := parsed.GlyphAdvance(&f.buffer, index, fixed.I(int(units)), font.HintingNone)
	if err != nil {
		return -1
	}
	return float64(w) / 64 / float64(units)
}

// width is the length of a guarded text in millimetres.
func (f *fonts) width(t style, s string) float64 {
	sum := 0.0
	for _, r := range s {
		sum += f.em(t.face, r)
	}
	return sum * t.size * points
}
