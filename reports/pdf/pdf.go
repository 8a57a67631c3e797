// Package pdf sets a page model on sheets, A4 or Letter. It is the only importer of the PDF
// library, which is kept behind a guard: text is made fit for the fonts, and
// coordinates are checked, before anything goes in. The same model gives the same
// bytes.
package pdf

import (
	"bytes"
	"fmt"
	"time"

	"codeberg.org/go-fonts/dejavu/dejavusans"
	"codeberg.org/go-fonts/dejavu/dejavusansbold"
	"github.com/jung-kurt/gofpdf"

	"kilovet/hv/parallel"
	"kilovet/reports/drawing"
	"kilovet/reports/page"
)

// undated is a moment for the library, which knows no file without one and else asks
// the clock; the sheets hold none, their date of issue is an input.
var undated = time.Date(2000, time.January, 1, 0, 0, 0, 0, time.UTC)

// Render sets the document on A4.
func Render(d *page.Document) ([]byte, error) { return RenderOn(A4, d) }

// RenderOn sets the document on a paper.
func RenderOn(p Paper, d *page.Document) ([]byte, error) {
	fonts, err := newFonts()
	if err != nil {
		return nil, err
	}
	pen, err := drawing.NewPen()
	if err != nil {
		return nil, err
	}
	beside, err := drawing.NewPen()
	if err != nil {
		return nil, err
	}
	w, empty := prepared(fonts, pen, foresee(d, beside, p.area()), p, d)
	return painted(w, empty, d.Block)
}

// painted is the file with the sheets of a layout in it.
func painted(w *flow, empty *gofpdf.Fpdf, block page.TitleBlock) ([]byte, error) {
	out := &painter{Fpdf: empty, fonts: w.fonts, links: map[string]int{}}
	w.announce(out)
	for i, s := range w.sheets {
		out.AddPage()
		if err := paint(out, s); err != nil {
			return nil, fmt.Errorf("pdf: sheet %d: %w", i+1, err)
		}
	}
	return finished(out, block)
}

// prepared is the document laid out, and a file to paint it in, whose fonts are read and
// whose curves are drawn meanwhile.
func prepared(f *fonts, pen *drawing.Pen, curves *ahead, p Paper, d *page.Document) (w *flow, empty *gofpdf.Fpdf) {
	names := f.names(d.Block)
	parallel.Do(
		func() { w = layout(f, p.area(), pen, curves, d) },
		curves.draw,
		func() { empty = blank(p, d.Block, names) },
	)
	return w, empty
}

// finished is the bytes of the file, compressed, and without moments that nobody named.
func finished(out *painter, block page.TitleBlock) ([]byte, error) {
	var small deflating
	if err := out.Output(&small); err != nil {
		return nil, fmt.Errorf("pdf: %w", err)
	}
	return withoutMoment(withoutMoment(small.file, "CreationDate", issued(block)), "ModDate", undated), nil
}

// names are what the file says of itself.
type names struct{ title, program string }

func (f *fonts) names(b page.TitleBlock) names {
	return names{f.guard(regular, b.Title), f.guard(regular, b.Program)}
}

// issued is the date of issue where it is written as ISO 8601 has it; else undated.
func issued(b page.TitleBlock) time.Time {
	if day, err := time.Parse(time.DateOnly, b.Date); err == nil {
		return day
	}
	return undated
}

// withoutMoment puts spaces in the place of a moment that is undated, so that the file
// claims none and every offset in it stays true.
func withoutMoment(file []byte, key string, moment time.Time) []byte {
	entry := []byte("/" + key + " (D:" + undated.Format("20060102150405") + ")")
	at := bytes.LastIndex(file, entry)
	if !moment.Equal(undated) || at < 0 {
		return file
	}
	copy(file[at:], bytes.Repeat([]byte{' '}, len(entry)))
	return file
}

// blank is a file without sheets. The library writes into the fonts it is given.
func blank(p Paper, block page.TitleBlock, n names) *gofpdf.Fpdf {
	width, height := p.size()
	out := gofpdf.NewCustom(&gofpdf.InitType{OrientationStr: "P", UnitStr: "mm", Size: gofpdf.SizeType{Wd: width, Ht: height}})
	out.SetCompression(false) // see deflated
	out.SetCatalogSort(true)
	out.SetCreationDate(issued(block))
	out.SetModificationDate(undated)
	out.SetAutoPageBreak(false, 0)
	out.SetTitle(n.title, true)
	out.SetCreator(n.program, true)
	out.AddUTF8FontFromBytes(family, "", bytes.Clone(dejavusans.TTF))
	out.AddUTF8FontFromBytes(family, "B", bytes.Clone(dejavusansbold.TTF))
	return out
}
