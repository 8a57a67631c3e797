package supply

import (
	"fmt"

	"kilovet/hv/chain"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

var strays = rule.Rule{
	ID: "multiplier.strays", Title: "What strays take",
	Demands: "Strays, junction capacitance and leakage take at most " + quantity.Text(limits.StrayShare) + " of the voltage without load.",
	Applies: "Where a multiplier is described, working state. Strays that are not given are taken as none.",
	Margin:  "marginal above " + quantity.Text(limits.StrayComfort),
	Concern: rule.Performance,
	Sources: []rule.Source{limits.StraySource},
	Example: rule.Example{
		Swaps: []rule.Swap{{Was: `stray_between_columns = "0.5 pF"`, Becomes: `stray_between_columns = "20 pF"`}},
		Changes: []rule.Change{
			{Rule: "multiplier.strays", Subject: "multiplier", Verdict: rule.Marginal},
			{Rule: "drive.headroom", Subject: "drive", Verdict: rule.Fails},
		},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		m := e.Chain().Multiplier
		if m == nil || e.Chain().Drive == nil {
			return rule.Over("no multiplier is described")
		}
		return rule.One(judgeStrays(e, m))
	},
}

func judgeStrays(e *evidence.Evidence, m *chain.Multiplier) rule.Finding {
	f := rule.Finding{Rule: "multiplier.strays", Subject: "multiplier", Concern: rule.Performance, Relation: rule.AtMost,
		Place: m.Here(), Under: string(evidence.Working), Sources: []rule.Source{limits.StraySource}}
	d, err := e.Drop()
	if err == nil {
		err = d.Split
	}
	none, err2 := e.NoLoad()
	if err != nil || err2 != nil {
		return f.Lacking(firstOf(err, err2))
	}
	f.Because = fmt.Sprintf("strays, junction capacitance and leakage take %s of %s", quantity.Text(d.Stray), quantity.Text(none))
	if d.Rest == nil {
		f.Because += ", the load " + quantity.Text(d.Load)
	}
	if unknown := e.StraysNotGiven(); len(unknown) > 0 {
		f.Because += picofarad(e)
		for _, key := range unknown {
			f = f.Assume("no " + key + ": it is not given")
		}
	}
	f.Remedy = "shorten what stands side by side, use diodes of less capacitance, larger capacitors or fewer stages; what they take grows steeply with the stages"
	return f.Most(rule.Of(quantity.Fraction(max(d.Stray, 0)/none)), rule.Of(limits.StrayShare), float64(limits.StrayShare/limits.StrayComfort)-1).WithoutRemedyIfMet()
}

// picofarad says what a picofarad a stage would take.
func picofarad(e *evidence.Evidence) string {
	v, err := e.OfAPicofarad()
	if err != nil {
		return ""
	}
	return "; a picofarad between the columns at every stage would take " + quantity.Text(v)
}

var unbalanced = rule.Rule{
	ID: "multiplier.unbalance", Title: "Ripple from unbalanced halves",
	Demands: "A symmetrical multiplier keeps at most nine tenths of the ripple that a half-wave one of the same capacitors would have.",
	Applies: "Where the multiplier is symmetrical, loaded, and its unbalance is given.",
	Margin:  "marginal above half of that ripple",
	Concern: rule.Performance,
	Sources: []rule.Source{balanceSource},
	Example: rule.Example{
		Of:      "positive",
		Swaps:   []rule.Swap{{Was: `current = "300 uA"`, Becomes: `current = "10 uA"`}, {Was: `unbalance  = "1 %"`, Becomes: `unbalance  = "2 %"`}},
		Changes: []rule.Change{{Rule: "multiplier.unbalance", Subject: "multiplier.ripple", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		c := e.Chain()
		switch {
		case c.Multiplier == nil || !c.Multiplier.Symmetrical():
			return rule.Over("the multiplier is not symmetrical")
		case !c.Drive.Unbalance.Set():
			return rule.Over("the unbalance is not given: multiplier.balance says so")
		}
		return rule.One(judgeUnbalance(e))
	},
}

func judgeUnbalance(e *evidence.Evidence) rule.Finding {
	f := rule.Finding{Rule: "multiplier.unbalance", Subject: "multiplier.ripple", Concern: rule.Performance, Relation: rule.AtMost,
		Place: e.Chain().Drive.Unbalance.Place, Under: string(evidence.Working), Sources: []rule.Source{balanceSource}}
	ripple, err := e.Swing("multiplier", "ground")
	equal, err2 := e.BalancedRipple()
	half, err3 := e.HalfWaveRipple()
	if err := firstOf(err, err2, err3); err != nil {
		return f.Lacking(err)
	}
	f.Because = fmt.Sprintf("halves that differ by %s make %s of ripple, equal ones would make %s, a half-wave multiplier %s",
		quantity.Text(e.Chain().Drive.Unbalance.V), quantity.Text(ripple), quantity.Text(equal), quantity.Text(half))
	f.Remedy = "balance the halves of the drive, or filter for the drive frequency instead of twice it"
	return f.Most(rule.Of(ripple), rule.Of(limits.HalfWaveShare*half), limits.HalfWaveShare/limits.HalfWaveComfort-1).WithoutRemedyIfMet()
}

var humShare = rule.Rule{
	ID: "heater.hum", Title: "Hum through the heater feed",
	Demands: "The hum that the heater feed brings to the cathode is at most ten times the ripple there.",
	Applies: "Where a heater is fed across the high voltage by other than a battery.",
	Margin:  "marginal above the ripple itself",
	Concern: rule.Performance,
	Sources: []rule.Source{limits.HumSource},
	Example: rule.Example{
		Swaps: []rule.Swap{{Was: `capacitance = "45 pF", screen = true`, Becomes: `capacitance = "45 pF", screen = false`}},
		Changes: []rule.Change{
			{Rule: "heater.hum", Subject: "cathode", Verdict: rule.Fails},
			{Rule: "beam.disturbance", Subject: "cathode", Verdict: rule.Fails},
			{Rule: "beam.hum", Subject: "hum", Verdict: rule.Fails},
			{Rule: "beam.blur", Subject: "beam", Verdict: rule.Fails},
		},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		h := e.Chain().Heater
		if e.Unheated() {
			return rule.One(rule.Finding{Rule: "heater.hum", Subject: "cathode", Concern: rule.Performance}.Lacking(lack.Key("heater")))
		}
		if h == nil || h.Feed == nil || h.Feed.Kind.V == "battery" {
			return rule.Over("no heater feed across the high voltage is described")
		}
		return rule.One(judgeHum(e, h.Feed))
	},
}

func judgeHum(e *evidence.Evidence, feed *chain.Feed) rule.Finding {
	f := rule.Finding{Rule: "heater.hum", Subject: "cathode", Concern: rule.Performance, Relation: rule.AtMost,
		Place: feed.Here(), Under: string(evidence.Working), Sources: []rule.Source{limits.HumSource}}
	hum, assumed, err := e.HumAtWorst()
	ripple, err2 := e.CathodeRipple()
	if err := firstOf(err, err2); err != nil {
		return f.Lacking(err)
	}
	f.Because = fmt.Sprintf("the cathode has %s of hum and %s of ripple, peak to peak%s", quantity.Text(hum), quantity.Text(ripple), atWorst(e))
	f.Remedy = "screen the feed and tie the screen to ground, feed the heater from a battery, or raise its frequency"
	return f.Most(rule.Of(hum), rule.Of(limits.HumOverRipple*ripple), limits.HumOverRipple-1).Assume(assumed...).WithoutRemedyIfMet()
}

// atWorst says where the hum is more than its figure.
func atWorst(e *evidence.Evidence) string {
	if more, _, err := e.TipBeyondNominal(); err == nil && more > 0 {
		return "; " + quantity.Text(more) + " of the hum by the tolerance of the heater's centre resistors"
	}
	return ""
}

func firstOf(errs ...error) error {
	for _, err := range errs {
		if err != nil {
			return err
		}
	}
	return nil
}
