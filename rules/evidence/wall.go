package evidence

import (
	"fmt"
	"math"
	"strings"

	"kilovet/hv/chain"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/solid"
	"kilovet/rules/build"
)

// Wall is the part of the voltage of a feedthrough that the wall of its sleeve takes, by
// its layers and by the computed field; what judges is the worse of the times just after
// switching and once DC has settled.
type Wall struct {
	Whole  quantity.Voltage  // on the pin
	Part   quantity.Fraction // that judges; above 1 where an edge raises the field
	Layers quantity.Fraction // by layers, the worse of both times
	Field  gap.Result[quantity.Fraction]
	Text   string   // how it divides, in words
	Taken  []string // what that takes for granted

	held bool // the annuli beside it hold their part
}

// isWall reports whether a spacing is the wall of the sleeve of a feedthrough.
func isWall(s *chain.Spacing) bool {
	return s.Of != nil && s.Of.Sleeve != nil && strings.HasSuffix(s.Name.V, ": "+chain.SleeveWall)
}

// onWall leaves of the voltages on the pin what the wall of the sleeve takes; other spacings
// have all of them.
func (e *Evidence) onWall(s *chain.Spacing, v gap.Voltages) (gap.Voltages, *Wall, error) {
	if !isWall(s) {
		return v, nil, nil
	}
	lasting, err := e.Mean(s.Of)
	if err != nil {
		return v, nil, err
	}
	w := e.wall(s.Of, v.Peak, min(lasting, v.Peak))
	v.Peak, v.LongTerm, v.Alternating = w.Of(v.Peak), w.Of(v.LongTerm), w.Of(v.Alternating)
	return v, &w, nil
}

// Of is what the wall takes of a voltage on the pin.
func (w Wall) Of(v quantity.Voltage) quantity.Voltage { return v * quantity.Voltage(w.Part) }

// wall is what the wall takes of a peak on the pin, of which a part lasts.
func (e *Evidence) wall(f *chain.Feedthrough, peak, lasting quantity.Voltage) Wall {
	w := e.divided(f, Wall{Whole: peak, Part: 1, Layers: 1, Field: gap.ResultOf(e.wallByField(f))}, lasting, 1)
	switch {
	case !w.held:
		w.Part = max(1, w.byField())
	case w.Field.Lack == nil && (f.Sleeve.Permittivity.Set() || w.Field.Value > w.Layers || !f.HasInnerGap() && !f.HasOuterGap()):
		w.Part = w.Field.Value
	default:
		w.Part = w.Layers
	}
	return w
}

// divided finds how the voltage divides by layers, and whether the annuli hold their part
// with so much in hand.
func (e *Evidence) divided(f *chain.Feedthrough, w Wall, lasting quantity.Voltage, hand quantity.Voltage) Wall {
	peak, sleeve := w.Whole, thinSleeve(f)
	_, switched, _, err := sleeve.Shares(solid.Switched)
	if err != nil {
		w.Text = fmt.Sprintf("the whole %s, since how it divides is not known: %s", quantity.Text(peak), err.Error())
		return w
	}
	_, settled, _, _ := sleeve.Shares(solid.Settled) // known where the other is
	w.Layers = wallShare(switched, settled, peak, lasting)
	w.Text = w.layered(f, switched, settled)
	why := ""
	if w.held, why = e.annuliHold(f, lasting, hand, &w); !w.held {
		w.Text += "; " + why + ", then it takes all"
	}
	return w
}

// byField is the share by the computed field, 0 without one.
func (w Wall) byField() quantity.Fraction {
	if w.Field.Lack != nil {
		return 0
	}
	return w.Field.Value
}

// wallShare is the worse of all at the switched share and the lasting part at the settled
// one with the rest at the switched one.
func wallShare(switched, settled quantity.Fraction, peak, lasting quantity.Voltage) quantity.Fraction {
	if peak == 0 {
		return max(switched, settled)
	}
	mean := quantity.Fraction(lasting / peak)
	return max(switched, mean*settled+(1-mean)*switched)
}

// layered says how the voltage divides.
func (w Wall) layered(f *chain.Feedthrough, switched, settled quantity.Fraction) string {
	text := "all of it, there being no annulus"
	if f.HasInnerGap() || f.HasOuterGap() {
		text = fmt.Sprintf("by layers %s just after switching, %s once DC has settled", quantity.Text(switched), quantity.Text(settled))
	}
	text = fmt.Sprintf("of %s on the pin %s", quantity.Text(w.Whole), text)
	if w.Field.Lack != nil {
		return text
	}
	return text + fmt.Sprintf(", %s by the greatest computed field in it (%s)", quantity.Text(w.Field.Value), w.Field.Because)
}

// annuliHold reports whether no annulus beside the sleeve discharges: one that does hands
// its part on to the wall.
func (e *Evidence) annuliHold(f *chain.Feedthrough, lasting, hand quantity.Voltage, w *Wall) (held bool, why string) {
	for _, a := range e.Annuli(f) {
		name := strings.TrimPrefix(a.Name, f.Name.V+": ")
		switch {
		case a.Starts.Lack != nil:
			return false, "from when the annulus " + name + " discharges is not known"
		case !quantity.AtMost(hand*a.Takes(w.Whole, lasting), a.Starts.Value):
			return false, "the annulus " + name + " discharges"
		case a.Assumed:
			w.Taken = append(w.Taken, "what fills "+a.Name+" is not given and taken as air")
		}
		w.Taken = append(w.Taken, a.Starts.Assumptions...)
	}
	return true, ""
}

// thinSleeve is a sleeve whose wall takes the most: of the least permittivity of its material
// where none is given.
func thinSleeve(f *chain.Feedthrough) solid.Sleeve {
	s := sleeveOf(f)
	if m, err := solid.Find(f.Sleeve.Material.V); err == nil && !f.Sleeve.Permittivity.Set() {
		s.Permittivity = m.Permittivity.Least
	}
	return s
}

// wallByField is the greatest computed field in the sleeve, on either side of the plate, as
// a part of what the wall alone would have of the voltage on the pin.
func (e *Evidence) wallByField(f *chain.Feedthrough) (gap.Answer[quantity.Fraction], error) {
	alone := 1 / (float64(f.Inner().V) * math.Log(float64(f.Outer().V/f.Inner().V))) // coaxial, at the bore, for each volt
	return e.shareByField(f, alone, func(a *build.Arrangement) (Stress, error) {
		return e.Stress(a, e.ClearOfEdges(a, Where{Body: build.Sleeve}))
	})
}
