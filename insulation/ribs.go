package insulation

import (
	"fmt"

	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

// SurfaceCounted is the part of the creepage that counts: all of it, or less the flanks
// of ribs whose grooves are narrower than X and so bridged (IEC 60664-1, IEC 61010-1
// Table C.1). In other media than air no rule counts the flanks, so none do. Beside it is
// why something was taken off.
func SurfaceCounted(g gap.Gap, v gap.Voltages) (quantity.Length, string, error) {
	flanks := 2 * quantity.Length(g.Ribs.Count) * g.Ribs.Depth
	if flanks == 0 {
		return g.Creepage, "", nil
	}
	if inAir(g) != nil {
		return g.Creepage - flanks, "the flanks of the ribs do not count outside air", nil
	}
	x, err := GrooveWidth(g, v)
	if err != nil {
		return 0, "", err
	}
	if !quantity.AtLeast(g.Ribs.Width, x.Value) {
		return g.Creepage - flanks, fmt.Sprintf("grooves of %s are narrower than X = %s and count as bridged", quantity.Text(g.Ribs.Width), quantity.Text(x.Value)), nil
	}
	return g.Creepage, "", nil
}
