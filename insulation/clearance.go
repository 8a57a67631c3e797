package insulation

import (
	"fmt"
	"slices"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/table"
)

// Scope of IEC 60664-1 (read in a catalogue entry): 1000 V AC, 1500 V DC. Its tables go
// on and are used to their last row.
const scope quantity.Voltage = 1500

// ClearanceNeeded is the clearance that the printed tables ask for in air: the largest
// of IEC 60664-1 Table F.8 for the peak, F.2 for the rated impulse where a mains reaches
// the gap, IEC 61010-1 K.11 or K.12 in a secondary circuit behind a mains of category 3
// or 4, IPC-2221 on a printed board, times the altitude factor, and not under the floor of
// the pollution degree. Reinforced insulation is dimensioned for 160 % of the peak and
// the next impulse step; functional insulation as basic, and past the last row of
// Table F.8 by needle gaps. Above 30 kHz the factor of IEC 60664-4 is added.
//
// Case A holds unless the gap was impulse tested. Past the last row of a table, without
// pollution degree or altitude, and in other gases there is a lack.
func ClearanceNeeded(g gap.Gap, v gap.Voltages) (gap.Answer[quantity.Length], error) {
	var none gap.Answer[quantity.Length]
	if clearance := mediumOf(g).clearance; clearance != nil {
		a, err := clearance(g, v.For(g.Class()))
		return forStep(g, a), err
	}
	if err := inAir(g); err != nil {
		return none, err
	}
	factor, err := altitudeFactor(g)
	if err != nil {
		return none, err
	}
	inhomogeneous, err := needIn(table.CaseA, g, v, factor)
	if !g.ImpulseTested || err == nil && g.Shape == nil && g.Clearance > 0 && quantity.AtLeast(g.Clearance, inhomogeneous.Value) {
		return inhomogeneous, err // nothing need be taken for granted
	}
	if a, err := homogeneousNeed(g, v, factor); err == nil {
		return a, nil
	}
	if err == nil && g.Shape != nil && g.Shape.Kind != gap.Plates {
		inhomogeneous.Because += "; the shape is not homogeneous, case A in spite of the test"
	}
	return inhomogeneous, err
}

// needIn is what the tables ask for in a case of the field, times the factor of the altitude.
func needIn(field table.Case, g gap.Gap, v gap.Voltages, factor table.Reading[quantity.Fraction]) (gap.Answer[quantity.Length], error) {
	var none gap.Answer[quantity.Length]
	asked, err := electrical(g, v, field)
	if err != nil {
		return none, err
	}
	for i := range asked {
		if !asked[i].aloft {
			asked[i].raise(factor, "the altitude")
		}
	}
	floor, err := table.PollutionFloor(degreeOn(g), g.Medium == gap.PrintedBoard)
	if err != nil {
		return none, err
	}
	a := largest(append(asked, demand{Reading: floor, why: pollution}))
	if err := bluntEnough(g, v, a.Value); err != nil {
		return none, err
	}
	a.Because += unread(g, v)
	a.Shown = append(a.Shown, compared(g, v)...)
	return a, nil
}

// pollution is why there is a floor; it is not shown where it does not govern.
const pollution = "pollution"

// demand is what one table asks for.
type demand struct {
	table.Reading[quantity.Length]
	why     string
	extra   []gap.Source // of factors
	assumed []string
	aloft   bool // the table has a column of its own for heights
}

// raise multiplies a demand by a factor above 1.
func (d *demand) raise(factor table.Reading[quantity.Fraction], what string) {
	if factor.Value > 1 {
		d.Value *= quantity.Length(factor.Value)
		d.why += fmt.Sprintf(", times %.4g for %s", float64(factor.Value), what)
		d.extra = append(d.extra, factor.Source)
	}
}

// largest makes the largest demand the answer and shows the others.
func largest(asked []demand) gap.Answer[quantity.Length] {
	slices.SortStableFunc(asked, func(a, b demand) int {
		switch {
		case a.Value > b.Value:
			return -1
		case a.Value < b.Value:
			return 1
		}
		return 0
	})
	first := asked[0]
	a := gap.Answer[quantity.Length]{
		Value:   first.Value,
		Because: fmt.Sprintf("%s: %s, %s", first.why, first.Source.Text, first.Rows),
		Sources: append([]gap.Source{first.Source.Governing()}, first.extra...),

		Assumptions: first.assumed,
	}
	if first.Note != "" {
		a.Because += "; " + first.Note
	}
	for _, d := range asked[1:] {
		if d.why != pollution {
			a.Shown = append(a.Shown, gap.Beside[quantity.Length]{Value: d.Value, Source: d.Source})
		}
	}
	return a
}

// electrical lists what the tables ask for at the voltages, before the altitude.
func electrical(g gap.Gap, v gap.Voltages, field table.Case) ([]demand, error) {
	steady, err := steadyDemand(g, v.Peak, field)
	if err != nil {
		return nil, err
	}
	factor, err := frequencyFactor(g, v, steady.Value)
	if err != nil {
		return nil, err
	}
	steady.raise(factor, "the frequency")
	asked := []demand{steady}
	impulse, err := impulseDemand(g, v, field)
	if err != nil {
		return nil, err
	}
	asked = append(asked, impulse...)
	board, err := boardDemand(g, v.Peak)
	if err != nil {
		return nil, err
	}
	asked = append(asked, board...)
	asked = append(asked, secondaryDemand(g, v.Peak)...)
	if Fast(v) { // whichever governs: it does so only if what is remembered asks for less
		for i := range asked {
			asked[i].assumed = append(asked[i].assumed, "the clearance at "+quantity.Text(v.Frequency)+" follows IEC 60664-4, from memory")
		}
	}
	return asked, nil
}

func steadyDemand(g gap.Gap, peak quantity.Voltage, field table.Case) (demand, error) {
	if column := table.SteadyClearance(field); g.Class() == gap.Functional && field == table.CaseA && peak > column.Last() {
		return functionalDemand(peak)
	}
	step := safetyStep(g)
	r, err := table.SteadyClearance(field).At(peak * step)
	d := demand{Reading: r, why: quantity.Text(peak) + " peak"}
	if step > 1 {
		d.why = "reinforced, 160 % of " + d.why
		d.extra = append(d.extra, stepSource)
	}
	if peak > scope {
		d.Note = "beyond the standard's scope of 1.5 kV DC, whose table is used to its last row"
	}
	return d, err
}

// impulseDemand is none where no mains reaches the gap.
func impulseDemand(g gap.Gap, v gap.Voltages, field table.Case) ([]demand, error) {
	u, sources, err := ratedImpulse(g, v)
	if err != nil || u == 0 {
		return nil, err
	}
	why := "impulse of " + quantity.Text(u)
	if g.Class() == gap.Reinforced {
		more := table.ReinforcedImpulse(u)
		u, why = more.Value, "reinforced, "+more.Rows+" "+quantity.Text(more.Value)
		sources = append(sources, more.Source)
	}
	column, err := table.ImpulseClearance(field, degreeOn(g))
	if err != nil {
		return nil, err
	}
	r, err := column.At(u)
	return []demand{{Reading: r, why: why, extra: sources}}, err
}

func ratedImpulse(g gap.Gap, v gap.Voltages) (quantity.Voltage, []gap.Source, error) {
	if v.RatedImpulse > 0 || g.Mains == nil {
		return v.RatedImpulse, nil, nil
	}
	r, err := table.RatedImpulse(g.Mains.LineToNeutral, g.Mains.Category)
	return r.Value, []gap.Source{r.Source}, err
}

// boardDemand is the conductor spacing of IPC-2221.
func boardDemand(g gap.Gap, peak quantity.Voltage) ([]demand, error) {
	if g.Medium != gap.PrintedBoard {
		return nil, nil
	}
	var altitude quantity.Length
	if g.Altitude != nil {
		altitude = *g.Altitude
	}
	r, err := table.BoardSpacing(peak, g.Board, altitude)
	return []demand{{Reading: r, why: quantity.Text(peak) + " between conductors of a board", aloft: true}}, err
}

// secondaryDemand is that of IEC 61010-1 where its tables were read; where not, the
// others stand alone.
func secondaryDemand(g gap.Gap, peak quantity.Voltage) []demand {
	if g.Mains == nil || !g.Mains.Secondary {
		return nil
	}
	r, err := table.SecondaryClearance(peak, g.Mains.LineToNeutral, g.Mains.Category)
	if err != nil {
		return nil
	}
	d := demand{Reading: r, why: quantity.Text(peak) + " behind the mains"}
	if g.Class() == gap.Reinforced {
		d.Value, d.why = 2*d.Value, "reinforced, twice "+d.why // IEC 61010-1 K.3
	}
	return []demand{d}
}

// unread says where IEC 61010-1 asks for something and its table was not read.
func unread(g gap.Gap, v gap.Voltages) string {
	if !Unread(g, v) {
		return ""
	}
	return fmt.Sprintf("; what IEC 61010-1 asks for behind a mains of overvoltage category %d was not read and is not in it", g.Mains.Category)
}

// compared are what other standards ask for, shown and not judged.
func compared(g gap.Gap, v gap.Voltages) []gap.Beside[quantity.Length] {
	var shown []gap.Beside[quantity.Length]
	if g.Medium == gap.PrintedBoard {
		r := table.ConverterSpacing(v.Peak)
		shown = append(shown, gap.Beside[quantity.Length]{Value: r.Value, Source: r.Source})
	}
	shown = append(shown, dischargeFree(g, v)...)
	if impulse, _, err := ratedImpulse(g, v); err == nil && impulse > 0 {
		if r, err := table.CombinedClearance(v.Peak, impulse); err == nil {
			shown = append(shown, gap.Beside[quantity.Length]{Value: r.Value, Source: r.Source})
		}
	}
	return shown
}

// altitudeFactor is that of the pressure where it is given, else of the altitude.
func altitudeFactor(g gap.Gap) (table.Reading[quantity.Fraction], error) {
	switch {
	case g.TruePressure() > 0:
		return table.PressureFactor(g.TruePressure())
	case g.Altitude == nil:
		return table.Reading[quantity.Fraction]{}, lack.Key("site.altitude")
	}
	return table.AltitudeFactor(*g.Altitude)
}

// dischargeFree is what Table F.9 asks of sharp electrodes where that is more than Table
// F.8 does: shown only, since the field decides on partial discharge.
func dischargeFree(g gap.Gap, v gap.Voltages) []gap.Beside[quantity.Length] {
	free, err := DischargeFreeClearance(g, v)
	steady, err2 := table.SteadyClearance(table.CaseA).At(v.Peak)
	if err != nil || err2 != nil || g.Medium == gap.PrintedBoard || quantity.AtMost(free.Value, steady.Value) {
		return nil
	}
	source := free.Sources[0]
	source.Governs = false
	source.Text += ", sharp electrodes free of partial discharge (does not decide: the field does)"
	return []gap.Beside[quantity.Length]{{Value: free.Value, Source: source}}
}
