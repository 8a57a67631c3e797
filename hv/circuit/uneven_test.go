package circuit

import (
	"math"
	"testing"

	"kilovet/hv/chain"
	"kilovet/hv/document"
)

// TestUnevenElements: 10 elements of 1 in series in 2 strings, one of them off. The rows
// are Ohm's law written out by hand.
func TestUnevenElements(t *testing.T) {
	part := &chain.Resistor{Count: document.Given[int]{V: 10}, Strings: document.Given[int]{V: 2}}
	part.Count.Place.Line, part.Strings.Place.Line = 1, 1
	if n, s := part.Elements(); n != 10 || s != 2 {
		t.Fatal(n, s)
	}
	for _, c := range []struct {
		name        string
		uneven      Uneven
		conductance float64
		share, heat float64
	}{
		{"alike", Uneven{}, 0.2, 0.1, 0.05},
		{"one string open", Uneven{Lost: 1}, 0.1, 0.1, 0.1},
		{"one shorted", Uneven{Odd: true}, 0.1 + 1/9., 1 / 9., (1 / 81.) / (0.1 + 1/9.)},
		{"ten times", Uneven{Odd: true, Times: 10}, 0.1 + 1/19., 10 / 19., (10 / 361.) / (0.1 + 1/19.)},
		{"a tenth", Uneven{Odd: true, Times: 0.1}, 0.1 + 1/9.1, 1 / 9.1, (1 / 82.81) / (0.1 + 1/9.1)},
	} {
		e := &Element{ResistorPart: part, Uneven: c.uneven}
		for what, pair := range map[string][2]float64{"conductance": {e.conductance(), c.conductance}, "share": {e.Share(), c.share}, "heat": {e.Heat(), c.heat}} {
			if math.Abs(pair[0]-pair[1]) > 1e-12 {
				t.Errorf("%s: %s %g, want %g", c.name, what, pair[0], pair[1])
			}
		}
	}
}

func TestOneOffChangesTheWholeArm(t *testing.T) {
	c := build(whole())
	for _, name := range []string{"divider.upper", "bleeder.1"} {
		n, s := c.Element(name).ResistorPart.Elements()
		if n < 2 {
			continue
		}
		was, is := c.Element(name).Resistance, c.OneOff(name, 10).Element(name).Resistance
		want := float64(s) / (float64(s-1) + float64(n)/(float64(n)+9))
		if math.Abs(float64(is/was)-want) > 1e-12 {
			t.Errorf("%s: %g times, want %g", name, is/was, want)
		}
	}
}
