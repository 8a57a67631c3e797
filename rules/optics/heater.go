package optics

import (
	"fmt"

	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

var balanceSource = rule.Source{Text: "an AC heater swings its tip by what its centre resistors differ (V |1/2 - R1/(R1 + R2)|), on the beam's energy and on the bias", Mark: rule.Derived, Governs: true}

var heaterBalance = rule.Rule{
	ID: "heater.balance", Title: "Balance of an AC heater",
	Demands: "With its centre resistors at the ends of their tolerance an AC heater swings its tip by no more than the blur allowance leaves.",
	Applies: "Where the heater is fed with AC and a stated blur allowance leaves something for a disturbance.",
	Margin:  "marginal above half of it",
	Concern: rule.Performance,
	Sources: []rule.Source{balanceSource},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `supply  = "dc"`, Becomes: `supply  = "ac"`}, {Was: `["22 ohm", "22 ohm"]`, Becomes: `["22 ohm", "150 ohm"]`}, {Was: `blur_allowance       = "12 nm"`, Becomes: `blur_allowance       = "4.72 nm"`}},
		Changes: []rule.Change{{Rule: "heater.balance", Subject: "heater", Verdict: rule.Fails}, {Rule: "beam.blur", Subject: "beam", Verdict: rule.Fails}, {Rule: "beam.disturbance", Subject: "cathode", Verdict: rule.Fails}, {Rule: "heater.hum", Subject: "cathode", Verdict: rule.Marginal}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		h := e.Chain().Heater
		switch {
		case h == nil || h.Supply.V != "ac":
			return rule.Over("the heater is not fed with AC")
		case noAllowance(e) != "":
			return rule.Over(noAllowance(e))
		}
		f := rule.Finding{Rule: "heater.balance", Subject: "heater", Concern: rule.Performance, Relation: rule.AtMost, Place: h.Supply.Place,
			Under: string(evidence.Working), Sources: []rule.Source{balanceSource}, Remedy: "match the centre resistors, or heat with DC"}
		swing, err := e.TipSwingAtWorst()
		if err != nil {
			return rule.One(f.Lacking(err))
		}
		if _, err := e.Spot(); err != nil {
			return rule.One(f.Lacking(err))
		}
		allowed, err := e.RippleAllowed()
		if err != nil {
			return rule.Over(err.Error())
		}
		f.Because = fmt.Sprintf("the tip swings by up to %s, peak to peak; the allowance leaves %s for all disturbances", quantity.Text(2*swing), quantity.Text(allowed))
		return rule.One(f.Most(rule.Of(2*swing), rule.Of(allowed), limits.BalanceMargin).WithoutRemedyIfMet())
	},
}

var feedSource = rule.Source{Text: "a heater feed keeps a fifth of its rated power in hand", Mark: rule.Practice, Governs: true}

var feedPower = rule.Rule{
	ID: "heater.feed_power", Title: "Power of the heater feed",
	Demands: "The feed delivers the heater's power.",
	Applies: "Where the rated power of the feed is stated.",
	Margin:  "marginal above 80 % of the rating",
	Concern: rule.Equipment,
	Sources: []rule.Source{feedSource},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `test_voltage = "50 kV" }`, Becomes: `test_voltage = "50 kV", rated_power = "4 W" }`}},
		Changes: []rule.Change{{Rule: "heater.feed_power", Subject: "heater", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		h := e.Chain().Heater
		if h == nil || h.Feed == nil || !h.Feed.RatedPower.Set() {
			return rule.Over("the rated power of a heater feed is not stated")
		}
		f := rule.Finding{Rule: "heater.feed_power", Subject: "heater", Concern: rule.Equipment, Relation: rule.AtMost, Place: h.Feed.RatedPower.Place,
			Under: string(evidence.Working), Sources: []rule.Source{feedSource}, Remedy: "a stronger feed; it must keep its insulation when warm"}
		power, err := e.HeaterPower()
		if err != nil {
			return rule.One(f.Lacking(err))
		}
		f.Because = fmt.Sprintf("the filament takes %s, leads and rectifiers apart", quantity.Text(power))
		return rule.One(f.Most(rule.Of(power), rule.Of(h.Feed.RatedPower.V), limits.FeedMargin).WithoutRemedyIfMet())
	},
}
