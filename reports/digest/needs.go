package digest

import (
	"regexp"
	"strings"

	"kilovet/rules/rule"
)

// Lacking names the keys that a finding lacks beside those that its remedy names already;
// none where its reason lists them.
func Lacking(f rule.Finding) string {
	if f.ListsMissing() {
		return ""
	}
	var rest []string
	for _, key := range f.Missing {
		if !names(f.Remedy, key) {
			rest = append(rest, key)
		}
	}
	return strings.Join(rest, ", ")
}

// names reports whether a text holds a key as a word of its own.
func names(text, key string) bool {
	return regexp.MustCompile(`(^|[^\w.])` + regexp.QuoteMeta(key) + `($|[^\w.]|\.($|\W))`).MatchString(text)
}
