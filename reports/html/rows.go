package html

import (
	"html/template"
	"strings"

	"kilovet/reports/digest"
)

// rowsOf is the rows of a table, the first cell of each a heading. Most of a page is
// such rows; a template takes several times as long for them.
func rowsOf(columns []column, rows [][]string) template.HTML {
	var b strings.Builder
	for _, row := range rows {
		b.WriteString("<tr>")
		for i, cell := range row {
			switch {
			case i == 0:
				element(&b, `<th scope="row">`, cell, "</th>")
			case columns[i].Number:
				element(&b, `<td class="number">`, cell, "</td>")
			default:
				element(&b, "<td>", cell, "</td>")
			}
		}
		b.WriteString("</tr>\n")
	}
	return template.HTML(b.String())
}

// figureRows is the rows of a group of figures.
func figureRows(g digest.Group) template.HTML {
	var b strings.Builder
	for _, row := range g.Rows {
		element(&b, `<tr><th scope="row">`, clean(row.Subject), "</th>")
		for _, v := range row.Values {
			element(&b, `<td class="number">`, v, "</td>")
		}
		b.WriteString("</tr>\n")
	}
	return template.HTML(b.String())
}

// element is a text between its marks, whatever the text holds.
func element(b *strings.Builder, open, text, end string) {
	b.WriteString(open)
	b.WriteString(template.HTMLEscapeString(text))
	b.WriteString(end)
}
