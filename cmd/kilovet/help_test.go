package main

import (
	"bytes"
	"strings"
	"testing"
	"unicode/utf8"

	"github.com/spf13/cobra"
)

// everyCommand is the root and what it offers.
func everyCommand() []*cobra.Command {
	root := root(world{out: &bytes.Buffer{}, err: &bytes.Buffer{}, in: &bytes.Buffer{}, columns: func() int { return 0 }})
	all := []*cobra.Command{root}
	for _, c := range root.Commands() {
		if c.IsAvailableCommand() {
			all = append(all, c)
		}
	}
	return all
}

// Help fits 80 columns, says an example within its first ten lines, and describes every
// flag.
func TestHelpFitsAndBeginsWithExamples(t *testing.T) {
	for _, c := range everyCommand() {
		c.InitDefaultHelpFlag()
		text := string(helpText(c, 80))
		lines := strings.Split(text, "\n")
		for _, width := range []int{80, 60} {
			for l := range strings.Lines(string(helpText(c, width))) {
				if n := utf8.RuneCountInString(strings.TrimRight(l, "\n")); n > width {
					t.Errorf("%s: %d columns in %d: %s", c.CommandPath(), n, width, l)
				}
			}
		}
		if head := strings.Join(lines[:min(10, len(lines))], "\n"); !strings.Contains(head, "\n  kilovet ") {
			t.Errorf("%s: no example in\n%s", c.CommandPath(), head)
		}
		for _, f := range flags(c) {
			if f.means == "" || !strings.Contains(text, "  "+f.word) {
				t.Errorf("%s: %s is not described", c.CommandPath(), f.word)
			}
		}
	}
}

// In a narrow terminal what is prose is wrapped, and nothing is lost.
func TestHelpIsWrapped(t *testing.T) {
	c := everyCommand()[0]
	narrow, wide := helpText(c, 40), helpText(c, 100)
	words := func(b []byte) string {
		return strings.Join(strings.Fields(strings.ReplaceAll(string(b), " \\\n", "\n")), " ")
	}
	if words(narrow) != words(wide) || bytes.Count(narrow, []byte("\n")) <= bytes.Count(wide, []byte("\n")) {
		t.Errorf("narrow:\n%s", narrow)
	}
}

// A manual page names its command, its flags and its examples, and no line of it is
// taken for a request that it is not.
func TestManualPages(t *testing.T) {
	for _, c := range everyCommand() {
		page := string(manualPage(c))
		if !strings.HasPrefix(page, manualBegins+"\n.TH "+strings.ToUpper(pageName(c))+" 1 ") {
			t.Errorf("%s begins %.80q", pageName(c), page)
		}
		for _, f := range flags(c) {
			if !strings.Contains(page, ".B "+roff(f.word)+"\n") {
				t.Errorf("%s: %s is missing", pageName(c), f.word)
			}
		}
		for _, l := range strings.Split(page, "\n") {
			if strings.HasPrefix(l, ".") && !strings.HasPrefix(l, `.\"`) {
				request, _, _ := strings.Cut(l[1:], " ")
				if !strings.Contains(" TH SH PP TP B BR nh ad nf fi ", " "+request+" ") {
					t.Errorf("%s: request %q", pageName(c), l)
				}
			}
		}
	}
	if got := roff(".a-b\n'c\\d"); got != `\&.a\-b`+"\n"+`\&'c\ed` {
		t.Errorf("got %q", got)
	}
}
