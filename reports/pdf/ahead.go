package pdf

import (
	"kilovet/reports/drawing"
	"kilovet/reports/page"
)

// ahead draws the curves of a document in the order in which they are laid out, while
// they are.
type ahead struct {
	pen   *drawing.Pen // its own: a pen draws one picture at a time
	order []asked
	ready map[asked]*sketch
}

// sketch is a picture to come.
type sketch struct {
	done    chan struct{}
	picture *drawing.Picture // nil where it was not drawn
}

// foresee lists the curves of a document in the widths that galleries give them.
func foresee(d *page.Document, pen *drawing.Pen, a area) *ahead {
	all := &ahead{pen: pen, ready: map[asked]*sketch{}}
	w := flow{area: a}
	for _, s := range d.Sections {
		for _, b := range s.Blocks {
			if g, is := b.(page.Gallery); is {
				all.gallery(&w, g.Figures)
			}
		}
	}
	return all
}

func (a *ahead) gallery(w *flow, figures []page.Figure) {
	for len(figures) > 0 {
		row := w.rowWidths(figures)
		for i, width := range row {
			wanted := asked{figures[i].Curve, nil, width}
			if wanted.curve != nil && a.ready[wanted] == nil {
				a.order = append(a.order, wanted)
				a.ready[wanted] = &sketch{done: make(chan struct{})}
			}
		}
		figures = figures[len(row):]
	}
}

// draw draws them all. What it leaves undrawn is given up.
func (a *ahead) draw() {
	next := 0
	defer func() {
		for _, wanted := range a.order[next:] {
			close(a.ready[wanted].done)
		}
	}()
	for ; next < len(a.order); next++ {
		wanted := a.order[next]
		s := a.ready[wanted]
		s.picture = a.pen.Curve(*wanted.curve, millimetres(wanted.width))
		close(s.done)
	}
}

// picture waits for a curve; nil where it was not foreseen.
func (a *ahead) picture(wanted asked) *drawing.Picture {
	if a == nil || a.ready[wanted] == nil {
		return nil
	}
	<-a.ready[wanted].done
	return a.ready[wanted].picture
}
