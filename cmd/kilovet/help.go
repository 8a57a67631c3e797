package main

import (
	"bytes"
	"fmt"
	"strings"
	"unicode/utf8"

	"github.com/spf13/cobra"
	"github.com/spf13/pflag"
)

// helpCommand shows the help of a command, as its flag does.
func helpCommand() *cobra.Command {
	return &cobra.Command{
		Use:     "help [COMMAND]",
		Short:   "Show what a command does",
		Example: "  kilovet help review",
		RunE: func(c *cobra.Command, args []string) error {
			about, rest, err := c.Root().Find(args)
			switch {
			case err != nil:
				return err
			case len(rest) > 0 && about == c.Root():
				return noCommand(about, rest)
			case len(rest) > 0:
				return exitf(unusable, "%s has no commands of its own; kilovet help %s shows what it does", about.Name(), about.Name())
			}
			about.InitDefaultHelpFlag()
			about.InitDefaultVersionFlag()
			return about.Help()
		},
		ValidArgsFunction: func(c *cobra.Command, args []string, _ string) ([]string, cobra.ShellCompDirective) {
			if len(args) > 0 {
				return nil, cobra.ShellCompDirectiveNoFileComp
			}
			return names(c.Root()), cobra.ShellCompDirectiveNoFileComp
		},
	}
}

// help writes what a command does, examples before everything else, into the width of
// the terminal.
func (w world) help(c *cobra.Command) {
	columns := w.columns()
	if columns == 0 {
		columns = 80
	}
	w.out.Write(helpText(c, max(40, min(columns, 100))))
}

func helpText(c *cobra.Command, width int) []byte {
	var b bytes.Buffer
	first, rest := paragraphs(c)
	prose(&b, first, width)
	if c.Example != "" {
		b.WriteByte('\n')
		examples(&b, c.Example, width)
	}
	if rest != "" {
		b.WriteByte('\n')
		prose(&b, rest, width)
	}
	b.WriteString("\nCommand line\n")
	for i, line := range wrapped(usage(c), width-6) {
		fmt.Fprintf(&b, "%*s%s\n", 2+4*min(i, 1), "", line)
	}
	listed(&b, "Commands", commands(c), width)
	listed(&b, "Flags", flags(c), width)
	if c.HasAvailableSubCommands() {
		fmt.Fprintf(&b, "\n%s COMMAND --help tells more about each.\n", c.Name())
	}
	return b.Bytes()
}

// prose writes paragraphs into a width; lines that are indented are examples.
func prose(b *bytes.Buffer, text string, width int) {
	for i, paragraph := range strings.Split(text, "\n\n") {
		if i > 0 {
			b.WriteByte('\n')
		}
		if strings.HasPrefix(paragraph, " ") {
			examples(b, paragraph, width)
			continue
		}
		for _, line := range wrapped(paragraph, min(width, 80)) {
			fmt.Fprintln(b, line)
		}
	}
}

// paragraphs is the first paragraph of what a command does, and the others.
func paragraphs(c *cobra.Command) (first, rest string) {
	if c.Long == "" {
		return c.Short + ".", ""
	}
	first, rest, _ = strings.Cut(c.Long, "\n\n")
	return first, rest
}

func usage(c *cobra.Command) string {
	line := c.CommandPath() + strings.TrimPrefix(c.Use, c.Name())
	switch {
	case c.HasAvailableSubCommands():
		return line + " COMMAND"
	case c.HasAvailableFlags() && !strings.HasSuffix(line, "[flags]"):
		return line + " [flags]"
	}
	return line
}

// described is a word with what it means.
type described struct{ word, means string }

func commands(c *cobra.Command) []described {
	var all []described
	for _, sub := range c.Commands() {
		if sub.IsAvailableCommand() {
			all = append(all, described{sub.Name(), sub.Short})
		}
	}
	return all
}

func flags(c *cobra.Command) []described {
	var all []described
	c.Flags().VisitAll(func(f *pflag.Flag) {
		if f.Hidden {
			return
		}
		kind, means := pflag.UnquoteUsage(f)
		word := "--" + f.Name
		if f.Shorthand != "" {
			word = "-" + f.Shorthand + ", " + word
		}
		if kind != "" {
			word += " " + kind
		}
		if d := f.DefValue; d != "" && d != "false" && d != "0" && d != "[]" {
			means += "; without it " + strings.Trim(d, "[]")
		}
		all = append(all, described{word, means})
	})
	return all
}

// mostWord is how long a word may be to have what it means beside it.
const mostWord = 26

// listed writes words in a column and beside them, wrapped, what they mean.
func listed(b *bytes.Buffer, title string, all []described, width int) {
	if len(all) == 0 {
		return
	}
	fmt.Fprintf(b, "\n%s\n", title)
	column := 0
	for _, d := range all {
		if n := utf8.RuneCountInString(d.word); n <= mostWord {
			column = max(column, n)
		}
	}
	column += 4
	for _, d := range all {
		label := "  " + d.word
		if utf8.RuneCountInString(label) > column-2 {
			fmt.Fprintln(b, label)
			label = ""
		}
		for _, line := range wrapped(d.means, width-column) {
			fmt.Fprintf(b, "%s%s%s\n", label, strings.Repeat(" ", column-utf8.RuneCountInString(label)), line)
			label = ""
		}
	}
}

// wrapped breaks a text at its spaces.
func wrapped(text string, width int) []string {
	lines := []string{""}
	for _, word := range strings.Fields(text) {
		last := len(lines) - 1
		switch joined := strings.TrimSpace(lines[last] + " " + word); {
		case lines[last] == "" || utf8.RuneCountInString(joined) <= width:
			lines[last] = joined
		default:
			lines = append(lines, word)
		}
	}
	return lines
}
