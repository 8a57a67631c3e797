package gas

import (
	"fmt"
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/table"
)

// sparkRows are the spheres of the AIEE spark-gap table: crest kV at 60 Hz, 760 Torr,
// 25 °C, and the gap in cm of spheres of 2.5, 5, 10 and 25 cm; 0 where blank.
var sparkRows = [][]float64{
	{5, 0.13, 0.15, 0.15, 0.16},
	{10, 0.27, 0.29, 0.3, 0.32},
	{15, 0.42, 0.44, 0.46, 0.48},
	{20, 0.58, 0.6, 0.62, 0.64},
	{25, 0.76, 0.77, 0.78, 0.81},
	{30, 0.95, 0.94, 0.95, 0.98},
	{35, 1.17, 1.12, 1.12, 1.15},
	{40, 1.41, 1.3, 1.29, 1.32},
	{45, 1.68, 1.5, 1.47, 1.49},
	{50, 2, 1.71, 1.65, 1.66},
	{60, 2.82, 2.17, 2.02, 2.01},
	{70, 4.05, 2.68, 2.42, 2.37},
	{80, 0, 3.26, 2.84, 2.74},
	{90, 0, 3.94, 3.28, 3.11},
	{100, 0, 4.77, 3.75, 3.49},
	{110, 0, 5.79, 4.25, 3.88},
	{120, 0, 7.07, 4.78, 4.28},
	{130, 0, 0, 5.35, 4.69},
	{140, 0, 0, 5.97, 5.1},
	{150, 0, 0, 6.64, 5.52},
	{160, 0, 0, 7.37, 5.95},
	{170, 0, 0, 8.16, 6.39},
	{180, 0, 0, 9.03, 6.84},
	{190, 0, 0, 10, 7.3},
	{200, 0, 0, 11.1, 7.76},
	{210, 0, 0, 12.3, 8.24},
	{220, 0, 0, 13.7, 8.73},
	{230, 0, 0, 15.3, 9.24},
	{240, 0, 0, 0, 9.76},
	{250, 0, 0, 0, 10.3},
	{300, 0, 0, 0, 13.3},
}

var sparkDiameters = [...]quantity.Length{2.5 * centimetre, 5 * centimetre, 10 * centimetre, 25 * centimetre}

var sparkGaps = func() (c [len(sparkDiameters)]*table.Column[quantity.Length, quantity.Voltage]) {
	for i, d := range sparkDiameters {
		var rows [][]float64
		for _, r := range sparkRows {
			if r[i+1] > 0 {
				rows = append(rows, []float64{r[i+1], r[0]})
			}
		}
		source := gap.Source{Text: "AIEE spark-gap table, spheres of " + quantity.Text(d), Mark: gap.Read}
		c[i] = table.Of(source, "gap", rows, 1, centimetre, kilovolt)
	}
	return c
}()

// shortSpark is the gap under which the spheres of the AIEE table are no measure; lastDigit
// is half the last one printed.
const (
	shortSpark quantity.Length = 6.5e-3
	lastDigit  quantity.Length = 0.05e-3
)

// SparkGap is the breakdown voltage between spheres of the AIEE table, in proportion to the
// density where the table does so. Other diameters than 2.5, 5, 10 and 25 cm, gaps outside the
// table and densities outside its multipliers are a lack.
//
// Short gaps are shown and never judge: with spheres of 25 cm the table runs in proportion to the
// voltage to 20 kV, 31 kV/cm throughout, and its other columns do from 5 to 10 kV, while
// what was measured rises to 47 kV/cm at 1 mm (IEC 60052, spheres of 2 cm; 43.45 kV/cm by the
// law of uniform fields). At 1.6 mm that is 5 kV against 6.2 kV, of which the last digit
// explains 3 %.
func SparkGap(s State, diameter, d quantity.Length) (table.Reading[quantity.Voltage], error) {
	density := s.density25()
	if !quantity.AtLeast(density, thinnest) || !quantity.AtMost(density, densest) {
		return table.Reading[quantity.Voltage]{}, lack.Range("the AIEE spark-gap table holds for densities of %.2f to %.2f, asked for %.3g", float64(thinnest), float64(densest), float64(density))
	}
	for i, known := range sparkDiameters {
		if math.Abs(float64(diameter/known)-1) > 1e-3 {
			continue
		}
		c := sparkGaps[i]
		if !quantity.AtLeast(d, c.First()) {
			return table.Reading[quantity.Voltage]{}, lack.Range("%s begins at a gap of %s", c.Source().Text, quantity.Text(c.First()))
		}
		r, err := c.At(d)
		r.Value *= quantity.Voltage(density)
		if d < shortSpark {
			r.Source.Text += fmt.Sprintf(" (its last digit is ±%.1f %% of this gap; its short gaps run in proportion to the voltage, below what was measured)", 100*float64(lastDigit/d))
		}
		return r, err
	}
	return table.Reading[quantity.Voltage]{}, lack.Range("the AIEE spark-gap table has no spheres of %s", quantity.Text(diameter))
}
