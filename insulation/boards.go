package insulation

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/gas"
)

// acrossBoard is the breakdown between conductors of a printed board: their edges are
// sharp, so it is that of needle points at the same distance in air, over a board that is
// dry and clean. A coating or the laminate over them, while whole, stands no less. An
// assumption of this project, which the answer says. The distance is the clearance, the
// creepage where that alone is given.
func acrossBoard(g gap.Gap) (gap.Answer[quantity.Voltage], error) {
	if g.Clearance <= 0 {
		g.Clearance = g.Creepage
	}
	if g.Clearance <= 0 {
		return gap.Answer[quantity.Voltage]{}, lack.Key("spacing.clearance")
	}
	g.Medium = gap.Air
	s, err := gas.StateOf(g)
	if err != nil {
		return gap.Answer[quantity.Voltage]{}, err
	}
	a, err := gas.Needles(s, g.Clearance)
	a.Because = "edges of conductors on a board: " + a.Because
	a.Assumptions = append(a.Assumptions, "conductors along a dry and clean board stand what sharp electrodes in air do at the same distance")
	return a, err
}
