package main

import (
	"crypto/sha256"
	"encoding/hex"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"path/filepath"
	"slices"
	"strings"

	"github.com/spf13/cobra"

	"kilovet"
	"kilovet/hv/chain"
	"kilovet/reports/digest"
	"kilovet/reports/json"
	"kilovet/reports/page"
	"kilovet/reports/pdf"
	"kilovet/reports/text"
	"kilovet/rules"
	"kilovet/rules/rule"
)

// reviewing is the flags of the command review.
type reviewing struct {
	world
	pdf, json string
	all       bool
	require   []string
}

func reviewCommand(w world) *cobra.Command {
	r := &reviewing{world: w}
	command := &cobra.Command{
		Use:   "review [CHAIN.toml]",
		Short: "Review a description: text, a PDF to sign, JSON",
		Long:  "Review a description. Without a file the built-in example is reviewed; - reads standard input.",
		Args:  cobra.MaximumNArgs(1),
		RunE:  func(_ *cobra.Command, args []string) error { return r.run(args) },
		ValidArgsFunction: func(*cobra.Command, []string, string) ([]string, cobra.ShellCompDirective) {
			return []string{"toml"}, cobra.ShellCompDirectiveFilterFileExt
		},
	}
	flags := command.Flags()
	flags.StringVar(&r.pdf, "pdf", "", "write the sheets to `FILE`")
	flags.StringVar(&r.json, "json", "", "write the results as JSON to `FILE`; - is standard output, without the text")
	flags.BoolVar(&r.all, "all", false, "show every figure, finding and source")
	flags.StringSliceVar(&r.require, "require", words(rule.Concerns), "`CONCERNS` that the exit status depends on")
	return command
}

func (r *reviewing) run(args []string) error {
	concerns, err := required(r.require)
	if err != nil {
		return err
	}
	given, err := r.input(args)
	if err != nil {
		return err
	}
	if err := r.distinct(args); err != nil {
		return err
	}
	review, err := r.review(given)
	if err != nil {
		return err
	}
	outputs, shown, err := r.render(review)
	if err != nil {
		return err
	}
	if err := replaceAll(outputs); err != nil {
		return err
	}
	if _, err := r.out.Write(shown); err != nil {
		return exitf(files, "standard output: %v%s", err, written(outputs))
	}
	return verdict(review, concerns)
}

// source is a description before it is understood.
type source struct {
	name string
	data []byte
}

// largest is the most that is read of a description: a byte more than one can have,
// so that the reader sees that it is too large.
const largest = 1<<20 + 1

func (r *reviewing) input(args []string) (source, error) {
	if len(args) == 0 {
		name, data := kilovet.Example()
		return source{name, data}, nil
	}
	if args[0] == "-" {
		return readAll("standard input", r.in)
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
	return source{name, data}, nil
}

// review reads the description and runs the rules; faults of the description are
// all listed and end the run.
func (r *reviewing) review(given source) (*rules.Review, error) {
	c, faults := chain.Read(given.data)
	if len(faults) > 0 {
		for _, f := range faults {
			fmt.Fprintln(r.err, digest.Clean(faultLine(given.name, f)))
		}
		return nil, exitf(unusable, "%s in %s; nothing was written", plural(len(faults), "fault"), given.name)
	}
	sum := sha256.Sum256(given.data)
	inputs := []rules.Input{{Role: "description", Name: filepath.Base(given.name), SHA256: hex.EncodeToString(sum[:])}}
	return rules.Run(c, inputs, rules.Program{Name: "kilovet", Version: version()}), nil
}

// render makes every output before any of them is written.
func (r *reviewing) render(review *rules.Review) (outputs []output, shown []byte, err error) {
	data, err := json.Render(review)
	if err != nil {
		return nil, nil, exitf(unsound, "%v: a defect of the program; nothing was written", err)
	}
	if r.pdf != "" {
		sheets, err := pdf.Render(page.New(review))
		if err != nil {
			return nil, nil, exitf(unsound, "%v: a defect of the program; nothing was written", err)
		}
		outputs = append(outputs, output{r.pdf, sheets})
	}
	if r.json == "-" {
		return outputs, data, nil
	}
	if r.json != "" {
		outputs = append(outputs, output{r.json, data})
	}
	return outputs, text.Render(review, r.manner(r.all)), nil
}

// manner is how text is to be written: colour only on a terminal that does not
// refuse it, and lines no longer than can be read.
func (w world) manner(all bool) text.Options {
	columns := w.columns()
	return text.Options{All: all, Colour: columns > 0 && w.env("NO_COLOR") == "", Width: min(columns, 100)}
}

// distinct refuses outputs that would overwrite each other or the description.
func (r *reviewing) distinct(args []string) error {
	paths := slices.DeleteFunc([]string{r.pdf, r.json}, func(p string) bool { return p == "" || p == "-" })
	if len(args) == 1 && args[0] != "-" {
		paths = append(paths, args[0])
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
