package insulation

import (
	"slices"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/table"
)

// SurfaceBounds are what is known of the creepage needed where no figure of the surface
// itself is. A surface adds nothing to the medium beside it, so shorter than Least is too
// short; Enough is what any surface needs that is no worse than a dry and clean one in air.
// Between the two nothing is known.
type SurfaceBounds struct {
	Least  gap.Result[quantity.Length]
	Enough gap.Result[quantity.Length]
}

// CreepageBounds bounds the creepage of a surface in oil, along a joint of solids, in a gas
// or in vacuum. Oil and compound keep water and dust away, as a coating of type 1 does
// (IEC 60664-3, memory): pollution degree 1 of Table F.5, one column for all materials,
// bounds them from above, which is an assumption. Thin and weak gases and vacuum have no
// bound above.
func CreepageBounds(g gap.Gap, v gap.Voltages) SurfaceBounds {
	b := SurfaceBounds{Least: gap.ResultOf(atLeast(g, v, aloneNeeded))}
	b.Enough = gap.ResultOf(cleanSurface(g, v, b.Least))
	return b
}

// aloneNeeded is what the medium alone needs between plates: the clearance asked for where
// one is, which the creepage is never under, else the distance whose breakdown is a quarter
// above the peak.
func aloneNeeded(g gap.Gap, v gap.Voltages) (gap.Answer[quantity.Length], error) {
	if g.Medium == gap.Oil || g.Medium == gap.Solid {
		g.Shape = &gap.Shape{Kind: gap.Plates}
		a, err := ClearanceNeeded(g, v)
		a.Because = "the clearance needed between plates, which a surface is never under: " + a.Because
		a.Assumptions = nil // a lower bound is none the weaker for them
		return a, err
	}
	alone, of := g, named(g)+" alone"
	if weaker(g) {
		alone.Gas, of = gap.AirGas, "air, more than which "+named(g)+" does not stand,"
	}
	alone.Shape, alone.Creepage = &gap.Shape{Kind: gap.Plates}, 0
	d, err := ClearanceForBreakdown(alone, v.For(g.Class()).Peak*inHand, gap.Unknown)
	if err != nil {
		return gap.Answer[quantity.Length]{}, err
	}
	alone.Clearance = d
	stands, err := Breakdown(alone, gap.Unknown)
	stands.Sources = append(stands.Sources, addsNothing)
	return gap.Answer[quantity.Length]{
		Value:   d,
		Because: of + " between plates is expected to break down over " + quantity.Text(d) + " at a quarter above the peak",
		Sources: stands.Sources,
	}, err
}

var addsNothing = gap.Source{Text: "an insulator across a gap never raises what the gap stands (Hawley 1968, vacuum)", Mark: gap.Read}

// weaker are the gases that stand less than air of the same pressure over the distances of
// insulation, and of which no law answers there (memory).
func weaker(g gap.Gap) bool {
	weak := []gap.Gas{gap.Helium, gap.Argon, gap.Hydrogen, gap.CarbonDioxide}
	return g.Medium == gap.InGas && slices.Contains(weak, g.Filling()) && quantity.AtLeast(g.TruePressure(), normalPressure/2)
}

// cleanSurface is the creepage of Table F.5 at pollution degree 1, never under the least.
func cleanSurface(g gap.Gap, v gap.Voltages, least gap.Result[quantity.Length]) (gap.Answer[quantity.Length], error) {
	if g.Medium != gap.Oil && g.Medium != gap.Solid {
		return gap.Answer[quantity.Length]{}, lack.Range("no surface in %s is known to be as good as one in clean air", named(g))
	}
	r, err := table.Creepage(v.LongTerm, table.Surface{Degree: 1, Group: table.GroupIIIb})
	if err != nil {
		return gap.Answer[quantity.Length]{}, err
	}
	a := stepped(g, v.LongTerm, "any material in dry and clean air", r)
	a.Sources = append(a.Sources, coverSource)
	a.Assumptions = []string{map[gap.Medium]string{
		gap.Oil: "a surface in clean dry oil without fibres", gap.Solid: "a joint of solids that is bonded or filled without voids",
	}[g.Medium] + " is no worse than a dry and clean one in air"}
	if least.Lack == nil && least.Value > a.Value {
		a.Value, a.Because = least.Value, least.Because
	}
	return a, nil
}
