package pdf

import (
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"testing"

	"kilovet/reports/page"
	"kilovet/rules/rule"
)

func verdictOf(s string) rule.Verdict { return rule.Verdict(s) }

// run calls a tool; where it is not installed the test is skipped, CI has it.
func run(t *testing.T, name string, args ...string) (stdout, stderr string) {
	t.Helper()
	path, err := exec.LookPath(name)
	if err != nil {
		t.Skip(err)
	}
	command := exec.Command(path, args...)
	var out, errs strings.Builder
	command.Stdout, command.Stderr = &out, &errs
	if err := command.Run(); err != nil {
		t.Fatalf("%s: %v: %s%s", name, err, out.String(), errs.String())
	}
	return out.String(), errs.String()
}

func TestOtherReadersAgree(t *testing.T) {
	for _, name := range []string{"failing", "empty", "hard"} {
		t.Run(name, func(t *testing.T) {
			file := filepath.Join(t.TempDir(), "review.pdf")
			if err := os.WriteFile(file, render(t, page.New(samples[name])), 0o644); err != nil {
				t.Fatal(err)
			}
			run(t, "qpdf", "--check", file)
			if _, complaints := run(t, "pdftoppm", "-r", "20", "-l", "3", "-png", file, filepath.Join(t.TempDir(), "sheet")); complaints != "" {
				t.Errorf("pdftoppm: %s", complaints)
			}
			embedded(t, file)
			if images, _ := run(t, "pdfimages", "-list", file); strings.Count(images, "\n") > 2 {
				t.Errorf("pixels in the file: %s", images)
			}
		})
	}
}

// embedded checks the column emb of pdffonts.
func embedded(t *testing.T, file string) {
	t.Helper()
	list, _ := run(t, "pdffonts", file)
	lines := strings.Split(strings.TrimSpace(list), "\n")
	if len(lines) < 3 {
		t.Fatalf("no fonts: %s", list)
	}
	at := strings.Index(lines[0], "emb")
	for _, l := range lines[2:] {
		if !strings.HasPrefix(l[at:], "yes") {
			t.Errorf("not embedded: %s", l)
		}
	}
}
