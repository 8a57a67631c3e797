package main

import (
	"crypto/sha256"
	"encoding/hex"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"slices"
	"strings"

	"github.com/spf13/cobra"

	"kilovet"
	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/reports/digest"
	"kilovet/reports/pdf"
	"kilovet/reports/text"
	"kilovet/rules"
	"kilovet/rules/rule"
)

// reviewing is the flags of the command review.
type reviewing struct {
	world
	html, paper string
	pdf, json   string
	local       string
	all         bool
	require     []string
	without     []string

	under *localLimits // once read
	press *pdf.Press   // set up while the review is made; nil where no sheets are wanted
}

func reviewCommand(w world) *cobra.Command {
	r := &reviewing{world: w}
	command := &cobra.Command{
		Use:               "review [CHAIN.toml]",
		Short:             "Review a description: text, sheets, JSON",
		Long:              aboutReview,
		Example:           reviewExamples,
		Args:              cobra.MaximumNArgs(1),
		RunE:              func(_ *cobra.Command, args []string) error { return r.run(args) },
		ValidArgsFunction: descriptions,
	}
	flags := command.Flags()
	r.sheetFlags(command)
	flags.StringVar(&r.pdf, "pdf", "", "write the sheets to `FILE`")
	flags.StringVar(&r.json, "json", "", "write the results as JSON to `FILE`; - is standard output, without the text")
	localFlag(flags, &r.local)
	flags.BoolVar(&r.all, "all", false, "show every figure, finding and source")
	flags.StringSliceVar(&r.require, "require", words(rule.Concerns), "let the exit status depend on these `CONCERNS` only")
	withoutFlag(flags, &r.without)
	return command
}

const aboutReview = `Review a description: what will happen, judged by named rules.

Exit status: 0 nothing fails and nothing is unassessed; 1 something does; 2 the
description or the command line cannot be used, and nothing was written; 3 a
file could not be read or written; 4 the program itself failed.`

const reviewExamples = `  kilovet review chain.toml                     one screen
  kilovet review --all chain.toml               every figure, finding and source
  kilovet review --pdf review.pdf chain.toml    sheets to read and file
  kilovet review --html page.html chain.toml    one page for the browser
  kilovet review --json - chain.toml            results for other programs
  kilovet review --local house.toml chain.toml  under a stricter local code
  kilovet review --without faults chain.toml    quicker; exit status 1
  kilovet review -                              a description on standard input
  kilovet review                                the built-in example`

// builtIn stands first on a review that nobody asked for by name.
const builtIn = "Built-in example: no file was named"

func (r *reviewing) run(args []string) error {
	concerns, err := required(r.require)
	if err != nil {
		return err
	}
	if err := leavable(r.without); err != nil {
		return err
	}
	if err := r.writable(args, sheets); err != nil {
		return err
	}
	r.begin()
	given, err := r.input(args)
	if err != nil {
		return err
	}
	review, err := r.review(given)
	if err != nil {
		return err
	}
	outputs, shown, err := r.render(review, given.note)
	if err != nil {
		return err
	}
	if err := replaceAll(outputs); err != nil {
		return err
	}
	if _, err := r.out.Write(shown); err != nil {
		return exitf(files, "standard output: %v%s", err, written(outputs))
	}
	if len(r.without) > 0 {
		return exitf(unsound, "%s left out: nothing of that was judged", strings.Join(r.without, " and "))
	}
	return verdict(review, concerns)
}

// source is a description before it is understood.
type source struct {
	name string
	data []byte
	note string // to stand first on the review
}

// largest is the most that is read of a description: a byte more than one can have,
// so that the reader sees that it is too large.
const largest = 1<<20 + 1

func (r *reviewing) input(args []string) (source, error) {
	if len(args) == 0 {
		if r.piped {
			fmt.Fprintln(r.err, "kilovet: standard input was not read; to review it: kilovet review -")
		}
		name, data := kilovet.Example()
		return source{name, data, builtIn}, nil
	}
	if args[0] == "-" {
		return readAll("standard input", r.in)
	}
	if args[0] == "" {
		return source{}, exitf(unusable, "a file was named by an empty text; name the description, or - for standard input")
	}
	file, err := os.Open(args[0])
	if err != nil {
		return source{}, exitf(files, "%s cannot be read: %v", args[0], plain(err))
	}
	defer file.Close()
	return readAll(args[0], file)
}

func readAll(name string, from io.Reader) (source, error) {
	data, err := io.ReadAll(io.LimitReader(from, largest))
	if err != nil {
		return source{}, exitf(files, "%s cannot be read: %v", name, plain(err))
	}
	return source{name: name, data: data}, nil
}

// review reads the description and runs the rules; faults of the description, and of
// the local limits, are all listed and end the run.
func (r *reviewing) review(given source) (*rules.Review, error) {
	_, err := r.limits()
	c, faults := rules.Read(given.data)
	if len(faults) > 0 {
		return nil, r.faulty(given.name, faults)
	}
	if err != nil {
		return nil, err
	}
	return r.reviewOf(c, given)
}

// reviewOf runs the rules on a description that was read without faults; faults of the
// local limits are listed and end the run.
func (r *reviewing) reviewOf(c *chain.Chain, given source) (*rules.Review, error) {
	review, faults, err := r.judged(c, given)
	switch {
	case err != nil:
		return nil, err
	case len(faults) > 0:
		return nil, r.faulty(r.under.name, faults)
	case r.under != nil:
		r.refusals(r.under.name, review.Local)
	}
	return review, nil
}

// judged runs the rules; the faults are those of the local limits.
func (r *reviewing) judged(c *chain.Chain, given source) (*rules.Review, document.Faults, error) {
	makeRoom()
	inputs, program := []rules.Input{inputOf("description", given)}, rules.Program{Name: "kilovet", Version: version()}
	progress := r.progress()
	defer progress.end()
	beside := rules.Beside{Without: r.without, Progress: progress.tell}
	ripple, trace, err := r.ripple(c, given)
	if err != nil {
		return nil, nil, err
	}
	if ripple != nil {
		beside.Ripple, inputs = trace, append(inputs, ripple.input())
	}
	limits, err := r.limits()
	if err != nil {
		return nil, nil, err
	}
	if limits != nil {
		beside.Limits, inputs = limits.file, append(inputs, limits.input)
	}
	review, faults := rules.RunUnder(c, inputs, program, beside)
	return review, faults, nil
}

// understood reads the description; its faults are all listed and end the run.
func (r *reviewing) understood(given source) (*chain.Chain, error) {
	c, faults := rules.Read(given.data)
	if len(faults) > 0 {
		return nil, r.faulty(given.name, faults)
	}
	return c, nil
}

// sum is the SHA-256 of the file.
func (s source) sum() string {
	sum := sha256.Sum256(s.data)
	return hex.EncodeToString(sum[:])
}

// manner is how text is to be written: colour only on a terminal that does not
// refuse it, and lines no longer than can be read.
func (w world) manner(all bool) text.Options {
	columns := w.columns()
	return text.Options{All: all, Colour: columns > 0 && w.env("NO_COLOR") == "" && w.env("TERM") != "dumb", Width: min(columns, 100)}
}

// required reads the concerns of --require.
func required(given []string) ([]rule.Concern, error) {
	var concerns []rule.Concern
	for _, g := range given {
		c := rule.Concern(strings.TrimSpace(g))
		if !slices.Contains(rule.Concerns, c) {
			return nil, exitf(unusable, "--require %s: no such concern; choose from %s", g, strings.Join(words(rule.Concerns), ","))
		}
		concerns = append(concerns, c)
	}
	if len(concerns) == 0 {
		return nil, exitf(unusable, "--require needs at least one of %s", strings.Join(words(rule.Concerns), ","))
	}
	return concerns, nil
}

// verdict is the exit status: whether among the required concerns something fails
// or is unassessed; where nothing was judged, nothing is known.
func verdict(review *rules.Review, concerns []rule.Concern) error {
	judged := 0
	for _, f := range review.Findings {
		if !slices.Contains(concerns, f.Concern) {
			continue
		}
		if digest.Blocks(f.Verdict) {
			return exit{status: unsound}
		}
		judged++
	}
	if judged == 0 {
		return exitf(unsound, "no rule judged anything that concerns %s", strings.Join(words(concerns), " or "))
	}
	return nil
}

// plain takes the path out of an error that names it again.
func plain(err error) error {
	var p *fs.PathError
	if errors.As(err, &p) {
		return p.Err
	}
	return err
}

func words[T ~string](list []T) []string {
	all := make([]string, len(list))
	for i, w := range list {
		all[i] = string(w)
	}
	return all
}

func plural(n int, thing string) string {
	if n == 1 {
		return "1 " + thing
	}
	return fmt.Sprintf("%d %ss", n, thing)
}
