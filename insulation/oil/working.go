package oil

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/shape"
)

// Working stress of small oil gaps under DC; the lower judges.
const (
	WorkingField quantity.Field = 2e6
	BoldField    quantity.Field = 5e6
)

var (
	workingSource = gap.Source{Text: "2 kV/mm in small oil gaps under DC", Mark: gap.Practice}
	boldSource    = gap.Source{Text: "5 kV/mm in small oil gaps under DC, clean and filtered", Mark: gap.Practice}
)

const unread = "the working stress of oil is common practice, no source was read"

// Gaps that practice calls small.
const (
	closestSmall quantity.Length = 0.1e-3
	widestSmall  quantity.Length = 50e-3
)

// ClearanceNeeded is the gap in oil at which the peak voltage has a peak field of 2
// kV/mm, from 0.1 to 50 mm; beside it that of 5 kV/mm. Both are practice. Without a shape,
// and where the electrodes are too sharp at any gap, there is a lack.
func ClearanceNeeded(g gap.Gap, v gap.Voltages) (gap.Answer[quantity.Length], error) {
	d, err := gapAt(g, v.Peak, WorkingField)
	if err != nil {
		return gap.Answer[quantity.Length]{}, err
	}
	assumed, tested, err := passes(g)
	if err != nil {
		return gap.Answer[quantity.Length]{}, err
	}
	a := gap.Answer[quantity.Length]{
		Value: d, Because: quantity.Text(v.Peak) + " peak at 2 kV/mm in oil",
		Sources:     append([]gap.Source{workingSource.Governing()}, tested...),
		Assumptions: append([]string{unread}, assumed...),
	}
	if bold, err := gapAt(g, v.Peak, BoldField); err == nil {
		a.Shown = []gap.Beside[quantity.Length]{{Value: bold, Source: boldSource}}
	}
	return a, nil
}

// WorkingVoltage is the peak voltage of a gap of oil at which its peak field is 2 kV/mm.
func WorkingVoltage(g gap.Gap) (gap.Answer[quantity.Voltage], error) {
	l, err := lineOf(g)
	if err != nil {
		return gap.Answer[quantity.Voltage]{}, err
	}
	if !quantity.AtLeast(l.Gap(), closestSmall) || !quantity.AtMost(l.Gap(), widestSmall) {
		return gap.Answer[quantity.Voltage]{}, lack.Range("the working stress of oil is that of gaps of 0.1 to 50 mm, asked for %s", quantity.Text(l.Gap()))
	}
	return gap.Answer[quantity.Voltage]{
		Value: quantity.Voltage(float64(WorkingField) / float64(l.PerVolt(0))), Because: "2 kV/mm in oil", Sources: []gap.Source{workingSource.Governing()},
	}, nil
}

// WorkingAlong is the field that a place in oil may have in service, 2 kV/mm, where the line
// from it is from 0.1 to 50 mm long; beside it that of clean and filtered oil. Both are
// practice. Oil that failed its test is a lack.
func WorkingAlong(g gap.Gap, l shape.Line) (gap.Answer[quantity.Field], error) {
	none := gap.Answer[quantity.Field]{}
	if !quantity.AtLeast(l.Gap(), closestSmall) || !quantity.AtMost(l.Gap(), widestSmall) {
		return none, lack.Range("the working stress of oil is that of gaps of 0.1 to 50 mm, asked for %s", quantity.Text(l.Gap()))
	}
	assumed, tested, err := passes(g)
	if err != nil {
		return none, err
	}
	return gap.Answer[quantity.Field]{
		Value: WorkingField, Because: "2 kV/mm in small oil gaps under DC",
		Sources:     append([]gap.Source{workingSource.Governing()}, tested...),
		Assumptions: append([]string{unread}, assumed...),
		Shown:       []gap.Beside[quantity.Field]{{Value: BoldField, Source: boldSource}},
	}, nil
}

// gapAt is the gap whose peak field at a voltage is a limit, the closest small one where
// that stands more.
func gapAt(g gap.Gap, v quantity.Voltage, limit quantity.Field) (quantity.Length, error) {
	stands := func(g gap.Gap) (quantity.Voltage, error) {
		l, err := lineOf(g)
		if err != nil {
			return 0, err
		}
		return quantity.Voltage(float64(limit) / float64(l.PerVolt(0))), nil
	}
	if g.Shape == nil {
		return 0, lack.Key("spacing.shape")
	}
	closest := max(closestSmall, 1.0001e-4*g.Shape.Sharpest())
	if u, err := stands(withGap(g, closest)); err == nil && u >= v {
		return closest, nil
	}
	return gapWhere(g, closestSmall, widestSmall, v, stands)
}
