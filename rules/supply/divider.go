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

var clampSource = rule.Source{Text: "a gas tube or Zener across the lower arm, since an open lower arm puts the high voltage on the meter lead", Mark: rule.Practice, Governs: true}

var dividerClamp = rule.Rule{
	ID: "divider.clamp", Title: "Clamp of the divider's tap",
	Demands: "A clamp holds the tap of the divider at 120 V or less should the lower arm open.",
	Applies: "Where an open lower arm would lift the tap above 60 V.",
	Concern: rule.Life,
	Fault:   true,
	Sources: []rule.Source{clampSource},
	Example: rule.Example{
		Swaps: []rule.Swap{{Was: `clamp  = { voltage = "90 V", kind = "gas tube", leakage = "1 nA" }`, Becomes: ""}},
		Changes: []rule.Change{
			{Rule: "divider.clamp", Subject: "divider.tap", Verdict: rule.Fails},
			{Rule: "gap.strikes", Subject: "divider.clamp"},
		},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		d := e.Chain().Divider
		if d == nil {
			return rule.Over("no divider is described")
		}
		f := rule.Finding{Rule: "divider.clamp", Subject: "divider.tap", Concern: rule.Life, Relation: rule.Presence, Place: d.Here(), Sources: []rule.Source{clampSource}}
		open, err := evidence.Worst(e, []string{"divider.tap"}, openArm)
		if err != nil {
			return rule.One(f.Lacking(err))
		}
		if quantity.AtMost(open.Value, limits.TouchVoltage) {
			return rule.Over("an open lower arm leaves the tap below 60 V")
		}
		f.Under = open.Under.Text()
		f.Because = fmt.Sprintf("with the lower arm open and the meter unplugged the tap rises to %s", quantity.Text(open.Value))
		f.Remedy = "fit a gas tube or Zener diode from the tap to ground, at the divider itself, that holds it at 120 V or less"
		if d.Clamp == nil {
			return rule.One(f.There(false))
		}
		f.Place, f.Sources = d.Clamp.Here(), append(f.Sources, limits.TouchFaultSource)
		held := min(open.Value, d.Clamp.Voltage.V)
		f.Because += fmt.Sprintf("; the clamp holds it at %s", quantity.Text(held))
		return rule.One(f.Most(rule.Of(held), rule.Of(limits.FaultVoltage), 0).WithoutRemedyIfMet())
	},
}

func openArm(e *evidence.Evidence, _ string) (quantity.Voltage, error) { return e.OpenLowerArm() }

var meterRating = rule.Rule{
	ID: "divider.meter_voltage", Title: "Meter with the lower arm open",
	Demands: "The meter stands the voltage of the tap with the lower arm open.",
	Applies: "Where a meter is described at the divider.",
	Margin:  limits.InsulationVoltage.Comfort("the rating"),
	Concern: rule.Equipment,
	Fault:   true,
	Sources: []rule.Source{clampSource, limits.InsulationVoltage.Source},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `rated_voltage = "300 V"`, Becomes: `rated_voltage = "80 V"`}},
		Changes: []rule.Change{{Rule: "divider.meter_voltage", Subject: "divider.meter", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		d := e.Chain().Divider
		if d == nil || d.Meter == nil {
			return rule.Over("no meter is described at a divider")
		}
		return rule.One(judgeMeter(e, d))
	},
}

func judgeMeter(e *evidence.Evidence, d *chain.Divider) rule.Finding {
	rated := d.Meter.RatedVoltage
	f := rule.Finding{Rule: "divider.meter_voltage", Subject: "divider.meter", Concern: rule.Equipment, Relation: rule.AtMost, Place: rated.Place,
		Sources: []rule.Source{clampSource}, Remedy: "fit a clamp below the meter's rating, or a meter rated higher"}
	if !rated.Set() {
		f.Place = d.Meter.Here()
		return f.Lacking(lack.Key(rated.Key))
	}
	most, err := evidence.Worst(e, []string{"divider.tap"}, func(e *evidence.Evidence, _ string) (quantity.Voltage, error) { return e.MeterWithOpenArm() })
	if err != nil {
		return f.Lacking(err)
	}
	f.Under = most.Under.Text()
	f.Because = fmt.Sprintf("with the lower arm open the meter sees %s of the %s it is rated for", quantity.Text(most.Value), quantity.Text(rated.V))
	return f.ShareOf(rule.Of(rated.V)).Most(rule.Of(most.Value), rule.Of(rated.V), limits.InsulationVoltage.Margin()).WithoutRemedyIfMet()
}

var errorKnown = rule.Rule{
	ID: "divider.error", Title: "Error of the divider",
	Demands: "The divider's error can be computed and stays at or below " + quantity.Text(limits.DividerError) + ", so that a reading can be believed.",
	Applies: "Where a divider is described.",
	Margin:  "marginal above " + quantity.Text(limits.DividerComfort),
	Concern: rule.Performance,
	Sources: []rule.Source{errorSource},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `rated_power = "500 mW", tolerance = "1 %", temperature_coefficient = "50 ppm/K", voltage_coefficient = "-1 ppm/V"`, Becomes: `rated_power = "500 mW", tolerance = "12 %", temperature_coefficient = "50 ppm/K", voltage_coefficient = "-1 ppm/V"`}},
		Changes: []rule.Change{{Rule: "divider.error", Subject: "divider", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		d := e.Chain().Divider
		if d == nil {
			return rule.Over("no divider is described")
		}
		f := rule.Finding{Rule: "divider.error", Subject: "divider", Concern: rule.Performance, Relation: rule.AtMost, Place: d.Here(),
			Under: string(e.Condition().State), Sources: []rule.Source{errorSource}, Remedy: "use tighter or more stable resistors, or calibrate the divider"}
		got, err := e.DividerError()
		if err != nil {
			return rule.One(f.Lacking(err))
		}
		f.Because = fmt.Sprintf("tolerance, temperature and voltage together: %s, worst case", quantity.Text(got))
		return rule.One(f.Most(rule.Of(got), rule.Of(limits.DividerError), float64(limits.DividerError/limits.DividerComfort)-1).WithoutRemedyIfMet())
	},
}

var errorSource = rule.Source{Text: "a divider off by more than " + quantity.Text(limits.DividerError) + " cannot prove a set voltage or a safe state", Mark: rule.Practice, Governs: true}
