package document

import (
	"fmt"
	"regexp"
	"strings"
	"unicode"
)

// plainNumber is a number that TOML reads as it stands.
var plainNumber = regexp.MustCompile(`^[+-]?(0|[1-9][0-9]*)(\.[0-9]+)?([eE][+-]?[0-9]+)?$`)

// Assign is the line that gives the key a value which a person wrote without quotes,
// as on a command line. What is no number or no yes or no stands in quotes even where
// one is wanted: reading it then says what is wrong with it.
func (d Declared) Assign(text string) string {
	return d.Key + " = " + d.Literal(text)
}

// Literal is such a value as it stands in a file.
func (d Declared) Literal(text string) string {
	switch {
	case (d.Holds == AWhole || d.Holds == ANumber) && plainNumber.MatchString(text):
		return text
	case d.Holds == AYesNo && (text == "true" || text == "false"):
		return text
	}
	return escaped(quote(text))
}

// escaped writes control characters as TOML escapes them in a basic string.
func escaped(s string) string {
	var b strings.Builder
	for _, r := range s {
		if unicode.IsControl(r) {
			fmt.Fprintf(&b, `\u%04x`, r)
			continue
		}
		b.WriteRune(r)
	}
	return b.String()
}
