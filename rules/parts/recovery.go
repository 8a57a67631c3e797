package parts

import (
	"fmt"

	"kilovet/hv/document"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/limits"
	"kilovet/rules/rule"
)

var diodeRecovery = rule.Rule{
	ID: "diode.recovery", Title: "Reverse recovery of the diodes",
	Demands: "The recovery time of a diode is at most a tenth of half a period of the drive.",
	Applies: "Where a multiplier is described.",
	Margin:  "marginal above a fiftieth",
	Concern: rule.Performance,
	Sources: []rule.Source{limits.RecoverySource},
	Example: rule.Example{
		Swaps:   []rule.Swap{{Was: `recovery_time = "80 ns"`, Becomes: `recovery_time = "3 us"`}},
		Changes: []rule.Change{{Rule: "diode.recovery", Subject: "multiplier.diode", Verdict: rule.Fails}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		m := e.Chain().Multiplier
		if m == nil {
			return rule.Over("no multiplier is described")
		}
		f := rule.Finding{Rule: "diode.recovery", Subject: "multiplier.diode", Concern: rule.Performance, Relation: rule.AtMost,
			Place: m.Here(), Sources: []rule.Source{limits.RecoverySource}, Remedy: "use faster diodes or a lower frequency"}
		if m.Diode == nil || !m.Diode.RecoveryTime.Set() {
			return rule.One(f.Lacking(lack.Key("multiplier.diode.recovery_time")))
		}
		f.Place = m.Diode.RecoveryTime.Place
		return rule.Judgement{Findings: []rule.Finding{judgeRecovery(e.Chain().Drive.Frequency, m.Diode.RecoveryTime, f)}}
	},
}

func judgeRecovery(drive document.Given[quantity.Frequency], recovery document.Given[quantity.Time], f rule.Finding) rule.Finding {
	half := quantity.Time(1 / (2 * float64(drive.V)))
	f.Because = fmt.Sprintf("%s of a half period of %s", quantity.Text(recovery.V), quantity.Text(half))
	return f.ShareOf(rule.Of(half)).Most(rule.Of(recovery.V), rule.Of(half*limits.RecoveryShare), limits.RecoveryShare/limits.RecoveryComfort-1).WithoutRemedyIfMet()
}
