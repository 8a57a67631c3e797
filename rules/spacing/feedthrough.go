package spacing

import (
	"kilovet/hv/lack"
	"kilovet/rules/evidence"
	"kilovet/rules/rule"
)

var weakest = rule.Rule{
	ID: "feedthrough.weakest", Title: "Weakest part of a feedthrough",
	Demands: "Every gap, surface and layer of a feedthrough meets what is asked of it; the weakest is named.",
	Applies: "Every [[feedthrough]].",
	Concern: rule.Life,
	Sources: []rule.Source{{Text: "what was not described cannot be judged", Mark: rule.Practice, Governs: true}},
	Example: rule.Example{
		Swaps: []rule.Swap{{Was: "[[target]]\n", Becomes: `[[feedthrough]]
name = "lens"
voltage = "20 kV"
pin = { radius = "3 mm" }
hole = { radius = "20 mm" }
air_side = { length = "150 mm" }

[[target]]
`}},
		Changes: []rule.Change{{Rule: "feedthrough.weakest", Subject: "lens", Verdict: rule.Unassessed}},
	},
	Judge: func(e *evidence.Evidence) rule.Judgement {
		if len(e.Chain().Feedthroughs) == 0 {
			return rule.Over("no feedthrough is described")
		}
		var j rule.Judgement
		for i := range e.Chain().Feedthroughs {
			f := &e.Chain().Feedthroughs[i]
			finding := rule.Finding{Rule: "feedthrough.weakest", Subject: f.Name.V, Concern: rule.Life, Place: f.Here()}
			j.Findings = append(j.Findings, finding.Lacking(lack.Because("the parts of a feedthrough are not judged together: describe its gaps and surfaces as spacings", "spacing")))
		}
		return j
	},
}
