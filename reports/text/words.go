package text

import (
	"strconv"
	"strings"
)

// broken breaks a text at its spaces, but none between a number and its unit, and inside
// a word only where the word is longer than a line: where it may be divided if it can.
func broken(s string, width int) []string { return filled(words(s), width) }

// filled sets pieces one after the other, each line as long as it may be.
func filled(pieces []string, width int) []string {
	var lines []string
	line := ""
	for _, piece := range pieces {
		if line != "" && runes(line)+1+runes(piece) <= width {
			line += " " + piece
			continue
		}
		if line != "" {
			lines = append(lines, line)
		}
		for runes(piece) > width {
			begin := divided(string([]rune(piece)[:width]))
			lines = append(lines, strings.TrimRight(begin, " "))
			piece = strings.TrimPrefix(piece, begin)
		}
		line = piece
	}
	if line == "" {
		return lines
	}
	return append(lines, line)
}

// divided is as much of a piece as stays on its line.
func divided(begin string) string {
	for _, at := range []string{" ", separators, "_"} {
		if i := strings.LastIndexAny(begin, at); i >= 0 {
			return begin[:i+1]
		}
	}
	return begin
}

// separators are where a long word is divided first.
const separators = "/.-"

// longestUnit is how long a word may be that stays with the number before it.
const longestUnit = 5

// words takes a text apart at its spaces; a number keeps its unit.
func words(s string) []string {
	var all []string
	number := false
	for _, word := range strings.Fields(s) {
		if number && runes(word) <= longestUnit {
			all[len(all)-1] += " " + word
			number = false
			continue
		}
		all = append(all, word)
		_, err := strconv.ParseFloat(word, 64)
		number = err == nil
	}
	return all
}

// longestWord is the width below which a text is broken inside a word.
func longestWord(s string) (most int) {
	for _, word := range strings.Fields(s) {
		most = max(most, runes(word))
	}
	return most
}

// longestPiece is the width below which a text is broken inside what holds together.
func longestPiece(s string) (most int) {
	for _, word := range strings.Fields(s) {
		for word != "" {
			end := len(word)
			if i := strings.IndexAny(word, separators); i >= 0 {
				end = i + 1
			}
			most = max(most, runes(word[:end]))
			word = word[end:]
		}
	}
	return most
}
