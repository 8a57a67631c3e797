package pdf

import "kilovet/rules/rule"

// row is cells side by side, set from the same height.
type row struct {
	cells []rowCell
	ruled bool    // a thin line under it
	bar   bool    // a bar at its left
	group bool    // stays with the row after it
	pad   float64 // above and below the text
	again func()  // what to repeat at the top of a sheet the row goes on to
	to    string  // what links lead to
}

// rowCell is lines of text, or a verdict, in its place, from the left of the column it
// is set in.
type rowCell struct {
	x, width float64
	lines    []set
	right    bool
	verdict  rule.Verdict
}

// tagHeight is the height a verdict takes in a row.
const tagHeight = 4.6

func (c rowCell) height() float64 {
	if c.verdict != "" {
		return tagHeight
	}
	return height(c.lines)
}

func (r row) height() float64 {
	most := 0.0
	for _, c := range r.cells {
		most = max(most, c.height())
	}
	return most + 2*r.pad
}

// row places a row whole where a sheet can hold it, and otherwise as much of it as
// fits on each sheet.
func (w *flow) row(r row) {
	if r.height() <= w.bottom-w.top-keep {
		w.begin(r, r.height())
		w.place(r)
		return
	}
	for r.height() > w.bottom-w.y {
		now, later := r.split(w.bottom - w.y)
		if now.height() > 2*r.pad {
			w.place(now)
		}
		r = later
		w.turn()
		r.repeat()
	}
	w.place(r)
}

// begin turns the sheet where the height is not left and repeats what is to stand
// on top.
func (w *flow) begin(r row, height float64) {
	if w.y+height > w.bottom && !w.fresh() {
		w.turn()
		w.room(height + headHeight) // waiting figures may have left less than a head and a row
		r.repeat()
	}
}

func (r row) repeat() {
	if r.again != nil {
		r.again()
	}
}

// split takes from each cell the lines that fit into a height.
func (r row) split(room float64) (now, later row) {
	now, later = r, r
	now.cells, later.cells = nil, nil
	now.ruled = false
	for _, c := range r.cells {
		a, b := c.split(room - 2*r.pad)
		now.cells, later.cells = append(now.cells, a), append(later.cells, b)
	}
	return now, later
}

func (c rowCell) split(room float64) (now, later rowCell) {
	now, later = c, c
	if c.verdict != "" {
		if room < tagHeight {
			now.verdict = ""
		} else {
			later.verdict = ""
		}
		return now, later
	}
	n := 0
	for n < len(c.lines) && height(c.lines[:n+1]) <= room {
		n++
	}
	now.lines, later.lines = c.lines[:n], c.lines[n:]
	return now, later
}

// place draws a row at the present height.
func (w *flow) place(r row) {
	s := w.sheet()
	w.anchor(r.to, w.y)
	for _, c := range r.cells {
		c.x += w.left
		switch {
		case c.verdict != "":
			w.tag(c.x, w.y+r.pad, min(c.width, 20), c.verdict)
		case c.right:
			w.rightward(c, w.y+r.pad)
		default:
			s.lines(c.x, w.y+r.pad, c.lines)
			w.links(c.x, w.y+r.pad, c.lines)
		}
	}
	h := r.height()
	if r.bar {
		s.add(stroke{w.left, w.y, w.left, w.y + h, 0.7, 0})
	}
	w.y += h
	if r.ruled {
		s.add(stroke{w.left, w.y, w.right, w.y, 0.1, 120})
	}
}

func (w *flow) rightward(c rowCell, y float64) {
	for _, l := range c.lines {
		x := c.x + c.width - w.width(l.style, l.text)
		if l.sheet != "" {
			x = c.x + c.width - w.width(l.style, widestNumber)
			w.sheet().add(&reference{x: x, y: y + l.style.size*points, right: c.x + c.width, style: l.style, to: l.sheet})
		} else {
			w.sheet().add(written{x: x, y: y + l.style.size*points, set: l})
		}
		w.links(x, y, []set{l})
		y += l.style.leading()
	}
}
