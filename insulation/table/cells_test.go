package table_test

import (
	"math"
	"strconv"
	"strings"
	"testing"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/table"
)

// cells reads a printed table.
func cells(t *testing.T, text string) [][]float64 {
	t.Helper()
	var rows [][]float64
	for line := range strings.Lines(strings.TrimSpace(text)) {
		var row []float64
		for _, word := range strings.Fields(line) {
			v, err := strconv.ParseFloat(word, 64)
			if err != nil {
				t.Fatalf("printed row %q: %v", line, err)
			}
			row = append(row, v)
		}
		rows = append(rows, row)
	}
	return rows
}

func mm(v float64) quantity.Length  { return quantity.Length(v * 1e-3) }
func kV(v float64) quantity.Voltage { return quantity.Voltage(v * 1e3) }

// sameCell compares a reading with a printed cell.
func sameCell[Q quantity.Number](t *testing.T, what string, row []float64, k int, got table.Reading[Q], err error, want Q) {
	t.Helper()
	if math.IsNaN(float64(want)) {
		if err == nil {
			t.Errorf("%s row %g column %d: %v, the printed cell is blank", what, row[0], k, got.Value)
		}
		return
	}
	if err != nil || !quantity.Equal(got.Value, want) {
		t.Errorf("%s row %g column %d: %v (%v), printed %v", what, row[0], k, got.Value, err, want)
	}
}

func TestCellsOfF1(t *testing.T) {
	for _, row := range cells(t, printedF1) {
		for category := 1; category <= 4; category++ {
			got, err := table.RatedImpulse(quantity.Voltage(row[0]), category)
			sameCell(t, "F.1", row, category, got, err, quantity.Voltage(row[category]))
		}
	}
}

func TestCellsOfF2(t *testing.T) {
	for _, row := range cells(t, printedF2) {
		for k := 1; k <= 6; k++ {
			c, err := table.ImpulseClearance(table.Case((k-1)/3), (k-1)%3+1)
			if err != nil {
				t.Fatal(err)
			}
			got, err := c.At(kV(row[0]))
			sameCell(t, "F.2", row, k, got, err, mm(row[k]))
		}
	}
}

func TestF2ColumnsAreDegree1WithTheFloors(t *testing.T) {
	for _, row := range cells(t, printedF2) {
		for _, first := range []int{1, 4} {
			for degree := 2; degree <= 3; degree++ {
				floor, err := table.PollutionFloor(degree, false)
				if want := math.Max(row[first], float64(floor.Value)*1e3); err != nil || math.Abs(row[first+degree-1]-want) > 1e-12 {
					t.Errorf("row %g kV, degree %d: printed %g, degree 1 and floor give %g (%v)", row[0], degree, row[first+degree-1], want, err)
				}
			}
		}
	}
}

func TestCellsOfF8(t *testing.T) {
	for _, row := range cells(t, printedF8) {
		for k, c := range []table.Case{table.CaseA, table.CaseB} {
			got, err := table.SteadyClearance(c).At(kV(row[0]))
			sameCell(t, "F.8", row, k+1, got, err, mm(row[k+1]))
		}
	}
}

func TestCellsOfF9(t *testing.T) {
	for _, row := range cells(t, printedF9) {
		got, err := table.DischargeFreeClearance(kV(row[0]))
		sameCell(t, "F.9", row, 1, got, err, mm(row[1]))
	}
	got, err := table.DischargeFreeClearance(2e3)
	sameCell(t, "F.9 at 2 kV is F.8", []float64{2}, 1, got, err, mm(1.27))
}

func TestCellsOfA2(t *testing.T) {
	for _, row := range cells(t, printedA2) {
		want := quantity.Fraction(math.Max(1, row[2])) // no reduction below 2000 m
		got, err := table.AltitudeFactor(quantity.Length(row[0]))
		sameCell(t, "A.2", row, 2, got, err, want)
	}
}

// Every factor of Table A.2 equals 80 kPa over the pressure to the printed digits;
// the printed pressures have two or three digits.
func TestA2IsEightyKilopascalsOverPressure(t *testing.T) {
	for _, row := range cells(t, printedA2) {
		if math.IsNaN(row[1]) || row[0] < 2000 {
			continue
		}
		got, err := table.PressureFactor(quantity.Pressure(row[1] * 1e3))
		if err != nil || math.Abs(float64(got.Value)/row[2]-1) > 0.005 {
			t.Errorf("%g m, %g kPa: %v (%v), printed %g", row[0], row[1], got.Value, err, row[2])
		}
	}
}

func TestCellsOfF5(t *testing.T) {
	surfaces := []table.Surface{
		{Degree: 1, Group: table.GroupI, PrintedWiring: true}, {Degree: 2, Group: table.GroupIIIa, PrintedWiring: true},
		{Degree: 1, Group: table.GroupIIIb},
		{Degree: 2, Group: table.GroupI}, {Degree: 2, Group: table.GroupII}, {Degree: 2, Group: table.GroupIIIb},
		{Degree: 3, Group: table.GroupI}, {Degree: 3, Group: table.GroupII}, {Degree: 3, Group: table.GroupIIIa},
	}
	for _, row := range cells(t, printedF5) {
		for k, s := range surfaces {
			if math.IsNaN(row[k+1]) { // past 1000 V printed wiring takes the plain columns
				s.PrintedWiring = false
				row[k+1] = row[3+map[int]int{1: 0, 2: 3}[s.Degree]]
			}
			got, err := table.Creepage(quantity.Voltage(row[0]), s)
			sameCell(t, "F.5", row, k+1, got, err, mm(row[k+1]))
		}
	}
}

func TestCellsOfF5WithRib(t *testing.T) {
	for _, row := range cells(t, printedRibs) {
		for k := 1; k <= 3; k++ {
			s := table.Surface{Degree: 3, Group: table.Group(k), Ribbed: true}
			got, err := table.Creepage(quantity.Voltage(row[0]), s)
			if math.IsNaN(row[k]) { // no bracket: the plain value
				s.Ribbed = false
				plain, _ := table.Creepage(quantity.Voltage(row[0]), s)
				row[k] = float64(plain.Value) * 1e3
			}
			sameCell(t, "F.5 with rib", row, k, got, err, mm(row[k]))
		}
	}
}

func TestCellsOfK11AndK12(t *testing.T) {
	for i, text := range []string{printedK11, printedK12} {
		for _, row := range cells(t, text) {
			for k, mains := range []quantity.Voltage{150, 300, 600, 1000} {
				got, err := table.SecondaryClearance(quantity.Voltage(row[1]), mains, 3+i)
				sameCell(t, "K.11/K.12", row, k, got, err, mm(row[2+2*k]))
			}
		}
	}
}

func TestEveryClearanceOfK11AndK12HasItsTestVoltage(t *testing.T) {
	for _, row := range cells(t, printedPairs) {
		got, err := table.TestVoltage(mm(row[0]))
		sameCell(t, "pairs", row, 1, got, err, quantity.Voltage(row[1]))
	}
	for _, text := range []string{printedK11, printedK12} {
		for _, row := range cells(t, text) {
			for k := 2; k+1 < len(row); k += 2 {
				if math.IsNaN(row[k]) {
					continue
				}
				got, err := table.TestVoltage(mm(row[k]))
				sameCell(t, "K.11/K.12 test", row, k+1, got, err, quantity.Voltage(row[k+1]))
			}
		}
	}
}

func TestCellsOfIPC2221(t *testing.T) {
	where := []gap.Board{gap.Internal, gap.ExternalUncoated, gap.ExternalUncoated, gap.PolymerCoated,
		gap.ConformalCoated, gap.TerminationBare, gap.TerminationCoat}
	altitude := []quantity.Length{0, 3050, 3051, 0, 0, 0, 0}
	for _, row := range cells(t, printedIPC) {
		for k, w := range where {
			got, err := table.BoardSpacing(quantity.Voltage(row[0]), w, altitude[k])
			sameCell(t, "IPC-2221", row, k+1, got, err, mm(row[k+1]))
			if memory := got.Source.Mark == gap.Memory; memory != (row[len(row)-1] == 0) {
				t.Errorf("IPC-2221 row %g V is marked %q", row[0], got.Source.Mark)
			}
		}
	}
}

// The last row of every table is its end: past it there is a lack of kind outside.
func TestNothingIsReadPastTheLastRow(t *testing.T) {
	past := map[string]func() error{
		"F.1": func() error { _, err := table.RatedImpulse(1501, 2); return err },
		"F.2": func() error {
			c, _ := table.ImpulseClearance(table.CaseA, 2)
			_, err := c.At(100.01e3)
			return err
		},
		"F.8 A": func() error { _, err := table.SteadyClearance(table.CaseA).At(50.01e3); return err },
		"F.8 B": func() error { _, err := table.SteadyClearance(table.CaseB).At(100.01e3); return err },
		"F.9":   func() error { _, err := table.DischargeFreeClearance(12.01e3); return err },
		"A.2":   func() error { _, err := table.AltitudeFactor(20001); return err },
		"A.2 p": func() error { _, err := table.PressureFactor(5.4e3); return err },
		"F.5": func() error {
			_, err := table.Creepage(63.1e3, table.Surface{Degree: 2, Group: table.GroupI})
			return err
		},
		"F.5 degree 4": func() error {
			_, err := table.Creepage(10.1e3, table.Surface{Degree: 4, Group: table.GroupI})
			return err
		},
		"K.11":       func() error { _, err := table.SecondaryClearance(11.3e3, 150, 3); return err },
		"K.12":       func() error { _, err := table.SecondaryClearance(11.3e3, 600, 4); return err },
		"K.11 mains": func() error { _, err := table.SecondaryClearance(1e3, 1001, 3); return err },
		"pairs":      func() error { _, err := table.TestVoltage(35.1e-3); return err },
	}
	for name, read := range past {
		if l := lack.Of(read()); l == nil || l.Kind != lack.Outside {
			t.Errorf("%s: past the last row %v, want a lack outside", name, l)
		}
	}
}
