package pdf

import "kilovet/reports/page"

// halves is two columns on a part of a sheet: the first ends where what is left would
// stand as high in both.
type halves struct {
	whole  area    // of the sheet
	from   float64 // top of the columns on this sheet
	second bool
	left   float64 // height of what is still to be set, in one column
	lowest float64 // what the columns of this sheet have reached
	broken bool    // pieces go on from one column to the other
}

// Sizes of columns in millimetres.
const (
	between     = 6.0  // two columns
	leastHalves = 40.0 // left of a sheet on which columns begin, unless all of it fits
	slack       = 4.0  // by which the first column may be longer
	leastColumn = 25.0 // of a first column
	uneven      = 22.0 // of which one column may be higher so that no piece is broken
)

// inHalves sets pieces in two columns.
func (w *flow) inHalves(b page.Halves) {
	if w.halves != nil || len(b.Blocks) == 0 {
		panic("pdf: columns within columns, or none")
	}
	half := w.area
	half.across = (w.across - between) / 2
	half.right = half.left + half.across
	heights := w.heights(half, b.Blocks)
	second, high := split(heights)
	w.gap(3)
	w.room(min(high, leastHalves))
	whole := w.y+high <= w.bottom
	w.halves = &halves{whole: w.area, from: w.y, left: sum(heights), broken: !whole || second == 0}
	w.area = half
	w.halves.begin(w)
	for i, block := range b.Blocks {
		if i == second && !w.halves.broken {
			w.turn()
		}
		w.block(block)
	}
	w.y = max(w.y, w.halves.lowest)
	w.area, w.halves = w.halves.whole, nil
}

// heights is what each of some pieces takes in one column without end.
func (w *flow) heights(half area, blocks []page.Block) []float64 {
	half.bottom = half.top + endless
	trial := w.trial(half.top + 1)
	trial.area = half
	var all []float64
	for _, b := range blocks {
		from := trial.y
		trial.block(b)
		all = append(all, trial.y-from)
	}
	return all
}

// split is which piece begins the second column where no piece is broken, and how high
// the columns then are; no piece begins it where it is better to break one.
func split(heights []float64) (second int, high float64) {
	all, first := sum(heights), 0.0
	second, high = len(heights), all // a single low piece stands whole in the first column
	for i, h := range heights {
		first += h
		if m := max(first, all-first); m < high {
			second, high = i+1, m
		}
	}
	if high > all/2+uneven {
		return 0, all/2 + slack
	}
	return second, high
}

func sum(all []float64) float64 {
	total := 0.0
	for _, v := range all {
		total += v
	}
	return total
}

// endless is higher than any sheet.
const endless = 5000.0

// begin sets the first column of a sheet.
func (h *halves) begin(w *flow) {
	w.top, w.y = h.from, h.from
	w.bottom = h.whole.bottom
	if h.broken {
		w.bottom = min(w.bottom, h.from+max(h.left/2+slack, leastColumn))
	}
	h.lowest = h.from
}

// turn goes on in the second column; it reports false where a new sheet begins, with its
// first column.
func (h *halves) turn(w *flow) bool {
	h.left -= w.y - h.from
	h.lowest = max(h.lowest, w.y)
	if !h.second {
		h.second = true
		w.left += w.across + between
		w.right += w.across + between
		w.y, w.bottom = h.from, h.whole.bottom
		return true
	}
	h.second = false
	w.left, w.right = h.whole.left, h.whole.left+w.across
	w.sheets = append(w.sheets, &sheet{})
	h.from = h.whole.top
	h.begin(w)
	return true
}
