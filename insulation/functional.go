package insulation

import (
	"fmt"

	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/table"
)

// FunctionalClearance is the gap, by physics, whose breakdown by its own shape lies a
// factor above the peak: for insulation that protects nobody and lies beyond the scope of
// the tables. Without a shape it is that of needle points.
func FunctionalClearance(g gap.Gap, v gap.Voltages, factor quantity.Fraction) (quantity.Length, error) {
	return ClearanceForBreakdown(g, v.Peak*quantity.Voltage(factor), v.Sharp)
}

// tabled is the air for which the clearances of the tables hold: 80 kPa, 20 °C.
var tabled = gap.Gap{Medium: gap.Air, Pressure: 80e3, Temperature: 293.15}

// functionalDemand is that of functional insulation past the last row of Table F.8, 50
// kV in case A: the breakdown gap of needle points in the air of the tables, with the
// margin that the last row itself holds over it. An assumption of this project, which
// the answer says.
func functionalDemand(peak quantity.Voltage) (demand, error) {
	column := table.SteadyClearance(table.CaseA)
	last, err := column.At(column.Last())
	if err != nil {
		return demand{}, err
	}
	atLast, err := ClearanceForBreakdown(tabled, column.Last(), gap.Unknown)
	if err != nil {
		return demand{}, err
	}
	here, err := ClearanceForBreakdown(tabled, peak, gap.Unknown)
	margin := last.Value / atLast
	return demand{
		Reading: table.Reading[quantity.Length]{
			Value:  here * margin,
			Rows:   fmt.Sprintf("%.3g times the breakdown gap", float64(margin)),
			Source: gap.Source{Text: "AIEE needle gaps with the margin of IEC 60664-1 Table F.8", Mark: gap.Derived},
			Note:   "past the last row of Table F.8, 50 kV",
		},
		why:     quantity.Text(peak) + " peak, functional",
		assumed: []string{"functional insulation past the last row of Table F.8 is judged by needle gaps with the margin of that row"},
	}, err
}
