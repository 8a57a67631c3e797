package main

import (
	"slices"
	"strings"

	"github.com/spf13/cobra"

	"kilovet/reports/pdf"
)

// sheetFlags are the flags of the page and of the paper.
func (r *reviewing) sheetFlags(command *cobra.Command) {
	command.Flags().StringVar(&r.html, "html", "", "write one page for the browser to `FILE`; it loads nothing")
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
	case !slices.Contains(pdf.Papers, pdf.Paper(r.paper)):
		return exitf(unusable, "--paper %s: no such paper; choose from %s", r.paper, strings.Join(words(pdf.Papers), ","))
	}
	return nil
}
