package insulation

import (
	"fmt"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/gas"
	"kilovet/insulation/shape"
	"kilovet/insulation/table"
)

// FieldPeak is the highest field of the shape at the peak voltage, exact for the ideal
// shape, an upper bound for a rounded edge. It holds in any medium that fills the gap
// alone. Without a shape there is a lack.
func FieldPeak(g gap.Gap, v gap.Voltages) (gap.Answer[quantity.Field], error) {
	l, err := lineOf(g)
	if err != nil {
		return gap.Answer[quantity.Field]{}, err
	}
	a := gap.Answer[quantity.Field]{
		Value:   l.Peak(v.Peak),
		Because: fmt.Sprintf("%s, utilisation factor %.3g", g.Shape.Kind, float64(l.Utilisation())),
		Sources: []gap.Source{{Text: "electrostatics of the ideal shape", Mark: gap.Derived, Governs: true}},
	}
	if l.Bound() {
		a.Because += "; an upper bound for an edge that runs straight, that of a full cylinder of the same radius"
	}
	return a, nil
}

// FieldLimit is the peak field of the shape at which a discharge starts.
func FieldLimit(g gap.Gap) (gap.Answer[quantity.Field], error) {
	return fieldAt(g, gap.ResultOf(Onset(g)))
}

// fieldAt is the peak field at the onset.
func fieldAt(g gap.Gap, onset gap.Result[quantity.Voltage]) (gap.Answer[quantity.Field], error) {
	if onset.Lack != nil {
		return gap.Answer[quantity.Field]{}, onset.Lack
	}
	l, err := lineOf(g)
	if err != nil {
		return gap.Answer[quantity.Field]{}, err
	}
	return fieldAlong(l, onset)
}

func lineOf(g gap.Gap) (shape.Line, error) {
	if g.Shape == nil {
		return shape.Line{}, lack.Key("spacing.shape")
	}
	return shape.Of(*g.Shape, g.Clearance)
}

// Onset is the peak or DC voltage at which a discharge starts in a gas: between plates
// the breakdown itself, else the streamer criterion along the critical line, with Peek's
// laws shown where one belongs to the shape. Without a shape there is a lack: sharp
// electrodes discharge from about 2 kV on.
func Onset(g gap.Gap) (gap.Answer[quantity.Voltage], error) {
	var none gap.Answer[quantity.Voltage]
	if onset := mediumOf(g).onset; onset != nil {
		return onset(g)
	}
	if err := inGas(g); err != nil {
		return none, err
	}
	l, err := lineOf(g)
	if err != nil {
		return none, err
	}
	s, err := gas.StateOf(g)
	if err != nil {
		return none, err
	}
	return onset(g, s, l)
}

func onset(g gap.Gap, s gas.State, l shape.Line) (gap.Answer[quantity.Voltage], error) {
	if g.Shape.Kind == gap.Plates {
		return gas.UniformBreakdown(s, l.Gap())
	}
	a, err := gas.Onset(s, l, g.Surface)
	if err != nil && s.Gas != gap.AirGas {
		return roughened(g)(atLeastUniform(g, s, l))
	}
	if err != nil {
		return a, err
	}
	if peek, err := gas.PeekOnset(s, g.Shape.Kind, l, g.Surface); err == nil {
		a.Shown = append(a.Shown, peek...)
	}
	a.Shown = append(a.Shown, measuringGap(g, s)...)
	return a, nil
}

// measuringGap is what the tables of sphere gaps say of one of their sizes, one sphere
// earthed.
func measuringGap(g gap.Gap, s gas.State) (all []gap.Beside[quantity.Voltage]) {
	if g.Shape.Kind != gap.SphereSphere || g.Shape.Symmetric || s.Gas != gap.AirGas {
		return nil
	}
	for _, look := range []func(gas.State, quantity.Length, quantity.Length) (table.Reading[quantity.Voltage], error){gas.SparkGap, gas.SphereGap} {
		if r, err := look(s, 2*g.Shape.Radius, g.Clearance); err == nil {
			all = append(all, gap.Beside[quantity.Voltage]{Value: r.Value, Source: r.Source})
		}
	}
	return all
}

// Breakdown is the peak or DC voltage that a gap in a gas breaks down at. Between
// plates it is the law of uniform fields or Paschen's; round other shapes the onset or,
// where it is higher in air, what sharp electrodes at the same distance stand; without a
// shape it is that of needle points. The polarity is that of the sharper electrode: a
// positive, changing or unknown one against a blunt one stands less than a pair of needles,
// of which one is positive whatever the polarity. Without a shape, no polarity says that
// both are alike.
func Breakdown(g gap.Gap, sharp gap.Polarity) (gap.Answer[quantity.Voltage], error) {
	return breakdown(g, sharp, gap.ResultOf(Onset(g)))
}

func breakdown(g gap.Gap, sharp gap.Polarity, starts gap.Result[quantity.Voltage]) (gap.Answer[quantity.Voltage], error) {
	var none gap.Answer[quantity.Voltage]
	if breakdown := mediumOf(g).breakdown; breakdown != nil {
		return breakdown(g)
	}
	if g.Medium == gap.PrintedBoard {
		return acrossBoard(g)
	}
	if err := inGas(g); err != nil {
		return none, err
	}
	s, err := gas.StateOf(g)
	if err != nil {
		return none, err
	}
	if g.Shape == nil {
		return sharpEnds(g, s, sharp)
	}
	l, err := lineOf(g)
	switch {
	case err != nil:
		return none, err
	case (g.Shape.Kind == gap.Plates || s.Gas != gap.AirGas) && starts.Lack != nil:
		return none, starts.Lack
	case g.Shape.Kind == gap.Plates || s.Gas != gap.AirGas:
		return starts.Answer, nil
	}
	if twoSided(g.Shape.Kind) {
		return crossing(s, l, gas.Needles, starts)
	}
	return oneSided(s, l, sharp, starts)
}

// oneSided is the breakdown of a sharper electrode against a blunter one by its polarity,
// that of the positive one where it is not known.
func oneSided(s gas.State, l shape.Line, sharp gap.Polarity, starts gap.Result[quantity.Voltage]) (gap.Answer[quantity.Voltage], error) {
	law, told := sharpLaw(sharp)
	a, err := crossing(s, l, law, starts)
	if err == nil && (starts.Lack != nil || a.Value > starts.Value) {
		a.Because += "; " + told
	}
	return a, err
}

// sharpLaw is what a sharp electrode of a polarity stands against a blunter one, and why.
func sharpLaw(sharp gap.Polarity) (law sharpGap, told string) {
	switch sharp {
	case gap.Negative:
		return gas.Needles, "the sharper electrode is negative, and stands no less than a pair of needles"
	case gap.Positive:
		return gas.PointPlane, "the sharper electrode is positive"
	case gap.Changing:
		return gas.PointPlane, "the sharper electrode is positive at times, the worse"
	}
	return gas.PointPlane, "the sharper electrode is taken as positive, the worse"
}

// sharpGap is a law of sharp electrodes a distance apart.
type sharpGap = func(gas.State, quantity.Length) (gap.Answer[quantity.Voltage], error)

// AgainstPlane is what a gap in air would stand at least if one electrode were a sharp
// positive one and the other blunt: less than a pair of needles. A lack in other media and
// past half a metre.
func AgainstPlane(g gap.Gap) (gap.Answer[quantity.Voltage], error) {
	s, err := gas.StateOf(g)
	if err == nil {
		err = inGas(g)
	}
	if err != nil || s.Gas != gap.AirGas {
		if err == nil {
			err = lack.Key("spacing.shape")
		}
		return gap.Answer[quantity.Voltage]{}, err
	}
	return gas.PointPlane(s, g.Clearance)
}

// sharpEnds is the breakdown of a gap whose electrodes are not described: both are sharp,
// or, where one is said to be the sharper, that one by its polarity.
func sharpEnds(g gap.Gap, s gas.State, sharp gap.Polarity) (gap.Answer[quantity.Voltage], error) {
	switch {
	case s.Gas != gap.AirGas:
		return gap.Answer[quantity.Voltage]{}, lack.Key("spacing.shape")
	case g.Clearance <= 0:
		return gap.Answer[quantity.Voltage]{}, lack.Key("spacing.clearance")
	case sharp == gap.Unknown:
		return gas.Needles(s, g.Clearance)
	}
	law, told := sharpLaw(sharp)
	a, err := law(s, g.Clearance)
	if err == nil {
		a.Because += "; " + told
	}
	return a, err
}

// crossing is the larger of onset and what sharp electrodes stand: a discharge that
// starts earlier than it can cross stays a corona. A radius too fine for an onset is
// sharp. Where the law of sharp electrodes ends before the gap does, both are lower bounds.
func crossing(s gas.State, l shape.Line, law sharpGap, starts gap.Result[quantity.Voltage]) (gap.Answer[quantity.Voltage], error) {
	fine := quantity.Length(s.Density())*l.Radius() < gas.FinestRadius
	if starts.Lack != nil && !fine {
		return gap.Answer[quantity.Voltage]{}, starts.Lack
	}
	sharp, err := law(s, l.Gap())
	if err != nil && starts.Lack == nil {
		sharp = narrowest(s, l.Gap(), law)
		starts.AtLeast = true
	} else if err != nil {
		return gap.Answer[quantity.Voltage]{}, err
	}
	if starts.Lack != nil || sharp.Value > starts.Value {
		return sharp, nil
	}
	return starts.Answer, nil
}

// narrowest is what sharp electrodes stand where their law ends before a gap does, a lower
// bound; nothing where it does not begin.
func narrowest(s gas.State, d quantity.Length, law sharpGap) gap.Answer[quantity.Voltage] {
	for end := d; end > d/1000; end /= 1.02 {
		if a, err := law(s, end); err == nil {
			a.AtLeast = true
			a.Because += "; as over " + quantity.Text(end) + ", where the law ends: this gap stands no less"
			return a
		}
	}
	return gap.Answer[quantity.Voltage]{}
}

// twoSided says whether both electrodes of a shape are curved alike.
func twoSided(k gap.Kind) bool { return k == gap.SphereSphere || k == gap.ParallelCylinders }
