package gas

import (
	"fmt"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/table"
)

const (
	millimetre quantity.Length  = 1e-3
	centimetre quantity.Length  = 1e-2
	kilovolt   quantity.Voltage = 1e3
)

// needleRows is the AIEE spark-gap table, gap of needle points in cm and crest kV at
// 60 Hz, 760 Torr, 25 °C, the columns exchanged.
var needleRows = [][]float64{
	{0.42, 5}, {0.85, 10}, {1.3, 15}, {1.75, 20}, {2.2, 25}, {2.69, 30}, {3.2, 35}, {3.81, 40}, {4.49, 45}, {5.2, 50},
	{6.81, 60}, {8.81, 70}, {11.1, 80}, {13.3, 90}, {15.5, 100}, {17.7, 110}, {19.8, 120}, {22, 130}, {24.1, 140},
	{26.1, 150}, {28.1, 160}, {30.1, 170}, {32, 180}, {33.9, 190}, {35.7, 200}, {37.6, 210}, {39.5, 220}, {41.4, 230},
	{43.3, 240}, {45.2, 250}, {54.7, 300},
}

var needles = table.Of(gap.Source{Text: "AIEE spark-gap table, needle points", Mark: gap.Read}, "gap", needleRows, 1, centimetre, kilovolt)

// The multipliers of the AIEE table run in proportion to the density from 0.93 (30 °C,
// 720 Torr) to 1.12 (0 °C, 780 Torr).
const (
	thinnest quantity.Fraction = 0.93
	densest  quantity.Fraction = 1.12
)

// Needles is the breakdown voltage between two sharp electrodes in air: the AIEE table
// of needle points, in proportion to the density where the table does so; thinner air
// goes on by similarity, gap times density, denser air gets no more credit. Shorter gaps
// than the first row, 4.2 mm, follow case A of IEC 60664-1, joined to that row; past the
// last row, 547 mm, there is a lack. Alternating voltage was used, so each needle was
// the positive one in turn.
func Needles(s State, d quantity.Length) (gap.Answer[quantity.Voltage], error) {
	if d < shortestGap {
		return gap.Answer[quantity.Voltage]{}, lack.Range("gaps under 10 µm break down by field emission, asked for %s", quantity.Text(d))
	}
	density := s.density25()
	a, err := normalNeedles(d * quantity.Length(min(1, density/thinnest)))
	a.Value *= quantity.Voltage(min(max(density, thinnest), densest))
	if err == nil && density < thinnest*(1-1e-9) {
		a.Because += ", in air thinner than that of the table by similarity, gap times density"
	}
	return sharpened(s, d, a), err
}

// normalNeedles is Needles at 25 °C and 760 Torr.
func normalNeedles(d quantity.Length) (gap.Answer[quantity.Voltage], error) {
	var none gap.Answer[quantity.Voltage]
	first := needles.First()
	r, err := needles.At(max(d, first))
	if err != nil {
		return none, err
	}
	a := gap.Answer[quantity.Voltage]{
		Value: r.Value, Because: "two sharp electrodes, " + r.Rows, Sources: []gap.Source{r.Source.Governing()},
	}
	if d >= first {
		return a, nil
	}
	join, err := caseA.Reach(first / quantity.Length(tableDensity))
	if err != nil {
		return none, err
	}
	here, err := caseA.Reach(d / quantity.Length(tableDensity))
	if err != nil {
		return none, err
	}
	a.Value *= here / join
	a.Because = "two sharp electrodes, from the first row, 4.2 mm, down as case A of IEC 60664-1"
	a.Sources = append(a.Sources, caseA.Source())
	return a, nil
}

var caseA = table.SteadyClearance(table.CaseA)

// PointPlane is a cautious breakdown voltage of a sharp positive electrode against a
// plane in air: the steady voltage that a point of 30 µm against a plane stands in
// IEC 60664-1 Table F.8, case A, whose clearances are those of air at 80 kPa, taken to
// the density by δ d. Past its last row, 100 mm, the voltage of that row, until the
// 4.5 kV/cm that positive streamers need to cross (Lehtinen and Østgaard) give more, to
// half a metre: there 225 kV against 228 kV of IEC 60071-2 for rod and plane. Gaps under
// 10 µm are a lack.
func PointPlane(s State, d quantity.Length) (gap.Answer[quantity.Voltage], error) {
	var none gap.Answer[quantity.Voltage]
	switch {
	case d < shortestGap:
		return none, lack.Range("gaps under 10 µm break down by field emission, asked for %s", quantity.Text(d))
	case d > longestStreamer:
		return none, lack.Range("no breakdown of sharp electrodes against a plane is known here past 0.5 m, asked for %s", quantity.Text(d))
	}
	similar := d * quantity.Length(s.Density()/tableDensity)
	v, err := caseA.Reach(similar)
	if err != nil {
		return none, err
	}
	a := gap.Answer[quantity.Voltage]{
		Value:   v,
		Because: fmt.Sprintf("a point against a plane stands it in case A, whose gap at 800 mbar is %s", quantity.Text(similar)),
		Sources: []gap.Source{{Text: caseA.Source().Text + " read backwards", Mark: gap.Derived, Governs: true}},
	}
	if crossing := streamerField * quantity.Field(s.Density()) * quantity.Field(d); quantity.Voltage(crossing) > v {
		a.Value, a.Because = quantity.Voltage(crossing), "positive streamers cross the gap at a mean of 4.5 kV/cm"
		a.Sources = []gap.Source{{Text: "least field of positive streamers, Lehtinen and Østgaard", Mark: gap.Read, Governs: true}}
	}
	return sharpened(s, d, a), nil
}

// tableDensity is that of air at 80 kPa and 20 °C, for which the clearances hold.
const tableDensity quantity.Fraction = 80e3 / 101325.0

const (
	streamerField   quantity.Field  = 4.5e5 // V/m at sea level
	longestStreamer quantity.Length = 0.5
)
