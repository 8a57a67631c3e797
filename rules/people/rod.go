package people

import (
	"fmt"

	"kilovet/hv/chain"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	body "kilovet/hv/touch"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

var rod = rule.Rule{
	ID: "rod.there", Title: "Earthing rod",
	Demands: "There is a resistor rod to discharge nodes by hand.",
	Applies: "Where a node holds more charge or energy than may be touched.",
	Margin:  "marginal where more than 5 A begin to flow through it; a rod without resistance fails",
	Concern: rule.Life,
	Sources: []rule.Source{limits.RodSource, limits.RodCurrentSource},
	Example: rule.Example{
		Swaps: []rule.Swap{{Was: `earthing_rod    = { resistance = "100 kohm", rated_voltage = "50 kV", rated_energy = "20 J" }`, Becomes: ""}},
		Changes: []rule.Change{
			{Rule: "rod.there", Subject: "chain", Verdict: rule.Fails},
			{Rule: "discharge.one_open", Subject: "chain", Verdict: rule.Fails},
			{Rule: "discharge.residue", Subject: "chain", Verdict: rule.Fails},
			{Rule: "discharge.recharge", Subject: "chain", Verdict: rule.Fails},
			{Rule: "rod.voltage", Subject: "earthing rod"},
			{Rule: "rod.energy", Subject: "earthing rod"},
		},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		f := rule.Finding{Rule: "rod.there", Subject: "chain", Concern: rule.Life, Relation: rule.Presence, Sources: []rule.Source{limits.RodSource}}
		access, done := needsCare(e, f)
		if done != nil {
			return *done
		}
		f.Place = access.Here()
		f.Because, f.Remedy = "no earthing rod is described", "provide a resistor rod rated for voltage and energy, and describe it as access.earthing_rod"
		if access.EarthingRod == nil {
			return *only(f.There(false))
		}
		return *only(resisting(e, access.EarthingRod, f))
	},
}

// resisting judges a rod by what it begins with at the highest node. Where no voltage is
// known rod.voltage says so.
func resisting(e *evidence.Evidence, r *chain.EarthingRod, f rule.Finding) rule.Finding {
	f.Place, f.Because = r.Here(), "an earthing rod is described"
	f.Remedy = "use a rod of kilo-ohms, so that a few amperes begin to flow"
	if r.Resistance.V == 0 {
		f.Because = "the rod that is described has no resistance: nothing limits the current of a discharge"
		return f.There(false)
	}
	most, err := highest(e)
	if err != nil {
		return f.There(true).WithoutRemedyIfMet()
	}
	i, err := body.Current(most.Value, r.Resistance.V, 0)
	if err != nil {
		return f.Lacking(err)
	}
	f.Because += "; " + quantity.Text(i) + " begin to flow through it"
	f = f.There(true)
	if !quantity.AtMost(i, limits.RodCurrent) {
		f.Sources = append(f.Sources, limits.RodCurrentSource)
		f = f.Assume("the rod, what it is put to and whoever holds it bear " + quantity.Text(i) + "; a few amperes are practice")
	}
	return f.WithoutRemedyIfMet()
}

// highest is the node that reaches most to ground, in any state and corner.
func highest(e *evidence.Evidence) (evidence.Extreme[quantity.Voltage], error) {
	return evidence.Worst(e, e.Nodes(), func(e *evidence.Evidence, n string) (quantity.Voltage, error) { return e.Between(n, "ground") })
}

var oneOpen = rule.Rule{
	ID: "discharge.one_open", Title: "Charge left by one open part",
	Demands: "With any one diode or permanent resistor open nothing stays above 60 V, or a rod reaches every node.",
	Applies: "Where a node holds more charge or energy than may be touched.",
	Margin:  "marginal where something stays and a rod is described",
	Concern: rule.Life,
	Fault:   true,
	Sources: []rule.Source{limits.RodSource},
	Example: rule.Example{
		Swaps: []rule.Swap{{Was: `earthing_rod    = { resistance = "100 kohm", rated_voltage = "50 kV", rated_energy = "20 J" }`, Becomes: ""}},
		Changes: []rule.Change{
			{Rule: "rod.there", Subject: "chain", Verdict: rule.Fails},
			{Rule: "discharge.one_open", Subject: "chain", Verdict: rule.Fails},
			{Rule: "discharge.residue", Subject: "chain", Verdict: rule.Fails},
			{Rule: "discharge.recharge", Subject: "chain", Verdict: rule.Fails},
			{Rule: "rod.voltage", Subject: "earthing rod"},
			{Rule: "rod.energy", Subject: "earthing rod"},
		},
	},
	Judge: judgeOneOpen,
}

func judgeOneOpen(e *evidence.Evidence) rule.Judgement {
	f := rule.Finding{Rule: "discharge.one_open", Subject: "chain", Concern: rule.Life, Relation: rule.Presence, Sources: []rule.Source{limits.RodSource}}
	access, done := needsCare(e, f)
	if done != nil {
		return *done
	}
	f.Place = access.Here()
	opened, err := e.In(evidence.Lost).OneOpen()
	if err != nil {
		return *only(f.Lacking(err))
	}
	stays, worst := 0, evidence.Opened{}
	for _, o := range opened {
		if o.Worst.Never {
			stays++
			if o.Worst.Slower(worst.Worst) {
				worst = o
			}
		}
	}
	f.Under = string(evidence.Lost)
	if stays == 0 {
		f.Because = fmt.Sprintf("none of %s, open alone, leaves a node above 60 V", rule.Number(len(opened), "part", "parts"))
		return *only(f.There(true))
	}
	f.Because = fmt.Sprintf("a node stays charged with %d of %s open alone; with %s open %s stays at %s", stays, rule.Number(len(opened), "part", "parts"), worst.Part, worst.Worst.Node, quantity.Text(worst.Worst.Left))
	f.Remedy = "discharge every column node, filter, output and cathode with the rod, one by one, whatever a meter says"
	return *only(f.There(access.EarthingRod != nil).Assume("a rod is put to every node before anything is touched"))
}

var residue = rule.Rule{
	ID: "discharge.residue", Title: "Residue of an intact ladder",
	Demands: "What an intact ladder keeps behind its diodes is at or below 60 V, or a rod reaches every column node.",
	Applies: "Where a node holds more charge or energy than may be touched.",
	Margin:  "marginal above 60 V where a rod is described",
	Concern: rule.Life,
	Sources: []rule.Source{limits.TouchVoltageSource, limits.RodSource},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `forward_drop = "12 V"`, Becomes: `forward_drop = "4 V"`}},
		Changes: []rule.Change{{Rule: "discharge.residue", Subject: "chain", Verdict: rule.Meets}},
	},
	Judge: judgeResidue,
}

func judgeResidue(e *evidence.Evidence) rule.Judgement {
	f := rule.Finding{Rule: "discharge.residue", Subject: "chain", Concern: rule.Life, Relation: rule.AtMost, Sources: []rule.Source{limits.TouchVoltageSource, limits.RodSource}}
	access, done := needsCare(e, f)
	if done != nil {
		return *done
	}
	f.Place = access.Here()
	left, err := e.Residue()
	if err != nil {
		return *only(f.Lacking(err))
	}
	f.Because = fmt.Sprintf("the diodes of the intact ladder hold back up to %s", quantity.Text(left))
	f.Remedy = "put the rod to every column node"
	if quantity.AtMost(left, limits.TouchVoltage) || access.EarthingRod == nil {
		return *only(f.Most(rule.Of(left), rule.Of(limits.TouchVoltage), 0).WithoutRemedyIfMet())
	}
	f.Relation = rule.Presence
	return *only(f.There(true).Assume("a rod is put to every node before anything is touched"))
}

var rodVoltage = rule.Rule{
	ID: "rod.voltage", Title: "Rating of the earthing rod: voltage",
	Demands: "The rod is rated for the highest voltage of any node.",
	Applies: "Where an earthing rod is described.",
	Margin:  "marginal above 80 % of the rating",
	Concern: rule.Life,
	Sources: []rule.Source{limits.RodSource, limits.InsulationVoltage.Source},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `rated_voltage = "50 kV", rated_energy = "20 J"`, Becomes: `rated_voltage = "20 kV", rated_energy = "20 J"`}},
		Changes: []rule.Change{{Rule: "rod.voltage", Subject: "earthing rod", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		r, over := described(e)
		if r == nil {
			return over
		}
		f := rule.Finding{Rule: "rod.voltage", Subject: "earthing rod", Concern: rule.Life, Relation: rule.AtMost, Place: r.RatedVoltage.Place,
			Sources: []rule.Source{limits.RodSource}, Remedy: "use a rod with a higher voltage rating"}
		if !r.RatedVoltage.Set() {
			return *only(f.Lacking(lack.Key(r.RatedVoltage.Key)))
		}
		most, err := highest(e)
		if err != nil {
			return *only(f.Lacking(err))
		}
		f.Under = most.Under.Text()
		f.Because = fmt.Sprintf("%s reaches %s; through the rod it starts with %s", most.Name, quantity.Text(most.Value), peakCurrent(most.Value, r.Resistance.V))
		return *only(f.ShareOf(rule.Of(r.RatedVoltage.V)).Most(rule.Of(most.Value), rule.Of(r.RatedVoltage.V), limits.InsulationVoltage.Margin()).WithoutRemedyIfMet())
	},
}

// peakCurrent says what a rod starts with at a voltage.
func peakCurrent(v quantity.Voltage, r quantity.Resistance) string {
	i, err := body.Current(v, r, 0)
	if err != nil {
		return "a current that nothing limits"
	}
	return quantity.Text(i)
}

var rodEnergy = rule.Rule{
	ID: "rod.energy", Title: "Rating of the earthing rod: energy",
	Demands: "The rod takes the stored energy of the whole chain.",
	Applies: "Where an earthing rod is described.",
	Margin:  "marginal above 80 % of the rating",
	Concern: rule.Life,
	Sources: []rule.Source{limits.RodSource, limits.SinglePulse.Source},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `rated_energy = "20 J"`, Becomes: `rated_energy = "0.2 J"`}},
		Changes: []rule.Change{{Rule: "rod.energy", Subject: "earthing rod", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		r, over := described(e)
		if r == nil {
			return over
		}
		f := rule.Finding{Rule: "rod.energy", Subject: "earthing rod", Concern: rule.Life, Relation: rule.AtMost, Place: r.RatedEnergy.Place,
			Sources: []rule.Source{limits.RodSource}, Remedy: "use a rod with a higher energy rating"}
		if !r.RatedEnergy.Set() {
			return *only(f.Lacking(lack.Key(r.RatedEnergy.Key)))
		}
		most, err := evidence.Worst(e, []string{""}, func(e *evidence.Evidence, _ string) (quantity.Energy, error) { return e.StoredEnergy() })
		if err != nil {
			return *only(f.Lacking(err))
		}
		f.Under = most.Under.Text()
		f.Because = fmt.Sprintf("the chain stores up to %s", quantity.Text(most.Value))
		return *only(f.ShareOf(rule.Of(r.RatedEnergy.V)).Most(rule.Of(most.Value), rule.Of(r.RatedEnergy.V), limits.SinglePulse.Margin()).Assume(exact(e, holds)...).WithoutRemedyIfMet())
	},
}
