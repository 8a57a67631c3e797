package pdf

import (
	"strings"

	"kilovet/reports/page"
	"kilovet/rules/rule"
)

// mark draws the box of a verdict so that it is told apart without colour: fails
// is black, unassessed has a double line, marginal a broken one, meets a thin one.
// It reports whether what is written inside must be white.
func (s *sheet) mark(v rule.Verdict, x, y, width, height float64) (white bool) {
	switch v {
	case rule.Meets:
		s.add(box{x: x, y: y, w: width, h: height, width: 0.15})
	case rule.Marginal:
		s.add(box{x: x, y: y, w: width, h: height, width: 0.35, dashed: true})
	case rule.Unassessed:
		s.add(box{x: x, y: y, w: width, h: height, width: 0.35})
		s.add(box{x: x + 0.6, y: y + 0.6, w: width - 1.2, h: height - 1.2, width: 0.15})
	default:
		s.add(box{x: x, y: y, w: width, h: height, width: 0.35, filled: true})
		return true
	}
	return false
}

// tag is a verdict in its box.
func (w *flow) tag(x, y, width float64, v rule.Verdict) {
	white := w.sheet().mark(v, x, y, width, tagHeight-0.4)
	w.centred(x, y+tagHeight*0.5+tag.size*points*0.27, width, w.fit(tag, strings.ToUpper(string(v)), width-2, 1), white)
}

// centred sets lines in the middle of a width, the first on a base line.
func (w *flow) centred(x, baseline, width float64, lines []set, white bool) {
	for _, l := range lines {
		w.sheet().add(written{x: x + (width-w.width(l.style, l.text))/2, y: baseline, set: l, white: white})
		baseline += l.style.leading()
	}
}

// banner is the verdict of the review: its word in a box, the sentence beside it.
func (w *flow) banner(b page.Banner) {
	const wide = 58.0
	lines := append(w.wrap(answer, b.Sentence, w.across-wide-6), w.wrap(body, b.Rest, w.across-wide-6)...)
	high := max(17, height(lines)+4)
	w.gap(2)
	w.room(high)
	white := w.sheet().mark(b.Verdict, w.left, w.y, wide, high)
	w.centred(w.left, w.y+high/2+word.size*points*0.36, wide, w.fit(word, b.Word, wide-4, 1), white)
	w.sheet().lines(w.left+wide+6, w.y+(high-height(lines))/2, lines)
	w.y += high + 2
}

// notice is a paragraph with a bar at its side.
func (w *flow) notice(b page.Notice) {
	w.gap(2)
	w.row(row{bar: true, pad: 1, cells: []rowCell{{x: 3, width: w.across - 3, lines: w.wrap(body, b.Text, w.across-3)}}})
	w.y += 2
}

// facts is labels in a column and their texts beside them.
func (w *flow) facts(b page.Facts) {
	wide := min(40, w.across*0.36)
	w.gap(2)
	for _, f := range b.Facts {
		w.row(row{pad: 0.6, ruled: true, cells: []rowCell{
			{width: wide, lines: w.wrap(strong, f.Label, wide-3)},
			{x: wide, width: w.across - wide, lines: w.wrap(body, f.Text, w.across-wide)},
		}})
	}
}

// signatures is blanks side by side.
func (w *flow) signatures(b page.Signatures) {
	if len(b.Blanks) == 0 {
		return
	}
	const high = 36.0
	w.gap(3)
	w.room(high)
	wide := w.across / float64(len(b.Blanks))
	for i, blank := range b.Blanks {
		w.blank(w.left+float64(i)*wide, wide, high, blank)
	}
	w.y += high
}

func (w *flow) blank(x, wide, high float64, b page.Blank) {
	s := w.sheet()
	s.add(box{x: x, y: w.y, w: wide, h: high, width: 0.2})
	s.lines(x+2, w.y+1.5, w.fit(strong, b.Role, wide-4, 1))
	for i, what := range []string{"Name", "Signature", "Date"} {
		y := w.y + 14 + float64(i)*9
		s.add(stroke{x + 2, y, x + wide - 2, y, 0.15, 0})
		s.lines(x+2, y+0.4, w.fit(label, what, wide-4, 1))
	}
	name := w.fit(body, b.Name, wide-4, 2)
	s.lines(x+2, w.y+13.6-height(name), name)
}
