package touch

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// The two rules of the curve and where one gives way to the other; they differ by 3.6 %
// there.
const (
	curveCharge  quantity.Charge  = 45e-6
	curveEnergy  quantity.Energy  = 350e-3
	curveTurn    quantity.Voltage = 15e3
	curveHighest quantity.Voltage = 100e3
)

// PermissibleCapacitance is line A of the figure of IEC 61010-1 6.3.1 c), the largest
// capacitance within reach at a voltage in normal condition: 45 µC up to 15 kV (read in a
// quotation), 350 mJ above (read in IEC 60335-1 8.1.4). For information: it knows neither
// the voltage below which any capacitance may be touched, nor a fault, whose line B was
// not found. A lack at zero and above 100 kV.
func PermissibleCapacitance(u quantity.Voltage) (quantity.Capacitance, error) {
	switch {
	case !positive(u) || !quantity.AtMost(u, curveHighest):
		return 0, lack.Range("the curve of permissible capacitance ends at 0 V and 100 kV, short of %s", quantity.Text(u))
	case quantity.AtMost(u, curveTurn):
		return quantity.Capacitance(float64(curveCharge) / float64(u)), nil
	}
	return quantity.Capacitance(2 * float64(curveEnergy) / (float64(u) * float64(u))), nil
}

// comparison is IEC 62368-1 Table 5 (read in a technical digest): capacitance in nF with
// its tolerance; peak voltage that may be touched, and in a single fault.
var comparison = [][]float64{
	{0.133, 25000, 50000}, {0.2, 20000, 40000}, {0.4, 10000, 20000}, {0.8, 5000, 10000}, {1.6, 2500, 5000},
	{4, 1000, 2000}, {8, 500, 1000}, {12, 350, 700}, {18, 250, 500}, {28, 200, 400},
	{41, 150, 300}, {61, 125, 250}, {91, 100, 200}, {170, 75, 150}, {300, 60, 120},
}

// ComparisonVoltage is the stricter line of equipment of other scope, IEC 62368-1 Table
// 5: the peak voltage at which a capacitance may be touched in normal condition and in a
// single fault, between rows linear as the standard allows. The first row holds for less
// capacitance and the last for more.
func ComparisonVoltage(c quantity.Capacitance) (normal, fault quantity.Voltage, err error) {
	if !notNegative(c) {
		return 0, 0, lack.Range("no capacitance: %s", quantity.Text(c))
	}
	nano := min(max(float64(c)*1e9, comparison[0][0]), comparison[len(comparison)-1][0])
	return quantity.Voltage(between(comparison, 1, nano)), quantity.Voltage(between(comparison, 2, nano)), nil
}

// between interpolates a column linearly in the first one; x must not leave the rows.
func between(rows [][]float64, column int, x float64) float64 {
	i := 1
	for i < len(rows)-1 && x > rows[i][0] {
		i++
	}
	low, high := rows[i-1], rows[i]
	return low[column] + (x-low[0])/(high[0]-low[0])*(high[column]-low[column])
}
