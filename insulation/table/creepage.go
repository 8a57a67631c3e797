package table

import (
	"fmt"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

// creepageRows is IEC 60664-1:2020 Table F.5 (2007: F.4): long-term r.m.s. or DC
// voltage in V; mm for printed wiring at degrees 1 and 2 (to 1000 V), degree 1,
// degree 2 with material group I, II, III, degree 3 with I, II, III. Read in two or
// more copies to 10 kV and in one above; the cells from memory or disputed are named
// in creepageMark.
var creepageRows = [][]float64{
	{10, 0.025, 0.04, 0.08, 0.4, 0.4, 0.4, 1, 1, 1},
	{12.5, 0.025, 0.04, 0.09, 0.42, 0.42, 0.42, 1.05, 1.05, 1.05},
	{16, 0.025, 0.04, 0.1, 0.45, 0.45, 0.45, 1.1, 1.1, 1.1},
	{20, 0.025, 0.04, 0.11, 0.48, 0.48, 0.48, 1.2, 1.2, 1.2},
	{25, 0.025, 0.04, 0.125, 0.5, 0.5, 0.5, 1.25, 1.25, 1.25},
	{32, 0.025, 0.04, 0.14, 0.53, 0.53, 0.53, 1.3, 1.3, 1.3},
	{40, 0.025, 0.04, 0.16, 0.56, 0.8, 1.1, 1.4, 1.6, 1.8},
	{50, 0.025, 0.04, 0.18, 0.6, 0.85, 1.2, 1.5, 1.7, 1.9},
	{63, 0.04, 0.063, 0.2, 0.63, 0.9, 1.25, 1.6, 1.8, 2},
	{80, 0.063, 0.1, 0.22, 0.67, 0.95, 1.3, 1.7, 1.9, 2.1},
	{100, 0.1, 0.16, 0.25, 0.71, 1, 1.4, 1.8, 2, 2.2},
	{125, 0.16, 0.25, 0.28, 0.75, 1.05, 1.5, 1.9, 2.1, 2.4},
	{160, 0.25, 0.4, 0.32, 0.8, 1.1, 1.6, 2, 2.2, 2.5},
	{200, 0.4, 0.63, 0.42, 1, 1.4, 2, 2.5, 2.8, 3.2},
	{250, 0.56, 1, 0.56, 1.25, 1.8, 2.5, 3.2, 3.6, 4},
	{320, 0.75, 1.6, 0.75, 1.6, 2.2, 3.2, 4, 4.5, 5},
	{400, 1, 2, 1, 2, 2.8, 4, 5, 5.6, 6.3},
	{500, 1.3, 2.5, 1.3, 2.5, 3.6, 5, 6.3, 7.1, 8},
	{630, 1.8, 3.2, 1.8, 3.2, 4.5, 6.3, 8, 9, 10},
	{800, 2.4, 4, 2.4, 4, 5.6, 8, 10, 11, 12.5},
	{1000, 3.2, 5, 3.2, 5, 7.1, 10, 12.5, 14, 16},
	{1250, 0, 0, 4.2, 6.3, 9, 12.5, 16, 18, 20},
	{1600, 0, 0, 5.6, 8, 11, 16, 20, 22, 25},
	{2000, 0, 0, 7.5, 10, 14, 20, 25, 28, 32},
	{2500, 0, 0, 10, 12.5, 18, 25, 32, 36, 40},
	{3200, 0, 0, 12.5, 16, 22, 32, 40, 45, 50},
	{4000, 0, 0, 16, 20, 28, 40, 50, 56, 63},
	{5000, 0, 0, 20, 25, 36, 50, 63, 71, 80},
	{6300, 0, 0, 25, 32, 45, 63, 80, 90, 100},
	{8000, 0, 0, 32, 40, 56, 80, 100, 110, 125},
	{10000, 0, 0, 40, 50, 71, 100, 125, 140, 160},
	{12500, 0, 0, 50, 63, 90, 125, 160, 180, 200},
	{16000, 0, 0, 63, 80, 110, 160, 200, 220, 250},
	{20000, 0, 0, 80, 100, 140, 200, 250, 280, 320},
	{25000, 0, 0, 100, 125, 180, 250, 320, 360, 400},
	{32000, 0, 0, 125, 160, 220, 320, 400, 450, 500},
	{40000, 0, 0, 160, 200, 280, 400, 500, 600, 630},
	{50000, 0, 0, 200, 250, 360, 500, 630, 710, 800},
	{63000, 0, 0, 250, 320, 450, 630, 800, 900, 1000},
}

// ribRows are the bracketed values of Table F.5 for degree 3, groups I, II, III,
// where a rib of the stated size breaks the path; blank where the copy had none.
var ribRows = [][]float64{
	{500, 0, 0, 7.9},
	{630, 7.9, 8.4, 9},
	{800, 9, 9.6, 10.2},
	{1000, 10.2, 11.2, 12.8},
	{1250, 12.8, 14.4, 16},
	{1600, 16, 17.6, 20},
	{2000, 20, 22.4, 25.6},
	{2500, 25.6, 28.8, 32},
	{3200, 32, 36, 40},
	{4000, 40, 44.8, 50.4},
	{5000, 50.4, 56.8, 64},
	{6300, 64, 72, 80},
	{8000, 0, 88, 100},
	{10000, 0, 112, 128},
}

// foulRows are the creepage distances of pollution degree 4 in an older edition:
// V; mm for groups I, II, III. The rows below were not read.
var foulRows = [][]float64{
	{3200, 0, 0, 100},
	{4000, 0, 100, 125},
	{5000, 100, 125, 160},
	{6300, 125, 160, 200},
	{8000, 160, 200, 250},
	{10000, 200, 250, 320},
}

type creepageColumn = Column[quantity.Voltage, quantity.Length]

var (
	wiring = [2]*creepageColumn{
		creepageOf(creepageRows, 1, "F.5, printed wiring, pollution degree 1"),
		creepageOf(creepageRows, 2, "F.5, printed wiring, pollution degree 2"),
	}
	clean   = marked(creepageOf(creepageRows, 3, "F.5, pollution degree 1"), 3)
	degree2 = creepageTriple(creepageRows, 4, "F.5, pollution degree 2")
	degree3 = creepageTriple(creepageRows, 7, "F.5, pollution degree 3")
	ribbed  = creepageTriple(ribRows, 1, "F.5, pollution degree 3 with rib")
	foul    = creepageTriple(foulRows, 1, "F.4 of an older edition, pollution degree 4")
)

func creepageOf(rows [][]float64, k int, name string) *creepageColumn {
	return Of(printed(name), "long-term voltage", rows, k, volt, millimetre)
}

func creepageTriple(rows [][]float64, first int, name string) [3]*creepageColumn {
	var t [3]*creepageColumn
	for i, group := range []string{"I", "II", "III"} {
		t[i] = marked(creepageOf(rows, first+i, name+", material group "+group), first+i)
	}
	return t
}

// marked gives each cell of a column its own mark.
func marked(c *creepageColumn, k int) *creepageColumn {
	for _, v := range c.at {
		c.marks = append(c.marks, creepageMark(v, k))
	}
	return c
}

// provisional is the voltage above which Table F.5 calls its values provisional.
const provisional = 10 * kilovolt

// creepageMark is the mark of one cell of Table F.5. At degree 3 nothing is printed
// above 10 kV as far as is remembered: those cells follow the series of preferred
// numbers and are a rule of this project. 40 kV, degree 3, group II is 560 by the
// series and 600 in the copy read: the larger is used. 63 kV, degree 2, group III is
// 630 by the series and the copy, 600 or 630 in memory.
func creepageMark(v quantity.Voltage, k int) gap.Mark {
	switch {
	case k >= 7 && v > provisional:
		return gap.Derived
	case k == 6 && v > 60*kilovolt:
		return gap.Memory
	}
	return gap.Read
}

// Surface is what decides a creepage distance besides the voltage.
type Surface struct {
	Degree        int // pollution degree, 1 to 4
	Group         Group
	PrintedWiring bool
	Ribbed        bool // a rib of the size the table asks for
}

// Creepage is the basic creepage distance for a long-term r.m.s. or DC voltage.
// Values between rows are linear (allowed; used in a published worked example). Past
// 63 kV, at degree 4 past 10 kV or below its first row, there is a lack, and so it is
// for a material that does not track, whose creepage is the clearance.
func Creepage(v quantity.Voltage, s Surface) (Reading[quantity.Length], error) {
	if err := s.check(v); err != nil {
		return Reading[quantity.Length]{}, err
	}
	r, err := s.column(v).At(v)
	if err != nil {
		return r, err
	}
	r = s.withRib(v, r)
	return s.remarked(v, r), nil
}

func (s Surface) check(v quantity.Voltage) error {
	if err := checkDegree(s.Degree); err != nil {
		return err
	}
	switch {
	case s.Group < GroupI || s.Group > GroupIIIb:
		return lack.Range("Table F.5 holds for materials that track")
	case s.Degree == 4 && v < foul[s.Group.column()].at[0]:
		return lack.Range("creepage at pollution degree 4 was read from %s on, asked for %s",
			quantity.Text(foul[s.Group.column()].at[0]), quantity.Text(v))
	}
	return nil
}

// column is the column of Table F.5 for the surface: printed wiring has its own to
// 1000 V, at degree 2 not for group IIIb.
func (s Surface) column(v quantity.Voltage) *creepageColumn {
	wired := s.PrintedWiring && quantity.AtMost(v, wiring[0].Last())
	switch {
	case s.Degree == 1 && wired, s.Degree == 2 && wired && s.Group != GroupIIIb:
		return wiring[s.Degree-1]
	case s.Degree == 1:
		return clean
	case s.Degree == 2:
		return degree2[s.Group.column()]
	case s.Degree == 3:
		return degree3[s.Group.column()]
	}
	return foul[s.Group.column()]
}

// withRib takes the bracketed value where there is one and it is smaller.
func (s Surface) withRib(v quantity.Voltage, plain Reading[quantity.Length]) Reading[quantity.Length] {
	if !s.Ribbed || s.Degree != 3 {
		return plain
	}
	r, err := ribbed[s.Group.column()].At(v)
	if err != nil || r.Value >= plain.Value { // past its last row the plain value stands
		return plain
	}
	return r
}

// remarked adds what the standard or this project says beside the number.
func (s Surface) remarked(v quantity.Voltage, r Reading[quantity.Length]) Reading[quantity.Length] {
	switch {
	case s.Degree == 3 && v > provisional:
		r.Source.Text = fmt.Sprintf("project rule: series of preferred numbers carried past 10 kV (%s)", r.Source.Text)
	case v > provisional:
		r.Note = "the standard calls its values above 10 kV provisional"
	case s.Degree == 3 && s.Group == GroupIIIb && v > 630*volt:
		r.Note = "material group IIIb is not recommended at pollution degree 3 above 630 V"
	}
	return r
}
