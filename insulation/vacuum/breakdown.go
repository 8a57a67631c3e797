package vacuum

import (
	"math"

	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/shape"
)

// Short gaps break down at a field, long ones at a product of voltage and field.
const (
	// shortField: 2.8 kV at 0.07 mm to 41.4 kV at 0.76 mm, 40 to 54 kV/mm, the lower
	// end; above 0.89 mm the mechanism changes.
	shortField quantity.Field = 40e6
	// longRoot is C of V = C √d, 39 kV/√mm in V/√m.
	longRoot = 39e3 / 0.03162277660168379
	// aged is the most that conditioning was seen to gain.
	aged = 2
)

var (
	shortSource = gap.Source{Text: "40 kV/mm, the low end of 40 to 54 kV/mm between aluminium electrodes 0.07 to 0.76 mm apart, Vacuum breakdown and its effect on subsequent current emission, abstract", Mark: gap.Read}
	longSource  = gap.Source{Text: "V = C √d (Cranberg, J. Appl. Phys. 23 (1952) 518) with C = 39 kV/√mm: 40 at 100 mm and 50 at 20 mm were held between polished, conditioned electrodes; cyclotron deflectors 38.7 (memory)", Mark: gap.Derived}
	agedSource  = gap.Source{Text: "high-voltage ageing gains up to a factor of 2 (Electrical breakdown in vacuum, IEEE T-ED 1965, abstract): before it a gap may stand half; general tables begin at 20 kV/mm", Mark: gap.Derived}
)

// prepared is what both laws rest on.
const prepared = "the electrodes are clean, polished and conditioned; before that they may stand half as much"

// PlaneBreakdown is the DC or peak voltage at which a vacuum gap between plates breaks
// down: the smaller of the field of short gaps and the square root of long ones, which
// cross at 0.95 mm. It is what polished, clean and conditioned electrodes reach; no
// other shape at that distance stands more. Held for 0.07 mm to 6 m; the survey's own
// end points lie at 45 and 90 kV/√mm, so beyond 100 mm the law is cautious.
func PlaneBreakdown(d quantity.Length) (gap.Answer[quantity.Voltage], error) {
	if err := inRange(d); err != nil {
		return gap.Answer[quantity.Voltage]{}, err
	}
	return law(d), nil
}

// Breakdown is the voltage at which a described gap breaks down: both laws are those of
// the field at the electrode (V E ≤ C² and E ≤ 40 kV/mm), so a gap with a utilisation
// factor η stands what plates at η d stand. The higher of the two electrodes' fields is
// taken, whatever the polarity: the cathode emits, the anode was seen to decide too.
// Electrodes that are not known to be polished and conditioned stand half, and an area
// under stress above a square centimetre takes its part. Without a shape there is a
// lack, PlaneBreakdown bounds what it could be.
func Breakdown(g gap.Gap) (gap.Answer[quantity.Voltage], error) {
	x, err := even(g)
	if err != nil {
		return gap.Answer[quantity.Voltage]{}, err
	}
	s, err := stateOf(g)
	return s.applied(law(x)), err
}

// BreakdownAlong is Breakdown of a critical line whose field was computed; of the gap its
// surfaces are read.
func BreakdownAlong(g gap.Gap, l shape.Line) (gap.Answer[quantity.Voltage], error) {
	if err := inRange(l.Gap()); err != nil {
		return gap.Answer[quantity.Voltage]{}, err
	}
	s, err := stateOf(g)
	if err != nil {
		return gap.Answer[quantity.Voltage]{}, err
	}
	return s.applied(law(quantity.Length(1 / float64(l.PerVolt(0))))), nil
}

// law joins the two laws over the even length of a gap.
func law(x quantity.Length) gap.Answer[quantity.Voltage] {
	short, long := float64(shortField)*float64(x), longRoot*math.Sqrt(float64(x)) // sources above
	a := gap.Answer[quantity.Voltage]{Assumptions: []string{prepared}}
	if short <= long {
		a.Value, a.Because = quantity.Voltage(short), "short vacuum gap, 40 kV/mm at the electrode"
		a.Sources = []gap.Source{shortSource.Governing(), longSource}
	} else {
		a.Value, a.Because = quantity.Voltage(long), "long vacuum gap, the square-root law at the field of the electrode"
		a.Sources = []gap.Source{longSource.Governing(), shortSource}
	}
	a.Shown = []gap.Beside[quantity.Voltage]{{Value: a.Value / aged, Source: agedSource}}
	return a
}

// ClearanceForBreakdown is the gap whose breakdown is at a voltage, sharpest radius kept.
func ClearanceForBreakdown(g gap.Gap, v quantity.Voltage) (quantity.Length, error) {
	s, err := stateOf(g)
	if err != nil {
		return 0, err
	}
	return gapOf(g, evenAt(v/s.factor()))
}

// evenAt is the even length at which the joined law gives a voltage.
func evenAt(v quantity.Voltage) quantity.Length {
	long := math.Pow(float64(v)/longRoot, 2)
	return quantity.Length(math.Max(float64(v)/float64(shortField), long))
}
