package json

import "kilovet/rules/exhibit"

// The shapes of exhibits: points are pairs, cells are numbers in the unit of their
// column or texts.
type (
	curve struct {
		ID      string          `json:"id"`
		Subject string          `json:"subject"`
		Chapter exhibit.Chapter `json:"chapter"`
		Title   string          `json:"title"`
		X       axis            `json:"x"`
		Y       axis            `json:"y"`
		Lines   []polyline      `json:"lines"`
		Marks   []spot          `json:"marks"`
		Levels  []level         `json:"levels"`
		Areas   []area          `json:"areas"`
		Basis   string          `json:"basis"`
		Note    string          `json:"note"`
	}
	axis struct {
		What string `json:"what"`
		Unit string `json:"unit"`
		Log  bool   `json:"log"`
	}
	polyline struct {
		Name   string       `json:"name"`
		Points [][2]float64 `json:"points"`
		Kind   exhibit.Kind `json:"kind,omitempty"`
	}
	area struct {
		Name  string          `json:"name"`
		Share float64         `json:"share"`
		Boxes [][2][2]float64 `json:"boxes"`
	}
	spot struct {
		Name string     `json:"name"`
		At   [2]float64 `json:"at"`
	}
	level struct {
		Name  string  `json:"name"`
		Value float64 `json:"value"`
		Along bool    `json:"along"`
	}
	table struct {
		ID      string          `json:"id"`
		Subject string          `json:"subject"`
		Chapter exhibit.Chapter `json:"chapter"`
		Title   string          `json:"title"`
		Columns []column        `json:"columns"`
		Rows    [][]any         `json:"rows"`
		Basis   string          `json:"basis"`
		Note    string          `json:"note"`
	}
	column struct {
		Head string `json:"head"`
		Unit string `json:"unit"`
	}
)

func curveOf(c exhibit.Curve) curve {
	return curve{
		ID: c.ID, Subject: c.Subject, Chapter: c.Chapter, Title: c.Title, X: axis(c.X), Y: axis(c.Y),
		Lines: each(c.Lines, func(l exhibit.Line) polyline {
			return polyline{l.Name, each(l.Points, pair), l.Kind}
		}),
		Marks:  each(c.Marks, func(m exhibit.Mark) spot { return spot{m.Name, [2]float64{m.X, m.Y}} }),
		Levels: each(c.Levels, func(l exhibit.Level) level { return level(l) }),
		Areas: each(c.Areas, func(a exhibit.Area) area {
			return area{a.Name, a.Share, each(a.Boxes, func(b [2]exhibit.Point) [2][2]float64 { return [2][2]float64{pair(b[0]), pair(b[1])} })}
		}),
		Basis: c.Basis, Note: c.Note,
	}
}

func pair(p exhibit.Point) [2]float64 { return [2]float64{p.X, p.Y} }

func tableOf(t exhibit.Table) table {
	return table{
		ID: t.ID, Subject: t.Subject, Chapter: t.Chapter, Title: t.Title,
		Columns: each(t.Columns, func(c exhibit.Column) column { return column(c) }),
		Rows:    each(t.Rows, func(row []exhibit.Cell) []any { return each(row, cellOf) }),
		Basis:   t.Basis, Note: t.Note,
	}
}

func cellOf(c exhibit.Cell) any {
	if c.Value != nil {
		return *c.Value
	}
	return c.Text
}
