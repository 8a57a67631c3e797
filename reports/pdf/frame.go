package pdf

import (
	"fmt"

	"kilovet/reports/page"
)

// field is one data field of the title block.
type field struct {
	label, text string
	share       float64 // of the width of the frame
}

// frame draws the border and the title block of a sheet: the data fields of ISO
// 7200, with blanks to write in where nothing was given.
func (w *flow) frame(s *sheet, b page.TitleBlock, n, of int) {
	s.add(box{x: w.frameLeft, y: w.frameTop, w: w.frameRight - w.frameLeft, h: w.frameBottom - w.frameTop, width: 0.5})
	rows := [][]field{
		{{"Legal owner", b.Owner, 0.25}, {"Title", b.Title, 0.46}, {"Document type", b.DocumentType, 0.29}},
		{{"Identification number", b.Document, 0.19}, {"Revision index", b.Revision, 0.1}, {"Creator", b.Creator, 0.17}, {"Approval person", b.Approver, 0.17}, {"Date of issue", b.Date, 0.13}, {"Made by", b.Program, 0.14}, {"Sheet", fmt.Sprintf("%d of %d", n, of), 0.1}},
	}
	high := blockHeight / float64(len(rows))
	for i, fields := range rows {
		y := w.frameBottom - blockHeight + float64(i)*high
		s.add(stroke{w.frameLeft, y, w.frameRight, y, 0.25, 0})
		x := w.frameLeft
		for _, d := range fields {
			wide := d.share * (w.frameRight - w.frameLeft)
			w.field(s, d, x, y, wide, high)
			x += wide
		}
	}
}

// field writes a data field under its label: on one line where that does, else
// smaller on two.
func (w *flow) field(s *sheet, d field, x, y, wide, high float64) {
	if x > w.frameLeft {
		s.add(stroke{x, y, x, y + high, 0.15, 0})
	}
	s.lines(x+1.2, y+0.4, w.fit(label, d.label, wide-2.4, 1))
	lines := w.wrap(body, d.text, wide-2.4)
	if len(lines) > 1 {
		lines = w.fit(small, d.text, wide-2.4, 2)
	}
	s.lines(x+1.2, y+3, lines)
}
