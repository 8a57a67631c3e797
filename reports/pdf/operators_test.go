package pdf

import (
	"bytes"
	"testing"

	"kilovet/reports/page"
)

// What is written here is what the library writes: brackets and marks that end a string,
// signs of two bytes that hold such marks, colours, cuts, and runes that come again.
func TestOperatorsAreThoseOfTheLibrary(t *testing.T) {
	texts := []string{"20 kV (peak)", "a\\b", "a\rb", "1 µA at 20 kV", "\u5c28\u2829\u0d5c", "", "20 kV (peak)"}
	written := func(text func(*painter, string)) []byte {
		out := &painter{Fpdf: blank(A4, page.TitleBlock{}, names{}), fonts: testFonts(t)}
		out.AddPage()
		for _, c := range []face{regular, bold, regular} {
			for _, ink := range [][3]int{{0, 0, 0}, {255, 255, 255}, {1, 128, 254}, {7, 7, 8}} {
				out.letters(c, 7.5)
				out.write(ink[0], ink[1], ink[2])
				for _, s := range texts {
					text(out, s)
				}
			}
			out.SetFillColor(1, 128, 254)
		}
		var file bytes.Buffer
		if err := out.Output(&file); err != nil {
			t.Fatal(err)
		}
		return file.Bytes()
	}
	want := written(func(p *painter, s string) { p.Fpdf.Text(12.3, 45.6, s) })
	got := written(func(p *painter, s string) { p.Text(12.3, 45.6, s) })
	if !bytes.Equal(got, want) {
		t.Error("a file with texts is not that of the library")
	}
}
