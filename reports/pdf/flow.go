package pdf

import "kilovet/reports/page"

// The sheet, in millimetres: A4 with the borders of ISO 5457 (20 on the filing
// side, 10 on the others), the title block at the foot of the frame.
const (
	frameLeft   = 20.0
	frameRight  = 200.0
	frameTop    = 10.0
	frameBottom = 287.0
	blockHeight = 30.0

	left   = frameLeft + 5
	right  = frameRight - 5
	top    = frameTop + 6
	bottom = frameBottom - blockHeight - 4
	across = right - left
)

// flow fills sheets from the top.
type flow struct {
	*fonts
	sheets []*sheet
	y      float64
}

// layout sets the document on sheets and gives each its frame and title block.
func layout(f *fonts, d *page.Document) []*sheet {
	w := &flow{fonts: f}
	w.turn()
	for _, s := range d.Sections {
		w.section(s)
	}
	for i, s := range w.sheets {
		frame(f, s, d.Block, i+1, len(w.sheets))
	}
	return w.sheets
}

// turn begins a new sheet.
func (w *flow) turn() {
	w.sheets = append(w.sheets, &sheet{})
	w.y = top
}

func (w *flow) sheet() *sheet { return w.sheets[len(w.sheets)-1] }

func (w *flow) fresh() bool { return w.y == top }

// room turns the sheet where less than the height is left, unless it is empty.
func (w *flow) room(height float64) {
	if w.y+height > bottom && !w.fresh() {
		w.turn()
	}
}

// gap leaves space between blocks, none at the top of a sheet.
func (w *flow) gap(height float64) {
	if !w.fresh() {
		w.y += height
	}
}

// keep is how much of a section must follow its heading on the same sheet.
const keep = 24.0

func (w *flow) section(s page.Section) {
	if s.Fresh && !w.fresh() || s.Whole && !w.holds(s) {
		w.turn()
	}
	w.gap(7)
	lines := append(w.wrap(strong, s.Lead, across), w.wrap(heading, s.Title, across)...)
	w.room(height(lines) + keep)
	w.sheet().lines(left, w.y, lines)
	w.y += height(lines) + 1.5
	for i, b := range s.Blocks {
		if t, ok := b.(page.Table); ok && t.Fill {
			b = w.filled(t, w.tall(s.Blocks[i+1:]))
		}
		w.block(b)
	}
}

// tall is the height that blocks take after others on a sheet of their own.
func (w *flow) tall(blocks []page.Block) float64 {
	trial := &flow{fonts: w.fonts, sheets: []*sheet{{}}, y: top + 1}
	for _, b := range blocks {
		trial.block(b)
	}
	if len(trial.sheets) > 1 {
		return bottom - top
	}
	return trial.y - top - 1
}

// holds reports whether what is left of the sheet takes the section whole.
func (w *flow) holds(s page.Section) bool {
	trial := &flow{fonts: w.fonts, sheets: []*sheet{{}}, y: w.y}
	s.Whole = false
	trial.section(s)
	return w.fresh() || len(trial.sheets) == 1
}

func (w *flow) block(b page.Block) {
	switch b := b.(type) {
	case page.Banner:
		w.banner(b)
	case page.Notice:
		w.notice(b)
	case page.Paragraph:
		w.gap(1.5)
		w.row(row{cells: []rowCell{{x: left, width: across, lines: w.wrap(body, b.Text, across)}}})
	case page.Facts:
		w.facts(b)
	case page.Table:
		w.table(b)
	case page.Signatures:
		w.signatures(b)
	}
}
