package pdf

import (
	"fmt"
	"math"
	"slices"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/reports/internal/sample"
	"kilovet/reports/page"
)

// Figures that wait for the next sheet stand there clear of what goes on around them,
// in their order and all of them; no heading of a table stays alone above them.
func TestFiguresThatWaitStandClear(t *testing.T) {
	f := testFonts(t)
	curves := sample.Curves()
	chance.Check(t, func(t *rapid.T) {
		var gallery page.Gallery
		for i := range rapid.IntRange(1, 5).Draw(t, "figures") {
			curve := curves[rapid.IntRange(0, 2).Draw(t, "curve")]
			gallery.Figures = append(gallery.Figures, page.Figure{Anchor: fmt.Sprint("figure ", i), Label: "Figure", Caption: "caption", Curve: &curve, Wide: rapid.Bool().Draw(t, "wide")})
		}
		table := page.Table{Title: "title", Columns: []page.Column{{Title: "one", Share: 0.5}, {Title: "two", Share: 0.5}}}
		for range rapid.IntRange(1, 60).Draw(t, "rows") {
			table.Rows = append(table.Rows, page.Row{Cells: []page.Cell{{Lines: slices.Repeat([]page.Line{{Text: "cell"}}, rapid.IntRange(1, 6).Draw(t, "lines"))}, {}}})
		}
		w := newFlow(f, a4, testPen())
		w.turn()
		w.y += rapid.Float64Range(0, 230).Draw(t, "from")
		w.section(page.Section{Title: "Chapter", Blocks: []page.Block{gallery, table, page.Halves{Blocks: []page.Block{table}}, table}})
		drawn := 0
		for i, s := range w.sheets {
			drawn += len(pictures(s))
			for _, head := range texts(s, "one") {
				if !slices.ContainsFunc(texts(s, "cell"), func(c written) bool { return c.y > head.y && math.Abs(c.x-head.x) < 1 }) {
					t.Fatalf("sheet %d: the head of a table has no row under it", i+1)
				}
			}
			all := append(pictures(s), places(f, s)...)
			for j, p := range all {
				if p.bottom > a4.bottom+0.01 {
					t.Fatalf("sheet %d: %+v leaves the body", i+1, p)
				}
				for _, q := range all[:j] {
					if p.left < q.right-0.01 && q.left < p.right-0.01 && p.top < q.bottom-0.01 && q.top < p.bottom-0.01 {
						t.Fatalf("sheet %d: %+v collides with %+v", i+1, p, q)
					}
				}
			}
		}
		if drawn != len(gallery.Figures) {
			t.Fatalf("%d figures of %d", drawn, len(gallery.Figures))
		}
		for i := 1; i < len(gallery.Figures); i++ {
			if w.anchors[fmt.Sprint("figure ", i)].sheet < w.anchors[fmt.Sprint("figure ", i-1)].sheet {
				t.Fatalf("figure %d stands before the one before it", i)
			}
		}
	})
}

// texts are the places of a text on a sheet.
func texts(s *sheet, text string) []written {
	var all []written
	for _, i := range s.items {
		if w, ok := i.(written); ok && w.text == text {
			all = append(all, w)
		}
	}
	return all
}
