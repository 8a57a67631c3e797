package main

import (
	"strings"
	"time"

	"github.com/spf13/cobra"

	"kilovet/reports/page"
	"kilovet/reports/pdf"
	"kilovet/reports/seal"
	"kilovet/reports/text"
	"kilovet/rules"
	"kilovet/rules/rule"
)

// signing is the flags of the command signoff.
type signing struct {
	reviewing
	date, until string
}

func signoffCommand(w world) *cobra.Command {
	s := &signing{reviewing: reviewing{world: w}}
	command := &cobra.Command{
		Use:   "signoff CHAIN.toml [READINGS.toml] --pdf FILE --date DATE",
		Short: "Write the sheet that people sign, if nothing stands against it",
		Long:  aboutSignoff,
		Example: `  kilovet signoff chain.toml --pdf sheet.pdf --date 2025-03-04
  kilovet signoff chain.toml --pdf sheet.pdf --date 2025-03-04 \
      --until 2026-03-03 --require life,equipment
  kilovet signoff chain.toml day1.toml --pdf sheet.pdf --date 2025-03-04`,
		Args:              cobra.RangeArgs(1, 2),
		RunE:              func(_ *cobra.Command, args []string) error { return s.run(args) },
		ValidArgsFunction: descriptions,
	}
	flags := command.Flags()
	flags.StringVar(&s.pdf, "pdf", "", "write the sheet to `FILE`")
	flags.StringVar(&s.date, "date", "", "`DATE` of issue, as in 2025-03-04")
	flags.StringVar(&s.until, "until", "", "last `DATE` of validity; without it there is a blank to write in")
	s.paperFlag(command)
	localFlag(flags, &s.local)
	flags.StringSliceVar(&s.require, "require", words(rule.Concerns), "issue the sheet where these `CONCERNS` allow it; life is always among them")
	return command
}

const aboutSignoff = `Write the sheet that people sign before the first power-up: what was reviewed,
what is open and who answers for it, what can hurt, and what ends its validity.

It is not issued while something of the required concerns fails or is unassessed
without an [[accepted]] in the description. What concerns life is never accepted
where it fails; where it is unassessed, only a recorded measurement answers it.
Readings of the first power-up, where they are named, must all be as planned. A
short code is printed; kilovet verify tells whether a sheet or a code belongs to a
description. It shows damage and mix-up, not forgery: there is no key.

Exit status: 0 the sheet was written; 1 it is not issued, and why; 2 the
description or the command line cannot be used; 3 a file could not be read or
written; 4 the program itself failed.`

func (s *signing) run(args []string) error {
	concerns, err := s.usable(args)
	if err != nil {
		return err
	}
	given, err := s.given(args)
	if err != nil {
		return err
	}
	signed, review := rules.SignOffOf(given.chain, given.review, concerns, given.read), given.review
	shown := text.SignOff(review, signed, s.pdf, strings.Join(args, " "), s.manner(true))
	if !signed.Issued() {
		if err := s.show(shown); err != nil {
			return err
		}
		return exit{status: unsound}
	}
	sheet, err := sheetOf(review, signed, seal.Stamp{Date: s.date, Until: s.until, Paper: s.paper})
	if err != nil {
		return defect(err)
	}
	if err := replaceAll([]output{{s.pdf, sheet}}); err != nil {
		return err
	}
	return s.show(shown)
}

// usable refuses a command line before anything is computed.
func (s *signing) usable(args []string) ([]rule.Concern, error) {
	concerns, err := required(s.require)
	if err != nil {
		return nil, err
	}
	if s.pdf == "" {
		return nil, exitf(unusable, "a sheet needs a file, as in --pdf sheet.pdf")
	}
	day, err := dated("--date", s.date)
	if err != nil {
		return nil, err
	}
	if s.until != "" {
		last, err := dated("--until", s.until)
		if err != nil {
			return nil, err
		}
		if last.Before(day) {
			return nil, exitf(unusable, "--until %s lies before --date %s", s.until, s.date)
		}
	}
	return concerns, s.writable(args, issued)
}

func dated(flag, text string) (time.Time, error) {
	day, err := time.Parse(time.DateOnly, text)
	switch {
	case text == "":
		return day, exitf(unusable, "a sheet needs its date of issue, as in %s 2025-03-04: the program has no clock", flag)
	case err != nil:
		return day, exitf(unusable, "%s %s is no date; write year, month and day, as in 2025-03-04", flag, text)
	}
	return day, nil
}

// sheetOf is a sheet with its stamp, whose dates and paper are given.
func sheetOf(review *rules.Review, signed rules.SignOff, s seal.Stamp) ([]byte, error) {
	sheet, err := pdf.RenderOn(pdf.Paper(s.Paper), page.SignOff(review, signed, page.Issue{Date: s.Date, Until: s.Until}))
	if err != nil {
		return nil, err
	}
	s.Code, s.Version, s.Required, s.Inputs = signed.Code, review.Program.Version, signed.Required, review.Inputs
	return seal.Seal(sheet, s), nil
}
