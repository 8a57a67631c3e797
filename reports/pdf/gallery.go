package pdf

import (
	"gonum.org/v1/plot/vg"

	"kilovet/reports/drawing"
	"kilovet/reports/page"
	"kilovet/rules/diagram"
	"kilovet/rules/exhibit"
)

// Sizes of a gallery in millimetres.
const (
	figureGap  = 6.0 // between two figures
	captionGap = 1.5 // between a picture and its caption
)

// framed is a picture with its caption, ready to be placed.
type framed struct {
	page.Figure
	picture       *drawing.Picture
	scale         float64
	width, height float64 // of the picture at its scale
	caption       []set
}

func (f framed) tall() float64 { return f.height + captionGap + height(f.caption) }

// gallery sets figures under each other, two beside each other where they are narrow;
// those that this sheet has no room for wait for the next, and what follows them goes on
// here.
func (w *flow) gallery(g page.Gallery) {
	w.waiting = append(w.waiting, g.Figures...)
	w.show()
}

// show sets waiting figures as far as they reach.
func (w *flow) show() {
	for len(w.waiting) > 0 {
		row := w.nextRow(w.waiting)
		if w.y+3+tallest(row) > w.bottom && !w.fresh() {
			return
		}
		w.waiting = w.waiting[len(row):]
		w.figures(row...)
	}
}

// nextRow draws the first of some figures, and the one beside it if there is one.
func (w *flow) nextRow(figures []page.Figure) []framed {
	var row []framed
	for i, width := range w.rowWidths(figures) {
		row = append(row, w.framed(figures[i], width))
	}
	return row
}

// rowWidths are the widths of the first of some figures, and of the one beside it if
// there is one.
func (w *flow) rowWidths(figures []page.Figure) []float64 {
	half := (w.across - figureGap) / 2
	if f := figures[0]; f.Wide || len(figures) == 1 || figures[1].Wide {
		return []float64{w.lone(f)}
	}
	return []float64{half, half}
}

// firstRow is the height of the first row.
func (w *flow) firstRow(g page.Gallery) float64 { return tallest(w.nextRow(g.Figures)) }

func tallest(row []framed) float64 {
	most := 0.0
	for _, f := range row {
		most = max(most, f.tall())
	}
	return most
}

// lone is the width of a figure that stands alone: of a curve, where little is to be
// explained, not the whole.
func (w *flow) lone(f page.Figure) float64 {
	if f.Wide {
		return w.across
	}
	return w.across * 0.7
}

// figures places figures beside each other, all on one sheet.
func (w *flow) figures(all ...framed) {
	most := tallest(all)
	w.gap(2.5)
	w.room(most)
	x := w.left
	for _, f := range all {
		w.anchor(f.Anchor, w.y)
		w.sheet().add(picture{x, w.y, f.scale, f.picture})
		w.spots(f, x, w.y)
		w.sheet().lines(x, w.y+f.height+captionGap, f.caption)
		x += f.width + figureGap
	}
	w.y += most + 3
}

// framed draws a figure for a width, once for all that ask.
func (w *flow) framed(f page.Figure, width float64) framed {
	wanted := asked{f.Curve, f.Diagram, width}
	known, there := w.drawn[wanted]
	if !there {
		known = w.draw(f, width)
		w.drawn[wanted] = known
	}
	return known
}

// asked is a picture of a width.
type asked struct {
	curve   *exhibit.Curve
	diagram *diagram.Diagram
	width   float64
}

// draw makes a picture smaller where a sheet would not hold it.
func (w *flow) draw(f page.Figure, width float64) framed {
	out := framed{Figure: f, caption: w.caption(f, width)}
	room := w.bottom - w.top - captionGap - height(out.caption) - 14
	if f.Diagram != nil {
		out.picture = w.pen.SchematicIn(f.Diagram, millimetres(width), millimetres(room))
	} else {
		out.picture = w.curve(asked{f.Curve, nil, width})
	}
	out.scale = out.picture.Scale(millimetres(width), millimetres(room))
	out.width, out.height = width, float64(out.picture.Height/vg.Millimeter)*out.scale
	return out
}

// curve is the picture of a curve, drawn ahead or now.
func (w *flow) curve(wanted asked) *drawing.Picture {
	if p := w.ahead.picture(wanted); p != nil {
		return p
	}
	return w.pen.Curve(*wanted.curve, millimetres(wanted.width))
}

func (w *flow) caption(f page.Figure, width float64) []set {
	label := w.wrap(tag, f.Label, width)
	return append(label, w.wrap(small, f.Caption, width)...)
}

// spots makes what is shown in a picture lead to what is said of it.
func (w *flow) spots(f framed, x, y float64) {
	if len(f.Spots) == 0 {
		return
	}
	for _, s := range f.picture.Spots() {
		if to := f.Spots[s.Of]; to != "" {
			low, high := inMillimetres(s.Area.Min), inMillimetres(s.Area.Max)
			w.sheet().add(jump{x + low[0]*f.scale, y + f.height - high[1]*f.scale, (high[0] - low[0]) * f.scale, (high[1] - low[1]) * f.scale, to})
		}
	}
}

func inMillimetres(p vg.Point) [2]float64 {
	return [2]float64{float64(p.X / vg.Millimeter), float64(p.Y / vg.Millimeter)}
}

func millimetres(v float64) vg.Length { return vg.Length(v) * vg.Millimeter }

// picture is a drawing with its top left corner at a place.
type picture struct {
	x, y, scale float64
	drawn       *drawing.Picture
}

func (p picture) nowhere() bool { return lost(p.x, p.y, p.scale) }

func (p picture) draw(out *painter) {
	c := newCanvas(out, p.x, p.y+float64(p.drawn.Height/vg.Millimeter)*p.scale, p.scale)
	p.drawn.Draw(c)
	out.refuse(c.err)
}
