package fault

import (
	"fmt"

	"kilovet/hv/chain"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/parts"
	"kilovet/rules/rule"
)

var overVoltageTrip = rule.Rule{
	ID: "protection.over_voltage", Title: "Over-voltage trip",
	Demands: "The over-voltage trip has a sensor of its own, takes the drive away, and is set above the highest working voltage and below what the ratings bear.",
	Applies: "Where an over-voltage trip is described.",
	Margin:  "marginal with less than 5 % above the working voltage, or where it rests on the main divider",
	Concern: rule.Equipment,
	Sources: []rule.Source{limits.TripSource},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `senses = "second divider"`, Becomes: `senses = "the main divider"`}},
		Changes: []rule.Change{{Rule: "protection.over_voltage", Subject: "chain", Verdict: rule.Marginal}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		p := e.Chain().Protection
		if !e.HasSupply() || p == nil || p.OverVoltage == nil {
			return rule.Over("no over-voltage trip is described")
		}
		return rule.One(judgeOverVoltage(e, p.OverVoltage))
	},
}

func trip(id string, here rule.Finding, acts string) rule.Finding {
	here.Rule, here.Subject, here.Concern, here.Relation, here.Sources = id, "chain", rule.Equipment, rule.AtLeast, []rule.Source{limits.TripSource}
	here.Remedy = "let it act on the drive supply or its mains"
	here.Because = "it acts on " + acts
	return here
}

func judgeOverVoltage(e *evidence.Evidence, t *chain.VoltageTrip) rule.Finding {
	f := trip("protection.over_voltage", rule.Finding{Place: t.Here()}, "the "+t.ActsOn.V)
	for _, key := range []struct {
		set bool
		key string
	}{{t.Senses.Set(), t.Senses.Key}, {t.ActsOn.Set(), t.ActsOn.Key}} {
		if !key.set {
			return f.Lacking(lack.Key(key.key))
		}
	}
	if !stops(t.ActsOn.V) {
		f.Relation = rule.Presence
		return f.There(false)
	}
	most, err := evidence.Largest(e, working(), []string{""}, func(e *evidence.Evidence, _ string) (quantity.Voltage, error) { return e.Sensed() })
	if err != nil {
		return f.Lacking(err)
	}
	f.Under = most.Under.Text()
	f = between(e, f, t.Trip.V, most.Value, func(e *evidence.Evidence) (quantity.Voltage, error) { return e.Sensed() })
	switch sensorOf(t.Senses.V) {
	case main:
		return f.Assume("the over-voltage trip rests on the main divider and does not answer its faults")
	case unknown:
		return f.Assume("what the over-voltage trip senses (" + t.Senses.V + ") rests on nothing of the main divider")
	}
	return f
}

// working are the conditions a trip must leave alone.
func working() []evidence.Condition {
	var all []evidence.Condition
	for _, s := range evidence.LongTerm() {
		for _, c := range evidence.Corners {
			all = append(all, evidence.Condition{State: s.State, Corner: c})
		}
	}
	return all
}

// between judges a set point: above what the chain works with, below what its ratings
// bear in proportion.
func between[Q quantity.Number](e *evidence.Evidence, f rule.Finding, set, most Q, seen func(*evidence.Evidence) (Q, error)) rule.Finding {
	f.Because += fmt.Sprintf(", is set to %s, and the chain works with up to %s", quantity.Text(set), quantity.Text(most))
	f.Remedy = "set it above the highest working value, and below what the parts bear"
	bears, part, err := borne(e, seen)
	if err != nil {
		return f.Lacking(err)
	}
	if bears > 0 && !quantity.AtMost(set, bears) {
		f.Because += fmt.Sprintf("; %s bears %s", part, quantity.Text(bears))
		return f.Most(rule.Of(set), rule.Of(bears), 0)
	}
	return f.Least(rule.Of(set), rule.Of(most), limits.TripMargin).WithoutRemedyIfMet()
}

// borne is the value of what a trip senses at which the first part reaches its rating, in
// proportion from the state with regulation lost; 0 where nothing is rated.
func borne[Q quantity.Number](e *evidence.Evidence, seen func(*evidence.Evidence) (Q, error)) (Q, string, error) {
	lost := e.Under(evidence.Condition{State: evidence.Lost})
	at, err := seen(lost)
	if err != nil {
		return 0, "", err
	}
	least, part := Q(0), ""
	for _, f := range parts.Lasting(lost) {
		if f.Provided == nil || f.Whole == nil || f.Provided.Value <= 0 {
			continue
		}
		if b := at * Q(f.Whole.Value/f.Provided.Value); least == 0 || b < least {
			least, part = b, f.Subject
		}
	}
	return least, part, nil
}

var overCurrentTrip = rule.Rule{
	ID: "protection.over_current", Title: "Over-current trip",
	Demands: "The over-current trip takes the drive away, and is set above the highest working current and below what the diodes carry.",
	Applies: "Where an over-current trip is described. It reads what senses says; without that the current that returns to the multiplier, which is an assumption.",
	Margin:  "marginal with less than 5 % above the working current, or where what it senses is assumed",
	Concern: rule.Equipment,
	Sources: []rule.Source{limits.TripSource},
	Example: rule.Example{
		Swaps: []rule.Swap{{Was: `over_current = { trip = "200 uA"`, Becomes: `over_current = { trip = "50 uA"`}},
		Changes: []rule.Change{
			{Rule: "fault.rating", Subject: "divider element off by ten", Verdict: rule.Meets},
			{Rule: "protection.over_current", Subject: "chain", Verdict: rule.Fails},
		},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		p := e.Chain().Protection
		if !e.HasSupply() || p == nil || p.OverCurrent == nil {
			return rule.Over("no over-current trip is described")
		}
		return rule.One(judgeOverCurrent(e, p.OverCurrent))
	},
}

func judgeOverCurrent(e *evidence.Evidence, t *chain.CurrentTrip) rule.Finding {
	f := trip("protection.over_current", rule.Finding{Place: t.Here()}, "the "+t.ActsOn.V)
	if !t.ActsOn.Set() {
		return f.Lacking(lack.Key(t.ActsOn.Key))
	}
	if !stops(t.ActsOn.V) {
		f.Relation = rule.Presence
		return f.There(false)
	}
	most, err := evidence.Largest(e, working(), []string{""}, func(e *evidence.Evidence, _ string) (quantity.Current, error) { return e.TripCurrent() })
	if err != nil {
		return f.Lacking(err)
	}
	f.Under = most.Under.Text()
	f = f.Assume(e.TripAssumptions()...)
	f.Because += fmt.Sprintf(", is set to %s, and %s works with up to %s", quantity.Text(t.Trip.V), sensed(e), quantity.Text(most.Value))
	f.Remedy = "set it above the highest working current, and below what the diodes carry"
	if d := e.Chain().Multiplier.Diode; d != nil && d.RatedCurrent.Set() {
		bears := d.RatedCurrent.V * quantity.Current(limits.DiodeCurrent.Fails)
		if !quantity.AtMost(t.Trip.V, bears) {
			f.Because += "; the diodes carry " + quantity.Text(bears)
			return f.Most(rule.Of(t.Trip.V), rule.Of(bears), 0)
		}
	}
	return f.Least(rule.Of(t.Trip.V), rule.Of(most.Value), limits.TripMargin).WithoutRemedyIfMet()
}

// sensed names what the over-current trip reads.
func sensed(e *evidence.Evidence) string {
	if part := e.TripSenses(); part != evidence.OfReturn {
		return part
	}
	return "the multiplier's return"
}
