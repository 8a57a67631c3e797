package main

import (
	"fmt"
	"os"
	"path/filepath"

	"github.com/spf13/pflag"

	"kilovet/hv/document"
	"kilovet/reports/digest"
	"kilovet/rules"
	"kilovet/rules/local"
)

// localLimits is a file of local limits that was read without faults.
type localLimits struct {
	name  string
	file  *local.File
	input rules.Input
}

func localFlag(set *pflag.FlagSet, path *string) {
	set.StringVar(path, "local", "", "judge by the stricter limits of a local code, and by relaxations with a test record, in `FILE` (TOML)")
}

// limits reads the file of --local once; nil where none is named.
func (r *reviewing) limits() (*localLimits, error) {
	if r.local == "" || r.under != nil {
		return r.under, nil
	}
	given, err := limitsFile(r.local)
	if err != nil {
		return nil, err
	}
	limits, faults := rules.ReadLocal(given.data)
	if len(faults) > 0 {
		return nil, r.faulty(given.name, faults)
	}
	r.under = &localLimits{given.name, limits, inputOf("local limits", given)}
	return r.under, nil
}

// limitsFile is what stands in a file of local limits.
func limitsFile(path string) (source, error) {
	if path == "-" {
		return source{}, exitf(unusable, "local limits are not read from standard input; name a file")
	}
	file, err := os.Open(path)
	if err != nil {
		return source{}, exitf(files, "%s cannot be read: %v", path, plain(err))
	}
	defer file.Close()
	return readAll(path, file)
}

// faulty lists the faults of a file, which end the run.
func (w world) faulty(name string, faults document.Faults) error {
	for _, f := range faults {
		fmt.Fprintln(w.err, digest.Clean(faultLine(name, f)))
	}
	return exitf(unusable, "%s in %s; nothing was written", plural(len(faults), "fault"), name)
}

// refusals tells at once what of the local limits was refused: it changed nothing.
func (w world) refusals(name string, outcomes []local.Outcome) {
	for _, o := range outcomes {
		if o.Result == local.Refused {
			line := fmt.Sprintf("%s:%d:%d: %s of %s refused for %s: %s", name, o.Place.Line, o.Place.Column, o.Kind, o.Rule, subjects(o.Subjects), o.Because)
			fmt.Fprintln(w.err, digest.Clean(line))
		}
	}
}

func subjects(all []string) string {
	if len(all) > 1 {
		return fmt.Sprintf("%s and %d more", all[0], len(all)-1)
	}
	return all[0]
}

func inputOf(role string, given source) rules.Input {
	return rules.Input{Role: role, Name: filepath.Base(given.name), SHA256: given.sum()}
}
