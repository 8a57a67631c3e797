// Package pdf sets a page model on sheets, A4 or Letter. It is the only importer of the PDF
// library, which is kept behind a guard: text is made fit for the fonts, and
// coordinates are checked, before anything goes in. The same model gives the same
// bytes.
package pdf

import "kilovet/reports/page"

// Render sets the document on A4.
func Render(d *page.Document) ([]byte, error) { return RenderOn(A4, d) }

// RenderOn sets the document on a paper.
func RenderOn(p Paper, d *page.Document) ([]byte, error) { return Begin(p).Render(d) }
