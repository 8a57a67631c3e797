package html

import (
	"fmt"
	"html/template"
	"slices"

	"gonum.org/v1/plot/vg"

	"kilovet/reports/digest"
	"kilovet/reports/drawing"
	"kilovet/rules"
	"kilovet/rules/exhibit"
)

// chapter is what the review shows of a part of the chain beside findings.
type chapter struct {
	ID, Title string
	Curves    []curve
	Exhibits  []exhibited
	Figures   []table
}

type curve struct {
	ID, Title, Note, Basis string
	Drawing                template.HTML
}

// exhibited is a table of the review.
type exhibited struct {
	ID, Title, Note, Basis string
	Folded                 string // what stands in its place until it is opened; empty where it is open
	Columns                []column
	Rows                   template.HTML
}

// mostRows is how many rows of a table are open from the beginning.
const mostRows = 60

// folded says what a table holds that is for whoever looks closely, or that is long.
func folded(t exhibit.Table) string {
	if !t.Detail && len(t.Rows) <= mostRows {
		return ""
	}
	return fmt.Sprintf("%d rows, to be opened to be read or printed", len(t.Rows))
}

type column struct {
	Head   string
	Number bool
}

// curveWidth is how wide curves are drawn before they are fitted to the page.
const curveWidth = 115 * vg.Millimeter

func chapters(pen *drawing.Pen, r *rules.Review) []chapter {
	var all []chapter
	for _, c := range digest.Chapters(r) {
		out := chapter{ID: "chapter-" + string(c.Of), Title: c.Title, Figures: figureTables(string(c.Of), c.Figures)}
		for i, given := range c.Curves {
			given = digest.Thinned(given)
			id := fmt.Sprintf("curve-%s-%d", c.Of, i+1)
			picture := pen.Curve(given, curveWidth).SVG(id+"-drawing", titled(given.Title, given.Subject), digest.CurveWords(given))
			out.Curves = append(out.Curves, curve{id, titled(given.Title, given.Subject), clean(given.Note), clean(given.Basis), template.HTML(picture)})
		}
		for i, given := range c.Tables {
			out.Exhibits = append(out.Exhibits, exhibitedOf(fmt.Sprintf("table-%s-%d", c.Of, i+1), given))
		}
		if len(out.Curves)+len(out.Exhibits)+len(out.Figures) > 0 {
			all = append(all, out)
		}
	}
	return all
}

func titled(title, subject string) string { return clean(digest.Titled(title, subject)) }

func exhibitedOf(id string, t exhibit.Table) exhibited {
	out := exhibited{ID: id, Title: titled(t.Title, t.Subject), Note: clean(t.Note), Basis: clean(t.Basis), Folded: folded(t)}
	for i, c := range t.Columns {
		words := slices.ContainsFunc(t.Rows, func(row []exhibit.Cell) bool { return row[i].Value == nil && row[i].Text != "" })
		out.Columns = append(out.Columns, column{clean(c.Head), c.Unit != "" && !words})
	}
	var rows [][]string
	for _, row := range t.Rows {
		var cells []string
		for i, cell := range row {
			cells = append(cells, clean(digest.Cell(t.Columns[i].Unit, cell.Value, cell.Text)))
		}
		rows = append(rows, cells)
	}
	out.Rows = rowsOf(out.Columns, rows)
	return out
}
