package text

import "kilovet/reports/lines"

// mostShort is how long a text may be to stand beside others in a list.
const mostShort = 30

// none is a cell of a table that has nothing to tell.
const none = "–"

// list writes each row as what it is about and, indented, headings with their texts,
// short ones beside each other, where columns do not fit.
func (g *grid) list() {
	for _, row := range g.cells {
		g.hang("  -", 4, row[0])
		var short []string
		for i, c := range row[1:] {
			text := g.heads[1+i] + ": " + c
			switch {
			case c == "" || c == none:
			case runes(c) <= mostShort:
				short = append(short, text)
			default:
				g.beside(short)
				g.hang("", 6, text)
				short = nil
			}
		}
		g.beside(short)
	}
}

// beside writes texts one after the other, breaking lines between them.
func (g *grid) beside(texts []string) {
	for i := range texts[:max(0, len(texts)-1)] {
		texts[i] += ";"
	}
	g.lines("", 6, lines.Filled(texts, g.width-6))
}
