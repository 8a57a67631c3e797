package document

import (
	"fmt"
	"regexp"
	"strings"
	"unicode"

	"github.com/BurntSushi/toml"
)

// decoded is what the TOML library reads in some statements: every key of them in
// document order, with its whole path, and the values.
type decoded struct {
	keys   []toml.Key
	next   int
	values map[string]any
}

// path takes the next key off the list.
func (d *decoded) path() []string {
	if d.next >= len(d.keys) {
		return nil
	}
	d.next++
	return d.keys[d.next-1]
}

// unreadable is what the TOML library objects to and where in its text.
type unreadable struct {
	message string
	offset  int
}

var repeatedKey = regexp.MustCompile(`^Key '(.*)' has already been defined`)

// repeated is the path of a key that stands twice in one statement.
func (u *unreadable) repeated() ([]string, bool) {
	m := repeatedKey.FindStringSubmatch(u.message)
	if m == nil {
		return nil, false
	}
	return []string{m[1]}, true
}

// decode hands statements to the TOML library. Its panics, which some garbled texts
// provoke, are errors like any other.
func decode(text string) (d *decoded, bad *unreadable) {
	defer func() {
		if p := recover(); p != nil {
			d, bad = nil, &unreadable{message: "not TOML"}
		}
	}()
	if strings.HasPrefix(text, byteOrderMark) { // the library would pass over it
		return nil, &unreadable{message: "a byte order mark"}
	}
	d = &decoded{}
	meta, err := toml.Decode(text, &d.values)
	if parse, ok := err.(toml.ParseError); ok {
		return nil, &unreadable{parse.Message, parse.Position.Start}
	} else if err != nil {
		return nil, &unreadable{message: err.Error()}
	}
	d.keys = meta.Keys()
	return d, nil
}

var (
	barePath  = regexp.MustCompile(`^[A-Za-z0-9_-]+(\s*\.\s*[A-Za-z0-9_-]+)*$`)
	bareValue = regexp.MustCompile(`^(true|false|[+-]?(inf|nan)|0[xob][0-9A-Fa-f_]+|[+-]?\d[\d_]*(\.[\d_]+)?([eE][+-]?\d+)?|\d{4}-\d.*|\d\d:\d\d.*)$`)
)

// plainPath reads a key without quotes; nil where it is none.
func plainPath(key string) []string {
	key = strings.TrimSpace(key)
	if !barePath.MatchString(key) {
		return nil
	}
	parts := strings.Split(key, ".")
	for i := range parts {
		parts[i] = strings.TrimSpace(parts[i])
	}
	return parts
}

// diagnosis is what is wrong with a statement that the TOML library refused, in
// plain words where one of the usual slips is recognised.
type diagnosis struct {
	offset       int
	what, remedy string
}

func (st statement) diagnose(text string, bad *unreadable) diagnosis {
	value := st.entry.value
	switch {
	case st.kind != pair:
		return diagnosis{st.start, "this header cannot be read", "write [table] or [[table]]"}
	case value.start == 0: // the scanner came to no "="
		return diagnosis{st.start, "neither a key with its value, a [table] nor a comment", `write key = value; begin a comment with "#"`}
	case st.entry.start == st.entry.end:
		return diagnosis{st.start, "a value without a key", "write key = value"}
	case value.end == value.start:
		return diagnosis{st.start, "a key without a value", `write its value after "="`}
	case st.broken && value.opener != 0:
		return diagnosis{value.start, fmt.Sprintf("the bracket %q is not closed or something between is not separated by a comma", string(value.opener)),
			fmt.Sprintf("close it with %q and separate with commas", closing(value.opener))}
	case st.broken && isQuote(text[value.start]):
		return diagnosis{value.start, "the quotes are not closed", "close them on the same line"}
	}
	if bare, offset := st.unquoted(text); bare != "" {
		return diagnosis{offset, bare + " stands without quotes", fmt.Sprintf("write %q: texts and quantities stand in quotes", bare)}
	}
	return diagnosis{min(st.start+bad.offset, st.end), "cannot be read (" + bad.message + ")",
		"texts and quantities stand in quotes, several values in [ ] with commas between"}
}

// unquoted finds the first value that only quotes would make readable.
func (st statement) unquoted(text string) (bare string, offset int) {
	value := st.entry.value
	if value.opener != 0 || isQuote(text[value.start]) {
		return value.unquoted(text)
	}
	line, _, _ := strings.Cut(text[value.start:st.end], "#")
	if line = strings.TrimSpace(line); !bareValue.MatchString(line) {
		return brief(line), value.start
	}
	return "", 0
}

func (e element) unquoted(text string) (bare string, offset int) {
	if e.opener == 0 {
		if bare := text[e.start:e.end]; bare != "" && !isQuote(bare[0]) && !bareValue.MatchString(bare) {
			return brief(bare), e.start
		}
		return "", 0
	}
	for _, inner := range e.entries {
		e.items = append(e.items, inner.value)
	}
	for _, item := range e.items {
		if bare, offset := item.unquoted(text); bare != "" {
			return bare, offset
		}
	}
	return "", 0
}

func isQuote(c byte) bool { return c == '"' || c == '\'' }

func closing(opener byte) string {
	if opener == '[' {
		return "]"
	}
	return "}"
}

// brief shortens what a message repeats of the input, and keeps it on one line.
func brief(s string) string {
	const most = 40
	runes := []rune(s)
	for i, r := range runes {
		if unicode.IsControl(r) {
			runes[i] = ' '
		}
	}
	if len(runes) > most {
		return string(runes[:most]) + "…"
	}
	return string(runes)
}
