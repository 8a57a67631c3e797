package text

import (
	"strings"

	"kilovet/reports/digest"
	"kilovet/reports/lines"
)

// longestWord is the width below which a text is broken inside a word, or between a number and its
// unit.
func longestWord(s string) (most int) {
	for _, word := range digest.Held(s) {
		most = max(most, runes(word))
	}
	return most
}

// longestPiece is the width below which a text is broken inside what holds together.
func longestPiece(s string) (most int) {
	for _, word := range strings.Fields(s) {
		for word != "" {
			end := len(word)
			if i := strings.IndexAny(word, lines.Separators); i >= 0 {
				end = i + 1
			}
			most = max(most, runes(word[:end]))
			word = word[end:]
		}
	}
	return most
}
