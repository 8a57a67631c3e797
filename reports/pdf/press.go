package pdf

import (
	"bytes"
	"errors"
	"fmt"

	"kilovet/hv/parallel"
	"kilovet/reports/drawing"
	"kilovet/reports/page"
)

// Press is what sheets need that does not depend on what stands on them: the type, to
// measure with and to embed, and pens. It makes one document.
type Press struct {
	paper       Paper
	ready       chan struct{}
	err         error
	fonts       *fonts
	pen, beside *drawing.Pen
	binding     *binding
}

// Begin sets a press up, while its caller goes on.
func Begin(p Paper) *Press {
	press := &Press{paper: p, ready: make(chan struct{})}
	go func() {
		defer close(press.ready)
		defer func() {
			if what := recover(); what != nil {
				press.err = fmt.Errorf("pdf: %v%s", what, parallel.Place())
			}
		}()
		press.setUp()
	}()
	return press
}

func (p *Press) setUp() {
	var errs [4]error
	p.fonts, errs[0] = newFonts()
	p.pen, errs[1] = drawing.NewPen()
	p.beside, errs[2] = drawing.NewPen()
	if errs[0] == nil {
		p.binding, errs[3] = newBinding(p.paper, p.fonts.common(regular), p.fonts.common(bold))
	}
	p.err = errors.Join(errs[:]...)
}

// Render sets the document. It is called once.
func (p *Press) Render(d *page.Document) ([]byte, error) {
	<-p.ready
	if p.err != nil {
		return nil, p.err
	}
	w := p.laidOut(foresee(d, p.beside, p.paper.area()), d)
	return p.printed(w, d.Block)
}

// laidOut is the layout of a document, whose curves are drawn meanwhile.
func (p *Press) laidOut(curves *ahead, d *page.Document) (w *flow) {
	parallel.Do(
		func() { w = layout(p.fonts, p.paper.area(), p.pen, curves, d) },
		curves.draw,
	)
	return w
}

// printed is the file with the sheets of a layout in it.
func (p *Press) printed(w *flow, block page.TitleBlock) (file []byte, err error) {
	painted, err := p.painted(w)
	if err == nil && !(runesOf(painted, regular).commons() && runesOf(painted, bold).commons()) {
		painted, err = p.paintedAnew(w)
	}
	if err != nil {
		return nil, err
	}
	var sheets [][]byte
	var small *deflater
	parallel.Do(
		func() { file, err = p.binding.bound(w, block, painted) },
		func() { sheets, small = deflateAll(painted) },
	)
	if err == nil {
		file, err = assembled(file, sheets, small)
	}
	if err != nil {
		return nil, err
	}
	return withoutMoment(withoutMoment(file, "CreationDate", issued(block)), "ModDate", undated), nil
}

// paintedAnew is painted, with the whole type, whose cuts have other names.
func (p *Press) paintedAnew(w *flow) (painted []*painter, err error) {
	if p.binding, err = newBinding(p.paper, bytes.Clone(cuts[regular]), bytes.Clone(cuts[bold])); err != nil {
		return nil, err
	}
	return p.painted(w)
}

// painted is what is seen on the sheets.
func (p *Press) painted(w *flow) ([]*painter, error) {
	all, errs := make([]*painter, len(w.sheets)), make([]error, len(w.sheets))
	parallel.Each(len(w.sheets), func(i int) {
		all[i] = newPainter(w.fonts, p.binding.cuts, p.paper)
		errs[i] = all[i].paint(w.sheets[i])
	})
	for i, err := range errs {
		if err != nil {
			return nil, fmt.Errorf("pdf: sheet %d: %w", i+1, err)
		}
	}
	return all, nil
}
