package page

import (
	"slices"
	"strings"
	"unicode/utf8"

	"kilovet/reports/digest"
	"kilovet/rules/exhibit"
)

// want is how wide a column of a table is in runes: with its longest word or number
// unbroken, and with its longest text on one line.
type want struct{ least, whole int }

// Sizes of columns in runes.
const (
	longestWord = 16
	longestText = 60
	lineRunes   = 88 // of a whole line of a sheet
)

// crowded is the part of a full line that goes to long texts all the same.
const crowded = 0.3

// columns shares the width of a table: each has room for its longest number or word,
// and what is left goes to those with long texts.
func columns(t exhibit.Table) []Column {
	wants := make([]want, len(t.Columns))
	least, whole := 0, 0
	for i := range t.Columns {
		wants[i] = wanted(t, i)
		least, whole = least+wants[i].least, whole+wants[i].whole
	}
	var all []Column
	for i, c := range t.Columns {
		share := float64(wants[i].whole) / float64(whole)
		switch spare := lineRunes - least; {
		case whole > lineRunes && float64(spare) < crowded*lineRunes: // too many columns: none starves
			share = (1-crowded)*float64(wants[i].least)/float64(least) + crowded*float64(wants[i].whole-wants[i].least)/float64(max(1, whole-least))
		case whole > lineRunes:
			share = (float64(wants[i].least) + float64(spare)*float64(wants[i].whole-wants[i].least)/float64(max(1, whole-least))) / lineRunes
		}
		all = append(all, Column{Title: c.Head, Share: share, Right: c.Unit != "" && !holdsWords(t, i)})
	}
	return summing(all)
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
	w := want{least: longest(t.Columns[i].Head), whole: min(utf8.RuneCountInString(t.Columns[i].Head), longestWord)}
	for _, row := range t.Rows {
		text := digest.Cell(t.Columns[i].Unit, row[i].Value, row[i].Text)
		n := utf8.RuneCountInString(text)
		w.whole = max(w.whole, min(n, longestText))
		if row[i].Value != nil {
			w.least = max(w.least, n)
		} else {
			w.least = max(w.least, longest(text))
		}
	}
	w.least += 2 // and the space beside it
	w.whole = max(w.whole+2, w.least)
	return w
}

// longest is the length of the longest word, as far as it is kept whole.
func longest(text string) int {
	n := 0
	for _, word := range strings.Fields(text) {
		n = max(n, min(utf8.RuneCountInString(word), longestWord))
	}
	return n
}

func holdsWords(t exhibit.Table, i int) bool {
	return slices.ContainsFunc(t.Rows, func(row []exhibit.Cell) bool { return row[i].Value == nil && row[i].Text != "" })
}
