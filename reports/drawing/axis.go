package drawing

import (
	"math"
	"strconv"
	"strings"

	"kilovet/hv/quantity"
	"kilovet/reports/digest"
	"kilovet/rules/exhibit"
	"kilovet/rules/rule"
)

// scale lays values off along one side of a curve.
type scale struct {
	exhibit.Axis
	from, to float64 // values at its ends; of a logarithmic axis above nought
	start    float64 // place of from
	length   float64 // towards the end; both in millimetres
	ticks    []tick
	title    string
}

// tick is a value with its label; between labelled ones an axis may have bare ones.
type tick struct {
	value float64
	label string
}

// at is the place of a value.
func (a scale) at(v float64) float64 { return a.start + a.length*a.share(v) }

func (a scale) share(v float64) float64 {
	if a.Log {
		return math.Log(v/a.from) / math.Log(a.to/a.from)
	}
	return (v - a.from) / (a.to - a.from)
}

// newScale spans values. What is not the free variable is shown from nought where it
// comes near it, and to a round value at both ends.
func newScale(axis exhibit.Axis, from, to float64, free bool) scale {
	a := scale{Axis: axis}
	switch {
	case axis.Log && free:
		a.from, a.to = from, to
	case axis.Log:
		a.from, a.to = math.Pow(10, math.Floor(math.Log10(from)+1e-9)), math.Pow(10, math.Ceil(math.Log10(to)-1e-9))
	case max(math.Abs(from), math.Abs(to)) < leastShown: // no step between such values can be counted
	default:
		a.from, a.to = nearNought(from, to)
	}
	if a.to-a.from <= 1e-12*max(math.Abs(a.to), math.Abs(a.from)) { // one value only
		a.widen()
	}
	return a
}

// leastShown is what an axis tells from nought; nothing physical is as small.
const leastShown = 1e-300

// nearNought takes nought in where the values come as near to it as half their span, and
// ends at it what passes it by less than the width of a line.
func nearNought(from, to float64) (float64, float64) {
	const unseen = 1e-3
	switch {
	case from < 0 && -from < unseen*to:
		return 0, to
	case to > 0 && to < -unseen*from:
		return from, 0
	case from > 0 && from < (to-from)/2:
		return 0, to
	case to < 0 && -to < (to-from)/2:
		return from, 0
	}
	return from, to
}

func (a *scale) widen() {
	switch {
	case a.Log:
		a.from, a.to = a.from/2, a.to*2
	case math.Abs(a.to) > 0:
		a.from, a.to = a.from-math.Abs(a.from)/2, a.to+math.Abs(a.to)/2
	default:
		a.from, a.to = -1, 1
	}
}

// mark divides the axis into about so many parts, and names it.
func (a *scale) mark(parts int, ends bool) {
	if a.Log {
		a.markLog(parts)
		return
	}
	unit, factor := unitOf(a.Unit, max(math.Abs(a.from), math.Abs(a.to)))
	round := roundStep((a.to - a.from) / factor / float64(max(parts, 1)))
	step := round * factor
	first, last := math.Ceil(a.from/step-1e-9), math.Floor(a.to/step+1e-9)
	if ends {
		first, last = math.Floor(a.from/step+1e-9), math.Ceil(a.to/step-1e-9)
		a.from, a.to = first*step, last*step
	}
	a.title = entitled(a.What, unit)
	a.ticks = nil
	for k := first; k <= last; k++ {
		a.ticks = append(a.ticks, tick{k * step, number(k*round, round)})
	}
}

// roundStep is the least of 1, 2 and 5 times a power of ten that is not less.
func roundStep(v float64) float64 {
	power := math.Pow(10, math.Floor(math.Log10(v)))
	for _, m := range []float64{1, 2, 5} {
		if v <= m*power*(1+1e-9) {
			return m * power
		}
	}
	return 10 * power
}

// number writes a value with the decimals that its step asks for.
func number(v, step float64) string {
	if math.Abs(v) < step/2 {
		return "0"
	}
	decimals := 0
	if e := math.Floor(math.Log10(step) + 1e-9); e < 0 {
		decimals = int(-e)
	}
	if decimals > 4 || math.Abs(v) >= 1e6 {
		return quantity.Significant(v)
	}
	return strconv.FormatFloat(v, 'f', decimals, 64)
}

// markLog puts labels at decades, several apart where there are many, and where there
// is hardly one at 1, 2 and 5 times them.
func (a *scale) markLog(parts int) {
	a.title = entitled(a.What, "")
	a.ticks = nil
	low, high := int(math.Floor(math.Log10(a.from)+1e-9)), int(math.Ceil(math.Log10(a.to)-1e-9))
	each := max(1, int(math.Ceil(float64(high-low)/float64(max(parts, 1)))))
	steps := []float64{1}
	if math.Log10(a.to/a.from) < 1.7 {
		steps = []float64{1, 2, 5}
	}
	for k := low; k <= high; k++ {
		for _, m := range steps {
			v := m * math.Pow(10, float64(k))
			if v < a.from*(1-1e-9) || v > a.to*(1+1e-9) {
				continue
			}
			t := tick{value: v}
			if (k-low)%each == 0 {
				t.label = digest.Value(v, a.Unit)
			}
			a.ticks = append(a.ticks, t)
		}
	}
}

// entitled is what an axis shows and in which unit.
func entitled(what, unit string) string {
	if unit == "" {
		return what
	}
	return what + " (" + unit + ")"
}

// unitOf is the unit with the prefix that suits values up to a size, and how many of
// the unit without it that is.
func unitOf(unit string, most float64) (name string, factor float64) {
	switch {
	case unit == "1":
		return "", 1
	case unit == "K":
		return "K", 1
	case unit == "s" && most >= 36000:
		return "h", 3600
	case unit == "s" && most >= 1000:
		return "min", 60
	case most == 0:
		return strings.ReplaceAll(unit, "ohm", "Ω"), 1
	}
	round := math.Pow(10, math.Floor(math.Log10(most)+1e-9))
	count, name, _ := strings.Cut(digest.Amount(rule.Amount{Value: round, Unit: unit}), " ")
	n, err := strconv.ParseFloat(count, 64)
	if err != nil || n == 0 { // below the smallest prefix
		return strings.ReplaceAll(unit, "ohm", "Ω"), 1
	}
	return name, round / n
}
