package insulation

import (
	"fmt"
	"slices"

	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/table"
)

// CreepageNeeded is the creepage distance that IEC 60664-1 Table F.5 asks for at the
// long-term voltage, twice it for reinforced insulation, never under the clearance
// needed. Glass, ceramics and other materials that do not track need the clearance
// only (memory). Without material or index, past 63 kV, and in media without a surface
// in air there is a lack.
func CreepageNeeded(g gap.Gap, v gap.Voltages) (gap.Answer[quantity.Length], error) {
	var none gap.Answer[quantity.Length]
	if creepage := mediumOf(g).creepage; creepage != nil {
		a, err := creepage(g, v.For(g.Class()))
		return forStep(g, a), err
	}
	if g.Medium == gap.InGas && g.Filling() != gap.AirGas {
		return alongInGas(g, v)
	}
	if err := inAir(g); err != nil {
		return none, err
	}
	group, source, err := groupOf(g)
	if err != nil {
		return none, err
	}
	return creepageOf(g, v, group, source)
}

// creepageOf is the creepage in air for a material group.
func creepageOf(g gap.Gap, v gap.Voltages, group table.Group, source gap.Source) (gap.Answer[quantity.Length], error) {
	clearance, noClearance := ClearanceNeeded(g, v)
	if group == table.NonTracking {
		clearance.Because = "no tracking: the clearance is enough, " + clearance.Because
		clearance.Sources = append(clearance.Sources, source)
		return clearance, noClearance
	}
	a, err := tracked(g, v, group)
	if err != nil {
		return gap.Answer[quantity.Length]{}, err
	}
	a.Sources = append(a.Sources, source)
	a.Assumptions = append(a.Assumptions, slowCreepage(v)...)
	switch {
	case noClearance != nil:
		a.Assumptions = append(a.Assumptions, "the creepage is not under the clearance, which is not known: "+noClearance.Error())
	case clearance.Value > a.Value:
		return raised(a, clearance), nil
	}
	return a, nil
}

// tracked is the creepage of Table F.5 with the step of the insulation class, and with what
// ribs of size take off it.
func tracked(g gap.Gap, v gap.Voltages, group table.Group) (gap.Answer[quantity.Length], error) {
	on := table.Surface{Degree: degreeOn(g), Group: group, PrintedWiring: g.Medium == gap.PrintedBoard}
	r, err := table.Creepage(v.LongTerm, on)
	if err != nil {
		return gap.Answer[quantity.Length]{}, err
	}
	a := stepped(g, v.LongTerm, group.String(), r)
	if Covered(g) {
		a.Sources = append(a.Sources, coverSource)
	}
	return withRibs(g, v, on, a), nil
}

// stepped is a reading of Table F.5 of some material as an answer, twice it for reinforced
// insulation.
func stepped(g gap.Gap, longTerm quantity.Voltage, of string, r table.Reading[quantity.Length]) gap.Answer[quantity.Length] {
	a := gap.Answer[quantity.Length]{
		Value:   r.Value,
		Because: fmt.Sprintf("%s long-term on %s: %s, %s", quantity.Text(longTerm), of, r.Source.Text, r.Rows),
		Sources: []gap.Source{r.Source.Governing()},
	}
	if g.Class() == gap.Reinforced {
		a.Value, a.Because = 2*a.Value, "reinforced, twice "+a.Because
		a.Sources = append(a.Sources, twiceSource)
	}
	if r.Note != "" {
		a.Because += "; " + r.Note
	}
	if longTerm > scope {
		a.Because += "; beyond the standard's scope of 1.5 kV DC"
	}
	return a
}

// raised is the creepage brought up to the clearance needed.
func raised(creepage, clearance gap.Answer[quantity.Length]) gap.Answer[quantity.Length] {
	shown := gap.Beside[quantity.Length]{Value: creepage.Value, Source: creepage.Sources[0]}
	shown.Source.Governs = false
	clearance.Because = "not under the clearance needed, " + clearance.Because
	clearance.Shown = append([]gap.Beside[quantity.Length]{shown}, clearance.Shown...)
	return clearance
}

// groupOf is the material group by index where one is given, else by name.
func groupOf(g gap.Gap) (table.Group, gap.Source, error) {
	if g.CTI != nil {
		return table.GroupByCTI(*g.CTI)
	}
	return table.GroupByName(g.Material)
}

// degreeOn is the pollution degree at the surface: 1 where the board is covered, else that
// of the site.
func degreeOn(g gap.Gap) int {
	if Covered(g) {
		return 1
	}
	return g.PollutionDegree
}

var coverSource = gap.Source{Text: "IEC 60664-3, under protection of type 1 pollution degree 1", Mark: gap.Memory}

// Covered reports whether pollution degree 1 is taken in place of a worse one of the site:
// under a coating or inside a board (IEC 60664-3, protection of type 1, memory). That the
// coating is of that type is for the rules to say.
func Covered(g gap.Gap) bool {
	return g.Medium == gap.PrintedBoard && !g.Exposed && g.PollutionDegree > 1 &&
		slices.Contains([]gap.Board{gap.Internal, gap.PolymerCoated, gap.ConformalCoated, gap.TerminationCoat}, g.Board)
}

// GrooveWidth is the width X under which a groove in the surface counts as bridged and
// adds nothing to the creepage (IEC 60664-1, IEC 61010-1 Table C.1).
func GrooveWidth(g gap.Gap, v gap.Voltages) (gap.Answer[quantity.Length], error) {
	clearance, err := ClearanceNeeded(g, v)
	if err != nil {
		return gap.Answer[quantity.Length]{}, err
	}
	r, err := table.GrooveWidth(degreeOn(g), clearance.Value)
	return gap.Answer[quantity.Length]{
		Value: r.Value, Because: "narrower grooves count as bridged, " + r.Rows, Sources: []gap.Source{r.Source.Governing()},
	}, err
}

// DischargeFreeClearance is the clearance at which sharp electrodes are free of partial
// discharge (IEC 60664-1 Table F.9), with the altitude factor. Past 12 kV there is a
// lack: a radius is needed, not a distance.
func DischargeFreeClearance(g gap.Gap, v gap.Voltages) (gap.Answer[quantity.Length], error) {
	var none gap.Answer[quantity.Length]
	if err := inAir(g); err != nil {
		return none, err
	}
	factor, err := altitudeFactor(g)
	if err != nil {
		return none, err
	}
	r, err := table.DischargeFreeClearance(v.Peak)
	if err != nil {
		return none, err
	}
	d := demand{Reading: r, why: quantity.Text(v.Peak) + " peak without discharge"}
	d.raise(factor, "the altitude")
	return largest([]demand{d}), nil
}
