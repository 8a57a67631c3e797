package lines

import (
	"strings"
	"unicode/utf8"

	"kilovet/reports/digest"
)

// Broken breaks a text at its spaces, but none between a number and its unit, and inside
// a word only where the word is longer than a line: where it may be divided if it can.
func Broken(s string, width int) []string { return Filled(digest.Held(s), width) }

// Filled sets pieces one after the other, each line as long as it may be.
func Filled(pieces []string, width int) []string {
	var all []string
	line := ""
	for _, piece := range pieces {
		if line != "" && runes(line)+1+runes(piece) <= width {
			line += " " + piece
			continue
		}
		if line != "" {
			all = append(all, line)
		}
		for runes(piece) > width {
			begin := divided(string([]rune(piece)[:width]))
			all = append(all, strings.TrimRight(begin, " "))
			piece = strings.TrimPrefix(piece, begin)
		}
		line = piece
	}
	if line == "" {
		return all
	}
	return append(all, line)
}

// divided is as much of a piece as stays on its line.
func divided(begin string) string {
	for _, at := range []string{" ", Separators, "_"} {
		if i := strings.LastIndexAny(begin, at); i >= 0 {
			return begin[:i+1]
		}
	}
	return begin
}

// Separators are where a long word is divided first.
const Separators = "/.-"

func runes(s string) int { return utf8.RuneCountInString(s) }
