package pdf

import (
	"kilovet/reports/drawing"
	"kilovet/reports/page"
)

// flow fills sheets from the top.
type flow struct {
	*fonts
	area
	pen     *drawing.Pen
	ahead   *ahead
	sheets  []*sheet
	y       float64
	anchors map[string]spot
	drawn   map[asked]framed
	halves  *halves       // while pieces stand in two columns
	waiting []page.Figure // for the next sheet
}

// spot is where links lead.
type spot struct {
	sheet int
	y     float64
}

func newFlow(f *fonts, a area, pen *drawing.Pen) *flow {
	return &flow{fonts: f, area: a, pen: pen, anchors: map[string]spot{}, drawn: map[asked]framed{}}
}

// trial is an empty flow on the same kind of sheet, to see what room things take.
func (w *flow) trial(y float64) *flow {
	t := newFlow(w.fonts, w.area, w.pen)
	t.sheets, t.y, t.drawn, t.ahead = []*sheet{{}}, y, w.drawn, w.ahead
	return t
}

// layout sets the document on sheets and gives each its frame and title block.
func layout(f *fonts, a area, pen *drawing.Pen, drawn *ahead, d *page.Document) *flow {
	w := newFlow(f, a, pen)
	w.ahead = drawn
	w.turn()
	for _, s := range d.Sections {
		w.section(s)
	}
	for i, s := range w.sheets {
		w.frame(s, d.Block, i+1, len(w.sheets))
		w.resolve(s)
	}
	return w
}

// turn begins a new sheet, or the second column of this one.
func (w *flow) turn() {
	if w.halves != nil && w.halves.turn(w) {
		return
	}
	w.sheets = append(w.sheets, &sheet{})
	w.y = w.top
	w.show()
}

func (w *flow) sheet() *sheet { return w.sheets[len(w.sheets)-1] }

func (w *flow) fresh() bool { return w.y == w.top }

// room turns the sheet where less than the height is left, unless it is empty; again
// where waiting figures have taken the next.
func (w *flow) room(height float64) {
	for w.y+height > w.bottom && !w.fresh() {
		w.turn()
	}
}

// gap leaves space between blocks, none at the top of a sheet.
func (w *flow) gap(height float64) {
	if !w.fresh() {
		w.y += height
	}
}

// keep is how much of a section should follow its heading on the same sheet.
const keep = 24.0

func (w *flow) section(s page.Section) {
	if s.Fresh && !w.fresh() || s.Whole && !w.holds(s) {
		w.turn()
	}
	w.gap(6)
	lines := append(w.wrap(strong, s.Lead, w.across), w.wrap(heading, s.Title, w.across)...)
	w.room(min(height(lines)+w.first(s.Blocks), w.bottom-w.top-1))
	if !w.fresh() {
		w.sheet().add(stroke{w.left, w.y - 2.5, w.right, w.y - 2.5, 0.5, 0})
	}
	w.anchor(s.Anchor, w.y)
	w.sheet().add(bookmark{w.guard(regular, s.Title), w.y})
	w.sheet().lines(w.left, w.y, lines)
	w.y += height(lines) + 1.5
	for i, b := range s.Blocks {
		if t, ok := b.(page.Table); ok && t.Fill {
			b = w.filled(t, w.tall(s.Blocks[i+1:]))
		}
		w.block(b)
	}
	for len(w.waiting) > 0 {
		w.turn()
	}
}

// first is how much must follow a heading on the same sheet.
func (w *flow) first(blocks []page.Block) float64 {
	if len(blocks) == 0 {
		return 0
	}
	if g, ok := blocks[0].(page.Gallery); ok && len(g.Figures) > 0 {
		if high := w.firstRow(g) + 4; len(blocks) == 1 || w.y+high+keep < w.bottom || w.fresh() {
			return high
		}
		return w.first(blocks[1:])
	}
	if _, ok := blocks[0].(page.Halves); ok {
		return keep + 4
	}
	if t, ok := blocks[0].(page.Table); ok && len(t.Rows) > 0 && !t.Fill {
		return min(w.tableStart(t)+6, (w.bottom-w.top)/3)
	}
	return keep
}

// tall is the height that blocks take after others on a sheet of their own.
func (w *flow) tall(blocks []page.Block) float64 {
	trial := w.trial(w.top + 1)
	for _, b := range blocks {
		trial.block(b)
	}
	if len(trial.sheets) > 1 {
		return w.bottom - w.top
	}
	return trial.y - w.top - 1
}

// holds reports whether what is left of the sheet takes the section whole.
func (w *flow) holds(s page.Section) bool {
	trial := w.trial(w.y)
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
		w.row(row{cells: []rowCell{{width: w.across, lines: w.wrap(body, b.Text, w.across)}}})
	case page.Facts:
		w.facts(b)
	case page.Table:
		w.table(b)
	case page.Halves:
		w.inHalves(b)
	case page.Gallery:
		w.gallery(b)
	case page.Contents:
		w.contents(b)
	case page.Signatures:
		w.signatures(b)
	}
}
