package evidence

import (
	"strings"

	"kilovet/hv/quantity"
)

// Corner is a corner of the tolerances.
type Corner string

// The corners: every part at its nominal value, or all at one end of their
// tolerance; in a corner the divider reads low by its error, so that regulation
// holds the output too high. Beside these there is, for each value that is judged, the
// corner in which every part is at the end that raises it (see Worst).
const (
	Nominal Corner = ""
	AllLow  Corner = "all parts at the low end of their tolerance"
	AllHigh Corner = "all parts at the high end of their tolerance"
)

// Corners lists those that are the same for every value.
var Corners = []Corner{Nominal, AllLow, AllHigh}

// Corners that name parts begin with a mark and hold the names behind separators, control
// characters that stand in no name.
const (
	onePart   = "\x1done"
	someParts = "\x1dsome"
	isHigh    = "\x1e"
	isLow     = "\x1f"
)

// alone takes one part to the high end.
func alone(part string) Corner { return Corner(onePart + isHigh + part) }

// together takes parts to either end; it is nominal where there are none.
func together(high, low []string) Corner {
	if len(high)+len(low) == 0 {
		return Nominal
	}
	var b strings.Builder
	b.WriteString(someParts)
	for _, part := range high {
		b.WriteString(isHigh + part)
	}
	for _, part := range low {
		b.WriteString(isLow + part)
	}
	return Corner(b.String())
}

// named are the parts that a corner takes to either end.
func (c Corner) named() (high, low []string) {
	rest := string(c)
	for {
		i := strings.IndexAny(rest, isHigh+isLow)
		if i < 0 {
			return high, low
		}
		mark := rest[i]
		rest = rest[i+1:]
		name := rest
		if end := strings.IndexAny(rest, isHigh+isLow); end >= 0 {
			name = rest[:end]
		}
		if mark == isHigh[0] {
			high = append(high, name)
		} else {
			low = append(low, name)
		}
	}
}

// Text says the corner in words.
func (c Corner) Text() string {
	high, low := c.named()
	switch {
	case !strings.HasPrefix(string(c), "\x1d"):
		return string(c)
	case len(low) == 0:
		return "each part at its worse end of tolerance, here the high one"
	case len(high) == 0:
		return "each part at its worse end of tolerance, here the low one"
	case len(low) <= len(high):
		return "each part at its worse end of tolerance, low " + strings.Join(low, ", ") + ", high the others"
	}
	return "each part at its worse end of tolerance, high " + strings.Join(high, ", ") + ", low the others"
}

// ends is how the corner scales the value of an element within its tolerance; nil leaves
// all nominal.
func (c Corner) ends() func(element string, tolerance quantity.Fraction) float64 {
	switch c {
	case Nominal:
		return nil
	case AllLow:
		return func(_ string, t quantity.Fraction) float64 { return 1 - float64(t) }
	case AllHigh:
		return func(_ string, t quantity.Fraction) float64 { return 1 + float64(t) }
	}
	sign := map[string]float64{}
	high, low := c.named()
	for _, part := range high {
		sign[part] = 1
	}
	for _, part := range low {
		sign[part] = -1
	}
	return func(element string, t quantity.Fraction) float64 { return 1 + sign[PartOf(element)]*float64(t) }
}
