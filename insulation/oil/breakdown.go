package oil

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/shape"
)

// powerLaw is V = K d^n, kV and mm.
type powerLaw struct {
	k, n float64
	gap.Source
}

func (l powerLaw) at(d quantity.Length) quantity.Voltage {
	return quantity.Voltage(l.k * 1e3 * math.Pow(float64(d)*1e3, l.n))
}

func (l powerLaw) gapAt(v quantity.Voltage) quantity.Length {
	return quantity.Length(math.Pow(float64(v)/(l.k*1e3), 1/l.n) * 1e-3)
}

// The laws of clean oil, least squares over the examples' own pairs within 4.3 %. The
// second is the smaller one up to 55 mm.
var (
	naidu  = powerLaw{25.6, 0.924, gap.Source{Text: "V = 25.6 d^0.924 kV (d in mm), clean oil, 4 to 12 mm, fitted to Naidu and Kamaraju, High Voltage Engineering, ex. 3.1", Mark: gap.Derived}}
	wadhwa = powerLaw{24.3, 0.937, gap.Source{Text: "V = 24.3 d^0.937 kV (d in mm), clean oil, 4 to 10 mm, fitted to Wadhwa, High Voltage Engineering, ex. 1.3", Mark: gap.Derived}}
)

// Gaps that the pairs behind the laws span, and that of the standard test.
const (
	shortestClean quantity.Length = 4e-3
	longestClean  quantity.Length = 12e-3
	testGap       quantity.Length = 2.5e-3
)

// CleanBreakdown is the breakdown voltage of clean oil between plates, the smaller of two
// textbook laws: an upper bound, never a design figure. It holds from 4 to 12 mm.
func CleanBreakdown(d quantity.Length) (gap.Answer[quantity.Voltage], error) {
	if !quantity.AtLeast(d, shortestClean) || !quantity.AtMost(d, longestClean) {
		return gap.Answer[quantity.Voltage]{}, lack.Range("the laws of clean oil hold from 4 to 12 mm, asked for %s", quantity.Text(d))
	}
	return gap.Answer[quantity.Voltage]{
		Value: wadhwa.at(d), Because: "clean dry oil between plates, an upper bound",
		Sources:     []gap.Source{wadhwa.Governing(), naidu.Source},
		Assumptions: []string{"the oil is as clean as a textbook's"},
		Shown:       []gap.Beside[quantity.Voltage]{{Value: naidu.at(d), Source: naidu.Source}},
	}, nil
}

// CleanGap is the gap between plates of clean oil that breaks down at a voltage: what
// must be exceeded, not what is enough.
func CleanGap(v quantity.Voltage) (quantity.Length, error) {
	d := wadhwa.gapAt(v)
	if !quantity.AtLeast(d, shortestClean) || !quantity.AtMost(d, longestClean) {
		return 0, lack.Range("the laws of clean oil hold from 4 to 12 mm; %s lies outside", quantity.Text(v))
	}
	return d, nil
}

// cautious is the low end of general tables; it lies under what oil that fails the
// standard test at 30 kV over 2.5 mm shows, and under half of the laws of clean oil.
const cautious quantity.Field = 10e6

var cautiousSource = gap.Source{Text: "10 kV/mm, the low end of 10 to 15.7 kV/mm of oil in general tables (encyclopaedia; Kuphaldt, Lessons in Electric Circuits)", Mark: gap.Read}

// Breakdown is the voltage at which oil is expected to break down where its peak field
// reaches 10 kV/mm; beside it stands what the laws of clean oil give. From the 2.5 mm of
// the standard test on; past 12 mm, where the pairs of those laws end, the same electrodes
// 12 mm apart judge. Closer gaps, oil that failed its test and a missing shape are a lack.
func Breakdown(g gap.Gap) (gap.Answer[quantity.Voltage], error) {
	none := gap.Answer[quantity.Voltage]{}
	l, err := lineOf(g)
	if err != nil {
		return none, err
	}
	because := "oil at 10 kV/mm of peak field"
	if d := l.Gap(); !quantity.AtMost(d, longestClean) {
		because += ", the same electrodes 12 mm apart, where the data end"
		if l, err = lineOf(withGap(g, longestClean)); err != nil {
			return none, err
		}
	} else if !quantity.AtLeast(d, testGap) {
		return none, lack.Range("breakdown of oil is known from 2.5 mm on, asked for %s", quantity.Text(d))
	}
	a, err := breaksAt(g, l, because)
	if err != nil {
		return none, err
	}
	if clean, err := CleanBreakdown(l.Gap()); err == nil {
		a.Shown = []gap.Beside[quantity.Voltage]{{Value: clean.Value * quantity.Voltage(l.Utilisation()), Source: clean.Sources[0]}}
	}
	return a, nil
}

// BreakdownAlong is the voltage across a critical line, whose field was computed, at which
// oil is expected to break down: where its peak field reaches 10 kV/mm, from 2.5 to 12 mm;
// of the gap the state of its oil is read. Other lengths and oil that failed its test are a
// lack.
func BreakdownAlong(g gap.Gap, l shape.Line) (gap.Answer[quantity.Voltage], error) {
	if d := l.Gap(); !quantity.AtLeast(d, testGap) || !quantity.AtMost(d, longestClean) {
		return gap.Answer[quantity.Voltage]{}, lack.Range("breakdown of oil along a computed line is known from 2.5 to 12 mm, asked for %s", quantity.Text(d))
	}
	return breaksAt(g, l, "oil at 10 kV/mm of peak field")
}

// breaksAt is the voltage at which the peak field of a line is what oil stands.
func breaksAt(g gap.Gap, l shape.Line, because string) (gap.Answer[quantity.Voltage], error) {
	assumed, tested, err := passes(g)
	if err != nil {
		return gap.Answer[quantity.Voltage]{}, err
	}
	return gap.Answer[quantity.Voltage]{
		Value:       quantity.Voltage(float64(cautious) / float64(l.PerVolt(0))),
		Because:     because,
		Sources:     append([]gap.Source{cautiousSource.Governing()}, tested...),
		Assumptions: assumed,
	}, nil
}

// ClearanceForBreakdown is the gap whose breakdown is at a voltage, sharpest radius kept.
func ClearanceForBreakdown(g gap.Gap, v quantity.Voltage) (quantity.Length, error) {
	return gapWhere(g, testGap, longestClean, v, func(g gap.Gap) (quantity.Voltage, error) {
		a, err := Breakdown(g)
		return a.Value, err
	})
}
