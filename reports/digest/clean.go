package digest

import (
	"strings"
	"unicode"
	"unicode/utf8"
)

// replacement stands visibly for what cannot be shown.
const replacement = utf8.RuneError

// Clean makes a text of outside origin fit to show on one line: line breaks and
// tabs become spaces, and control and format characters, which could steer a
// terminal or reverse what is read, and invalid UTF-8 are replaced visibly.
func Clean(s string) string {
	if clean(s) {
		return s
	}
	return strings.Map(func(r rune) rune {
		switch {
		case r == '\n', r == '\r', r == '\t', r == '\u2028', r == '\u2029':
			return ' '
		case unicode.Is(unicode.Cc, r), unicode.Is(unicode.Cf, r), !utf8.ValidRune(r):
			return replacement
		}
		return r
	}, strings.ToValidUTF8(s, string(replacement)))
}

// clean reports whether a text holds printable ASCII alone, as most do.
func clean(s string) bool {
	for i := range len(s) {
		if s[i] < ' ' || s[i] > '~' {
			return false
		}
	}
	return true
}
