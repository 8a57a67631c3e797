package fault

import (
	"fmt"
	"slices"
	"strings"

	"kilovet/hv/lack"
	"kilovet/rules/rule"
)

// uncomputed is the lack of what was not computed among some faults, nil where all were:
// what follows from those is not known, and no rule over all of them is met.
func uncomputed(all []Outcome) error {
	var first Outcome
	n := 0
	for _, o := range all {
		if o.Err == nil {
			continue
		}
		if n++; n == 1 {
			first = o
		}
	}
	if n == 0 {
		return nil
	}
	why := fmt.Sprintf("not computed of %s: %d, first %s: %v", rule.Number(len(all), "fault", "faults"), n, first.Name, first.Err)
	if l := lack.Of(first.Err); l != nil {
		return &lack.Lack{Kind: l.Kind, Keys: l.Keys, Why: why}
	}
	return lack.Failed("%s", why)
}

// notComputed is the subject of what is said of faults that were not computed.
const notComputed = "faults not computed"

// withUnknown adds to the findings of a rule the one about the faults that were not
// computed; where nothing is found at all, the rule is passed over with a reason.
func withUnknown(found []rule.Finding, about rule.Finding, all []Outcome, nothing string) rule.Judgement {
	if err := uncomputed(all); err != nil {
		about.Subject, about.Relation = notComputed, rule.Presence
		found = append(found, about.Lacking(err))
	}
	if len(found) == 0 {
		return rule.Over(nothing)
	}
	return rule.Judgement{Findings: found}
}

// unrated is the lack of ratings among some faults, nil where all are known: what a fault
// does to a part without a rating is judged by nobody, and each such part is named.
func unrated(all []Outcome) error {
	var names, keys []string
	for _, o := range all {
		for _, f := range o.Unknown() {
			if !isRating(f) {
				continue
			}
			if !slices.Contains(names, f.Subject) {
				names = append(names, f.Subject)
			}
			for _, key := range f.Missing {
				if !slices.Contains(keys, key) {
					keys = append(keys, key)
				}
			}
		}
	}
	if len(names) == 0 {
		return nil
	}
	return lack.Because("what faults do to parts whose ratings are not known is judged by nobody: "+strings.Join(names, ", "), keys...)
}

func firstOf(errs ...error) error {
	for _, err := range errs {
		if err != nil {
			return err
		}
	}
	return nil
}
