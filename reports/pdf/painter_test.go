package pdf

import (
	"bytes"
	"math"
	"regexp"
	"slices"
	"strings"
	"testing"

	"github.com/jung-kurt/gofpdf"
)

// A text is written in the codes in which the library writes it: brackets and marks that
// end a string, and signs of two bytes that hold such marks.
func TestTextIsThatOfTheLibrary(t *testing.T) {
	texts := []string{"20 kV (peak)", "a\\b", "a\rb", "1 µA at 20 kV", "\u5c28\u2829\u0d5c", "", "20 kV (peak)"}
	binding, err := newBinding(A4, bytes.Clone(cuts[regular]), bytes.Clone(cuts[bold]))
	if err != nil {
		t.Fatal(err)
	}
	want := binding.CreateTemplate(func(out *gofpdf.Tpl) {
		out.SetFont(family, "", 7.5)
		for _, s := range texts {
			out.Text(12.3, 45.6, s)
		}
	}).Bytes()
	got := testPainter(t)
	for _, s := range texts {
		got.text(12.3, 45.6, s)
	}
	strings := regexp.MustCompile(`(?s)Td (\(.*?\) Tj) ET`)
	said := func(content []byte) (all []string) {
		for _, m := range strings.FindAllSubmatch(content, -1) {
			all = append(all, string(m[1]))
		}
		return all
	}
	if len(said(want)) != len(texts) || !slices.Equal(said(got.content), said(want)) {
		t.Errorf("%q is not %q of the library", said(got.content), said(want))
	}
}

// What is set holds until it is set otherwise, and is written once; what is set while
// something is turned holds only there.
func TestStateIsWrittenWhereItChanges(t *testing.T) {
	p := testPainter(t)
	line := stroke{x2: 1, width: 0.2, grey: 128}
	line.draw(p)
	line.draw(p)
	box{w: 1, h: 1, width: 0.2, dashed: true}.draw(p)
	line.draw(p)
	p.fill(white)
	p.turned(10, 20, math.Pi/2, func() {
		p.fill(ink{1, 128, 254})
		p.letters(bold, 7.5)
	})
	p.fill(white)
	p.letters(bold, 7.5)
	for what, want := range map[string]int{"0.502 G\n": 2, "0.57 w\n": 1, "[3.4 2.27 ] 0 d\n": 1, "[] 0 d\n": 1, "0.000 G\n": 1, "1.000 g\n": 1, "0.004 0.502 0.996 rg\n": 1, "/B 7.5 Tf\n": 2} {
		if got := strings.Count(string(p.content), what); got != want {
			t.Errorf("%q stands %d times, not %d, in\n%s", what, got, want, p.content)
		}
	}
	// A quarter turn about 28.35 pt and 841.89 pt less 56.69 pt.
	if want := "0.00000 1.00000 -1.00000 0.00000 813.54 756.85 cm\n"; !strings.Contains(string(p.content), want) {
		t.Errorf("%q is missing in\n%s", want, p.content)
	}
}

func TestNumbersToTheHundredth(t *testing.T) {
	for v, want := range map[float64]string{0: "0 ", 12: "12 ", -0.004: "0 ", 0.05: "0.05 ", -1.25: "-1.25 ", 841.896: "841.9 ", 99.999: "100 "} {
		p := testPainter(t)
		if p.number(v); string(p.content) != want {
			t.Errorf("%g is written %q, not %q", v, p.content, want)
		}
	}
}

// Every text of the sheets, in pictures too, has its glyphs in the file.
func TestEveryRuneIsEmbedded(t *testing.T) {
	d := curved()
	press := readyPress(t)
	w := press.laidOut(&ahead{}, d)
	painted, err := press.painted(w)
	if err != nil {
		t.Fatal(err)
	}
	var all [2]runes
	for _, p := range painted {
		for c := range all {
			all[c].join(&p.runes[c])
		}
	}
	for _, s := range w.sheets {
		for _, i := range s.items {
			if text, is := i.(written); is {
				for _, r := range text.text {
					if !slices.Contains(all[text.style.face].list(), r) {
						t.Fatalf("%q of %q is not embedded", r, text.text)
					}
				}
			}
		}
	}
	if len(all[regular].list()) < 40 || len(all[bold].list()) < 20 {
		t.Errorf("%d and %d runes", len(all[regular].list()), len(all[bold].list()))
	}
}
