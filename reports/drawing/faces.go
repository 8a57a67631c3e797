package drawing

import (
	"fmt"
	"strings"

	"codeberg.org/go-fonts/dejavu/dejavusans"
	"codeberg.org/go-fonts/dejavu/dejavusansbold"
	xfont "golang.org/x/image/font"
	"golang.org/x/image/font/opentype"
	"golang.org/x/image/font/sfnt"
	"golang.org/x/image/math/fixed"
	"gonum.org/v1/plot/font"

	"kilovet/reports/digest"
)

// style is a cut of the type at a size in millimetres.
type style struct {
	bold bool
	size float64
}

// The styles of a schematic: about eight and six and a half points.
var (
	named = style{size: 2.5}
	value = style{size: 2.7}
	tag   = style{bold: true, size: 2.4}
)

// leading is the distance of two lines of text.
const leading = 3.4

// faces measures text, without kerning, which not every canvas knows.
type faces struct {
	cache    *font.Cache
	advances [2]map[rune]float64 // of the regular and the bold cut, in em
	buffer   sfnt.Buffer
}

// typeface is the name of the face under which canvases know it.
const typeface = "DejaVu Sans"

func newFaces() (*faces, error) {
	var all font.Collection
	for weight, data := range map[xfont.Weight][]byte{xfont.WeightNormal: dejavusans.TTF, xfont.WeightBold: dejavusansbold.TTF} {
		parsed, err := opentype.Parse(data)
		if err != nil {
			return nil, fmt.Errorf("drawing: font: %w", err)
		}
		all = append(all, font.Face{Font: font.Font{Typeface: typeface, Variant: "Sans", Weight: weight}, Face: parsed})
	}
	return &faces{cache: font.NewCache(all), advances: [2]map[rune]float64{{}, {}}}, nil
}

func (f *faces) face(t style) font.Face {
	weight := xfont.WeightNormal
	if t.bold {
		weight = xfont.WeightBold
	}
	return f.cache.Lookup(font.Font{Typeface: typeface, Variant: "Sans", Weight: weight}, mm(t.size))
}

// wide is the width of a text in millimetres.
func (f *faces) wide(t style, text string) float64 {
	sum := 0.0
	for _, r := range clean(text) {
		sum += f.advance(t, r)
	}
	return sum * t.size
}

// advance is the width of a rune in em; of one without a glyph that of the sign for
// it.
func (f *faces) advance(t style, r rune) float64 {
	known := f.advances[0]
	if t.bold {
		known = f.advances[1]
	}
	em, ok := known[r]
	if !ok {
		em = f.measured(t, r)
		known[r] = em
	}
	return em
}

func (f *faces) measured(t style, r rune) float64 {
	parsed := f.face(t).Face
	units := parsed.UnitsPerEm()
	index, err := parsed.GlyphIndex(&f.buffer, r)
	if err != nil {
		panic("drawing: no glyph: " + err.Error())
	}
	width, err := parsed.GlyphAdvance(&f.buffer, index, fixed.Int26_6(units), xfont.HintingNone)
	if err != nil {
		panic("drawing: no advance: " + err.Error())
	}
	return float64(width) / float64(units)
}

// widest is the width of the widest of some texts.
func (f *faces) widest(t style, texts []string) float64 {
	most := 0.0
	for _, text := range texts {
		most = max(most, f.wide(t, text))
	}
	return most
}

// clean makes a text of outside origin fit to be drawn.
func clean(text string) string { return strings.TrimSpace(digest.Clean(text)) }

// mostLines is how many lines a name may take.
const mostLines = 3

// wrapped breaks a name into lines of at most a width: after its joints where it has
// any, else anywhere; what does not fit is cut, and shown to be.
func (f *faces) wrapped(t style, name string, width float64) []string {
	var all []string
	line := ""
	for _, piece := range pieces(clean(name)) {
		for f.wide(t, line+piece) > width && line != "" {
			all, line = append(all, line), ""
		}
		for f.wide(t, piece) > width {
			n := f.fits(t, piece, width)
			all, piece = append(all, string([]rune(piece)[:n])), string([]rune(piece)[n:])
		}
		line += piece
	}
	if line != "" {
		all = append(all, line)
	}
	if len(all) > mostLines {
		all = all[:mostLines]
		all[mostLines-1] = strings.TrimRight(all[mostLines-1], " ") + "…"
	}
	return all
}

// fits is how many runes of a text fit into a width, at least one.
func (f *faces) fits(t style, text string, width float64) int {
	n, sum := 0, 0.0
	for _, r := range text {
		if sum += f.advance(t, r) * t.size; sum > width {
			break
		}
		n++
	}
	return max(n, 1)
}

// pieces takes a name apart after its joints.
func pieces(name string) []string {
	var all []string
	start := 0
	for i, r := range name {
		if strings.ContainsRune("._ -/", r) {
			all = append(all, name[start:i+1])
			start = i + 1
		}
	}
	return append(all, name[start:])
}
