package pdf

import (
	"fmt"
	"strings"

	"kilovet/reports/page"
)

// widestNumber is the room that the number of a sheet takes.
const widestNumber = "000"

// anchor remembers where links to a name lead: to the first place that has it.
func (w *flow) anchor(name string, y float64) {
	if _, known := w.anchors[name]; name != "" && !known {
		w.anchors[name] = spot{len(w.sheets), y}
	}
}

// links makes the words of set lines lead where they say.
func (w *flow) links(x, y float64, lines []set) {
	for _, l := range lines {
		for _, link := range l.links {
			if link.To != "" {
				w.link(x, y, l, link)
			}
		}
		y += l.style.leading()
	}
}

func (w *flow) link(x, y float64, l set, to page.Link) {
	from, width := 0.0, w.width(l.style, l.text)
	if l.sheet != "" {
		width = w.width(l.style, widestNumber)
	}
	if to.Word != "" {
		before, _, found := strings.Cut(" "+l.text+" ", " "+to.Word)
		if !found {
			return
		}
		before = strings.TrimPrefix(before+" ", " ")
		from, width = w.width(l.style, before), w.width(l.style, to.Word)
	}
	w.sheet().add(jump{x: x + from, y: y, w: width, h: l.style.leading(), to: to.To})
}

// resolve writes the numbers of sheets that are referred to.
func (w *flow) resolve(s *sheet) {
	for i, it := range s.items {
		r, ok := it.(*reference)
		if !ok {
			continue
		}
		text := ""
		if at, there := w.anchors[r.to]; there {
			text = fmt.Sprint(at.sheet)
		}
		s.items[i] = written{x: r.right - w.width(r.style, text), y: r.y, set: set{style: r.style, text: text}}
	}
}

// reference is the number of a sheet, once it is known.
type reference struct {
	x, y, right float64
	style       style
	to          string
}

func (r *reference) nowhere() bool { return lost(r.x, r.y, r.right) }
func (r *reference) draw(*painter) { panic("pdf: a sheet is referred to by no number") }

// jump is a place that leads to another.
type jump struct {
	x, y, w, h float64
	to         string
}

func (j jump) nowhere() bool { return lost(j.x, j.y, j.w, j.h) }

func (j jump) note(b *binding) {
	if link, there := b.links[j.to]; there {
		b.Link(j.x, j.y, j.w, j.h, link)
	}
}

// bookmark is an entry in the outline of the file.
type bookmark struct {
	title string
	y     float64
}

func (m bookmark) nowhere() bool { return lost(m.y) }

func (m bookmark) note(b *binding) { b.Bookmark(m.title, 0, m.y) }

// contents lists sections with their sheets, in two columns.
func (w *flow) contents(c page.Contents) {
	if len(c.Entries) == 0 {
		return
	}
	const gap, number = 10.0, 8.0
	wide := (w.across - gap) / 2
	line := body.leading() + 1.2
	rows := (len(c.Entries) + 1) / 2
	w.gap(4)
	w.room(float64(rows)*line + 6)
	w.sheet().add(stroke{w.left, w.y, w.right, w.y, 0.35, 0})
	w.sheet().lines(w.left, w.y+1, w.fit(column, "Contents, with sheets", w.across, 1))
	top := w.y + 6
	for i, e := range c.Entries {
		x, y := w.left+float64(i/rows)*(wide+gap), top+float64(i%rows)*line
		w.sheet().lines(x, y, w.fit(body, e.Title, wide-number-2, 1))
		w.sheet().add(&reference{x: x + wide - number, y: y + body.size*points, right: x + wide, style: body, to: e.Anchor})
		w.sheet().add(stroke{x, y + line - 0.4, x + wide, y + line - 0.4, 0.1, 120})
		w.sheet().add(jump{x, y, wide, line, e.Anchor})
	}
	w.y = top + float64(rows)*line
}
