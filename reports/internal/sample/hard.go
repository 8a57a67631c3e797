package sample

import (
	"fmt"
	"math"
	"strings"

	"kilovet/rules"
	"kilovet/rules/figure"
	"kilovet/rules/rule"
)

// LongName is a name of sixty characters without a space.
const LongName = "isolation_transformer_secondary_feedthrough_lower_flange_air"

// Foreign is text no font of Latin letters has in full: an emoji beyond the
// basic plane, Chinese, an escape, invalid UTF-8, signs of the trade.
const Foreign = "µ Ω ≤ ²  \U0001F600 高压 \x1b[31m \xff\xfe end"

// Hard is a review that strains a layout: forty failures, names of sixty
// characters, texts of several hundred, foreign text in every place.
func Hard() *rules.Review {
	r := Failing()
	long := strings.Repeat("The voltage across the surface exceeds what the path withstands in this state. ", 8)
	r.Heading = rules.Heading{Title: LongName + " " + LongName + " " + Foreign, Document: LongName, Revision: LongName, Owner: LongName,
		Creator: LongName, Approver: Foreign, Date: LongName, DocumentType: LongName}
	r.Inputs = append(r.Inputs, rules.Input{Role: LongName, Name: LongName + "/" + LongName + ".toml", SHA256: SHA})
	r.Summary = append(r.Summary, rules.Line{Label: LongName, Text: long}, rules.Line{Label: "foreign", Text: Foreign})
	for i := range 40 {
		r.Findings = append(r.Findings, hard(i, long))
	}
	r.Counts[rule.Fails] += 40
	for i := range 40 {
		r.Figures = append(r.Figures, figure.Figure{ID: "stored.discharge_time", Subject: fmt.Sprintf("%s %d", LongName, i), State: "lost", What: long, Value: float64(i), Unit: "s", Basis: LongName})
	}
	r.Cautions = append(r.Cautions, rule.Caution{Subject: LongName, Text: long}, rule.Caution{Subject: Foreign, Text: Foreign})
	r.PassedOver = append(r.PassedOver, rule.PassedOver{Rule: LongName, Because: long})
	r.Assumptions = append(r.Assumptions, long, LongName+LongName+LongName)
	r.Curves, r.Tables = Curves(), Tables()
	r.Diagram = Diagram(60)
	return r
}

func hard(i int, long string) rule.Finding {
	f := creepage()
	f.Rule = fmt.Sprintf("%s.%d", LongName, i)
	f.Subject = LongName
	f.Because, f.Remedy, f.Under = long, long+Foreign, LongName
	f.Missing = []string{LongName, "access.waiting_time"}
	f.Assumptions = []string{long, LongName}
	f.Sources = append(f.Sources, rule.Source{Text: long, Mark: rule.Practice}, rule.Source{Text: LongName, Mark: rule.Memory})
	if i%3 == 0 {
		f.Margin = margin(math.Inf(1))
	}
	return f
}
