package touch

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Opening is the shape of an opening in a fence or cover.
type Opening int

// The three shapes; the size is the width of a slot, the side of a square, the diameter
// of a circle.
const (
	Slot Opening = iota
	Square
	Circle
)

// openings is EN 50191 Table A.4, from EN 294 Table 4 (read in BGI 891): upper limit of
// the size in mm; distance in mm of a slot, a square, a circle from the prohibited zone.
var openings = [][]float64{
	{6, 10, 5, 5}, {8, 20, 15, 5}, {10, 80, 25, 20}, {12, 100, 80, 80}, {20, 120, 120, 120}, {30, 850, 120, 120}, {40, 850, 200, 120}, {120, 850, 850, 850},
}

// MeshDistance is how far an opening must lie from the prohibited zone for arms and
// fingers. Sizes below 4 mm take the first row; above 120 mm it is a lack.
func MeshDistance(shape Opening, size quantity.Length) (quantity.Length, error) {
	if shape < Slot || shape > Circle {
		panic("touch: no such opening")
	}
	for _, row := range openings {
		if positive(size) && quantity.AtMost(float64(size)*1e3, row[0]) {
			return quantity.Length(row[1+shape] * 1e-3), nil
		}
	}
	return 0, lack.Range("distances are tabulated for openings to 120 mm, not %s", quantity.Text(size))
}
