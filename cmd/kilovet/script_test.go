package main

import (
	"bytes"
	"encoding/json"
	"errors"
	"os"
	"os/exec"
	"path/filepath"
	"strconv"
	"testing"

	"github.com/rogpeppe/go-internal/testscript"

	"kilovet"
)

func TestMain(m *testing.M) { testscript.Main(m, map[string]func(){"kilovet": main}) }

// Every script finds two descriptions in its folder: the built-in one as
// column.toml and, where any will do, a single spacing as gap.toml.
func TestScripts(t *testing.T) {
	if testing.Short() {
		t.Skip("starts the program many times")
	}
	testscript.Run(t, testscript.Params{
		Dir:                 "testdata/script",
		RequireExplicitExec: true,
		RequireUniqueNames:  true,
		Cmds:                map[string]func(*testscript.TestScript, bool, []string){"status": status, "replace": replace, "valid": valid, "same": identical, "appended": appended, "verified": verified, "damaged": damaged},
		Setup: func(e *testscript.Env) error {
			_, column := kilovet.Example()
			gap, err := os.ReadFile("testdata/gap.toml")
			return errors.Join(err, os.WriteFile(filepath.Join(e.WorkDir, "column.toml"), column, 0o644),
				os.WriteFile(filepath.Join(e.WorkDir, "gap.toml"), gap, 0o644))
		},
	})
}

// status runs a command and demands its exit status: status 2 kilovet review x.toml.
func status(ts *testscript.TestScript, _ bool, args []string) {
	want, err := strconv.Atoi(args[0])
	ts.Check(err)
	got := 0
	if err := ts.Exec(args[1], args[2:]...); err != nil {
		var e *exec.ExitError
		if !errors.As(err, &e) {
			ts.Fatalf("%v", err)
		}
		got = e.ExitCode()
	}
	if got != want {
		ts.Fatalf("exit status %d, want %d", got, want)
	}
}

// replace changes a text that stands exactly once in a file: replace column.toml was becomes.
func replace(ts *testscript.TestScript, _ bool, args []string) {
	file := ts.MkAbs(args[0])
	data := []byte(ts.ReadFile(args[0]))
	if n := bytes.Count(data, []byte(args[1])); n != 1 {
		ts.Fatalf("%q stands %d times in %s", args[1], n, args[0])
	}
	ts.Check(os.WriteFile(file, bytes.Replace(data, []byte(args[1]), []byte(args[2]), 1), 0o644))
}

// valid demands that a file (or stdout) is JSON.
func valid(ts *testscript.TestScript, _ bool, args []string) {
	if !json.Valid([]byte(ts.ReadFile(args[0]))) {
		ts.Fatalf("%s is not JSON", args[0])
	}
}

// identical demands that two files hold the same bytes, whatever they are.
func identical(ts *testscript.TestScript, neg bool, args []string) {
	if (ts.ReadFile(args[0]) == ts.ReadFile(args[1])) == neg {
		ts.Fatalf("%s and %s: same bytes %t", args[0], args[1], neg)
	}
}
