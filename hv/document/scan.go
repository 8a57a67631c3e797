package document

import "strings"

// The scanner finds where everything stands. It takes the text apart into
// statements (a header or a key with its value) and their values into elements, by
// brackets and quotes alone; what each means is left to the TOML library, which can
// then be handed one statement at a time. So one broken statement hides no other.

// deepest is how far tables and lists may stand within each other.
const deepest = 12

// statement is one header or one key with its value.
type statement struct {
	kind       statementKind
	start, end int   // of the text handed to the TOML library
	entry      entry // headers have a key only
	broken     bool  // the scanner found no end: no TOML, whatever follows
	deep       bool  // too deeply nested to hand on
}

type statementKind int

const (
	pair    statementKind = iota // key = value
	header                       // [table]
	headers                      // [[table]]
)

// entry is a key and its value.
type entry struct {
	start, end int // of the key as written
	value      element
}

// element is a value: a scalar, a list of items or an inline table of entries.
type element struct {
	opener     byte // '[', '{' or 0
	start, end int
	items      []element
	entries    []entry
}

type scanner struct {
	text  string
	at    int
	depth int
	deep  bool
}

// scan takes a text apart into its statements.
func scan(text string) []statement {
	s := &scanner{text: text}
	var found []statement
	for s.blank(true); s.at < len(text); s.blank(true) {
		found = append(found, s.statement())
	}
	return found
}

func (s *scanner) statement() statement {
	st := statement{start: s.at}
	s.depth, s.deep = 0, false
	ok := false
	if s.peek() == '[' {
		st.kind, st.entry = s.header()
		ok = true
	} else {
		st.entry, ok = s.pair()
	}
	st.broken, st.deep = !ok, s.deep
	st.end = s.finish(st.start, ok)
	return st
}

// finish moves past the statement and tells where its text ends: at the end of the
// line, or before a line on which the scanner saw a new statement begin.
func (s *scanner) finish(start int, ok bool) int {
	lineStart := strings.LastIndexByte(s.text[:s.at], '\n') + 1
	if !ok && lineStart > start && strings.TrimLeft(s.text[lineStart:s.at], " \t") == "" {
		s.at = lineStart
		return lineStart - 1
	}
	s.at = s.lineEnd()
	if s.at < len(s.text) && s.text[s.at-1] == '\r' {
		return s.at - 1 // a line that ends in CR LF
	}
	return s.at
}

func (s *scanner) header() (statementKind, entry) {
	kind := header
	s.at++
	if s.peek() == '[' {
		kind = headers
		s.at++
	}
	e := entry{start: s.at}
	s.key("]#\n")
	e.end = s.at
	return kind, e
}

func (s *scanner) pair() (entry, bool) {
	e := entry{start: s.at}
	s.key("=#\n,{}[]")
	e.end = e.start + len(strings.TrimRight(s.text[e.start:s.at], " \t\r"))
	if s.peek() != '=' || s.deep {
		return e, false
	}
	s.at++
	s.blank(false)
	var ok bool
	e.value, ok = s.element()
	return e, ok
}

// key passes a key, quoted parts included, up to one of the stop bytes.
func (s *scanner) key(stop string) {
	dots := 0
	for ; s.at < len(s.text) && strings.IndexByte(stop, s.text[s.at]) < 0; s.at++ {
		switch c := s.text[s.at]; c {
		case '"', '\'':
			s.line(c)
			s.at-- // the loop passes the closing quote
		case '.':
			dots++
		}
	}
	s.deep = s.deep || dots >= deepest
}

func (s *scanner) element() (element, bool) {
	e := element{start: s.at}
	ok := true
	switch c := s.peek(); c {
	case '[':
		e.opener = c
		ok = s.within(func() bool { return s.list(&e) })
	case '{':
		e.opener = c
		ok = s.within(func() bool { return s.table(&e) })
	case '"', '\'':
		ok = s.quoted(c)
	default:
		s.bare()
		ok = s.at > e.start
	}
	e.end = s.at
	return e, ok
}

func (s *scanner) within(scan func() bool) bool {
	if s.depth >= deepest {
		s.deep = true
		return false
	}
	s.depth++
	s.at++
	ok := scan()
	s.depth--
	return ok
}

func (s *scanner) list(e *element) bool {
	for {
		newLine := s.blank(true)
		switch {
		case s.at >= len(s.text) || newLine && s.newStatement():
			return false
		case s.peek() == ']':
			s.at++
			return true
		case s.peek() == ',':
			s.at++
			continue
		}
		item, ok := s.element()
		e.items = append(e.items, item)
		if !ok {
			return false
		}
	}
}

func (s *scanner) table(e *element) bool {
	for comma := true; ; {
		s.blank(true)
		switch c := s.peek(); {
		case s.at >= len(s.text) || c == '[' || c == ']':
			return false
		case c == '}':
			s.at++
			return true
		case c == ',':
			s.at++
			comma = true
			continue
		case !comma:
			return false
		}
		inner, ok := s.pair()
		e.entries = append(e.entries, inner)
		if !ok {
			return false
		}
		comma = false
	}
}

// newStatement reports whether, inside a list, a line begins as only a new
// statement can: the closing bracket was forgotten.
func (s *scanner) newStatement() bool {
	i := s.at
	for i < len(s.text) && isBareKey(s.text[i]) {
		i++
	}
	return i > s.at && strings.HasPrefix(strings.TrimLeft(s.text[i:], " \t"), "=")
}

// quoted passes a string of any of the four kinds.
func (s *scanner) quoted(quote byte) bool {
	triple := strings.Repeat(string(quote), 3)
	if !strings.HasPrefix(s.text[s.at:], triple) {
		return s.line(quote)
	}
	for i := s.at + 3; i < len(s.text); i++ {
		switch {
		case s.text[i] == '\\' && quote == '"':
			i++
		case strings.HasPrefix(s.text[i:], triple):
			for i += 3; i < len(s.text) && s.text[i] == quote; i++ { // quotes before the closing three
			}
			s.at = i
			return true
		}
	}
	s.at = s.lineEnd()
	return false
}

// line passes a string that ends on its line.
func (s *scanner) line(quote byte) bool {
	for s.at++; s.at < len(s.text) && s.text[s.at] != '\n'; s.at++ {
		switch s.text[s.at] {
		case quote:
			s.at++
			return true
		case '\\':
			if quote == '"' && s.at+1 < len(s.text) && s.text[s.at+1] != '\n' {
				s.at++
			}
		}
	}
	return false
}

// bare passes a number, date, true or false, or whatever stands there unquoted.
func (s *scanner) bare() {
	start := s.at
	for s.at < len(s.text) && strings.IndexByte(",]}#\n", s.text[s.at]) < 0 {
		s.at++
	}
	s.at = start + len(strings.TrimRight(s.text[start:s.at], " \t\r"))
}

// blank passes white space and, over several lines, comments; it reports whether
// it came to a new line.
func (s *scanner) blank(lines bool) (newLine bool) {
	for ; s.at < len(s.text); s.at++ {
		switch c := s.text[s.at]; {
		case c == ' ' || c == '\t':
		case lines && (c == '\n' || strings.HasPrefix(s.text[s.at:], "\r\n")):
			newLine = true
		case lines && c == '#':
			s.at = s.lineEnd() - 1
		default:
			return newLine
		}
	}
	return newLine
}

func (s *scanner) lineEnd() int {
	if i := strings.IndexByte(s.text[s.at:], '\n'); i >= 0 {
		return s.at + i
	}
	return len(s.text)
}

func (s *scanner) peek() byte {
	if s.at < len(s.text) {
		return s.text[s.at]
	}
	return 0
}

func isBareKey(c byte) bool {
	return c >= 'a' && c <= 'z' || c >= 'A' && c <= 'Z' || c >= '0' && c <= '9' || c == '_' || c == '-'
}
