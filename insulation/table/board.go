package table

import (
	"fmt"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

// boardRows is IPC-2221 (A and B) Table 6-1: DC or peak voltage in V, upper end of
// each band; mm for B1, B2, B3, B4, A5, A6, A7. The row of 500 V is from memory.
var boardRows = [][]float64{
	{15, 0.05, 0.1, 0.1, 0.05, 0.13, 0.13, 0.13},
	{30, 0.05, 0.1, 0.1, 0.05, 0.13, 0.25, 0.13},
	{50, 0.1, 0.6, 0.6, 0.13, 0.13, 0.4, 0.13},
	{100, 0.1, 0.6, 1.5, 0.13, 0.13, 0.5, 0.13},
	{150, 0.2, 0.6, 3.2, 0.4, 0.4, 0.8, 0.4},
	{170, 0.2, 1.25, 3.2, 0.4, 0.4, 0.8, 0.4},
	{250, 0.2, 1.25, 6.4, 0.4, 0.4, 0.8, 0.4},
	{300, 0.2, 1.25, 12.5, 0.4, 0.4, 0.8, 0.8},
	{500, 0.25, 2.5, 12.5, 0.8, 0.8, 1.5, 0.8},
}

// boardRates are what a volt above 500 V adds, mm, in the same order (read in
// IPC-D-275, assigned to the columns from memory).
var boardRates = [...]quantity.Length{
	0.0025 * millimetre, 0.005 * millimetre, 0.025 * millimetre, 0.00305 * millimetre,
	0.00305 * millimetre, 0.00305 * millimetre, 0.00305 * millimetre,
}

var boardNames = [...]string{"B1", "B2", "B3", "B4", "A5", "A6", "A7"}

var boards = func() (c [len(boardNames)]*Column[quantity.Voltage, quantity.Length]) {
	for i, name := range boardNames {
		source := gap.Source{Text: "IPC-2221 Table 6-1, column " + name, Mark: gap.Read}
		c[i] = Of(source, "peak voltage", boardRows, i+1, volt, millimetre)
		for range boardRows {
			c[i].marks = append(c[i].marks, gap.Read)
		}
		c[i].marks[len(boardRows)-1] = gap.Memory // the row of 500 V
	}
	return c
}()

// thinAir is the altitude above which external bare conductors take column B3.
const thinAir quantity.Length = 3050

// BoardSpacing is the spacing of conductors on a printed board for a DC or peak
// voltage: the bands of IPC-2221 Table 6-1 and its rate per volt above 500 V.
func BoardSpacing(peak quantity.Voltage, where gap.Board, altitude quantity.Length) (Reading[quantity.Length], error) {
	k, err := boardColumn(where, altitude)
	if err != nil {
		return Reading[quantity.Length]{}, err
	}
	c := boards[k]
	last := c.Last()
	if quantity.AtMost(peak, last) {
		return c.Step(peak)
	}
	r := c.cell(len(c.at) - 1)
	r.Value += boardRates[k] * quantity.Length(peak-last)
	r.Rows = fmt.Sprintf("row 500 V and %s for each volt above", quantity.Text(boardRates[k]))
	r.Source.Mark = gap.Memory
	return r, nil
}

func boardColumn(where gap.Board, altitude quantity.Length) (int, error) {
	switch where {
	case gap.Internal:
		return 0, nil
	case gap.ExternalUncoated, "":
		if quantity.AtMost(altitude, thinAir) {
			return 1, nil
		}
		return 2, nil
	case gap.PolymerCoated:
		return 3, nil
	case gap.ConformalCoated:
		return 4, nil
	case gap.TerminationBare:
		return 5, nil
	case gap.TerminationCoat:
		return 6, nil
	}
	return 0, lack.Range("IPC-2221 has no column for %q", string(where))
}

// ConverterSpacing is the spacing IPC-9592 asks for in power conversion, 0.6 mm and
// 0.005 mm for each volt of peak, read on a trade page; shown for comparison.
func ConverterSpacing(peak quantity.Voltage) Reading[quantity.Length] {
	return Reading[quantity.Length]{
		Value:  0.6*millimetre + 0.005*millimetre*quantity.Length(peak),
		Rows:   "0.6 mm and 0.005 mm per volt",
		Source: gap.Source{Text: "IPC-9592", Mark: gap.Read},
	}
}
