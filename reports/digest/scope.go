package digest

import (
	"slices"
	"strings"

	"kilovet/rules"
	"kilovet/rules/people"
	"kilovet/rules/radiation"
	"kilovet/rules/rule"
)

// Scope says that only a part was judged where no finding is about people: a
// description of spacings or fields alone makes a review that must not be taken for
// one of a whole chain. It is empty where people were judged.
func Scope(r *rules.Review) string {
	const rest = "othing about people, stored charge or X-rays was"
	about := slices.Concat(people.Rules(), radiation.Rules())
	var families []string
	for _, f := range r.Findings {
		if slices.ContainsFunc(about, func(a rule.Rule) bool { return a.ID == f.Rule }) {
			return ""
		}
		if family, _, _ := strings.Cut(f.Rule, "."); family != "" && !slices.Contains(families, family) {
			families = append(families, family)
		}
	}
	if len(families) == 0 {
		return "N" + rest + " judged."
	}
	return "Only " + strings.Join(families, ", ") + " rules were judged: n" + rest + "."
}
