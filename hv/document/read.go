package document

import (
	"fmt"
	"reflect"
	"strings"
	"unicode/utf8"
)

// largest is the most bytes a description can have.
const largest = 1 << 20

// byteOrderMark stands before the text of some editors' files.
const byteOrderMark = "\ufeff"

// Read reads a TOML description into a tagged struct and lists every fault of it
// in document order. Fields are Given leaves, structs or pointers to structs for
// tables, and slices of structs for lists of tables; a pointer stays nil where the
// table is absent. What was given but refused has its place and no usable value,
// so after any fault the struct serves only to look for more faults.
func Read(data []byte, into any) Faults {
	text, unusable := decodeText(data)
	if unusable != nil {
		return Faults{*unusable}
	}
	text, faults := withoutControls(text)
	root, unread := grow(text)
	faults = append(faults, unread...)
	if len(root.names) == 0 && len(faults) == 0 {
		return Faults{{Code: Empty, Line: 1, Column: 1, What: "the file holds no key", Remedy: "begin with a key, as in format = 1"}}
	}
	b := &binder{faults: faults, top: structType(into), known: map[reflect.Type][]Declared{}}
	b.table(root, reflect.ValueOf(into).Elem(), "")
	return b.faults.Sorted()
}

// withoutControls puts a space for every control character that a text file cannot
// hold and reports the first.
func withoutControls(text string) (string, Faults) {
	var clean []byte
	var faults Faults
	for i := range len(text) {
		if !isControl(text, i) {
			continue
		}
		if clean == nil {
			clean = []byte(text)
			at := newCursor(text).at(i)
			faults = Faults{{Code: Encoding, Line: at.Line, Column: at.Column, What: fmt.Sprintf("control character 0x%02x", text[i]),
				Remedy: "remove it; save the file as plain text in UTF-8"}}
		}
		clean[i] = ' '
	}
	if clean == nil {
		return text, nil
	}
	return string(clean), faults
}

// isControl reports whether the byte at i is a control character other than a tab
// or the end of a line.
func isControl(text string, i int) bool {
	switch c := text[i]; c {
	case '\t', '\n':
		return false
	case '\r':
		return i+1 == len(text) || text[i+1] != '\n'
	default:
		return c < ' ' || c == 0x7f
	}
}

// decodeText makes text of the bytes of a file, or says why they are none.
func decodeText(data []byte) (string, *Fault) {
	if len(data) > largest {
		return "", &Fault{Code: Size, Line: 1, Column: 1, What: fmt.Sprintf("the file has %d bytes", len(data)),
			Remedy: fmt.Sprintf("a description has at most %d", largest)}
	}
	text := strings.TrimPrefix(string(data), byteOrderMark)
	if i := invalid(text); i >= 0 {
		at := newCursor(text).at(i)
		return "", &Fault{Code: Encoding, Line: at.Line, Column: at.Column, What: fmt.Sprintf("byte 0x%02x is not UTF-8", text[i]),
			Remedy: "save the file as UTF-8"}
	}
	return text, nil
}

// invalid is the offset of the first byte that is not UTF-8, −1 where there is none.
func invalid(text string) int {
	for i, r := range text {
		if r == utf8.RuneError && !strings.HasPrefix(text[i:], "\ufffd") {
			return i
		}
	}
	return -1
}
