package main

import (
	"strings"

	"github.com/spf13/cobra"

	"kilovet/hv/document"
	"kilovet/reports/text"
	"kilovet/rules"
	"kilovet/rules/rule"
)

func basisCommand(w world) *cobra.Command {
	return &cobra.Command{
		Use:   "basis [RULE]",
		Short: "List the rules, or show what one of them rests on",
		Example: `  kilovet basis                        every rule, by what is at stake
  kilovet basis spacing.creepage       what one demands, its sources, an example`,
		Args: cobra.MaximumNArgs(1),
		RunE: func(_ *cobra.Command, args []string) error { return w.basis(args) },
		ValidArgsFunction: func(*cobra.Command, []string, string) ([]string, cobra.ShellCompDirective) {
			return ids(rules.All()), cobra.ShellCompDirectiveNoFileComp
		},
	}
}

func (w world) basis(args []string) error {
	all := rules.All()
	if len(args) == 0 {
		return w.show(text.Rules(all, w.manner(true)))
	}
	for _, r := range all {
		if r.ID == args[0] {
			return w.show(text.Rule(r, w.manner(true)))
		}
	}
	return exitf(unusable, "no rule %q; %s", args[0], nearest(args[0], ids(all)))
}

func nearest(word string, among []string) string {
	if near, ok := document.Nearest(word, among); ok {
		return "did you mean " + near + "?"
	}
	return "kilovet basis lists them: " + strings.Join(among[:min(3, len(among))], ", ") + " …"
}

func ids(all []rule.Rule) []string {
	var names []string
	for _, r := range all {
		names = append(names, r.ID)
	}
	return names
}

// show writes to standard output.
func (w world) show(data []byte) error {
	if _, err := w.out.Write(data); err != nil {
		return exitf(files, "standard output: %v", err)
	}
	return nil
}
