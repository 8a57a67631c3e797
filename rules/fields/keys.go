package fields

import (
	"strings"

	"kilovet/hv/lack"
	"kilovet/rules/build"
	"kilovet/rules/rule"
)

// lacking says what an arrangement lacks; of a described field by its own keys, where the
// laws of gaps name those of a gap.
func lacking(f *build.Arrangement, finding rule.Finding, err error) rule.Finding {
	l := lack.Of(err)
	if l == nil || f.From != "" {
		return finding.Lacking(err)
	}
	own := *l
	own.Keys = nil
	for _, k := range l.Keys {
		own.Keys = append(own.Keys, ofField(k))
	}
	own.Why = ofField(l.Why)
	return finding.Lacking(&own)
}

func ofField(text string) string {
	return strings.ReplaceAll(text, "spacing.pressure", "field.pressure")
}
