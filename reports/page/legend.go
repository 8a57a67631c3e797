package page

import (
	"unicode/utf8"

	"kilovet/rules/exhibit"
)

// longAgain is how many runes a text has that is told once under a table instead of in
// every row, longBeside one that stands in a column of such notes.
const (
	longAgain  = 30
	longBeside = 16
)

// legend is texts that stand under a table, with the notes that refer to them in its
// cells.
type legend struct {
	letters map[string]string
	lines   []Line
}

// newLegend takes, as they are read, the longer texts of columns in which a long one comes
// more than once.
func newLegend(rows [][]string) *legend {
	l := &legend{letters: map[string]string{}}
	if len(rows) == 0 {
		return l
	}
	taken := make([]bool, len(rows[0]))
	for i := range taken {
		taken[i] = again(rows, i)
	}
	for _, row := range rows {
		for i, text := range row {
			if taken[i] {
				l.take(text)
			}
		}
	}
	return l
}

func again(rows [][]string, column int) bool {
	seen := map[string]bool{}
	for _, row := range rows {
		if t := row[column]; seen[t] {
			return true
		} else {
			seen[t] = long(t)
		}
	}
	return false
}

func long(text string) bool { return utf8.RuneCountInString(text) > longAgain }

func (l *legend) take(text string) {
	if utf8.RuneCountInString(text) <= longBeside || l.letters[text] != "" {
		return
	}
	l.letters[text] = "note " + lettered(len(l.lines))
	l.lines = append(l.lines, small(l.letters[text]+": "+text))
}

const alphabet = "abcdefghijklmnopqrstuvwxyz"

// lettered counts in letters: a to z, aa, ab and so on.
func lettered(n int) string {
	if n < len(alphabet) {
		return alphabet[n : n+1]
	}
	return lettered(n/len(alphabet)-1) + lettered(n%len(alphabet))
}

// short is the letter of a text, or the text.
func (l *legend) short(text string) string {
	if letter := l.letters[text]; letter != "" {
		return letter
	}
	return text
}

// withLegend is a table with letters for its long texts that come again, and what they
// stand for. The first column says what a row is about, and keeps its texts.
func withLegend(t exhibit.Table) (exhibit.Table, []Line) {
	words := make([][]string, len(t.Rows))
	for i, row := range t.Rows {
		words[i] = make([]string, len(row))
		for j, c := range row {
			if j > 0 && c.Value == nil {
				words[i][j] = c.Text
			}
		}
	}
	l := newLegend(words)
	if len(l.lines) == 0 {
		return t, nil
	}
	rows := make([][]exhibit.Cell, len(t.Rows))
	for i, row := range t.Rows {
		rows[i] = make([]exhibit.Cell, len(row))
		for j, c := range row {
			if j > 0 && c.Value == nil {
				c.Text = l.short(c.Text)
			}
			rows[i][j] = c
		}
	}
	t.Rows = rows
	return t, l.lines
}
