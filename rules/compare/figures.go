package compare

import (
	"math"

	"kilovet/rules/figure"
)

// still is the relative change below which a figure counts as not moved: figures
// agree to 1e-6 across machines.
const still = 1e-6

// figures lists the figures that moved, came or went.
func figures(old, new []figure.Figure) []Figure {
	var moved []Figure
	for _, p := range pairs(old, new, figureName) {
		if p.old != nil && p.new != nil && !differs(p.old.Value, p.new.Value) {
			continue
		}
		f := p.first()
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

func differs(a, b float64) bool { return math.Abs(a-b) > still*max(math.Abs(a), math.Abs(b)) }

// change is the relative change; nil where a side lacks the figure or the old one is
// nought.
func change(old, new *figure.Figure) *float64 {
	if old == nil || new == nil || old.Value == 0 {
		return nil
	}
	share := (new.Value - old.Value) / math.Abs(old.Value)
	return &share
}
