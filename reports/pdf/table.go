package pdf

import (
	"slices"

	"kilovet/reports/page"
)

// gutter is the space between columns, in millimetres.
const gutter = 2.0

// table sets a table; its column titles stand again on every sheet it goes on to.
func (w *flow) table(t page.Table) {
	if len(t.Rows) == 0 {
		return
	}
	w.gap(2.5)
	head := func() { w.head(t.Columns) }
	rows := w.tableRows(t, head)
	title := append(w.wrap(strong, t.Title, w.across), w.wrap(small, t.Note, w.across)...)
	start := height(title) + 2 + w.headTall(t.Columns)
	if all := start + total(rows); all <= wholeTable {
		w.room(all)
	} else {
		w.room(min(start+max(together(rows, 0), min(total(rows[:min(3, len(rows))]), startOfTable)), w.bottom-w.top-keep))
	}
	w.anchor(t.Anchor, w.y)
	w.row(row{cells: []rowCell{{width: w.across, lines: title}}})
	if len(title) > 0 {
		w.y += 1
	}
	head()
	for i, r := range rows {
		w.begin(r, min(together(rows, i), w.bottom-w.top-keep))
		w.row(r)
	}
	w.legend(t.Title, t.Legend)
	w.y += 1
}

// wholeTable is up to what height a table stands on one sheet, in millimetres.
const wholeTable = 45.0

// startOfTable is how much of a long table should follow its title, in millimetres.
const startOfTable = 20.0

func total(rows []row) float64 {
	sum := 0.0
	for _, r := range rows {
		sum += r.height()
	}
	return sum
}

// legend is what stands under a table; on another sheet than its last row it says whose it
// is.
func (w *flow) legend(of string, lines []page.Line) {
	again := func() {
		if of != "" {
			w.place(row{pad: 0.3, cells: []rowCell{{width: w.across, lines: w.fit(column, of+", notes", w.across, 1)}}})
		}
	}
	for _, l := range lines {
		w.row(row{pad: 0.3, again: again, cells: []rowCell{{width: w.across, lines: w.cell([]page.Line{l}, w.across)}}})
	}
}

// tableStart is the height of what must stay together at the beginning of a table:
// title, heads of the columns and the first row.
func (w *flow) tableStart(t page.Table) float64 {
	title := append(w.wrap(strong, t.Title, w.across), w.wrap(small, t.Note, w.across)...)
	t.Rows = t.Rows[:min(2, len(t.Rows))]
	return height(title) + 2 + w.headTall(t.Columns) + together(w.tableRows(t, func() {}), 0)
}

// filled is the table cut to the rows that the sheet holds beside what follows it, at
// least one, with a row that counts the others.
func (w *flow) filled(t page.Table, after float64) page.Table {
	room := w.bottom - after - w.y - 4.5 - w.headTall(t.Columns)
	rows := w.tableRows(t, func() {})
	heights := func(upTo int) (sum float64) {
		for _, r := range rows[:upTo] {
			sum += r.height()
		}
		return sum
	}
	if heights(len(rows)) <= room {
		return t
	}
	rest := w.tableRows(page.Table{Columns: t.Columns, Rows: []page.Row{t.Rest(0)}}, func() {})[0].height()
	n := len(rows) - 1
	for n > 1 && (heights(n)+rest > room || t.Rows[n-1].Group) {
		n--
	}
	t.Rows = append(slices.Clone(t.Rows[:n]), t.Rest(n))
	return t
}

// headLines is how many lines the title of a column may take.
const headLines = 4

// headTall is what the titles of these columns take.
func (w *flow) headTall(columns []page.Column) float64 {
	most := 0.0
	for _, c := range columns {
		most = max(most, height(w.fit(column, c.Title, c.Share*w.across-gutter, headLines)))
	}
	return most + 2 + w.overTall(columns)
}

// overTall is what stands above the titles of the columns takes.
func (w *flow) overTall(columns []page.Column) float64 {
	most := 0.0
	for _, o := range w.overs(columns) {
		most = max(most, height(o.lines)+1)
	}
	return most
}

// over is a title that spans columns beside each other.
type over struct {
	x, width float64
	lines    []set
}

func (w *flow) overs(columns []page.Column) []over {
	var all []over
	x := 0.0
	for i, c := range columns {
		wide := c.Share * w.across
		switch {
		case c.Over == "":
		case i > 0 && columns[i-1].Over == c.Over:
			all[len(all)-1].width += wide
		default:
			all = append(all, over{x: x, width: wide - gutter})
			all[len(all)-1].lines = []set{{text: c.Over}}
		}
		x += wide
	}
	for i := range all {
		all[i].lines = w.fit(column, all[i].lines[0].text, all[i].width, 2)
	}
	return all
}

// headHeight is the most that the titles of the columns take.
const headHeight = 16.0

// head is the titles of the columns between two lines.
func (w *flow) head(columns []page.Column) {
	w.sheet().add(stroke{w.left, w.y, w.right, w.y, 0.35, 0})
	tall := w.overTall(columns)
	for _, o := range w.overs(columns) {
		x := w.left + o.x
		w.centred(x, w.y+tall-height(o.lines)-0.4+column.size*points, o.width, o.lines, false)
		w.sheet().add(stroke{x + 1, w.y + tall, x + o.width, w.y + tall, 0.15, 0})
	}
	w.y += tall
	titles := row{pad: 1}
	x := 0.0
	for _, c := range columns {
		titles.cells = append(titles.cells, rowCell{x: x, width: c.Share*w.across - gutter, lines: w.fit(column, c.Title, c.Share*w.across-gutter, headLines), right: c.Right})
		x += c.Share * w.across
	}
	w.place(titles)
	w.sheet().add(stroke{w.left, w.y, w.right, w.y, 0.2, 0})
}

// tableRows sets the rows; one that goes on to another sheet has the titles, and
// its group, above it again.
func (w *flow) tableRows(t page.Table, head func()) []row {
	var rows []row
	var group row
	for i, r := range t.Rows {
		alone := i+1 == len(t.Rows) || !t.Rows[i+1].Under
		cells := w.tableCells(t.Columns, r)
		set := row{cells: cells, pad: padding(r, cells), ruled: !r.Group || alone, again: head, group: r.Group, to: r.Anchor}
		if r.Group {
			group = set
		}
		if above := group; r.Under && above.height() <= keep-headHeight {
			set.again = func() { head(); w.place(above) }
		}
		rows = append(rows, set)
	}
	return rows
}

// padding sets rows of one line, and rows that belong together, closer.
func padding(r page.Row, cells []rowCell) float64 {
	if r.Under || !slices.ContainsFunc(cells, func(c rowCell) bool { return len(c.lines) > 1 || c.verdict != "" }) {
		return 0.25
	}
	return 0.5
}

func (w *flow) tableCells(columns []page.Column, r page.Row) []rowCell {
	if r.Group {
		return []rowCell{{width: w.across, lines: w.cell(r.Cells[0].Lines, w.across)}}
	}
	var cells []rowCell
	x := 0.0
	for i, c := range r.Cells {
		wide := columns[i].Share*w.across - gutter
		cells = append(cells, rowCell{x: x, width: wide, lines: w.cell(c.Lines, wide), right: columns[i].Right, verdict: c.Verdict})
		x += columns[i].Share * w.across
	}
	return cells
}

// together is the height that must stay on one sheet: a row, and the one after it
// if the row is the head of a group.
func together(rows []row, i int) float64 {
	h := rows[i].height()
	if rows[i].group && i+1 < len(rows) {
		h += rows[i+1].height()
	}
	return h
}
