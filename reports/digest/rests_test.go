package digest_test

import (
	"slices"
	"testing"

	"kilovet/reports/digest"
	"kilovet/rules"
	"kilovet/rules/figure"
)

// What findings are said to rest on are figures that there are, of rules that there are.
func TestFindingsRestOnWhatThereIs(t *testing.T) {
	with := 0
	for _, r := range rules.All() {
		for _, ref := range digest.Rests(r.ID, "bias.clamp") {
			with++
			if known := slices.ContainsFunc(figure.List, func(d figure.Declaration) bool { return d.ID == ref.ID }); ref.Kind == "figure" && !known {
				t.Errorf("%s rests on %s, which is no figure", r.ID, ref.ID)
			}
			if !slices.Contains([]string{"figure", "table", "curve"}, ref.Kind) {
				t.Errorf("%s rests on a %q", r.ID, ref.Kind)
			}
		}
	}
	if with < 60 {
		t.Errorf("rules that there are rest on %d things", with)
	}
}
