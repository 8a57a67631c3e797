package compare

import (
	"slices"
	"strconv"

	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/hv/quantity"
)

// inputs lists the values that were changed, added or taken out.
func inputs(old, new []document.Written, renamed []rename) []Input {
	declared := map[string]document.Declared{}
	for _, d := range document.Describe(&chain.Chain{}) {
		declared[d.Path] = d
	}
	var changed []Input
	for _, p := range pairs(old, new, func(w *document.Written) string { return w.At }) {
		w := p.first()
		in := Input{Key: w.Key, At: w.At, Old: text(p.old), New: text(p.new)}
		if in.Old == in.New {
			continue
		}
		in.Renamed = slices.ContainsFunc(renamed, func(r rename) bool { return in.At == r.new.at+".name" })
		in.Rewritten = p.old != nil && p.new != nil && sameValue(declared[w.Key], in.Old, in.New)
		changed = append(changed, in)
	}
	return changed
}

func text(w *document.Written) string {
	if w == nil {
		return ""
	}
	return w.Text
}

// sameValue reports whether two texts of a quantity or a number say the same.
func sameValue(d document.Declared, old, new string) bool {
	a, errA := value(d, old)
	b, errB := value(d, new)
	return errA == nil && errB == nil && quantity.Equal(a, b)
}

// value reads what stands in a file as a number in SI units.
func value(d document.Declared, text string) (float64, error) {
	if d.Dimension == nil {
		return strconv.ParseFloat(text, 64)
	}
	return d.Dimension.Parse(unquoted(text))
}

// unquoted takes the quotes off a text without escapes; others stay as they are and
// count as changed.
func unquoted(text string) string {
	if len(text) < 2 {
		return text
	}
	return text[1 : len(text)-1]
}
