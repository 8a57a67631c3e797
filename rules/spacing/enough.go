package spacing

import (
	"kilovet/hv/chain"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
)

// Enough is a distance with which one rule about a spacing would be met.
type Enough struct {
	Rule    string
	Least   Distance // met
	Comfort Distance // met with the rule's stated margin
	Because string
}

// Distance is a length, or the reason why there is none.
type Distance struct {
	Length quantity.Length
	Err    error
}

// DistancesOf are the distances that a spacing without a clearance needs, rule by rule,
// by the laws that judge it where one is given.
func DistancesOf(e *evidence.Evidence, s *chain.Spacing) []Enough {
	if s.Clearance.Set() {
		return nil
	}
	x, err := e.Spacing(s)
	if err != nil {
		return []Enough{{Rule: "spacing.clearance", Least: Distance{Err: err}, Comfort: Distance{Err: err}}}
	}
	all := []Enough{enoughAcross(e, s)}
	if !otherGas(s) {
		all = append([]Enough{tabled("spacing.clearance", x.Assessment.ClearanceNeeded)}, all...)
	}
	if inAir(s) && !s.Creepage.Set() {
		all = append(all, tabled("spacing.creepage", x.Assessment.CreepageNeeded))
	}
	if s.Medium.V == "air" || s.Medium.V == "gas" {
		all = append(all, enoughQuiet(e, s))
	}
	return all
}

func tabled(rule string, need gap.Result[quantity.Length]) Enough {
	if need.Lack != nil {
		return Enough{Rule: rule, Least: Distance{Err: need.Lack}, Comfort: Distance{Err: need.Lack}}
	}
	return Enough{rule, Distance{Length: need.Value}, Distance{Length: need.Value * (1 + limits.DistanceMargin)}, need.Because}
}

func enoughAcross(e *evidence.Evidence, s *chain.Spacing) Enough {
	n := Enough{Rule: "spacing.breakdown", Because: "the gap whose breakdown estimate is the voltage over the share that may be used"}
	n.Least = distanceFor(e.DistanceFor(s, limits.BreakdownShare))
	n.Comfort = distanceFor(e.DistanceFor(s, limits.BreakdownComfort))
	return n
}

func enoughQuiet(e *evidence.Evidence, s *chain.Spacing) Enough {
	n := Enough{Rule: "spacing.corona", Because: "the gap at which a discharge begins at the voltage"}
	if s.Shape == nil {
		n.Least.Err = lack.Key("spacing.shape")
		n.Comfort.Err = n.Least.Err
		return n
	}
	n.Least = distanceFor(e.QuietDistance(s, 1))
	n.Comfort = distanceFor(e.QuietDistance(s, 1/(1+limits.DistanceMargin)))
	return n
}

func distanceFor(d quantity.Length, err error) Distance { return Distance{d, err} }
