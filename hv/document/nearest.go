package document

import (
	"strings"
	"unicode/utf8"
)

// Nearest finds the word that was most likely meant: the same letters in another
// case, a beginning of at least three letters, or a few slips of the pen. It looks
// at the first 500 words.
func Nearest(word string, among []string) (string, bool) {
	best, least := "", 1e9
	for _, candidate := range among[:min(len(among), 500)] {
		if d := distance(word, candidate); d < least {
			best, least = candidate, d
		}
	}
	return best, least <= 1
}

// distance is zero for words that differ by case only and at most one for words
// that are near enough to be offered.
func distance(word, candidate string) float64 {
	const longest = 64 // of a word worth comparing
	w, c := strings.ToLower(word), strings.ToLower(candidate)
	shorter, longer := utf8.RuneCountInString(w), utf8.RuneCountInString(c)
	if shorter > longer {
		shorter, longer = longer, shorter
	}
	switch {
	case w == c:
		return 0
	case longer > longest:
		return 2
	case shorter >= 3 && (strings.HasPrefix(c, w) || strings.HasPrefix(w, c)):
		return 0.5 + 0.4*float64(longer-shorter)/longest
	}
	allowed := max(1, longer/3)
	return float64(slips([]rune(w), []rune(c))) / float64(allowed)
}

// Slips counts the letters dropped, added, replaced or swapped with a neighbour
// between two words.
func Slips(a, b string) int { return slips([]rune(a), []rune(b)) }

// slips is Slips (restricted Damerau-Levenshtein distance).
func slips(a, b []rune) int {
	before, last, row := make([]int, len(b)+1), make([]int, len(b)+1), make([]int, len(b)+1)
	for j := range last {
		last[j] = j
	}
	for i := range a {
		row[0] = i + 1
		for j := range b {
			replaced := last[j]
			if a[i] != b[j] {
				replaced++
			}
			row[j+1] = min(replaced, last[j+1]+1, row[j]+1)
			if i > 0 && j > 0 && a[i] == b[j-1] && a[i-1] == b[j] {
				row[j+1] = min(row[j+1], before[j-1]+1)
			}
		}
		before, last, row = last, row, before
	}
	return last[len(b)]
}
