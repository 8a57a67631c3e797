package table

import (
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

// grooveWidths are X at pollution degrees 1 to 4 (IEC 61010-1:2010 Table C.1, the
// same in IEC 60664-1; degree 4 from memory).
var grooveWidths = [4]quantity.Length{0.25 * millimetre, 1 * millimetre, 1.5 * millimetre, 2.5 * millimetre}

// GrooveWidth is the width X below which a groove counts as bridged and adds nothing
// to the creepage distance. Where the clearance needed is under 3 mm, X may fall to a
// third of it (the third from memory).
func GrooveWidth(degree int, clearanceNeeded quantity.Length) (Reading[quantity.Length], error) {
	if err := checkDegree(degree); err != nil {
		return Reading[quantity.Length]{}, err
	}
	r := Reading[quantity.Length]{
		Value:  grooveWidths[degree-1],
		Rows:   "width X",
		Source: gap.Source{Text: "IEC 61010-1:2010 Table C.1", Mark: gap.Read},
	}
	if degree == 4 {
		r.Source.Mark = gap.Memory
	}
	if third := clearanceNeeded / 3; clearanceNeeded < 3*millimetre && third < r.Value {
		r.Value, r.Rows, r.Source.Mark = third, "a third of the clearance", gap.Memory
	}
	return r, nil
}
