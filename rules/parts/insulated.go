package parts

import (
	"kilovet/hv/document"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

var cableVoltage = rule.Rule{
	ID: "cable.voltage", Title: "Cable voltage",
	Demands: "The cable is rated for the highest voltage of the chain.",
	Applies: "Where a cable is described.",
	Margin:  limits.InsulationVoltage.Comfort("the rating"),
	Concern: rule.Life,
	Sources: []rule.Source{limits.InsulationVoltage.Source},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: "rated_voltage = \"40 kV\"\ngun_end", Becomes: "rated_voltage = \"22 kV\"\ngun_end"}},
		Changes: []rule.Change{{Rule: "cable.voltage", Subject: "cable", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		cable := e.Chain().Cable
		if cable == nil {
			return rule.Over("no cable is described")
		}
		return insulated(e, "cable.voltage", "cable", "supply", "ground", cable.RatedVoltage)
	},
}

var feedVoltage = rule.Rule{
	ID: "feed.voltage", Title: "Heater feed voltage",
	Demands: "The feed that carries the heater's power is rated for the highest voltage between its sides.",
	Applies: "Where a heater feed other than a battery is described.",
	Margin:  limits.InsulationVoltage.Comfort("the rating"),
	Concern: rule.Life,
	Sources: []rule.Source{limits.InsulationVoltage.Source},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `"isolation transformer", rated_voltage = "40 kV"`, Becomes: `"isolation transformer", rated_voltage = "22 kV"`}},
		Changes: []rule.Change{{Rule: "feed.voltage", Subject: "heater.feed", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		h := e.Chain().Heater
		if e.Unheated() {
			return unheated("feed.voltage")
		}
		if h == nil || h.Feed == nil || h.Feed.Kind.V == "battery" {
			return rule.Over("no heater feed across the high voltage is described")
		}
		return insulated(e, "feed.voltage", "heater.feed", "cathode", "mains", h.Feed.RatedVoltage)
	},
}

// unheated is the judgement on the feed of a hot cathode whose heater is not described.
func unheated(id string) rule.Judgement {
	return rule.One(rule.Finding{Rule: id, Subject: "heater.feed", Concern: rule.Life}.Lacking(lack.Key("heater")))
}

func insulated(e *evidence.Evidence, id, subject, from, to string, rated document.Given[quantity.Voltage]) rule.Judgement {
	f := rule.Finding{Rule: id, Subject: subject, Concern: rule.Life, Place: rated.Place}
	r := rating[quantity.Voltage]{what: "voltage", rated: rated.V, given: rated.Set(), key: rated.Key,
		derating: limits.InsulationVoltage,
		stress:   func(e *evidence.Evidence, _ string) (quantity.Voltage, error) { return e.Between(from, to) }}
	return rule.Judgement{Findings: []rule.Finding{r.judge(e, group{subject: subject, elements: one(subject)}, f)}}
}

var feedTest = rule.Rule{
	ID: "feed.test_voltage", Title: "Heater feed test",
	Demands: "The feed was tested with at least 1.2 times the highest voltage between its sides.",
	Applies: "Where a heater feed other than a battery is described.",
	Margin:  "marginal below 1.5 times the highest voltage",
	Concern: rule.Life,
	Sources: []rule.Source{limits.FeedTestSource},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `test_voltage = "50 kV"`, Becomes: `test_voltage = "25 kV"`}},
		Changes: []rule.Change{{Rule: "feed.test_voltage", Subject: "heater.feed", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		h := e.Chain().Heater
		if e.Unheated() {
			return unheated("feed.test_voltage")
		}
		if h == nil || h.Feed == nil || h.Feed.Kind.V == "battery" {
			return rule.Over("no heater feed across the high voltage is described")
		}
		return rule.Judgement{Findings: []rule.Finding{judgeFeedTest(e, h.Feed.TestVoltage)}}
	},
}

func judgeFeedTest(e *evidence.Evidence, test document.Given[quantity.Voltage]) rule.Finding {
	f := rule.Finding{Rule: "feed.test_voltage", Subject: "heater.feed", Concern: rule.Life, Place: test.Place,
		Relation: rule.AtLeast, Sources: []rule.Source{limits.FeedTestSource}, Remedy: "have the feed tested with a higher DC voltage, and state it"}
	if !test.Set() {
		return f.Lacking(lack.Key(test.Key))
	}
	most, err := evidence.Worst(e, []string{"heater.feed"}, func(e *evidence.Evidence, _ string) (quantity.Voltage, error) { return e.Between("cathode", "mains") })
	if err != nil {
		return f.Lacking(err)
	}
	f.Under = most.Under.Text()
	f.Because = "the feed stands up to " + quantity.Text(most.Value) + " and was tested with " + quantity.Text(test.V)
	return f.ShareOf(rule.Of(most.Value)).Least(rule.Of(test.V), rule.Of(most.Value*limits.FeedTest), limits.FeedTestComfort/limits.FeedTest-1).WithoutRemedyIfMet()
}
