package pdf

import (
	"fmt"
	"slices"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
	"kilovet/reports/page"
)

// Pieces of any height stand in two columns, each within its own, none on another, and
// none is lost.
func TestColumnsHoldPiecesOfAnyHeight(t *testing.T) {
	f := testFonts(t)
	chance.Check(t, func(t *rapid.T) {
		var halves page.Halves
		n := 0
		for range rapid.IntRange(1, 5).Draw(t, "tables") {
			table := page.Table{Title: "title", Columns: []page.Column{{Title: "one", Share: 0.3}, {Over: "over", Title: "two", Share: 0.4, Right: true}, {Over: "over", Title: "three", Share: 0.3}}}
			for range rapid.IntRange(1, 40).Draw(t, "rows") {
				n++
				lines := slices.Repeat([]page.Line{{Text: "line"}}, rapid.IntRange(1, 4).Draw(t, "lines"))
				table.Rows = append(table.Rows, page.Row{Cells: []page.Cell{{Lines: []page.Line{{Text: fmt.Sprintf("row%d", n)}}}, {Lines: lines}, {}}})
			}
			halves.Blocks = append(halves.Blocks, table)
		}
		w := newFlow(f, a4, testPen())
		w.turn()
		w.y += rapid.Float64Range(0, 240).Draw(t, "from")
		w.block(halves)
		w.block(page.Paragraph{Text: "after"})
		var seen []string
		middle := (a4.left + a4.right) / 2
		for i, s := range w.sheets {
			all := places(f, s)
			for j, p := range all {
				if p.left < a4.left || p.right > a4.right+0.01 || p.bottom > a4.bottom+0.01 || p.left < middle && p.right > middle {
					t.Fatalf("sheet %d: %+v leaves its column", i+1, p)
				}
				for _, q := range all[:j] {
					if p.left < q.right && q.left < p.right && p.top < q.bottom && q.top < p.bottom {
						t.Fatalf("sheet %d: %+v collides with %+v", i+1, p, q)
					}
				}
			}
			for _, word := range words(s) {
				if strings.HasPrefix(word, "row") {
					seen = append(seen, word)
				}
			}
		}
		if len(seen) != n || seen[0] != "row1" || seen[n-1] != fmt.Sprintf("row%d", n) {
			t.Fatalf("%d rows of %d", len(seen), n)
		}
	})
}

// Columns end about as high as each other.
func TestColumnsAreBalanced(t *testing.T) {
	f := testFonts(t)
	table := page.Table{Columns: []page.Column{{Title: "one", Share: 1}}}
	for i := range 60 {
		table.Rows = append(table.Rows, page.Row{Cells: []page.Cell{{Lines: []page.Line{{Text: fmt.Sprintf("row%d", i)}}}}})
	}
	w := newFlow(f, a4, testPen())
	w.turn()
	w.block(page.Halves{Blocks: []page.Block{table}})
	left, right := 0.0, 0.0
	for _, p := range places(f, w.sheets[0]) {
		if p.left < (a4.left+a4.right)/2 {
			left = max(left, p.bottom)
		} else {
			right = max(right, p.bottom)
		}
	}
	if len(w.sheets) != 1 || left-right > 12 || right-left > 12 {
		t.Errorf("%d sheets, columns down to %g and %g mm", len(w.sheets), left, right)
	}
	if w.y < left || w.y < right {
		t.Errorf("what follows stands at %g mm", w.y)
	}
}

// A piece goes to the second column whole where that leaves the columns even enough.
func TestPiecesStayWhole(t *testing.T) {
	for _, c := range []struct {
		heights []float64
		second  int
		high    float64
	}{
		{[]float64{30, 30}, 1, 30},
		{[]float64{20, 20, 40, 10}, 2, 50},
		{[]float64{100}, 0, 50 + slack},
		{[]float64{10, 100}, 0, 55 + slack},
	} {
		if second, high := split(c.heights); second != c.second || high != c.high {
			t.Errorf("%v: %d, %g", c.heights, second, high)
		}
	}
}

// A low table stands whole, in the first column.
func TestLowTableStandsWhole(t *testing.T) {
	f := testFonts(t)
	table := page.Table{Columns: []page.Column{{Title: "one", Share: 1}}}
	for i := range 4 {
		table.Rows = append(table.Rows, page.Row{Cells: []page.Cell{{Lines: []page.Line{{Text: fmt.Sprintf("row%d", i)}}}}})
	}
	w := newFlow(f, a4, testPen())
	w.turn()
	w.block(page.Halves{Blocks: []page.Block{table}})
	for _, p := range places(f, w.sheets[0]) {
		if p.left >= (a4.left+a4.right)/2 {
			t.Errorf("%+v stands in the second column", p)
		}
	}
}
