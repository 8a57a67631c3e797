package insulation

import (
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
}

// mediumOf is the medium of a gap without gas; the zero medium where gas fills it.
func mediumOf(g gap.Gap) medium {
	switch g.Medium {
	case gap.Vacuum:
		return medium{vacuum.ClearanceNeeded, alongInVacuum, vacuum.Onset, acrossVacuum}
	case gap.Solid:
		return medium{clearance: solid.ClearanceNeeded, breakdown: solid.Breakdown}
	case gap.Oil:
		return medium{clearance: oil.ClearanceNeeded, breakdown: oil.Breakdown}
	}
	return medium{}
}

func alongInVacuum(g gap.Gap, v gap.Voltages) (gap.Answer[quantity.Length], error) {
	return vacuum.CreepageNeeded(g, v, vacuum.AluminaPractice)
}

// acrossVacuum is what a gap in vacuum stands: where an insulator bridges it, the lower
// of the gap itself and the flashover of its surface.
func acrossVacuum(g gap.Gap) (gap.Answer[quantity.Voltage], error) {
	across, err := vacuum.Breakdown(g)
	if g.Creepage <= 0 || err != nil {
		return across, err
	}
	along, err := vacuum.Flashover(g, vacuum.AluminaPractice)
	if err != nil || along.Value < across.Value {
		return along, err
	}
	return across, nil
}
