package table

import (
	"fmt"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

// Case is the field a clearance is dimensioned for (IEC 60664-1).
type Case int

const (
	// CaseA: inhomogeneous, a point of 30 µm radius against a plane; holds for any
	// electrodes and asks for no test.
	CaseA Case = iota
	// CaseB: homogeneous, spheres of a radius larger than the gap; only with an
	// impulse voltage test.
	CaseB
)

// String is how the standard calls the case.
func (c Case) String() string {
	if c == CaseB {
		return "case B"
	}
	return "case A"
}

const (
	kilovolt   quantity.Voltage = 1e3
	volt       quantity.Voltage = 1
	millimetre quantity.Length  = 1e-3
	metre      quantity.Length  = 1
)

// impulseRows is IEC 60664-1:2020 Table F.2 (the same numbers in 2007): withstand
// voltage 1.2/50 in kV; mm for case A at pollution degrees 1, 2, 3, then case B.
// Up to 2000 m. One copy prints 0.25 for case A, degree 2 at 1.0 kV, a shifted cell;
// 0.2 is used.
var impulseRows = [][]float64{
	{0.33, 0.01, 0.2, 0.8, 0.01, 0.2, 0.8},
	{0.4, 0.02, 0.2, 0.8, 0.02, 0.2, 0.8},
	{0.5, 0.04, 0.2, 0.8, 0.04, 0.2, 0.8},
	{0.6, 0.06, 0.2, 0.8, 0.06, 0.2, 0.8},
	{0.8, 0.1, 0.2, 0.8, 0.1, 0.2, 0.8},
	{1, 0.15, 0.2, 0.8, 0.15, 0.2, 0.8},
	{1.2, 0.25, 0.25, 0.8, 0.2, 0.2, 0.8},
	{1.5, 0.5, 0.5, 0.8, 0.3, 0.3, 0.8},
	{2, 1, 1, 1, 0.45, 0.45, 0.8},
	{2.5, 1.5, 1.5, 1.5, 0.6, 0.6, 0.8},
	{3, 2, 2, 2, 0.8, 0.8, 0.8},
	{4, 3, 3, 3, 1.2, 1.2, 1.2},
	{5, 4, 4, 4, 1.5, 1.5, 1.5},
	{6, 5.5, 5.5, 5.5, 2, 2, 2},
	{8, 8, 8, 8, 3, 3, 3},
	{10, 11, 11, 11, 3.5, 3.5, 3.5},
	{12, 14, 14, 14, 4.5, 4.5, 4.5},
	{15, 18, 18, 18, 5.5, 5.5, 5.5},
	{20, 25, 25, 25, 8, 8, 8},
	{25, 33, 33, 33, 10, 10, 10},
	{30, 40, 40, 40, 12.5, 12.5, 12.5},
	{40, 60, 60, 60, 17, 17, 17},
	{50, 75, 75, 75, 22, 22, 22},
	{60, 90, 90, 90, 27, 27, 27},
	{80, 130, 130, 130, 35, 35, 35},
	{100, 170, 170, 170, 45, 45, 45},
}

// steadyRows is IEC 60664-1:2020 Table F.8 (2007: F.7a): peak kV of the steady,
// temporary or recurring voltage; mm for case A, case B. Case A ends at 50 kV.
var steadyRows = [][]float64{
	{0.04, 0.001, 0.001},
	{0.06, 0.002, 0.002},
	{0.1, 0.003, 0.003},
	{0.12, 0.004, 0.004},
	{0.15, 0.005, 0.005},
	{0.2, 0.006, 0.006},
	{0.25, 0.008, 0.008},
	{0.33, 0.01, 0.01},
	{0.4, 0.02, 0.02},
	{0.5, 0.04, 0.04},
	{0.6, 0.06, 0.06},
	{0.8, 0.13, 0.1},
	{1, 0.26, 0.15},
	{1.2, 0.42, 0.2},
	{1.5, 0.76, 0.3},
	{2, 1.27, 0.45},
	{2.5, 1.8, 0.6},
	{3, 2.4, 0.8},
	{4, 3.8, 1.2},
	{5, 5.7, 1.5},
	{6, 7.9, 2},
	{8, 11, 3},
	{10, 15.2, 3.5},
	{12, 19, 4.5},
	{15, 25, 5.5},
	{20, 34, 8},
	{25, 44, 10},
	{30, 55, 12.5},
	{40, 77, 17},
	{50, 100, 22},
	{60, 0, 27},
	{80, 0, 35},
	{100, 0, 45},
}

// dischargeFreeRows is IEC 60664-1:2020 Table F.9 (2007: F.7b): peak kV, mm, case A.
var dischargeFreeRows = [][]float64{
	{2.5, 2},
	{3, 3.2},
	{4, 11},
	{5, 24},
	{6, 64},
	{8, 184},
	{10, 290},
	{12, 320},
}

func printed(table string) gap.Source {
	return gap.Source{Text: "IEC 60664-1:2020 Table " + table, Mark: gap.Read}
}

var impulse = [2][3]*Column[quantity.Voltage, quantity.Length]{
	{impulseColumn(CaseA, 1), impulseColumn(CaseA, 2), impulseColumn(CaseA, 3)},
	{impulseColumn(CaseB, 1), impulseColumn(CaseB, 2), impulseColumn(CaseB, 3)},
}

func impulseColumn(c Case, degree int) *Column[quantity.Voltage, quantity.Length] {
	source := printed(fmt.Sprintf("F.2, %s, pollution degree %d", c, degree))
	return Of(source, "impulse voltage", impulseRows, 3*int(c)+degree, kilovolt, millimetre)
}

// ImpulseClearance is the column of Table F.2 for a case and a pollution degree of
// 1 to 3; degree 4 takes that of 3 with the floor of PollutionFloor.
func ImpulseClearance(c Case, degree int) (*Column[quantity.Voltage, quantity.Length], error) {
	if err := checkDegree(degree); err != nil {
		return nil, err
	}
	return impulse[c][min(degree, 3)-1], nil
}

var steady = [2]*Column[quantity.Voltage, quantity.Length]{
	Of(printed("F.8, case A"), "peak voltage", steadyRows, 1, kilovolt, millimetre),
	Of(printed("F.8, case B"), "peak voltage", steadyRows, 2, kilovolt, millimetre),
}

// SteadyClearance is the column of Table F.8 for steady, temporary and recurring
// peak voltages. Case A ends at 50 kV, case B at 100 kV. Interpolation in it is
// allowed (memory).
func SteadyClearance(c Case) *Column[quantity.Voltage, quantity.Length] { return steady[c] }

var dischargeFree = Of(printed("F.9, case A"), "peak voltage", dischargeFreeRows, 1, kilovolt, millimetre)

// DischargeFreeClearance is the case A clearance at which partial discharge is
// avoided (Table F.9): up to 2 kV peak that of Table F.8, nothing past 12 kV. It
// shows that sharp electrodes are not made free of discharge by distance.
func DischargeFreeClearance(peak quantity.Voltage) (Reading[quantity.Length], error) {
	if quantity.AtMost(peak, 2*kilovolt) { // Table F.9, note
		return steady[CaseA].At(peak)
	}
	return dischargeFree.At(peak)
}

// PollutionFloor is the least clearance at a pollution degree: 0.2, 0.8 and 1.6 mm
// at 2, 3 and 4 (IEC 60664-1 Table F.2, footnotes; degree 4 from memory), none at 1.
// Printed wiring at degree 2 takes 0.04 mm.
func PollutionFloor(degree int, printedWiring bool) (Reading[quantity.Length], error) {
	if err := checkDegree(degree); err != nil {
		return Reading[quantity.Length]{}, err
	}
	floor := [4]quantity.Length{0, 0.2 * millimetre, 0.8 * millimetre, 1.6 * millimetre}[degree-1]
	source := printed("F.2, footnotes")
	switch {
	case degree == 4:
		source.Mark = gap.Memory
	case degree == 2 && printedWiring:
		floor = 0.04 * millimetre
	}
	rows := fmt.Sprintf("floor of pollution degree %d", degree)
	return Reading[quantity.Length]{Value: floor, Rows: rows, Source: source}, nil
}

func checkDegree(degree int) error {
	switch {
	case degree == 0:
		return lack.Key("site.pollution_degree")
	case degree < 1 || degree > 4:
		return lack.Range("IEC 60664-1 knows pollution degrees 1 to 4, not %d", degree)
	}
	return nil
}
