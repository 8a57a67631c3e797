package rules

import (
	"slices"

	"kilovet/hv/chain"
	"kilovet/rules/rule"
)

// unsaid is what every state of a chain takes for granted about its supply where the
// description leaves it out.
func unsaid(c *chain.Chain) (all []string) {
	if c.Multiplier == nil {
		return nil
	}
	if !c.Drive.Waveform.Set() {
		all = append(all, "the drive is a sine: drive.waveform is not given")
	}
	if !c.Multiplier.Topology.Set() {
		all = append(all, "the multiplier has one coupling column: multiplier.topology is not given")
	}
	return all
}

// onSupply adds what is taken for granted about the supply to each finding that rests on a
// state of the chain.
func onSupply(findings []rule.Finding, granted func() []string) []rule.Finding {
	if !slices.ContainsFunc(findings, rests) {
		return findings
	}
	taken := granted()
	if len(taken) == 0 {
		return findings
	}
	for i, f := range findings {
		if !rests(f) {
			continue
		}
		passed := f.Verdict == rule.Meets
		if f = f.Assume(taken...); passed && f.Remedy == "" {
			f.Remedy = "say it in the description"
		}
		findings[i] = f
	}
	return findings
}

// rests reports whether a finding rests on a state of the chain.
func rests(f rule.Finding) bool { return f.Under != "" }
