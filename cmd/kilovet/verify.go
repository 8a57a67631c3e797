package main

import (
	"io"
	"os"
	"path/filepath"
	"strings"

	"github.com/spf13/cobra"

	"kilovet/reports/seal"
	"kilovet/reports/text"
	"kilovet/rules/signoff"
)

// verifying is the flags of the command verify.
type verifying struct{ reviewing }

func verifyCommand(w world) *cobra.Command {
	v := &verifying{reviewing{world: w}}
	command := &cobra.Command{
		Use:   "verify SHEET.pdf|CODE CHAIN.toml [READINGS.toml]",
		Short: "Tell whether a sheet or a code belongs to a description",
		Long: `Tell whether a sheet of kilovet signoff, or the code on it, belongs to exactly
this description: the same files, program and verdicts. A sheet is also made anew
and held against the file byte by byte.

It shows damage and mix-up, not forgery: there is no key.

Exit status: 0 it belongs; 1 it does not, and why; 2 the sheet, the code, the
description or the command line cannot be used; 3 a file could not be read; 4 the
program itself failed.`,
		Example: `  kilovet verify sheet.pdf chain.toml
  kilovet verify 7Q2M4K-9XB3TD-W0ZA5E chain.toml
  kilovet verify sheet.pdf chain.toml --local house.toml
  kilovet verify sheet.pdf chain.toml day1.toml`,
		Args: cobra.RangeArgs(2, 3),
		RunE: func(_ *cobra.Command, args []string) error { return v.run(args[0], args[1:]) },
	}
	localFlag(command.Flags(), &v.local)
	return command
}

func (v *verifying) run(what string, paths []string) error {
	stamp, sheet, err := v.stamp(what)
	if err != nil {
		return err
	}
	given, err := v.given(paths)
	if err != nil {
		return err
	}
	b := text.Belongs{What: what, To: strings.Join(paths, " "), Code: stamp.Code, Date: stamp.Date, Until: stamp.Until}
	if sheet == nil {
		byCode(&b, given)
	} else if err := bySheet(&b, stamp, sheet, given); err != nil {
		return defect(err)
	}
	if err := v.show(text.Verify(b, v.manner(true))); err != nil {
		return err
	}
	if len(b.Against) > 0 {
		return exit{status: unsound}
	}
	return nil
}

// stamp is that of a sheet with its bytes, or, of a code alone, without.
func (v *verifying) stamp(what string) (seal.Stamp, []byte, error) {
	if _, err := os.Stat(what); err != nil && !strings.EqualFold(filepath.Ext(what), ".pdf") {
		code, err := signoff.ReadCode(what)
		if err != nil {
			return seal.Stamp{}, nil, exitf(unusable, "%s is neither a file nor a code: %v", what, err)
		}
		return seal.Stamp{Code: code}, nil, nil
	}
	sheet, err := readSheet(what)
	if err != nil {
		return seal.Stamp{}, nil, err
	}
	stamp, err := seal.Open(sheet)
	if err != nil {
		return seal.Stamp{}, nil, exitf(unusable, "%s cannot be verified: %v", what, err)
	}
	return stamp, sheet, nil
}

func readSheet(path string) ([]byte, error) {
	const most = 64 << 20 // no sheet is larger
	file, err := os.Open(path)
	if err != nil {
		return nil, exitf(files, "%s cannot be read: %v", path, plain(err))
	}
	defer file.Close()
	data, err := io.ReadAll(io.LimitReader(file, most+1))
	switch {
	case err != nil:
		return nil, exitf(files, "%s cannot be read: %v", path, plain(err))
	case len(data) > most:
		return nil, exitf(unusable, "%s cannot be verified: it is larger than any sheet", path)
	}
	return data, nil
}
