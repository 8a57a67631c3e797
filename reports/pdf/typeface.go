package pdf

import (
	"bytes"
	"encoding/binary"

	"golang.org/x/image/font/sfnt"
)

// span is runes that follow one another.
type span struct{ first, last rune }

// common are the runes that sheets are hardly ever without: Latin, Greek and Cyrillic, and
// the signs of units, mathematics and arrows. The library goes through every rune of a type
// several times, and there are six times as many.
var common = [...]span{
	{' ', '~'}, {0xA0, 0x17F}, {0x2B0, 0x2FF}, {0x370, 0x3FF}, {0x400, 0x45F}, {0x2010, 0x205F}, {0x2070, 0x209F},
	{0x20AC, 0x20AC}, {0x2100, 0x214F}, {0x2190, 0x21FF}, {0x2200, 0x22FF}, {0x25A0, 0x25FF}, {0xFFFD, 0xFFFD},
}

// commons reports whether all runes of a set are common.
func (s *runes) commons() bool {
	for _, r := range s.list() {
		if !isCommon(r) {
			return false
		}
	}
	return true
}

func isCommon(r rune) bool {
	for _, s := range common {
		if r >= s.first && r <= s.last {
			return true
		}
	}
	return false
}

// mapped is runes that follow one another and whose glyphs do.
type mapped struct {
	span
	glyph sfnt.GlyphIndex // of the first
}

// common is a cut of the type that knows common runes alone.
func (f *fonts) common(c face) []byte { return withMap(cuts[c], f.mappedCommon(c)) }

// mappedCommon is where a face has its common runes.
func (f *fonts) mappedCommon(c face) []mapped {
	var all []mapped
	for _, s := range common {
		for r := s.first; r <= s.last; r++ {
			glyph, err := f.faces[c].GlyphIndex(&f.buffer, r)
			if err != nil || glyph == 0 {
				continue
			}
			if n := len(all) - 1; n >= 0 && all[n].last == r-1 && glyph-all[n].glyph == sfnt.GlyphIndex(r-all[n].first) {
				all[n].last = r
				continue
			}
			all = append(all, mapped{span{r, r}, glyph})
		}
	}
	return append(all, mapped{span{0xFFFF, 0xFFFF}, 0}) // which the format asks for
}

// withMap is a copy of a type that knows these runes alone: its table of characters, of format
// 4 in ISO/IEC 14496-22 5.2.1, stands at its end. Sums of tables are left as they are; only the
// library reads the copy, and it asks for none.
func withMap(data []byte, all []mapped) []byte {
	n := uint16(len(all))
	table := make([]byte, 0, 32+8*len(all))
	put := func(words ...uint16) {
		for _, w := range words {
			table = binary.BigEndian.AppendUint16(table, w)
		}
	}
	put(0, 1, 3, 1, 0, 12) // one table, of the first plane of Unicode, right behind this
	put(4, 16+8*n, 0, 2*n, 0, 0, 0)
	for _, m := range all {
		put(uint16(m.last))
	}
	put(0)
	for _, m := range all {
		put(uint16(m.first))
	}
	for _, m := range all {
		put(uint16(m.glyph) - uint16(m.first))
	}
	table = append(table, make([]byte, 2*n)...) // each glyph by its distance
	out := append(make([]byte, 0, len(data)+len(table)), data...)
	entry := bytes.Index(out, []byte("cmap"))
	binary.BigEndian.PutUint32(out[entry+8:], uint32(len(data)))
	binary.BigEndian.PutUint32(out[entry+12:], uint32(len(table)))
	return append(out, table...)
}
