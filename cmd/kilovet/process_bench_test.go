package main

import (
	"errors"
	"os/exec"
	"path/filepath"
	"testing"
)

// BenchmarkProcess reviews the built-in example as whoever calls the program waits for it,
// sheets and page written: all of it, and without faults and fields. Run with:
// go test -run '^$' -bench Process -benchtime 40x ./cmd/kilovet
func BenchmarkProcess(b *testing.B) {
	dir := b.TempDir()
	program := filepath.Join(dir, "kilovet")
	if said, err := exec.Command("go", "build", "-o", program, ".").CombinedOutput(); err != nil {
		b.Fatalf("%v: %s", err, said)
	}
	for name, more := range map[string][]string{"whole": nil, "without faults and fields": {"--without", "faults,fields"}} {
		b.Run(name, func(b *testing.B) {
			for b.Loop() {
				args := append([]string{"review", "--pdf", filepath.Join(dir, "a.pdf"), "--html", filepath.Join(dir, "a.html")}, more...)
				err := exec.Command(program, args...).Run()
				if done := (*exec.ExitError)(nil); err != nil && (!errors.As(err, &done) || done.ExitCode() != unsound) {
					b.Fatal(err)
				}
			}
		})
	}
}
