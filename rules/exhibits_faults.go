package rules

import (
	"cmp"
	"slices"
	"strings"

	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
	"kilovet/rules/exhibit"
	"kilovet/rules/fault"
	"kilovet/rules/rule"
)

// faultTable lists every single fault and error of assembly, the worst first.
func faultTable(e *evidence.Evidence) []exhibit.Table {
	if !e.HasSupply() {
		return nil
	}
	t := exhibit.Table{
		ID: "faults.outcomes", Chapter: exhibit.Faults, Title: "Single faults and errors of assembly, the worst first", Basis: evidence.Basis,
		Columns: []exhibit.Column{{Head: "fault"}, {Head: "drive peak", Unit: "V"}, {Head: "output", Unit: "V"},
			{Head: "most loaded"}, {Head: "part of what is allowed", Unit: "1"}, {Head: "limits passed"}, {Head: "caught by"}, {Head: "what to add"}},
		Note: "The drive is where the regulation comes to rest with the fault, up to its limit. Allowed are whole ratings, and the touch limits of a single fault; the usual shares of ratings are for what lasts. An output under a millionth of the largest here is what rounding leaves, and stands as 0 V.",
	}
	all := slices.Clone(fault.StudyAll(e))
	slices.SortStableFunc(all, func(a, b fault.Outcome) int {
		return cmp.Or(cmp.Compare(graveness(b), graveness(a)), cmp.Compare(loaded(b), loaded(a)))
	})
	least := 1e-6 * largestOutput(all)
	for _, o := range all {
		if max(o.Output, -o.Output) < least {
			o.Output = 0
		}
		t.Rows = append(t.Rows, outcomeRow(o))
	}
	return []exhibit.Table{t}
}

func largestOutput(all []fault.Outcome) quantity.Voltage {
	most := quantity.Voltage(0)
	for _, o := range all {
		most = max(most, o.Output, -o.Output)
	}
	return most
}

// graveness orders outcomes: what passes a limit and nothing catches, what is not known,
// what something catches, what passes none.
func graveness(o fault.Outcome) int {
	_, caught := o.Caught()
	switch passed := len(o.Passed()) > 0; {
	case o.Err != nil:
		return 2
	case passed && !caught:
		return 3
	case len(o.Unknown()) > 0:
		return 2
	case passed:
		return 1
	}
	return 0
}

func loaded(o fault.Outcome) float64 {
	if len(o.Findings) == 0 {
		return 0
	}
	return fault.Share(o.Findings[0])
}

func outcomeRow(o fault.Outcome) []exhibit.Cell {
	if o.Err != nil {
		return []exhibit.Cell{exhibit.Words(o.Name), exhibit.Words(""), exhibit.Words(""), exhibit.Words("not computed: " + o.Err.Error()),
			exhibit.Words(""), exhibit.Words("not known"), exhibit.Words(""), exhibit.Words(o.Add)}
	}
	worst, share := exhibit.Words(""), exhibit.Words("")
	if len(o.Findings) > 0 {
		worst, share = exhibit.Words(o.Findings[0].Subject), exhibit.Number(fault.Share(o.Findings[0]))
	}
	caught := ""
	if m, ok := o.Caught(); ok {
		caught = m.Name
	}
	add := ""
	if len(o.Passed()) > 0 && caught == "" {
		add = o.Add
	}
	return []exhibit.Cell{exhibit.Words(o.Name), exhibit.Number(o.Drive), exhibit.Number(o.Output), worst, share,
		exhibit.Words(limitsPassed(o)), exhibit.Words(caught), exhibit.Words(add)}
}

// limitsPassed names the parts, spacings and nodes whose limits are passed, each once, and
// those of which that is not known.
func limitsPassed(o fault.Outcome) string {
	passed, unknown := strings.Join(subjects(o.Passed()), ", "), strings.Join(subjects(o.Unknown()), ", ")
	switch {
	case unknown == "":
		return passed
	case passed == "":
		return "not known of " + unknown
	}
	return passed + "; not known of " + unknown
}

func subjects(all []rule.Finding) (names []string) {
	for _, f := range all {
		if !slices.Contains(names, f.Subject) {
			names = append(names, f.Subject)
		}
	}
	return names
}
