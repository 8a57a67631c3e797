package main

import (
	"os"

	"github.com/spf13/cobra"

	"kilovet/hv/chain"
	"kilovet/reports/procedure"
	"kilovet/rules/evidence"
	"kilovet/rules/plan"
)

// planning is the flags of the command plan.
type planning struct {
	world
	readings string
}

func planCommand(w world) *cobra.Command {
	p := &planning{world: w}
	command := &cobra.Command{
		Use:   "plan [CHAIN.toml]",
		Short: "Plan the first power-up: cold checks, steps, expected readings",
		Long: `Plan the first power-up of a chain, every step computed.

  kilovet plan chain.toml                       the plan, with boxes to fill in
  kilovet plan --readings day1.toml chain.toml  and a form for what is read
  kilovet readings chain.toml day1.toml         what the readings say

Exit status: 0 planned; 1 something could not be planned, and the plan says
what; 2 the description or the command line cannot be used; 3 a file could not
be read or written.`,
		Args:              cobra.MaximumNArgs(1),
		RunE:              func(_ *cobra.Command, args []string) error { return p.run(args) },
		ValidArgsFunction: descriptions,
	}
	command.Flags().StringVar(&p.readings, "readings", "", "write the form for the readings to `FILE`")
	return command
}

// descriptions completes the names of descriptions.
func descriptions(*cobra.Command, []string, string) ([]string, cobra.ShellCompDirective) {
	return []string{"toml"}, cobra.ShellCompDirectiveFilterFileExt
}

func (p *planning) run(args []string) error {
	r := &reviewing{world: p.world}
	if len(args) == 1 && p.readings != "" && args[0] != "-" && same(p.readings, args[0]) {
		return exitf(unusable, "%s is named twice; give every file a name of its own", p.readings)
	}
	given, err := r.input(args)
	if err != nil {
		return err
	}
	c, err := r.understood(given)
	if err != nil {
		return err
	}
	progress := p.progress()
	made, err := plan.Of(evidence.New(c).Telling(progress.tell))
	progress.end()
	if err != nil {
		return exitf(unsound, "nothing to plan: %v", err)
	}
	if err := p.form(c, given, made); err != nil {
		return err
	}
	if err := p.show(procedure.Text(made, procedure.Options{Width: min(p.columns(), 100), Title: c.Title.V, Note: given.note})); err != nil {
		return err
	}
	if len(made.Open) > 0 {
		return exit{status: unsound}
	}
	return nil
}

// form writes the form for the readings where it is asked for.
func (p *planning) form(c *chain.Chain, given source, made *plan.Plan) error {
	if p.readings == "" {
		return nil
	}
	if info, err := os.Stat(p.readings); err == nil && info.Size() > 0 {
		return exitf(unusable, "%s exists and may hold readings: it is not replaced; give another name", p.readings)
	}
	data := procedure.Form(made, procedure.Heading{Document: c.Document.V, Revision: c.Revision.V, SHA256: given.sum()})
	if err := (output{p.readings, data}).replace(); err != nil {
		return exitf(files, "%s cannot be written: %v; nothing was written", p.readings, plain(err))
	}
	return nil
}
