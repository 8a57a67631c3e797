package main

import (
	"fmt"

	"github.com/spf13/cobra"

	"kilovet/reports/digest"
	"kilovet/reports/json"
	"kilovet/reports/text"
	"kilovet/rules"
	"kilovet/rules/rule"
)

// gapping is the flags of the command spacing.
type gapping struct {
	reviewing
	gap *gapFlags
}

func spacingCommand(w world) *cobra.Command {
	g := &gapping{reviewing: reviewing{world: w}}
	command := &cobra.Command{
		Use:   "spacing --medium MEDIUM --voltage VOLTAGE [flags]",
		Short: "Judge one gap from flags, or find the distance it needs",
		Long:  aboutSpacing,
		Example: `  kilovet spacing --voltage '20 kV' --medium air --clearance '60 mm' \
      --creepage '150 mm' --material alumina \
      --altitude '240 m' --air-temperature '30 degC' --pollution-degree 2
  kilovet spacing --voltage 20kV --medium air --clearance 60mm \
      --shape 'coaxial inner_radius=3mm outer_radius=63mm' --altitude 240m
  kilovet spacing --voltage 20kV --medium vacuum --shape plates`,
		Args: cobra.NoArgs,
		RunE: func(*cobra.Command, []string) error { return g.run() },
	}
	flags := command.Flags()
	g.gap = newGapFlags(flags)
	flags.StringVar(&g.json, "json", "", "write the results as JSON to `FILE`; - is standard output, without the text")
	localFlag(flags, &g.local)
	flags.StringSliceVar(&g.require, "require", words(rule.Concerns), "let the exit status depend on these `CONCERNS` only")
	return command
}

const aboutSpacing = `Judge one gap by the tables of the standards and by physics, without a file. The
flags are the keys of [[spacing]] and [site]; the block that they make is reviewed
by the rules of kilovet review, and printed to be pasted into a description.

The last of the examples has no clearance: the distance that each rule needs is computed, and what
cannot be judged without a clearance is unassessed.

Exit status: as of kilovet review; 2 where the flags describe no gap.`

func (g *gapping) run() error {
	concerns, err := required(g.require)
	if err != nil {
		return err
	}
	if err := g.writable(nil, sheets); err != nil {
		return err
	}
	block, lines := g.gap.block()
	review, err := g.judge(block, lines)
	if err != nil {
		return err
	}
	outputs, shown, err := g.renderGap(review, block)
	if err != nil {
		return err
	}
	if err := replaceAll(outputs); err != nil {
		return err
	}
	if err := g.show(shown); err != nil {
		return err
	}
	return verdict(review, concerns)
}

// judge reviews the block; its faults are those of the flags that made its lines.
func (g *gapping) judge(block []byte, lines []string) (*rules.Review, error) {
	given := source{name: "flags", data: block}
	c, faults := g.gap.read(block, lines)
	if len(faults) > 0 {
		for _, f := range faults {
			fmt.Fprintln(g.err, digest.Clean(f))
		}
		return nil, exitf(unusable, "%s in the flags; see kilovet spacing --help", plural(len(faults), "fault"))
	}
	return g.reviewOf(c, given)
}

func (g *gapping) renderGap(review *rules.Review, block []byte) (outputs []output, shown []byte, err error) {
	data, err := json.Render(review)
	if err != nil {
		return nil, nil, defect(err)
	}
	switch g.json {
	case "-":
		return nil, data, nil
	case "":
	default:
		outputs = []output{{g.json, data}}
	}
	return outputs, text.Gap(review, string(block), g.manner(true)), nil
}
