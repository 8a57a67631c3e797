package main

import (
	"slices"
	"strings"

	"github.com/spf13/pflag"

	"kilovet/rules"
)

func withoutFlag(set *pflag.FlagSet, without *[]string) {
	set.StringSliceVar(without, "without", nil, "leave out `FAMILIES` of rules, "+strings.Join(rules.Families(), ",")+": quicker, but never sound")
}

// leavable refuses families that cannot be left out.
func leavable(without []string) error {
	for _, f := range without {
		if !slices.Contains(rules.Families(), f) {
			return exitf(unusable, "--without %s: no such family; choose from %s", f, strings.Join(rules.Families(), ","))
		}
	}
	return nil
}
