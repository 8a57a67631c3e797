package people

import (
	"fmt"
	"strings"

	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/hv/lack"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

// described is the rod, or why there is none to judge.
func described(e *evidence.Evidence) (*chain.EarthingRod, rule.Judgement) {
	if !e.HasSupply() {
		return nil, rule.Over("no supply is described")
	}
	if a := e.Chain().Access; a != nil && a.EarthingRod != nil {
		return a.EarthingRod, rule.Judgement{}
	}
	return nil, rule.Over("no earthing rod is described")
}

var enclosure = rule.Rule{
	ID: "access.enclosure", Title: "Enclosure",
	Demands: "Parts with more charge or energy than may be touched are in an enclosure that is interlocked or opens with a tool only.",
	Applies: "Where a node holds more charge or energy than may be touched.",
	Concern: rule.Life,
	Sources: []rule.Source{limits.EnclosureSource},
	Example: rule.Example{
		Swaps: []rule.Swap{{Was: `enclosure       = "interlocked"`, Becomes: `enclosure       = "open"`}},
		Changes: []rule.Change{
			{Rule: "access.enclosure", Subject: "chain", Verdict: rule.Fails},
			{Rule: "access.interlock", Subject: "chain"},
		},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		f := rule.Finding{Rule: "access.enclosure", Subject: "chain", Concern: rule.Life, Relation: rule.Presence, Sources: []rule.Source{limits.EnclosureSource}}
		access, done := needsCare(e, f)
		if done != nil {
			return *done
		}
		f.Place = access.Enclosure.Place
		if !access.Enclosure.Set() {
			return *only(f.Lacking(lack.Key(access.Enclosure.Key)))
		}
		f.Because = "the enclosure is " + access.Enclosure.V
		f.Remedy = "close it: interlocked, or opened with a tool only"
		return *only(f.There(access.Enclosure.V != "open").WithoutRemedyIfMet())
	},
}

var interlock = rule.Rule{
	ID: "access.interlock", Title: "Interlock",
	Demands: "Each door has at least two switches that act on the drive supply, and only a deliberate act switches on again.",
	Applies: "Where the enclosure is interlocked.",
	Concern: rule.Life,
	Sources: []rule.Source{limits.InterlockSource},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `switches = 2`, Becomes: `switches = 1`}},
		Changes: []rule.Change{{Rule: "access.interlock", Subject: "chain", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		access := e.Chain().Access
		if access == nil || access.Enclosure.V != "interlocked" {
			return rule.Over("no interlocked enclosure is described")
		}
		f := rule.Finding{Rule: "access.interlock", Subject: "chain", Concern: rule.Life, Relation: rule.AtLeast, Sources: []rule.Source{limits.InterlockSource}}
		return *only(judgeInterlock(access, f))
	},
}

func judgeInterlock(access *chain.Access, f rule.Finding) rule.Finding {
	f.Place = access.Enclosure.Place
	lock := access.Interlock
	if lock == nil {
		return f.Lacking(lack.Key("access.interlock"))
	}
	f.Place = lock.Here()
	if err := document.Need(lock.Restart, lock.ActsOn); err != nil {
		return f.Lacking(err)
	}
	if lock.Restart.V != "manual" {
		f.Because, f.Remedy, f.Relation, f.Place = "it comes back by itself when the door closes", "make restart a deliberate act", rule.Presence, lock.Restart.Place
		return f.There(false)
	}
	if !strings.Contains(lock.ActsOn.V, "drive") && !strings.Contains(lock.ActsOn.V, "mains") {
		f.Because, f.Remedy, f.Relation, f.Place = fmt.Sprintf("it acts on %q, not on the drive supply", lock.ActsOn.V), "let it cut the drive supply or its mains", rule.Presence, lock.ActsOn.Place
		return f.There(false)
	}
	f.Because = fmt.Sprintf("switches at each door: %d; they act on %q", lock.Switches.V, lock.ActsOn.V)
	f.Remedy = "fit two independent switches at each door"
	return f.Least(count(lock.Switches.V), count(2), 0).WithoutRemedyIfMet()
}

var bonds = rule.Rule{
	ID: "access.earth_bond", Title: "Earth bonds",
	Demands: "The enclosure has two separate earth bonds, each measured at 0.1 ohm or less with 25 A.",
	Applies: "Where a supply is described.",
	Concern: rule.Life,
	Sources: []rule.Source{limits.BondSource, limits.TwoBondsSource},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `resistance = "0.05 ohm"`, Becomes: `resistance = "0.5 ohm"`}},
		Changes: []rule.Change{{Rule: "access.earth_bond", Subject: "chain", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		if !e.HasSupply() {
			return rule.Over("no supply is described")
		}
		f := rule.Finding{Rule: "access.earth_bond", Subject: "chain", Concern: rule.Life, Relation: rule.AtMost, Sources: []rule.Source{limits.BondSource, limits.TwoBondsSource}}
		access := e.Chain().Access
		if access == nil || access.EarthBond == nil {
			return *only(f.Lacking(lack.Key("access.earth_bond")))
		}
		return *only(judgeBonds(access.EarthBond, f))
	},
}

func judgeBonds(b *chain.EarthBond, f rule.Finding) rule.Finding {
	f.Place = b.Here()
	if err := document.Need(b.Count, b.Resistance, b.TestCurrent); err != nil {
		return f.Lacking(err)
	}
	f.Remedy = "fit a second separate bond"
	if b.Count.V < 2 {
		f.Because, f.Place, f.Relation = fmt.Sprintf("%d bond", b.Count.V), b.Count.Place, rule.AtLeast
		return f.Least(count(b.Count.V), count(2), 0)
	}
	if b.TestCurrent.V < limits.BondTestCurrent {
		f.Because, f.Place, f.Remedy = "measured with less than 25 A", b.TestCurrent.Place, "measure the bonds with 25 A"
		f.Relation = rule.AtLeast
		return f.Least(rule.Of(b.TestCurrent.V), rule.Of(limits.BondTestCurrent), 0)
	}
	f.Because, f.Place, f.Remedy = fmt.Sprintf("%d bonds, the worst %s", b.Count.V, rule.Quantity(b.Resistance.V)), b.Resistance.Place, "clean and tighten the bonds, measure again"
	return f.Most(rule.Of(b.Resistance.V), rule.Of(limits.BondResistance), 0).WithoutRemedyIfMet()
}

var restart = rule.Rule{
	ID: "protection.restart", Title: "No restart by itself",
	Demands: "After a trip or a mains failure the supply comes back by a deliberate act only.",
	Applies: "Where a supply is described.",
	Concern: rule.Life,
	Sources: []rule.Source{limits.RestartSource},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `restart      = "manual"`, Becomes: `restart      = "automatic"`}},
		Changes: []rule.Change{{Rule: "protection.restart", Subject: "chain", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		if !e.HasSupply() {
			return rule.Over("no supply is described")
		}
		f := rule.Finding{Rule: "protection.restart", Subject: "chain", Concern: rule.Life, Relation: rule.Presence, Sources: []rule.Source{limits.RestartSource}}
		p := e.Chain().Protection
		if p == nil || !p.Restart.Set() {
			return *only(f.Lacking(lack.Key("protection.restart")))
		}
		f.Place, f.Because, f.Remedy = p.Restart.Place, "restart is "+p.Restart.V, "make restart a deliberate act"
		return *only(f.There(p.Restart.V == "manual").WithoutRemedyIfMet())
	},
}

// Rules lists the rules of this family.
func Rules() []rule.Rule {
	return []rule.Rule{touch, waiting, redundancy, rod, oneOpen, residue, recharge, rodVoltage, rodEnergy, enclosure, interlock, bonds, restart}
}
