package main

import (
	"bytes"
	"os"
	"regexp"
	"strings"

	"github.com/rogpeppe/go-internal/testscript"

	"kilovet/reports/seal"
)

// appended adds one file to the end of another: appended column.toml more.txt.
func appended(ts *testscript.TestScript, _ bool, args []string) {
	text := ts.ReadFile(args[0]) + ts.ReadFile(args[1])
	ts.Check(os.WriteFile(ts.MkAbs(args[0]), []byte(text), 0o644))
}

var codeForm = regexp.MustCompile(`[0-9A-HJKMNP-TV-Z]{6}(-[0-9A-HJKMNP-TV-Z]{6}){2}`)

// verified verifies the code that stands in a file: verified 0 said.txt column.toml.
func verified(ts *testscript.TestScript, neg bool, args []string) {
	code := codeForm.FindString(ts.ReadFile(args[1]))
	status(ts, neg, append([]string{args[0], "kilovet", "verify", code}, args[2:]...))
}

// damaged verifies a sheet cut short or with a byte changed at many places, and changed
// on purpose and sealed anew: damaged sheet.pdf column.toml.
func damaged(ts *testscript.TestScript, _ bool, args []string) {
	sheet := []byte(ts.ReadFile(args[0]))
	try := func(what, want string, file []byte) {
		ts.Check(os.WriteFile(ts.MkAbs("damaged.pdf"), file, 0o644))
		status(ts, false, []string{want, "kilovet", "verify", "damaged.pdf", args[1]})
		if strings.HasPrefix(ts.ReadFile("stdout"), "belongs") {
			ts.Fatalf("%s, and said to belong", what)
		}
	}
	const places = 23
	for i := range places {
		at := len(sheet) * i / places
		try("cut short", "2", sheet[:at])
		changed := bytes.Clone(sheet)
		changed[at] ^= 1
		try("one byte changed", "2", changed)
	}
	try("a byte more", "2", append(bytes.Clone(sheet), '\n'))
	stamp, err := seal.Open(sheet)
	ts.Check(err)
	pages := sheet[:bytes.Index(sheet, []byte("%kilovet-sheet"))]
	changed := bytes.Clone(pages)
	changed[len(changed)/2] ^= 1
	try("changed and sealed anew", "1", seal.Seal(changed, stamp))
	stamp.Date = "2030-01-01"
	try("dated anew and sealed anew", "1", seal.Seal(pages, stamp))
	try("sealed anew as it was", "1", seal.Seal(append(bytes.Clone(pages), '\n'), stamp))
}
