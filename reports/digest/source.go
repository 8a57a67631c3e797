package digest

import (
	"slices"

	"kilovet/rules"
	"kilovet/rules/rule"
)

// Sources lists the sources of all findings, each once, in the order of Sorted; the
// number of a source is its place here, from one.
func Sources(r *rules.Review) []rule.Source {
	var all []rule.Source
	for _, f := range Sorted(r.Findings) {
		for _, s := range f.Sources {
			if SourceNumber(all, s) == 0 {
				all = append(all, rule.Source{Text: s.Text, Mark: s.Mark})
			}
		}
	}
	return all
}

// SourceNumber is the number of a source in a list; 0 where it is not in it.
func SourceNumber(all []rule.Source, s rule.Source) int {
	return 1 + slices.IndexFunc(all, func(o rule.Source) bool { return o.Text == s.Text && o.Mark == s.Mark })
}

// Known says how well a source is known.
func Known(s rule.Source) string {
	if s.Mark == "" {
		return "not marked"
	}
	return string(s.Mark)
}

// Cell writes a cell of a column: its words, or a number in its unit.
func Cell(unit string, value *float64, text string) string {
	if value == nil || text != "" {
		return text
	}
	return Amount(rule.Amount{Value: *value, Unit: unit})
}
