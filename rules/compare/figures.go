package compare

import (
	"math"
	"slices"

	"kilovet/rules/figure"
)

const (
	// still is the relative change below which a figure counts as not moved: figures
	// agree to 1e-6 across machines.
	still = 1e-6
	// rounding is the share of the largest figure of its id below which a change is
	// that of arithmetic: what is nought by nature comes out as such a residue.
	rounding = 1e-9
)

// figures lists the figures that moved, came or went.
func figures(old, new []figure.Figure) []Figure {
	largest := map[string]float64{}
	for _, f := range slices.Concat(old, new) {
		largest[f.ID] = max(largest[f.ID], math.Abs(f.Value))
	}
	var moved []Figure
	for _, p := range pairs(old, new, figureName) {
		f := p.first()
		if p.old != nil && p.new != nil && !differs(p.old.Value, p.new.Value, largest[f.ID]) {
			continue
		}
		moved = append(moved, Figure{f.ID, f.Subject, f.State, f.What, f.Unit, valueOf(p.old), valueOf(p.new), change(p.old, p.new)})
	}
	return moved
}

func figureName(f *figure.Figure) [3]string { return [3]string{f.ID, f.Subject, f.State} }

func valueOf(f *figure.Figure) *float64 {
	if f == nil {
		return nil
	}
	return &f.Value
}

func differs(a, b, largest float64) bool {
	return math.Abs(a-b) > max(still*max(math.Abs(a), math.Abs(b)), rounding*largest)
}

// change is the relative change; nil where a side lacks the figure or the old one is
// nought.
func change(old, new *figure.Figure) *float64 {
	if old == nil || new == nil || old.Value == 0 {
		return nil
	}
	share := (new.Value - old.Value) / math.Abs(old.Value)
	return &share
}
