package digest

import (
	"strings"

	"kilovet/hv/quantity"
)

// Held takes a text apart where a line may end: at its spaces, but at none between a
// number and its unit.
func Held(s string) []string {
	var all []string
	last := ""
	for _, word := range strings.Fields(s) {
		if holds(last, word) {
			all[len(all)-1] += " " + word
		} else {
			all = append(all, word)
		}
		last = word
	}
	return all
}

// Parts reports whether a line may end at a space of a text that has one space between
// its words.
func Parts(s string, space int) bool {
	before := s[:space]
	after, _, _ := strings.Cut(s[space+1:], " ")
	return !holds(before[strings.LastIndexByte(before, ' ')+1:], after)
}

// longestUnit is how many bytes a word may have to be a unit.
const longestUnit = 10

// holds reports whether a word stays with the one before it: a unit with its number, and
// the second word of a unit with the first; signs and brackets around them aside.
func holds(before, after string) bool {
	if before == "" || len(after) > longestUnit {
		return false
	}
	unit := strings.TrimRight(after, ".,;:)]\"")
	if digit(before[len(before)-1]) {
		return number(strings.TrimLeft(before, "(≤≥±+-−<>~=\"")) && quantity.IsUnit(unit)
	}
	return strings.HasSuffix(unit, "m") && quantity.IsUnit(before) && quantity.IsUnit(before+" "+unit)
}

func number(s string) bool {
	if s == "" || !digit(s[0]) {
		return false
	}
	for i := range len(s) {
		if !digit(s[i]) && !strings.ContainsRune(".,eE-+", rune(s[i])) {
			return false
		}
	}
	return true
}

func digit(b byte) bool { return '0' <= b && b <= '9' }
