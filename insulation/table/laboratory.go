package table

import (
	"fmt"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

// thirdRows is IEC 61010-1:2010 Table K.11, secondary circuits behind a mains of
// overvoltage category III: working voltage r.m.s. V, DC or peak V; then clearance in
// mm and AC test voltage in V for mains to 150, 300, 600, 1000 V. The copy ends in
// the row of 8 kV; later rows were not found. 47.3 V beside 33 V is as printed.
var thirdRows = [][]float64{
	{16, 22.6, 0.48, 1100, 1.5, 1800, 2.9, 2820, 5.4, 4240},
	{33, 47.3, 0.5, 1100, 1.5, 1800, 3, 2900, 5.4, 4240},
	{50, 70, 0.53, 1120, 1.5, 1800, 3, 2900, 5.5, 4300},
	{100, 140, 0.61, 1170, 1.6, 1880, 3.1, 2960, 5.6, 4360},
	{150, 210, 0.69, 1200, 1.6, 1880, 3.2, 3020, 5.7, 4420},
	{300, 420, 0.94, 1360, 1.8, 2040, 3.4, 3140, 6, 4600},
	{600, 840, 1.6, 1880, 2.4, 2440, 3.9, 3440, 6.6, 4860},
	{1000, 1400, 2.5, 2500, 3.5, 3200, 5, 4000, 7.4, 5240},
	{1250, 1750, 3.2, 3020, 4.2, 3620, 5.8, 4480, 8.1, 5560},
	{1600, 2240, 4.1, 3560, 5.2, 4120, 6.9, 5040, 9.3, 6120},
	{2000, 2800, 5.3, 4180, 6.5, 4800, 8.2, 5620, 11, 7000},
	{2500, 3500, 6.9, 5040, 8.1, 5560, 9.8, 6320, 12, 7500},
	{3200, 4480, 9.2, 6080, 10, 6400, 12, 7500, 15, 9100},
	{4000, 5600, 12, 7500, 12, 7500, 15, 9100, 17, 10100},
	{5000, 7000, 15, 9100, 16, 9600, 18, 10600, 20, 11600},
	{6300, 8820, 19, 11200, 20, 11600, 22, 12600, 25, 14100},
	{8000, 11200, 25, 14100, 26, 14600, 28, 15500, 31, 16900},
}

// fourthRows is Table K.12, the same for category IV; four scan errors of the copy
// were corrected after Table K.11; it ends in the row of 10 kV.
var fourthRows = [][]float64{
	{16, 22.6, 1.5, 1800, 2.9, 2820, 5.4, 4240, 8.3, 5680},
	{33, 47.3, 1.5, 1800, 3, 2900, 5.4, 4240, 8.3, 5680},
	{50, 70, 1.5, 1800, 3, 2900, 5.5, 4300, 8.4, 5740},
	{100, 140, 1.6, 1880, 3.1, 2960, 5.6, 4360, 8.5, 5800},
	{150, 210, 1.6, 1880, 3.2, 3020, 5.7, 4420, 8.6, 5860},
	{300, 420, 1.8, 2040, 3.4, 3140, 6, 4600, 8.9, 5960},
	{600, 840, 2.4, 2440, 3.9, 3440, 6.6, 4860, 9.6, 6240},
	{1000, 1400, 3.5, 3200, 5, 4000, 7.4, 5240, 10, 6400},
	{1250, 1750, 4.2, 3620, 5.8, 4480, 8.1, 5560, 11, 7000},
	{1600, 2240, 5.2, 4120, 6.9, 5040, 9.3, 6120, 12, 7500},
	{2000, 2800, 6.5, 4800, 8.2, 5620, 11, 7000, 13, 8100},
	{2500, 3500, 8.1, 5560, 9.8, 6320, 12, 7500, 15, 9100},
	{3200, 4480, 10, 6400, 12, 7500, 15, 9100, 17, 10100},
	{4000, 5600, 12, 7500, 15, 9100, 17, 10100, 19, 11200},
	{5000, 7000, 16, 9600, 18, 10600, 20, 11600, 23, 13100},
	{6300, 8820, 20, 11600, 22, 12600, 25, 14100, 27, 15100},
	{8000, 11200, 26, 14600, 28, 15500, 31, 16900, 33, 17800},
	{10000, 14000, 33, 17800, 35, 18700, 0, 0, 0, 0},
}

// pairRows are the pairs of clearance in mm and AC test voltage in V r.m.s. that
// Tables K.11 and K.12 hold.
var pairRows = [][]float64{
	{0.48, 1100},
	{0.5, 1100},
	{0.53, 1120},
	{0.61, 1170},
	{0.69, 1200},
	{0.94, 1360},
	{1.5, 1800},
	{1.6, 1880},
	{1.8, 2040},
	{2.4, 2440},
	{2.5, 2500},
	{2.9, 2820},
	{3, 2900},
	{3.1, 2960},
	{3.2, 3020},
	{3.4, 3140},
	{3.5, 3200},
	{3.9, 3440},
	{4.1, 3560},
	{4.2, 3620},
	{5, 4000},
	{5.2, 4120},
	{5.3, 4180},
	{5.4, 4240},
	{5.5, 4300},
	{5.6, 4360},
	{5.7, 4420},
	{5.8, 4480},
	{6, 4600},
	{6.5, 4800},
	{6.6, 4860},
	{6.9, 5040},
	{7.4, 5240},
	{8.1, 5560},
	{8.2, 5620},
	{8.3, 5680},
	{8.4, 5740},
	{8.5, 5800},
	{8.6, 5860},
	{8.9, 5960},
	{9.2, 6080},
	{9.3, 6120},
	{9.6, 6240},
	{9.8, 6320},
	{10, 6400},
	{11, 7000},
	{12, 7500},
	{13, 8100},
	{15, 9100},
	{16, 9600},
	{17, 10100},
	{18, 10600},
	{19, 11200},
	{20, 11600},
	{22, 12600},
	{23, 13100},
	{25, 14100},
	{26, 14600},
	{27, 15100},
	{28, 15500},
	{31, 16900},
	{33, 17800},
	{35, 18700},
}

// mainsBands are the line-to-neutral voltages of the columns of K.11 and K.12.
var mainsBands = [4]quantity.Voltage{150, 300, 600, 1000}

var secondary = [2][4]*Column[quantity.Voltage, quantity.Length]{
	secondaryTable("K.11", thirdRows), secondaryTable("K.12", fourthRows),
}

func secondaryTable(name string, rows [][]float64) (c [4]*Column[quantity.Voltage, quantity.Length]) {
	byPeak := make([][]float64, len(rows))
	for i, row := range rows {
		byPeak[i] = row[1:]
	}
	for i, band := range mainsBands {
		source := laboratory(fmt.Sprintf("Table %s, mains to %s", name, quantity.Text(band)))
		c[i] = Of(source, "peak voltage", byPeak, 1+2*i, volt, millimetre)
	}
	return c
}

func laboratory(clause string) gap.Source {
	return gap.Source{Text: "IEC 61010-1:2010 " + clause, Mark: gap.Read}
}

// SecondaryClearance is the clearance of a secondary circuit behind a mains of
// category 3 or 4, by its DC or peak working voltage, without interpolation. The
// tables of the other categories were not read and give a lack.
func SecondaryClearance(peak, lineToNeutral quantity.Voltage, category int) (Reading[quantity.Length], error) {
	var none Reading[quantity.Length]
	if category != 3 && category != 4 {
		return none, lack.Range("the tables of IEC 61010-1 for secondary circuits were read for overvoltage categories 3 and 4 only")
	}
	for i, band := range mainsBands {
		if quantity.AtMost(lineToNeutral, band) {
			return secondary[category-3][i].Step(peak)
		}
	}
	return none, lack.Range("IEC 61010-1 Tables K.11, K.12 end at a mains of 1000 V, asked for %s", quantity.Text(lineToNeutral))
}

// SecondaryAtMost is what IEC 61010-1 asks for at most in a secondary circuit behind a mains
// of category 1 or 2, whose tables were not read: what Table K.11 asks for at a mains of the
// same rated impulse, or the next larger. Where K.11 and K.12 have a rated impulse in common
// they have the same distances (derived).
func SecondaryAtMost(peak, lineToNeutral quantity.Voltage, category int) (Reading[quantity.Length], error) {
	impulse, err := RatedImpulse(lineToNeutral, category)
	if err != nil {
		return Reading[quantity.Length]{}, err
	}
	for i, band := range mainsBands {
		third, err := RatedImpulse(band, 3)
		if err != nil {
			return Reading[quantity.Length]{}, err
		}
		if quantity.AtLeast(third.Value, impulse.Value) {
			r, err := secondary[0][i].Step(peak)
			r.Source.Mark = gap.Derived
			return r, err
		}
	}
	return Reading[quantity.Length]{}, lack.Range("IEC 61010-1 Table K.11 ends at an impulse of 8 kV, asked for %s", quantity.Text(impulse.Value))
}

var testPairs = Of(laboratory("Tables K.11, K.12, pairs of clearance and test"), "clearance", pairRows, 1, millimetre, volt)

// TestVoltage is the AC r.m.s. voltage, 50 or 60 Hz for at least 5 s, with which a
// clearance is tested, without altitude correction; between rows that of the larger.
func TestVoltage(clearance quantity.Length) (Reading[quantity.Voltage], error) {
	return testPairs.Step(clearance)
}

// CombinedClearance is the clearance of IEC 61010-1 K.3 for a circuit with a working
// peak and transients on it: D1 + F (D2 − D1), D1 for impulses and D2 for steady
// voltage, both at the sum. Table K.15 was not read: D1 and D2 come from IEC 60664-1
// Tables F.2 and F.8, case A, which is an assumption; F is from memory.
func CombinedClearance(working, transient quantity.Voltage) (Reading[quantity.Length], error) {
	sum := working + transient
	d1, err := impulse[CaseA][0].At(sum)
	if err != nil {
		return d1, err
	}
	d2, err := steady[CaseA].At(sum)
	if err != nil {
		return d2, err
	}
	part := 0.0
	if share := float64(working / sum); share > 0.2 {
		part = 1.25*share - 0.25 // IEC 61010-1 K.3, memory
	}
	source := laboratory("K.3 with IEC 60664-1 F.2, F.8 in place of Table K.15")
	source.Mark = gap.Memory
	return Reading[quantity.Length]{
		Value:  d1.Value + quantity.Length(part)*(d2.Value-d1.Value),
		Rows:   fmt.Sprintf("at %s with %.2f of the way to the steady value", quantity.Text(sum), part),
		Source: source,
	}, nil
}
