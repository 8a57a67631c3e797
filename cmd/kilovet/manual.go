package main

import (
	"bytes"
	"fmt"
	"os"
	"path/filepath"
	"strings"

	"github.com/spf13/cobra"
)

func manualCommand(w world) *cobra.Command {
	return &cobra.Command{
		Use:   "manual FOLDER",
		Short: "Write the manual pages of all commands into a folder",
		Long:  "Write the manual pages of all commands into a folder, which is made if it is\nnot there.",
		Example: `  kilovet manual ~/.local/share/man/man1        then: man kilovet-review
  kilovet manual . && man ./kilovet.1           to look at them first`,
		Args: cobra.ExactArgs(1),
		RunE: func(c *cobra.Command, args []string) error { return w.manual(c.Root(), args[0]) },
		ValidArgsFunction: func(*cobra.Command, []string, string) ([]string, cobra.ShellCompDirective) {
			return nil, cobra.ShellCompDirectiveFilterDirs
		},
	}
}

// manual writes a page for each command into the folder, which is made if it is not there.
func (w world) manual(root *cobra.Command, folder string) error {
	var outputs []output
	for _, c := range append([]*cobra.Command{root}, root.Commands()...) {
		if c == root || c.IsAvailableCommand() {
			outputs = append(outputs, output{filepath.Join(folder, pageName(c)+".1"), manualPage(c)})
		}
	}
	if err := os.MkdirAll(folder, 0o777); err != nil {
		return exitf(files, "the folder %s cannot be made: %v; nothing was written", folder, plain(err))
	}
	if err := replaceAll(outputs); err != nil {
		return err
	}
	return w.show([]byte(fmt.Sprintf("%s in %s\n", plural(len(outputs), "manual page"), folder)))
}

func pageName(c *cobra.Command) string { return strings.ReplaceAll(c.CommandPath(), " ", "-") }

// manualBegins marks the pages as our own.
const manualBegins = `.\" Manual of kilovet, made from its commands.`

// manualPage is the page of a command in the language of man(7). It holds no date: the
// same commands give the same page.
func manualPage(c *cobra.Command) []byte {
	var b bytes.Buffer
	name := pageName(c)
	fmt.Fprintf(&b, "%s\n.TH %s 1 \"\" \"kilovet\" \"kilovet manual\"\n.nh\n.ad l\n", manualBegins, strings.ToUpper(name))
	fmt.Fprintf(&b, ".SH NAME\n%s \\- %s\n.SH SYNOPSIS\n.B %s\n", roff(name), roff(c.Short), roff(usage(c)))
	first, rest := paragraphs(c)
	b.WriteString(".SH DESCRIPTION\n")
	running(&b, first)
	if c.Example != "" {
		b.WriteString(".SH EXAMPLES\n")
		running(&b, c.Example)
	}
	if rest != "" {
		b.WriteString(".SH MORE\n")
		running(&b, rest)
	}
	terms(&b, "COMMANDS", commands(c))
	terms(&b, "OPTIONS", flags(c))
	if c.HasParent() {
		fmt.Fprintf(&b, ".SH SEE ALSO\n.BR %s (1)\n", roff(c.Root().Name()))
	}
	return b.Bytes()
}

// running writes paragraphs; indented lines stay as they are.
func running(b *bytes.Buffer, text string) {
	for _, paragraph := range strings.Split(text, "\n\n") {
		if strings.HasPrefix(paragraph, "  ") {
			fmt.Fprintf(b, ".PP\n.nf\n%s\n.fi\n", roff(paragraph))
			continue
		}
		fmt.Fprintf(b, ".PP\n%s\n", roff(paragraph))
	}
}

func terms(b *bytes.Buffer, title string, all []described) {
	if len(all) == 0 {
		return
	}
	fmt.Fprintf(b, ".SH %s\n", title)
	for _, d := range all {
		fmt.Fprintf(b, ".TP\n.B %s\n%s\n", roff(d.word), roff(d.means))
	}
}

// roff keeps a text from being read as requests.
func roff(text string) string {
	text = strings.NewReplacer(`\`, `\e`, "-", `\-`).Replace(text)
	lines := strings.Split(text, "\n")
	for i, l := range lines {
		if strings.HasPrefix(l, ".") || strings.HasPrefix(l, "'") {
			lines[i] = `\&` + l
		}
	}
	return strings.Join(lines, "\n")
}
