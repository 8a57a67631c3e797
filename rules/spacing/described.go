package spacing

import (
	"fmt"
	"slices"

	"kilovet/hv/chain"
	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

var describedSource = rule.Source{Text: "what was not described cannot be judged: every gap above 1 kV is listed before power-up", Mark: rule.Practice, Governs: true}

var described = rule.Rule{
	ID: "spacing.described", Title: "Every gap described",
	Demands: "Every node above 1 kV to ground, every adjacent pair of stages, output to cathode, and the floating heater supply to mains has a spacing or is covered by a rated part. A cable answers for its own insulation: where no spacing is described at its ends, that they are covered is an assumption.",
	Applies: "Where a supply is described.",
	Concern: rule.Life,
	Sources: []rule.Source{describedSource},
	Example: rule.Example{
		Swaps: []rule.Swap{{Was: "also       = [\"cathode\"]\n", Becomes: ""}},
		Changes: []rule.Change{
			{Rule: "spacing.described", Subject: "chain"},
			{Rule: "spacing.described", Subject: "cathode to ground", Verdict: rule.Unassessed},
		},
	},
	Judge: judgeDescribed,
}

func judgeDescribed(e *evidence.Evidence) rule.Judgement {
	if !e.HasSupply() {
		return rule.Over("no supply is described")
	}
	all := finding("spacing.described", rule.Life, rule.Presence, nil)
	all.Subject, all.Sources = "chain", []rule.Source{describedSource}
	pairs, err := wanted(e)
	if err != nil {
		return rule.Judgement{Findings: []rule.Finding{all.Lacking(err)}}
	}
	var j rule.Judgement
	missing := false
	for _, p := range pairs {
		f := all
		f.Subject, f.Concern = p.from+" to "+p.to, p.concern
		switch {
		case spaced(e, p) || byFeed(e, p):
		case cabled(e, p):
			f.Because, f.Remedy = "the cable is rated between them", "describe a [[spacing]] between supply and ground"
			j.Findings = append(j.Findings, f.Assume(bareEnds).There(true))
		default:
			missing = true
			j.Findings = append(j.Findings, f.Lacking(lack.Because("no spacing is described between these two", "spacing")))
		}
	}
	if !missing {
		all.Because = "a spacing or a rated part stands between " + rule.Number(len(pairs), "pair of nodes that needs one", "pairs of nodes that need one") + ", which is all"
		j.Findings = append(j.Findings, all.There(true))
	}
	return j
}

// bareEnds is what the rating of a cable does not answer for.
const bareEnds = "the rating of the cable answers for its own insulation only: the bare metal at its ends, supply to ground, is taken to be covered"

// pair is two nodes that need a spacing between them.
type pair struct {
	from, to string
	concern  rule.Concern
}

// wanted lists the pairs that need a spacing, each once.
func wanted(e *evidence.Evidence) ([]pair, error) {
	pairs, err := toGround(e)
	if err != nil {
		return nil, err
	}
	for k := 1; k < e.Chain().Multiplier.Stages.V; k++ {
		pairs = append(pairs, pair{stage(k), stage(k + 1), rule.Equipment})
	}
	if !same(e, "output", "cathode") {
		pairs = append(pairs, pair{"output", "cathode", rule.Equipment})
	}
	if h := e.Chain().Heater; h != nil && (h.Feed == nil || h.Feed.Kind.V != "battery") {
		pairs = append(pairs, pair{"cathode", "mains", rule.Life})
	}
	return pairs, nil
}

func stage(k int) string { return fmt.Sprintf("stage.%d", k) }

// toGround lists the nodes above 1 kV; the ends of the heater count as cathode.
func toGround(e *evidence.Evidence) ([]pair, error) {
	var pairs []pair
	for _, node := range e.Nodes() {
		if node == "heater.a" || node == "heater.b" || node == "mains" {
			continue
		}
		toGround := func(e *evidence.Evidence, n string) (quantity.Voltage, error) { return e.Between(n, "ground") }
		most, err := evidence.Largest(e, evidence.Ratings(), []string{node}, toGround)
		if err == nil && quantity.AtMost(most.Value, limits.DescribedAbove) {
			most, err = evidence.BySign(e, most, toGround)
		}
		if err != nil {
			return nil, err
		}
		if !quantity.AtMost(most.Value, limits.DescribedAbove) {
			pairs = append(pairs, pair{node, "ground", rule.Life})
		}
	}
	return pairs, nil
}

// same reports whether two names are one node, or do not both exist.
func same(e *evidence.Evidence, a, b string) bool {
	na, ok := e.Layout().Node(a)
	nb, ok2 := e.Layout().Node(b)
	return !ok || !ok2 || na == nb
}

// cabled reports whether a rated cable lies between a pair.
func cabled(e *evidence.Evidence, p pair) bool {
	cable := e.Chain().Cable
	return cable != nil && cable.RatedVoltage.Set() && matches(e, p, "supply", "ground")
}

// byFeed reports whether a rated heater feed lies between a pair.
func byFeed(e *evidence.Evidence, p pair) bool {
	h := e.Chain().Heater
	return h != nil && h.Feed != nil && h.Feed.RatedVoltage.Set() && matches(e, p, "cathode", "mains")
}

// spaced reports whether a described spacing lies between a pair.
func spaced(e *evidence.Evidence, p pair) bool {
	return slices.ContainsFunc(e.Spacings(), func(s *chain.Spacing) bool {
		return s.From.Set() && slices.ContainsFunc(ends(s), func(from string) bool { return matches(e, p, from, s.To.V) })
	})
}

// ends are the nodes on the live side of a spacing.
func ends(s *chain.Spacing) []string { return append([]string{s.From.V}, s.Also.V...) }

// matches reports whether two names are the pair, under any alias and either way round.
func matches(e *evidence.Evidence, p pair, a, b string) bool {
	at := func(name string) circuit.Node {
		if name == "heater.a" || name == "heater.b" {
			name = "cathode"
		}
		n, ok := e.Layout().Node(name)
		if !ok {
			return -1
		}
		return n
	}
	from, to := at(p.from), at(p.to)
	return at(a) == from && at(b) == to || at(a) == to && at(b) == from
}
