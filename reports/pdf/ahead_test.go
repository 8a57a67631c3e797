package pdf

import (
	"bytes"
	"testing"

	"kilovet/reports/internal/sample"
	"kilovet/reports/page"
)

// curved is a review with curves.
func curved() *page.Document {
	r := sample.Failing()
	r.Curves = sample.Curves()
	return page.New(r)
}

// Every curve of the sheets is drawn ahead, in the width it stands in, and none besides;
// the file is the one that is had by drawing each when its turn comes.
func TestCurvesAreDrawnAhead(t *testing.T) {
	d := curved()
	press := readyPress(t)
	curves := foresee(d, press.beside, a4)
	w := press.laidOut(curves, d)
	drawn := 0
	for wanted := range w.drawn {
		if wanted.curve == nil {
			continue
		}
		drawn++
		if curves.ready[wanted] == nil {
			t.Errorf("a curve %.0f mm wide was not foreseen", wanted.width)
		}
	}
	if drawn < 4 || drawn != len(curves.order) {
		t.Errorf("%d curves stand on the sheets, %d were drawn ahead", drawn, len(curves.order))
	}
	ahead, err := press.printed(w, d.Block)
	now, err2 := readyPress(t).printed(layout(testFonts(t), a4, testPen(), nil, d), d.Block)
	if err != nil || err2 != nil || !bytes.Equal(ahead, now) {
		t.Errorf("%d bytes drawn ahead (%v), %d drawn in turn (%v), not the same", len(ahead), err, len(now), err2)
	}
}

// readyPress has been set up.
func readyPress(t *testing.T) *Press {
	t.Helper()
	p := Begin(A4)
	if <-p.ready; p.err != nil {
		t.Fatal(p.err)
	}
	return p
}

// A pen that breaks leaves nobody waiting.
func TestBrokenPenLeavesNobodyWaiting(t *testing.T) {
	d := curved()
	curves := foresee(d, nil, a4)
	func() {
		defer func() {
			if recover() == nil {
				t.Error("no pen drew")
			}
		}()
		curves.draw()
	}()
	if w := layout(testFonts(t), a4, testPen(), curves, d); len(w.sheets) == 0 {
		t.Error("nothing was laid out")
	}
}
