package text

import (
	"slices"
	"strings"

	"kilovet/reports/digest"
	"kilovet/reports/lines"
	"kilovet/rules"
	"kilovet/rules/exhibit"
)

// exhibits writes the tables of a review, and its curves in words.
func exhibits(w *writer, r *rules.Review) {
	if len(r.Tables) > 0 {
		w.head("Tables")
	}
	for _, t := range r.Tables {
		w.blank()
		w.wrap(digest.Titled(t.Title, t.Subject))
		newGrid(w, t).write()
		w.remark(t.Note, t.Basis)
	}
	if len(r.Curves) == 0 {
		return
	}
	w.head("Curves, drawn by --pdf and --html")
	for _, c := range r.Curves {
		w.hang("-", 2, digest.Titled(c.Title, c.Subject)+". "+digest.CurveWords(c)+" "+c.Note)
		if c.Basis != "" {
			w.hang("  by", 5, c.Basis)
		}
	}
}

// remark is what stands under a table.
func (w *writer) remark(note, basis string) {
	if note != "" {
		w.hang("", 2, note)
	}
	if basis != "" {
		w.hang("  by", 5, basis)
	}
}

// grid sets a table with columns as wide as their texts, or narrower where the width
// asks for it.
type grid struct {
	*writer
	heads  []string
	cells  [][]string
	number []bool
	widths []int
}

// between stands between two columns.
const between = 2

func newGrid(w *writer, t exhibit.Table) *grid {
	g := &grid{writer: w}
	for i, c := range t.Columns {
		words := slices.ContainsFunc(t.Rows, func(row []exhibit.Cell) bool { return row[i].Value == nil && row[i].Text != "" })
		g.heads, g.number = append(g.heads, digest.Clean(c.Head)), append(g.number, c.Unit != "" && !words)
	}
	for _, row := range t.Rows {
		var cells []string
		for i, c := range row {
			cells = append(cells, digest.Clean(digest.Cell(t.Columns[i].Unit, c.Value, c.Text)))
		}
		g.cells = append(g.cells, cells)
	}
	g.widths = g.fitted()
	return g
}

// leastColumn is how narrow a column may be made.
const leastColumn = 8

// fitted is the width of each column: what its longest text takes, the widest made
// narrower until all fit. Words stay whole as long as that can be; where even pieces of
// words would have to be broken, or a text would stand as a column of single words, nil.
func (g *grid) fitted() []int {
	for _, piece := range []func(string) int{longestWord, longestPiece} {
		if widths := g.narrowed(piece); widths != nil {
			if g.thin(widths) {
				return nil
			}
			return widths
		}
	}
	return nil
}

// narrowed is the widths of columns that fit, none narrower than its longest piece; nil
// where there are none.
func (g *grid) narrowed(piece func(string) int) []int {
	widths, least := make([]int, len(g.heads)), make([]int, len(g.heads))
	sum := 2 + between*(len(widths)-1)
	for i := range widths {
		widths[i], least[i] = runes(g.heads[i]), max(leastColumn, piece(g.heads[i]))
		for _, row := range g.cells {
			widths[i] = max(widths[i], runes(row[i]))
			least[i] = max(least[i], g.unbroken(i, row[i], piece))
		}
		sum += widths[i]
	}
	for ; sum > g.width; sum-- {
		widest := widestAbove(widths, least)
		if widest < 0 {
			return nil
		}
		widths[widest]--
	}
	return widths
}

// unbroken is how wide a cell must be for nothing in it to be broken inside: numbers stay
// with their units.
func (g *grid) unbroken(column int, text string, piece func(string) int) int {
	if g.number[column] {
		return runes(text)
	}
	return piece(text)
}

// A text is thin where it takes more lines than thinLines in a column narrower than
// thinColumn.
const (
	thinLines  = 4
	thinColumn = 20
)

func (g *grid) thin(widths []int) bool {
	for _, row := range g.cells {
		for i, c := range row {
			if widths[i] < thinColumn && len(lines.Broken(c, widths[i])) > thinLines {
				return true
			}
		}
	}
	return false
}

// widestAbove is the widest column that is still wider than it must be, -1 for none.
func widestAbove(widths, least []int) int {
	widest := -1
	for i, w := range widths {
		if w > least[i] && (widest < 0 || w > widths[widest]) {
			widest = i
		}
	}
	return widest
}

func (g *grid) write() {
	if g.widths == nil {
		g.list()
		return
	}
	g.row(g.heads)
	for _, row := range g.cells {
		g.row(row)
	}
}

// row writes cells beside each other, each on as many lines as it takes.
func (g *grid) row(cells []string) {
	set := make([][]string, len(cells))
	most := 0
	for i, c := range cells {
		set[i] = lines.Broken(c, g.widths[i])
		most = max(most, len(set[i]))
	}
	for n := range most {
		var b strings.Builder
		b.WriteString("  ")
		for i := range cells {
			b.WriteString(g.padded(i, at(set[i], n)) + pad("", between))
		}
		g.line(b.String())
	}
}

func at(lines []string, n int) string {
	if n < len(lines) {
		return lines[n]
	}
	return ""
}

// padded sets numbers to the right.
func (g *grid) padded(column int, s string) string {
	if g.number[column] {
		return strings.Repeat(" ", g.widths[column]-runes(s)) + s
	}
	return pad(s, g.widths[column])
}
