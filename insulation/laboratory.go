package insulation

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/table"
)

// SecondaryAtMost is the clearance that IEC 61010-1 asks for at most in a secondary circuit
// behind a mains whose own table was not read, with the altitude factor and twice it for
// reinforced insulation. Where the table was read, and where no mains reaches a gap of such a
// circuit, there is a lack.
func SecondaryAtMost(g gap.Gap, v gap.Voltages) (quantity.Length, error) {
	if !Unread(g, v) {
		return 0, lack.Failed("nothing of IEC 61010-1 is left open")
	}
	factor, err := altitudeFactor(g)
	if err != nil {
		return 0, err
	}
	r, err := table.SecondaryAtMost(v.Peak, g.Mains.LineToNeutral, g.Mains.Category)
	if g.Class() == gap.Reinforced {
		r.Value *= 2 // IEC 61010-1 K.3
	}
	return r.Value * quantity.Length(max(1, factor.Value)), err
}

// Unread reports whether IEC 61010-1 asks for a clearance that its tables, as far as they were
// read, do not tell.
func Unread(g gap.Gap, v gap.Voltages) bool {
	if g.Mains == nil || !g.Mains.Secondary {
		return false
	}
	_, err := table.SecondaryClearance(v.Peak, g.Mains.LineToNeutral, g.Mains.Category)
	return err != nil
}
