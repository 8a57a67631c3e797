package people

import (
	"fmt"

	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

var waiting = rule.Rule{
	ID: "discharge.waiting_time", Title: "Waiting time",
	Demands: "After switching off, every node falls to 60 V through what is permanent within the stated waiting time, with every part at the high end of its tolerance too.",
	Applies: "Where a node holds more charge or energy than may be touched.",
	Margin:  "marginal where the waiting time is less than 1.25 times the time computed",
	Concern: rule.Life,
	Sources: []rule.Source{limits.DischargeSource, limits.InteriorSource},
	Example: rule.Example{
		Swaps: []rule.Swap{{Was: `waiting_time    = "90 s"`, Becomes: `waiting_time    = "4 s"`}},
		Changes: []rule.Change{
			{Rule: "discharge.waiting_time", Subject: "chain", Verdict: rule.Fails},
			{Rule: "bleeder.redundancy", Subject: "chain", Verdict: rule.Fails},
		},
	},
	Judge: judgeWaiting,
}

func judgeWaiting(e *evidence.Evidence) rule.Judgement {
	f := rule.Finding{Rule: "discharge.waiting_time", Subject: "chain", Concern: rule.Life, Relation: rule.AtLeast,
		Sources: []rule.Source{limits.DischargeSource, limits.InteriorSource}}
	access, done := needsCare(e, f)
	if done != nil {
		return *done
	}
	f.Place = access.WaitingTime.Place
	slowest, under, err := slowestOf(e, slow())
	if err != nil {
		return *only(f.Lacking(err))
	}
	f.Under = under.Text()
	f.Remedy = "state a longer waiting time, or fit a permanent bleeder that is faster"
	if slowest.Never {
		f.Because = fmt.Sprintf("%s stays at %s: nothing permanent discharges it", slowest.Node, quantity.Text(slowest.Left))
		f.Relation, f.Remedy = rule.Presence, "fit a permanent bleeder: no waiting time is long enough"
		return *only(f.There(false))
	}
	f.Because = fmt.Sprintf("%s is the last to fall to 60 V, after %s", slowest.Node, quantity.Text(slowest.Time))
	if !access.WaitingTime.Set() {
		f.Because += "; no waiting time is stated"
		return *only(f.Lacking(lack.Key(access.WaitingTime.Key)))
	}
	f = f.Least(rule.Of(access.WaitingTime.V), rule.Of(slowest.Time), limits.WaitingMargin)
	return *only(f.Assume(exact(e, discharges)...).WithoutRemedyIfMet())
}

// slowestOf is the slowest discharge over all states and some corners of the tolerances.
func slowestOf(e *evidence.Evidence, corners []evidence.Corner) (evidence.Discharge, evidence.Condition, error) {
	var worst evidence.Discharge
	var under evidence.Condition
	for _, state := range evidence.States {
		for _, corner := range corners {
			c := e.Condition()
			c.State, c.Corner = state, corner
			d, err := e.Under(c).SlowestDischarge()
			if err != nil {
				return d, c, err
			}
			if d.Slower(worst) {
				worst, under = d, c
			}
		}
	}
	return worst, under, nil
}

var redundancy = rule.Rule{
	ID: "bleeder.redundancy", Title: "Bleeder redundancy",
	Demands: "At least two permanent strings to ground each discharge the chain alone within the waiting time, with every part at the high end of its tolerance.",
	Applies: "Where a node holds more charge or energy than may be touched.",
	Concern: rule.Life,
	Fault:   true,
	Sources: []rule.Source{limits.RedundancySource},
	Example: rule.Example{
		Swaps: []rule.Swap{
			{Was: "leakage = \"1 nA\" }\npermanent = true", Becomes: "leakage = \"1 nA\" }\npermanent = false"},
			{Was: `count = 4, strings = 2, rated_voltage = "15 kV"`, Becomes: `count = 4, strings = 1, rated_voltage = "15 kV"`},
		},
		Changes: []rule.Change{{Rule: "bleeder.redundancy", Subject: "chain", Verdict: rule.Fails}},
	},
	Judge: judgeRedundancy,
}

func judgeRedundancy(e *evidence.Evidence) rule.Judgement {
	f := rule.Finding{Rule: "bleeder.redundancy", Subject: "chain", Concern: rule.Life, Relation: rule.AtLeast,
		Sources: []rule.Source{limits.RedundancySource}}
	access, done := needsCare(e, f)
	if done != nil {
		return *done
	}
	f.Place = access.Here()
	if len(e.Chain().Bleeders) > 0 {
		f.Place = e.Chain().Bleeders[0].Here()
	}
	if !access.WaitingTime.Set() {
		return *only(f.Lacking(lack.Key(access.WaitingTime.Key)))
	}
	good, all, err := countStrings(e, access.WaitingTime.V)
	if err != nil {
		return *only(f.Lacking(err))
	}
	f.Because = fmt.Sprintf("permanent strings to ground that discharge the chain alone within %[3]s: %[1]d of %[2]d", good, all, quantity.Text(access.WaitingTime.V))
	f.Remedy = "fit a second permanent bleeder string that meets the waiting time alone"
	return *only(f.Least(count(good), count(2), 0).Assume(exact(e, discharges)...).WithoutRemedyIfMet())
}

func count(n int) rule.Amount { return rule.Amount{Value: float64(n), Unit: "1"} }

// countStrings counts the permanent strings to ground, and those that alone meet a time.
func countStrings(e *evidence.Evidence, within quantity.Time) (good, all int, err error) {
	for _, el := range e.Layout().Elements {
		if !bleeds(el) {
			continue
		}
		c := e.Condition()
		c.Fault = alone(el)
		d, _, err := slowestOf(e.Under(c), []evidence.Corner{evidence.AllHigh})
		if err != nil {
			return 0, 0, err
		}
		n := stringsOf(el)
		all += n
		if !d.Never && quantity.AtMost(d.Time, within) {
			good += n
		}
	}
	return good, all, nil
}

// bleeds reports whether an element is the upper end of a permanent string to ground.
func bleeds(el circuit.Element) bool {
	return el.Permanent && el.Role == circuit.Load && el.Kind == circuit.Resistor && el.Name != "divider.lower"
}

// stringsOf is the number of parallel strings an element stands for.
func stringsOf(el circuit.Element) int {
	if el.ResistorPart == nil {
		return 1
	}
	_, n := el.ResistorPart.Elements()
	return n
}

// alone leaves of all permanent strings one string of one part.
func alone(keep circuit.Element) evidence.Fault {
	n := stringsOf(keep)
	return evidence.Fault{Name: "only one string of " + keep.Name + " left", Edit: func(c *circuit.Circuit) *circuit.Circuit {
		return c.Each(func(el *circuit.Element) bool {
			if el.Name == keep.Name {
				el.Resistance *= quantity.Resistance(n)
				return true
			}
			return !bleeds(*el)
		})
	}}
}
