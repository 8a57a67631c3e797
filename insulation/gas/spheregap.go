package gas

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/table"
)

// sphereGapRows is IEC 60052, one sphere earthed, peak kV of AC, DC and negative
// impulses at 20 °C, 101.3 kPa: gap in cm; diameters of 2, 5, 6.25, 10, 12.5, 15,
// 25 cm. All from memory; AIEE's table, read, agrees within 3 %.
var sphereGapRows = [][]float64{
	{0.05, 2.8, 0, 0, 0, 0, 0, 0},
	{0.1, 4.7, 0, 0, 0, 0, 0, 0},
	{0.15, 6.4, 0, 0, 0, 0, 0, 0},
	{0.2, 8, 8, 0, 0, 0, 0, 0},
	{0.25, 9.6, 9.6, 0, 0, 0, 0, 0},
	{0.3, 11.2, 11.2, 0, 0, 0, 0, 0},
	{0.4, 14.4, 14.3, 14.2, 0, 0, 0, 0},
	{0.5, 17.4, 17.4, 17.2, 16.8, 16.8, 16.8, 0},
	{0.6, 20.4, 20.4, 20.2, 19.9, 19.9, 19.9, 0},
	{0.7, 23.2, 23.4, 23.2, 23, 23, 23, 0},
	{0.8, 25.8, 26.3, 26.2, 26, 26, 26, 0},
	{0.9, 28.3, 29.2, 29.1, 28.9, 28.9, 28.9, 0},
	{1, 30.7, 32, 31.9, 31.7, 31.7, 31.7, 31.7},
	{1.2, 35.1, 37.6, 37.5, 37.4, 37.4, 37.4, 37.4},
	{1.4, 38.5, 42.9, 42.9, 42.9, 42.9, 42.9, 42.9},
	{1.5, 40, 45.5, 45.5, 45.5, 45.5, 45.5, 45.5},
	{1.6, 0, 48.1, 48.1, 48.1, 48.1, 48.1, 48.1},
	{1.8, 0, 53, 53.5, 53.5, 53.5, 53.5, 53.5},
	{2, 0, 57.5, 58.5, 59, 59, 59, 59},
	{2.2, 0, 61.5, 63, 64.5, 64.5, 64.5, 64.5},
	{2.4, 0, 65.5, 67.5, 69.5, 70, 70, 70},
	{2.6, 0, 69, 72, 74.5, 75, 75.5, 75.5},
	{2.8, 0, 72.5, 76, 79.5, 80, 80.5, 81},
	{3, 0, 75.5, 79.5, 84, 85, 85.5, 86},
	{3.5, 0, 82.5, 87.5, 95, 97, 98, 99},
	{4, 0, 88.5, 95, 105, 108, 110, 112},
	{4.5, 0, 0, 101, 115, 119, 122, 125},
	{5, 0, 0, 107, 123, 129, 133, 137},
	{5.5, 0, 0, 0, 131, 138, 143, 149},
	{6, 0, 0, 0, 138, 146, 152, 161},
	{6.5, 0, 0, 0, 144, 154, 161, 173},
	{7, 0, 0, 0, 150, 161, 169, 184},
	{7.5, 0, 0, 0, 155, 168, 177, 195},
	{8, 0, 0, 0, 0, 174, 185, 206},
	{9, 0, 0, 0, 0, 185, 198, 226},
	{10, 0, 0, 0, 0, 195, 209, 244},
	{11, 0, 0, 0, 0, 0, 219, 261},
	{12, 0, 0, 0, 0, 0, 229, 275},
}

var diameters = [...]quantity.Length{2 * centimetre, 5 * centimetre, 6.25 * centimetre, 10 * centimetre, 12.5 * centimetre, 15 * centimetre, 25 * centimetre}

var sphereGaps = func() (c [len(diameters)]*table.Column[quantity.Length, quantity.Voltage]) {
	for i, d := range diameters {
		source := gap.Source{Text: "IEC 60052, spheres of " + quantity.Text(d), Mark: gap.Memory}
		c[i] = table.Of(source, "gap", sphereGapRows, i+1, centimetre, kilovolt)
	}
	return c
}()

// SphereGap is the breakdown voltage of a measuring gap of IEC 60052, one sphere
// earthed, in proportion to the density: within 3 % to half the diameter, 5 % beyond.
// Other diameters than 2, 5, 6.25, 10, 12.5, 15, 25 cm and gaps outside the table are a
// lack.
func SphereGap(s State, diameter, d quantity.Length) (table.Reading[quantity.Voltage], error) {
	for i, known := range diameters {
		if math.Abs(float64(diameter/known)-1) > 1e-3 {
			continue
		}
		c := sphereGaps[i]
		if !quantity.AtLeast(d, c.First()) {
			return table.Reading[quantity.Voltage]{}, lack.Range("%s begins at a gap of %s", c.Source().Text, quantity.Text(c.First()))
		}
		r, err := c.At(d)
		r.Value *= quantity.Voltage(s.Density())
		return r, err
	}
	return table.Reading[quantity.Voltage]{}, lack.Range("IEC 60052 has no spheres of %s", quantity.Text(diameter))
}

// SparkingDistance is the gap at which a measuring gap of IEC 60052 sparks at a voltage,
// SphereGap asked backwards. Voltages under the first row or at the last are a lack.
func SparkingDistance(s State, diameter quantity.Length, v quantity.Voltage) (quantity.Length, gap.Source, error) {
	for i, known := range diameters {
		if math.Abs(float64(diameter/known)-1) > 1e-3 {
			continue
		}
		c := sphereGaps[i]
		d, err := c.Reach(v / quantity.Voltage(s.Density()))
		if err == nil && quantity.AtLeast(d, c.Last()) {
			err = lack.Range("%s ends under %s", c.Source().Text, quantity.Text(v))
		}
		return d, c.Source(), err
	}
	return 0, gap.Source{}, lack.Range("IEC 60052 has no spheres of %s", quantity.Text(diameter))
}

// MeasuringSpheres are the diameters that IEC 60052 has here.
func MeasuringSpheres() []quantity.Length { return append([]quantity.Length(nil), diameters[:]...) }
