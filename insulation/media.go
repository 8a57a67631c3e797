package insulation

import (
	"slices"

	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/oil"
	"kilovet/insulation/solid"
	"kilovet/insulation/vacuum"
)

// medium is what answers for a gap that is not filled with gas; what it has no law
// for is nil.
type medium struct {
	clearance func(gap.Gap, gap.Voltages) (gap.Answer[quantity.Length], error)
	creepage  func(gap.Gap, gap.Voltages) (gap.Answer[quantity.Length], error)
	onset     func(gap.Gap) (gap.Answer[quantity.Voltage], error)
	breakdown func(gap.Gap) (gap.Answer[quantity.Voltage], error)
	// the gap whose breakdown or onset is at a voltage
	forBreakdown func(gap.Gap, quantity.Voltage) (quantity.Length, error)
	forOnset     func(gap.Gap, quantity.Voltage) (quantity.Length, error)
}

// mediumOf is the medium of a gap without gas; the zero medium where gas fills it.
func mediumOf(g gap.Gap) medium {
	switch g.Medium {
	case gap.Vacuum:
		return medium{vacuum.ClearanceNeeded, alongInVacuum, vacuum.Onset, acrossVacuum, vacuum.ClearanceForBreakdown, vacuum.ClearanceForOnset}
	case gap.Solid:
		return medium{clearance: solid.ClearanceNeeded, creepage: alongTested, breakdown: solid.Breakdown, forBreakdown: solid.ThicknessForBreakdown}
	case gap.Oil:
		return medium{clearance: oil.ClearanceNeeded, creepage: alongTested, breakdown: oil.Breakdown, forBreakdown: oil.ClearanceForBreakdown}
	}
	return medium{}
}

func alongInVacuum(g gap.Gap, v gap.Voltages) (gap.Answer[quantity.Length], error) {
	return vacuum.CreepageNeeded(g, v, vacuum.ReferenceOf(g))
}

// acrossVacuum is what a gap in vacuum stands: where an insulator bridges it, the lower
// of the gap itself and the flashover of its surface, on what both rest.
func acrossVacuum(g gap.Gap) (gap.Answer[quantity.Voltage], error) {
	if g.Clearance <= 0 && g.Creepage > 0 {
		return vacuum.Flashover(g, vacuum.ReferenceOf(g))
	}
	across, err := vacuum.Breakdown(g)
	if g.Creepage <= 0 || err != nil {
		return across, err
	}
	along, err := vacuum.Flashover(g, vacuum.ReferenceOf(g))
	switch {
	case err != nil:
		return along, err
	case along.Value < across.Value:
		along.Assumptions = union(along.Assumptions, across.Assumptions)
		return along, nil
	}
	across.Assumptions = union(across.Assumptions, along.Assumptions)
	return across, nil
}

// union are the texts of both, each once.
func union(a, b []string) []string {
	all := slices.Clone(a)
	for _, t := range b {
		if !slices.Contains(all, t) {
			all = append(all, t)
		}
	}
	return all
}
