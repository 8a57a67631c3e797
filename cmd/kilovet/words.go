package main

import (
	"regexp"
	"strings"

	"github.com/spf13/cobra"

	"kilovet/hv/document"
)

// plainly answers a command line that cannot be used in the program's own words, with
// what is nearest to it.
func plainly(root *cobra.Command) {
	root.SetFlagErrorFunc(flagFault)
	root.Args = noCommand
	for _, c := range root.Commands() {
		accepts := c.Args
		c.Args = func(c *cobra.Command, given []string) error {
			if accepts == nil || accepts(c, given) == nil {
				return nil
			}
			return exitf(unusable, "%s; the command is: kilovet %s", counted(given, accepts(c, nil) == nil), c.Use)
		}
	}
}

// counted says what is wrong with the number of names that a command was given, which it
// may do without.
func counted(given []string, none bool) string {
	switch {
	case len(given) == 0:
		return "nothing was named"
	case len(given) == 1 && none:
		return given[0] + " is too many"
	case len(given) == 1:
		return "only " + given[0] + " was named"
	}
	return strings.Join(given, " ") + " are too many"
}

// noCommand answers a word in the place of a command.
func noCommand(root *cobra.Command, given []string) error {
	if len(given) == 0 {
		return nil
	}
	word := given[0]
	if strings.HasSuffix(strings.ToLower(word), ".toml") {
		return exitf(unusable, "no command %q; to review the file: kilovet review %s", word, word)
	}
	if word == "version" {
		return exitf(unusable, "no command %q; the version is told by kilovet --version", word)
	}
	if near, ok := document.Nearest(word, names(root)); ok {
		return exitf(unusable, "no command %q; did you mean %s?", word, near)
	}
	return exitf(unusable, "no command %q; kilovet --help lists them", word)
}

// names are those of the commands that a command has.
func names(of *cobra.Command) []string {
	var all []string
	for _, c := range of.Commands() {
		all = append(all, c.Name())
	}
	return all
}

// flagFault answers a flag that is not there or lacks its value. The library tells
// its faults apart by their first words.
func flagFault(c *cobra.Command, err error) error {
	const unknown, short, valueless = "unknown flag: --", "unknown shorthand flag: ", "flag needs an argument: "
	text := err.Error()
	switch {
	case strings.HasPrefix(text, unknown):
		return noFlag(c, "--", strings.TrimPrefix(text, unknown))
	case strings.HasPrefix(text, short):
		_, name, _ := strings.Cut(text, " in -")
		return noFlag(c, "-", name)
	case strings.HasPrefix(text, valueless):
		return exitf(unusable, "%s needs a value; see %s --help", strings.TrimPrefix(text, valueless), c.CommandPath())
	}
	return exitf(unusable, "%s; see %s --help", text, c.CommandPath())
}

// longFlag finds the names of flags in their help.
var longFlag = regexp.MustCompile(`(?m)^ *(?:-\w, )?--([\w-]+)`)

func noFlag(c *cobra.Command, dashes, name string) error {
	name, _, _ = strings.Cut(name, "=")
	var names []string
	for _, m := range longFlag.FindAllStringSubmatch(c.Flags().FlagUsages(), -1) {
		names = append(names, m[1])
	}
	if near, ok := document.Nearest(name, names); ok {
		return exitf(unusable, "no flag %s%s; did you mean --%s?", dashes, name, near)
	}
	return exitf(unusable, "no flag %s%s; %s --help lists them", dashes, name, c.CommandPath())
}
