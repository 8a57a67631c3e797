package insulation

import (
	"fmt"

	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/table"
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

// A rib is of the size that Table F.5 asks for its figures in brackets where it is as thick
// as a fifth and as high as a quarter of the creepage needed without it (IEC 60664-1,
// memory).
const (
	ribThickness quantity.Length = 0.2
	ribHeight    quantity.Length = 0.25
)

// withRibs lets the figure in brackets of Table F.5, pollution degree 3, stand in place of
// the plain one where the ribs are of size and the surface falls short of that; else it is
// shown. The size of ribs is from memory, an assumption.
func withRibs(g gap.Gap, v gap.Voltages, on table.Surface, plain gap.Answer[quantity.Length]) gap.Answer[quantity.Length] {
	on.Ribbed = true
	r, err := table.Creepage(v.LongTerm, on)
	if g.Ribs.Count == 0 || err != nil {
		return plain
	}
	reduced := stepped(g, v.LongTerm, on.Group.String(), r)
	if !quantity.AtMost(reduced.Value*(1+1e-6), plain.Value) {
		return plain // no figure in brackets
	}
	high, thick := plain.Value*ribHeight, plain.Value*ribThickness
	size := fmt.Sprintf("a rib %s high and %s thick", quantity.Text(high), quantity.Text(thick))
	counted, _, err := SurfaceCounted(g, v)
	if err != nil || !quantity.AtLeast(g.Ribs.Depth, high) || !quantity.AtLeast(g.Ribs.Thickness, thick) || quantity.AtLeast(counted, plain.Value) {
		source := r.Source
		source.Text += ", which takes " + size
		plain.Shown = append(plain.Shown, gap.Beside[quantity.Length]{Value: reduced.Value, Source: source})
		return plain
	}
	reduced.Because += "; in place of " + quantity.Text(plain.Value) + ", since the ribs are of size"
	reduced.Assumptions = append(reduced.Assumptions, size+" is what Table F.5 asks for its figures in brackets, from memory")
	source := plain.Sources[0]
	source.Governs = false
	reduced.Shown = append(reduced.Shown, gap.Beside[quantity.Length]{Value: plain.Value, Source: source})
	return reduced
}
