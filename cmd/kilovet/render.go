package main

import (
	"fmt"
	"slices"
	"strings"
	"sync"

	"github.com/spf13/cobra"

	"kilovet/hv/parallel"
	"kilovet/reports/html"
	"kilovet/reports/json"
	"kilovet/reports/page"
	"kilovet/reports/pdf"
	"kilovet/reports/text"
	"kilovet/rules"
)

// sheetFlags are the flags of the page and of the paper.
func (r *reviewing) sheetFlags(command *cobra.Command) {
	command.Flags().StringVar(&r.html, "html", "", "write one page for the browser to `FILE`; it loads nothing")
	r.paperFlag(command)
}

// paperFlag is the flag of the paper alone.
func (r *reviewing) paperFlag(command *cobra.Command) {
	command.Flags().StringVar(&r.paper, "paper", string(pdf.A4), "set the sheets on this `PAPER`: "+strings.Join(words(pdf.Papers), " or "))
	_ = command.RegisterFlagCompletionFunc("paper", func(*cobra.Command, []string, string) ([]string, cobra.ShellCompDirective) {
		return words(pdf.Papers), cobra.ShellCompDirectiveNoFileComp
	})
}

// sheetsUsable refuses sheets and pages on standard output, and papers that there are
// not.
func (r *reviewing) sheetsUsable() error {
	switch {
	case r.pdf == "-":
		return exitf(unusable, "sheets are not written to standard output; name a file, as in --pdf review.pdf")
	case r.html == "-":
		return exitf(unusable, "a page is not written to standard output; name a file, as in --html page.html")
	case r.paper != "" && !slices.Contains(pdf.Papers, pdf.Paper(r.paper)):
		return exitf(unusable, "--paper %s: no such paper; choose from %s", r.paper, strings.Join(words(pdf.Papers), ","))
	}
	return nil
}

// render makes every output, side by side, before any of them is written; the note
// stands first.
func (r *reviewing) render(review *rules.Review, note string) (outputs []output, shown []byte, err error) {
	var makers []maker
	if r.pdf != "" {
		makers = append(makers, maker{r.pdf, func() ([]byte, error) { return r.press.Render(page.New(review).Noted(note)) }})
	}
	if r.html != "" {
		makers = append(makers, maker{r.html, func() ([]byte, error) { return html.RenderWith(review, html.Options{Note: note}) }})
	}
	if r.json == "" {
		makers = append(makers, maker{"", func() ([]byte, error) { return nil, json.Check(review) }})
	} else {
		makers = append(makers, maker{r.json, func() ([]byte, error) { return json.Render(review) }})
	}
	outputs, err = made(makers)
	if err != nil {
		return nil, nil, err
	}
	if r.json == "-" {
		last := len(outputs) - 1
		return outputs[:last], outputs[last].data, nil
	}
	how := r.manner(r.all)
	how.Note = note
	return slices.DeleteFunc(outputs, func(o output) bool { return o.path == "" }), text.Render(review, how), nil
}

// begin prepares what does not depend on the description, while that is read.
func (r *reviewing) begin() {
	makeRoom()
	if r.pdf != "" {
		r.press = pdf.Begin(pdf.Paper(r.paper))
	}
	if r.html != "" {
		go func() {
			defer func() { _ = recover() }() // the page itself meets it again, and tells
			html.Prepare()
		}()
	}
}

// maker makes an output; one without a path only sees that results could be made.
type maker struct {
	path string
	make func() ([]byte, error)
}

// made runs makers side by side. The first in order that fails is told.
func made(makers []maker) ([]output, error) {
	outputs, errs := make([]output, len(makers)), make([]error, len(makers))
	var group sync.WaitGroup
	for i, m := range makers {
		group.Go(func() {
			defer func() {
				if what := recover(); what != nil {
					errs[i] = fmt.Errorf("%v%s", what, parallel.Place())
				}
			}()
			data, err := m.make()
			outputs[i], errs[i] = output{m.path, data}, err
		})
	}
	group.Wait()
	for _, err := range errs {
		if err != nil {
			return nil, defect(err)
		}
	}
	return outputs, nil
}

// writable refuses outputs before anything is computed: sheets on standard output, and
// what would take the place of something else.
func (r *reviewing) writable(args []string, sheet kind) error {
	if err := r.sheetsUsable(); err != nil {
		return err
	}
	if err := r.distinct(args); err != nil {
		return err
	}
	for _, o := range []struct {
		path string
		kind kind
	}{{r.pdf, sheet}, {r.html, pages}} {
		if o.path == "" {
			continue
		}
		if err := spares(o.path, o.kind); err != nil {
			return err
		}
	}
	if r.json != "" && r.json != "-" {
		return spares(r.json, results)
	}
	return nil
}

// distinct refuses outputs that would overwrite each other or the description.
func (r *reviewing) distinct(args []string) error {
	paths := slices.DeleteFunc([]string{r.pdf, r.html, r.json}, func(p string) bool { return p == "" || p == "-" })
	for _, given := range args {
		if given != "-" {
			paths = append(paths, given)
		}
	}
	if r.local != "" && r.local != "-" {
		paths = append(paths, r.local)
	}
	for i, p := range paths {
		for _, q := range paths[:i] {
			if same(p, q) {
				return exitf(unusable, "%s is named twice; give every file a name of its own", p)
			}
		}
	}
	return nil
}
