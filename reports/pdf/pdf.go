// Package pdf sets a page model on A4 sheets. It is the only importer of the PDF
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

	"kilovet/reports/page"
)

// undated stands where the file format wants a moment: sheets hold no clock, their
// date of issue is an input.
var undated = time.Date(2000, time.January, 1, 0, 0, 0, 0, time.UTC)

// Render sets the document.
func Render(d *page.Document) ([]byte, error) {
	fonts, err := newFonts()
	if err != nil {
		return nil, err
	}
	sheets := layout(fonts, d)
	out := blank(fonts, d.Block)
	for i, s := range sheets {
		out.AddPage()
		if err := paint(out, s); err != nil {
			return nil, fmt.Errorf("pdf: sheet %d: %w", i+1, err)
		}
	}
	var file bytes.Buffer
	if err := out.Output(&file); err != nil {
		return nil, fmt.Errorf("pdf: %w", err)
	}
	return file.Bytes(), nil
}

// blank is a file without sheets. The library writes into the fonts it is given.
func blank(fonts *fonts, block page.TitleBlock) *gofpdf.Fpdf {
	out := gofpdf.New("P", "mm", "A4", "")
	out.SetCatalogSort(true)
	out.SetCreationDate(undated)
	out.SetModificationDate(undated)
	out.SetAutoPageBreak(false, 0)
	out.SetTitle(fonts.guard(regular, block.Title), true)
	out.SetCreator(fonts.guard(regular, block.Program), true)
	out.AddUTF8FontFromBytes(family, "", bytes.Clone(dejavusans.TTF))
	out.AddUTF8FontFromBytes(family, "B", bytes.Clone(dejavusansbold.TTF))
	return out
}
