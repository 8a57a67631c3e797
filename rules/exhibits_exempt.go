package rules

import "kilovet/rules/exhibit"

// exemptTable says which rules do not apply to a subject though they apply to another;
// those that apply to none are passed over as a whole.
func exemptTable(all []said) []exhibit.Table {
	t := exhibit.Table{
		ID: "spacing.exempt", Chapter: exhibit.Spacings, Title: "Spacings that a rule does not apply to", Basis: "rules.spacing",
		Columns: []exhibit.Column{{Head: "spacing"}, {Head: "rule"}, {Head: "why"}},
		Note:    "Rules that apply to no spacing at all stand among the rules passed over.",
	}
	for _, s := range all {
		if len(s.Findings) == 0 {
			continue
		}
		for _, x := range s.Exempt {
			t.Rows = append(t.Rows, []exhibit.Cell{exhibit.Words(x.Subject), exhibit.Words(s.rule.ID), exhibit.Words(x.Because)})
		}
	}
	if len(t.Rows) == 0 {
		return nil
	}
	return []exhibit.Table{t}
}
