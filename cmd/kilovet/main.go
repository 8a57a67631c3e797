// Command kilovet reviews a high-voltage supply chain and its insulation before
// first power-up.
package main

import (
	"context"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"

	"github.com/spf13/cobra"
	"golang.org/x/term"

	"kilovet/reports/digest"
)

func main() {
	os.Exit(run(world{
		args: os.Args[1:], in: os.Stdin, out: os.Stdout, err: os.Stderr, env: os.Getenv,
		columns: func() int { return columns(os.Stdout) }, piped: piped(os.Stdin),
		watched: term.IsTerminal(int(os.Stderr.Fd())),
	}))
}

// world is all that the command line touches outside itself, beside files.
type world struct {
	args     []string
	in       io.Reader
	out, err io.Writer
	env      func(string) string
	columns  func() int // of the terminal that out is; 0 where it is none
	piped    bool       // something was led into in: a pipe or a file
	watched  bool       // err is a terminal
}

func piped(in *os.File) bool {
	info, err := in.Stat()
	return err == nil && info.Mode()&(fs.ModeCharDevice|fs.ModeDevice|fs.ModeDir) == 0
}

func columns(out *os.File) int {
	if !term.IsTerminal(int(out.Fd())) {
		return 0
	}
	width, _, err := term.GetSize(int(out.Fd()))
	if err != nil || width <= 0 { // some lines do not say how wide they are
		return 80
	}
	return width
}

// The exit statuses.
const (
	sound    = 0 // nothing fails and nothing is unassessed among the required concerns
	unsound  = 1 // something is
	unusable = 2 // the description or the command line cannot be used
	files    = 3 // a file could not be read or written
	failed   = 4 // the program itself failed
)

// exit ends a command with a status; its words, if any, go to standard error.
type exit struct {
	status int
	words  string
}

func (e exit) Error() string { return e.words }

func exitf(status int, format string, args ...any) error {
	return exit{status, fmt.Sprintf(format, args...)}
}

// run carries out a command line and gives its exit status. What cobra refuses is a
// command line that cannot be used; a panic is a defect of the program.
func run(w world) (status int) {
	defer func() {
		if what := recover(); what != nil {
			status = w.end(defect(what))
		}
	}()
	command := root(w)
	command.SetArgs(w.args)
	err := command.ExecuteContext(context.Background())
	if err == nil {
		return sound
	}
	var e exit
	if !errors.As(err, &e) {
		e = exit{unusable, err.Error() + "; see kilovet --help"}
	}
	return w.end(e)
}

// end says why a command ended.
func (w world) end(e exit) int {
	if e.words != "" {
		fmt.Fprintln(w.err, "kilovet: "+digest.Clean(e.words))
	}
	return e.status
}

func root(w world) *cobra.Command {
	command := &cobra.Command{
		Use:           "kilovet",
		Short:         "Reviews a high-voltage supply chain before first power-up",
		Long:          about,
		Example:       begin,
		Version:       version(),
		SilenceErrors: true,
		SilenceUsage:  true,
		RunE:          func(c *cobra.Command, _ []string) error { return c.Help() },
	}
	command.SetVersionTemplate("kilovet {{.Version}}\n")
	command.SetIn(w.in)
	command.SetOut(w.out)
	command.SetErr(w.err)
	command.CompletionOptions.DisableDefaultCmd = true
	command.SetHelpCommand(helpCommand())
	command.AddCommand(reviewCommand(w), basisCommand(w), completionCommand(w), draftCommand(w), schemaCommand(w), compareCommand(w), showCommand(w), spacingCommand(w), planCommand(w), readingsCommand(w), manualCommand(w), signoffCommand(w), verifyCommand(w))
	command.SetHelpFunc(func(c *cobra.Command, _ []string) { w.help(c) })
	plainly(command)
	return command
}

const begin = `  kilovet review                               the built-in example
  kilovet draft > chain.toml                   a description to fill in
  kilovet review chain.toml                    what stands against switching on
  kilovet review --pdf review.pdf chain.toml   sheets to read and file
  kilovet show chain.toml                      a page that follows the file
  kilovet basis                                the rules`

const about = `kilovet reads the description of a high-voltage supply chain, computes what will
happen when it is switched on, judges that against named rules, and writes a
review and, when nothing stands against it, a sheet to sign.

Exit status: 0 nothing fails and nothing is unassessed; 1 something does; 2 the
description or the command line cannot be used; 3 a file could not be read or
written; 4 the program itself failed. Local electrical codes and licensed
practice come first.`
