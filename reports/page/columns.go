package page

import (
	"slices"
	"strings"
	"unicode/utf8"

	"kilovet/reports/digest"
	"kilovet/rules/exhibit"
)

// want is how wide a column of a table is in runes: with its longest word or number
// unbroken, with its longest text on one line, and with the longest that cannot be
// broken between words; and whether it holds numbers, with short words at most.
type want struct {
	least, whole, name int
	number             bool
}

// Sizes of columns in runes.
const (
	longestWord = 16
	longestText = 60
	shortWords  = 11  // are not broken
	lineRunes   = 112 // of a whole line of a sheet
	halfRunes   = 54  // of a line of half the width

	letter, digit = 8, 9 // how wide they are beside each other
)

// columns shares the width of a table, which may be half a line: each column has room
// for its longest number or word, and what is left goes to those with long texts. Where
// even that is too much, numbers stay whole and words break.
func columns(t exhibit.Table) (all []Column, narrow bool) {
	wants := make([]want, len(t.Columns))
	least, whole, folded := 0, 0, 0
	for i := range t.Columns {
		w := wanted(t, i)
		least, whole, folded = least+w.least, whole+w.whole, folded+max(w.least, w.whole*85/100, w.name)
		wants[i] = w
	}
	line := lineRunes
	if folded <= halfRunes {
		line, narrow = halfRunes, true
	}
	spare := line - least
	for i, c := range t.Columns {
		w := wants[i]
		share := float64(w.whole)
		switch {
		case whole > line && spare <= 0 && w.number:
			share = 1.3 * float64(w.least)
		case whole > line && spare <= 0:
			share = max(0.6*float64(w.least)+0.3*float64(w.whole), float64(min(w.whole, shortWords)+1))
		case whole > line:
			share = float64(w.least) + float64(spare)*float64(w.whole-w.least)/float64(max(1, whole-least))
		}
		all = append(all, Column{Title: c.Head, Share: share, Right: w.number})
	}
	return summing(all), narrow
}

// summing lets shares sum to one.
func summing(all []Column) []Column {
	sum := 0.0
	for _, c := range all {
		sum += c.Share
	}
	for i := range all {
		all[i].Share /= sum
	}
	return all
}

func wanted(t exhibit.Table, i int) want {
	w := want{least: longest(t.Columns[i].Head), whole: longest(t.Columns[i].Head)}
	for _, row := range t.Rows {
		text := digest.Cell(t.Columns[i].Unit, row[i].Value, row[i].Text)
		n := utf8.RuneCountInString(text)
		if row[i].Value != nil || n <= shortWords {
			w.least, w.whole = max(w.least, n), max(w.whole, n)
		} else {
			line := min(n*letter/digit, longestText)
			w.least, w.whole = max(w.least, longest(text)), max(w.whole, line)
			if !strings.Contains(text, " ") {
				w.name = max(w.name, line+2)
			}
		}
	}
	w.number = t.Columns[i].Unit != "" && !holdsTexts(t, i)
	w.least += 2 // and the space beside it
	w.whole = max(w.whole+2, w.least)
	return w
}

// longest is the length of the longest word, or number with its unit, as far as it is kept whole.
func longest(text string) int {
	n := 0
	for _, word := range digest.Held(text) {
		n = max(n, min(utf8.RuneCountInString(word), longestWord))
	}
	return n
}

// holdsTexts reports whether there is more than a short word beside numbers.
func holdsTexts(t exhibit.Table, i int) bool {
	return slices.ContainsFunc(t.Rows, func(row []exhibit.Cell) bool {
		return row[i].Value == nil && utf8.RuneCountInString(row[i].Text) > shortWords
	})
}
