package pdf

import (
	"bytes"
	"compress/zlib"
	"io"
	"testing"

	"golang.org/x/image/font/sfnt"

	"kilovet/reports/internal/sample"
	"kilovet/reports/page"
)

// Another reader of types finds every common rune where the whole type has it, and no other.
func TestCommonRunesKeepTheirGlyphs(t *testing.T) {
	f := testFonts(t)
	for c := range cuts {
		few, err := sfnt.Parse(f.common(face(c)))
		if err != nil {
			t.Fatal(err)
		}
		for r := rune(0); r < 0xFFFF; r++ {
			want, _ := f.faces[c].GlyphIndex(&f.buffer, r)
			if !isCommon(r) {
				want = 0
			}
			if got, err := few.GlyphIndex(&f.buffer, r); err != nil || got != want {
				t.Fatalf("cut %d, %U: glyph %d, want %d; %v", c, r, got, want, err)
			}
		}
	}
}

// The glyphs of runes that are not common are in the file as well.
func TestRareRunesAreEmbedded(t *testing.T) {
	for _, title := range []string{"Supply", "Кран", "Սնուցում", "კვება"} {
		d := page.New(sample.Sound())
		d.Block.Title = title
		types := embeddedTypes(t, render(t, d))
		if len(types) != len(cuts) {
			t.Fatalf("%d types", len(types))
		}
		for _, r := range title {
			if !shows(types[0], r) && !shows(types[1], r) {
				t.Errorf("%s: no glyph of %c", title, r)
			}
		}
	}
}

func shows(parsed *sfnt.Font, r rune) bool {
	g, err := parsed.GlyphIndex(new(sfnt.Buffer), r)
	return err == nil && g != 0
}

// embeddedTypes are those in a file.
func embeddedTypes(t *testing.T, file []byte) (all []*sfnt.Font) {
	t.Helper()
	for {
		_, rest, found := bytes.Cut(file, []byte("stream\n"))
		if !found {
			return all
		}
		file = rest
		inflated, err := zlib.NewReader(bytes.NewReader(rest))
		if err != nil {
			continue
		}
		plain, _ := io.ReadAll(inflated)
		if parsed, err := sfnt.Parse(plain); err == nil {
			all = append(all, parsed)
		}
	}
}
