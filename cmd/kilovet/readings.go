package main

import (
	"github.com/spf13/cobra"

	"kilovet/hv/chain"
	"kilovet/reports/procedure"
	"kilovet/rules/evidence"
	"kilovet/rules/plan"
	"kilovet/rules/readings"
)

func readingsCommand(w world) *cobra.Command {
	return &cobra.Command{
		Use:   "readings CHAIN.toml READINGS.toml",
		Short: "Compare what was read at a first power-up with what the plan expects",
		Long: `Compare the readings of a first power-up with the plan, and name what a
deviation points to: every fault and error of assembly is computed at the steps
that were read.

  kilovet plan --readings day1.toml chain.toml  make the form, then fill it in
  kilovet readings chain.toml day1.toml         what it says

Exit status: 0 every reading lies within its bounds; 1 one does not, or nothing
was read; 2 a file or the command line cannot be used, or the readings belong to
another description; 3 a file could not be read.`,
		Args:              cobra.ExactArgs(2),
		RunE:              func(_ *cobra.Command, args []string) error { return w.compareReadings(args[0], args[1]) },
		ValidArgsFunction: descriptions,
	}
}

func (w world) compareReadings(description, form string) error {
	if description == "-" && form == "-" {
		return exitf(unusable, "standard input can be one of the two only")
	}
	r := &reviewing{world: w}
	given, err := r.input([]string{description})
	if err != nil {
		return err
	}
	filled, err := r.input([]string{form})
	if err != nil {
		return err
	}
	c, err := r.understood(given)
	if err != nil {
		return err
	}
	progress := w.progress()
	defer progress.end()
	e := evidence.New(c).Telling(progress.tell)
	made, err := plan.Of(e)
	if err != nil {
		return exitf(unsound, "nothing to compare with: %v", err)
	}
	f, faults := readings.Read(filled.data, made)
	if len(faults) > 0 {
		return w.faulty(filled.name, faults)
	}
	if err := belongs(f, given, filled.name); err != nil {
		return err
	}
	said, err := readings.Of(e, made, f)
	progress.end()
	if err != nil {
		return exitf(unsound, "the readings cannot be compared: %v", err)
	}
	return w.say(said, c)
}

// belongs refuses readings that were taken on another description.
func belongs(f *readings.File, given source, name string) error {
	if f.Description.V != given.sum() {
		return exitf(unusable, "%s belongs to another description (SHA-256 %s); this one is %s: make a form for it with kilovet plan --readings", name, f.Description.V, given.sum())
	}
	return nil
}

func (w world) say(said *readings.Comparison, c *chain.Chain) error {
	if err := w.show(procedure.Readings(said, procedure.Options{Width: min(w.columns(), 100), Title: c.Title.V})); err != nil {
		return err
	}
	if !said.Sound {
		return exit{status: unsound}
	}
	return nil
}
