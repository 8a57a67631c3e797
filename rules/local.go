package rules

import (
	"fmt"
	"strings"

	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/rules/exhibit"
	"kilovet/rules/local"
	"kilovet/rules/spacing"
)

// ReadLocal reads a file of local limits.
func ReadLocal(data []byte) (*local.File, document.Faults) {
	return local.Read(data, ids())
}

// ids are the names of all rules.
func ids() []string {
	var ids []string
	for _, r := range All() {
		ids = append(ids, r.ID)
	}
	return ids
}

// under judges the findings of a review anew by local limits, then what rests on them.
func (r *Review) under(f *local.File, c *chain.Chain) document.Faults {
	if f == nil {
		return nil
	}
	findings, outcomes, faults := local.Apply(f, r.Findings, r.PassedOver)
	r.Findings, r.Local = spacing.WeakestAgain(c, findings), outcomes
	return faults
}

// localTable shows what became of each local limit and relaxation.
func localTable(outcomes []local.Outcome) []exhibit.Table {
	if len(outcomes) == 0 {
		return nil
	}
	t := exhibit.Table{
		ID: "local.limits", Chapter: exhibit.Chain, Title: "Local limits and relaxations",
		Columns: []exhibit.Column{{Head: "rule and subject"}, {Head: "value and source"}, {Head: "result and reason"}},
		Basis:   "the file of local limits",
		Note:    "Local limits can only be stricter. What was read in a standard, and what concerns life, is never relaxed.",
	}
	for _, o := range outcomes {
		t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words(o.Rule + ": " + strings.Join(o.Subjects, "; ")),
			exhibit.Words(o.Kind + ", " + o.Value + ": " + o.From), exhibit.Words(string(o.Result) + ": " + o.Because)})
	}
	return []exhibit.Table{t}
}

// localLine counts them for the first screen and sheet.
func localLine(outcomes []local.Outcome) []Line {
	if len(outcomes) == 0 {
		return nil
	}
	n := map[local.Result]int{}
	for _, o := range outcomes {
		n[o.Result] += len(o.Subjects)
	}
	var parts []string
	for _, p := range []struct {
		result local.Result
		word   string
	}{{local.Governs, "govern"}, {local.Same, "as the rules"}, {local.Refused, "refused"}, {local.Relaxed, "relaxed"}, {local.NotNeeded, "not needed"}, {local.NotApplied, "not applied"}} {
		if n[p.result] > 0 {
			parts = append(parts, fmt.Sprintf("%d %s", n[p.result], p.word))
		}
	}
	return []Line{{"Local limits", strings.Join(parts, ", ")}}
}
