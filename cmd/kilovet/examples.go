package main

import (
	"bytes"
	"fmt"
	"strings"
	"unicode/utf8"
)

// examples writes command lines with what they do beside them; where one does not fit,
// all have it on a line below. A command line itself is broken only as a shell takes it.
func examples(b *bytes.Buffer, text string, width int) {
	if fit(strings.Split(text, "\n"), width) {
		fmt.Fprintln(b, text)
		return
	}
	for _, line := range strings.Split(strings.ReplaceAll(text, " \\\n     ", ""), "\n") {
		indent := line[:len(line)-len(strings.TrimLeft(line, " "))]
		command, does, _ := strings.Cut(strings.TrimSpace(line), "  ")
		if len(indent) > remark {
			command, does = "", strings.TrimSpace(line)
		}
		if command != "" {
			continued(b, indent, command, width)
		}
		if does = strings.TrimSpace(does); does != "" {
			for _, l := range wrapped(does, width-6) {
				fmt.Fprintf(b, "      %s\n", l)
			}
		}
	}
}

// remark is how far in a line stands that holds nothing but what the one above does.
const remark = 10

func fit(lines []string, width int) bool {
	for _, l := range lines {
		if utf8.RuneCountInString(l) > width {
			return false
		}
	}
	return true
}

// continued writes a command line, each line but the last ending in a backslash.
func continued(b *bytes.Buffer, indent, command string, width int) {
	parts := quoted(command)
	line := indent
	for i, part := range parts {
		if i > 0 && utf8.RuneCountInString(line+" "+part) > width-2 {
			fmt.Fprintln(b, line+` \`)
			line = "     "
		}
		if i > 0 {
			line += " "
		}
		line += part
	}
	fmt.Fprintln(b, line)
}

// quoted takes a command line apart at its spaces, but for those between quotes and
// those between a flag and its value.
func quoted(command string) []string {
	var parts []string
	for _, word := range strings.Fields(command) {
		if n := len(parts); n > 0 && (strings.Count(parts[n-1], "'")%2 == 1 || valued(parts[n-1], word)) {
			parts[n-1] += " " + word
			continue
		}
		parts = append(parts, word)
	}
	return parts
}

// valued reports whether a word may be the value of the flag before it.
func valued(flag, word string) bool {
	return strings.HasPrefix(flag, "--") && !strings.Contains(flag, " ") && !strings.HasPrefix(word, "-")
}
