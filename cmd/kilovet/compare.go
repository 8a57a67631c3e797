package main

import (
	"github.com/spf13/cobra"

	"kilovet/hv/document"
	"kilovet/reports/difference"
	"kilovet/rules"
	"kilovet/rules/compare"
)

// comparing is the flags of the command compare.
type comparing struct {
	world
	json  string
	local string
	all   bool

	under *localLimits // once read
}

func compareCommand(w world) *cobra.Command {
	c := &comparing{world: w}
	command := &cobra.Command{
		Use:   "compare OLD.toml NEW.toml",
		Short: "Show what a change of the description does: inputs, figures, verdicts",
		Example: `  kilovet compare old.toml new.toml            what moved and what changed
  kilovet compare --all old.toml new.toml      every figure that moved
  kilovet compare --json - old.toml new.toml   for other programs`,
		Long: `Review two descriptions and show what differs: inputs, figures beyond a
millionth, verdicts. - reads one of them from standard input.

Exit status: 0 no verdict is worse in the new one; 1 some verdict is, or what
was met is judged no longer (a rule judges fewer than it did); 2 a description
or the command line cannot be used; 3 a file could not be read or written.`,
		Args:              cobra.ExactArgs(2),
		RunE:              func(_ *cobra.Command, args []string) error { return c.run(args[0], args[1]) },
		ValidArgsFunction: descriptions,
	}
	command.Flags().StringVar(&c.json, "json", "", "write the difference as JSON to `FILE`; - is standard output, without the text")
	localFlag(command.Flags(), &c.local)
	command.Flags().BoolVar(&c.all, "all", false, "show every figure that moved")
	return command
}

func (c *comparing) run(old, new string) error {
	if old == "-" && new == "-" {
		return exitf(unusable, "standard input can be one of the two only")
	}
	for _, given := range []string{old, new, c.local} {
		if c.json != "" && c.json != "-" && given != "-" && given != "" && same(c.json, given) {
			return exitf(unusable, "%s is named twice; give every file a name of its own", c.json)
		}
	}
	before, after, err := c.reviewed(old, new)
	if err != nil {
		return err
	}
	report := &difference.Report{Old: before.named(), New: after.named(), Difference: compare.Of(before.side(), after.side())}
	report.Program.Name, report.Program.Version = "kilovet", version()
	if c.under != nil {
		report.Local = difference.File{Name: c.under.input.Name, SHA256: c.under.input.SHA256}
	}
	if err := c.write(report); err != nil {
		return err
	}
	if report.Worse {
		return exit{status: unsound}
	}
	return nil
}

// reviewed is a description with its review.
type reviewed struct {
	source
	review *rules.Review
}

// reviewed reads and reviews both; the faults of both are listed before either ends
// the run.
func (c *comparing) reviewed(old, new string) (before, after reviewed, err error) {
	r := &reviewing{world: c.world, local: c.local}
	if before.source, err = r.input([]string{old}); err != nil {
		return before, after, err
	}
	if after.source, err = r.input([]string{new}); err != nil {
		return before, after, err
	}
	before.review, err = r.review(before.source)
	review, err2 := r.review(after.source)
	if after.review = review; err == nil {
		err = err2
	}
	c.under = r.under
	return before, after, err
}

func (r reviewed) side() compare.Side {
	return compare.Side{Inputs: document.List(r.data), Figures: r.review.Figures, Findings: r.review.Findings, Verdict: r.review.Verdict}
}

func (r reviewed) named() difference.Side {
	return difference.Side{Name: r.name, SHA256: r.review.Inputs[0].SHA256, Title: r.review.Heading.Title}
}

// write renders everything before it writes anything.
func (c *comparing) write(report *difference.Report) error {
	data, err := difference.JSON(report)
	if err != nil {
		return defect(err)
	}
	shown := difference.Text(report, difference.Options{All: c.all, Width: min(c.columns(), 100)})
	switch c.json {
	case "":
	case "-":
		shown = data
	default:
		if err := replaceAll([]output{{c.json, data}}); err != nil {
			return err
		}
	}
	return c.show(shown)
}
