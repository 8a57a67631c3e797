package evidence

import (
	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/gas"
	"kilovet/insulation/solid"
	"kilovet/insulation/vacuum"
)

// Annulus is what is known of an annulus beside the sleeve of a feedthrough.
type Annulus struct {
	Name     string         // "gun feedthrough: pin to sleeve"
	Medium   gap.Medium     // air or vacuum
	Assumed  bool           // the medium was not given
	Place    document.Place // of the radius that makes it
	Gap      gap.Gap        // the annulus alone
	Switched quantity.Fraction
	Settled  quantity.Fraction
	Field    gap.Result[quantity.Fraction] // by the greatest computed field in it, just after switching
	Settling gap.Result[quantity.Time]     // none where a figure of the sleeve is not known
	Starts   gap.Result[quantity.Voltage]
	Slit     solid.Slit

	part string // of the feedthrough
}

// Annuli are the annuli of a feedthrough; none where the sleeve fills hole and bore.
func (e *Evidence) Annuli(f *chain.Feedthrough) []Annulus {
	if f.Sleeve == nil {
		return nil
	}
	s := sleeveOf(f)
	var all []Annulus
	if f.HasInnerGap() {
		all = append(all, e.annulus(f, s, s.Inner(), chain.InnerAnnulus, f.Sleeve.InnerGap, f.Inner().Place))
	}
	if f.HasOuterGap() {
		all = append(all, e.annulus(f, s, s.Outer(), chain.OuterAnnulus, f.Sleeve.OuterGap, f.Outer().Place))
	}
	for i := range all {
		all[i].Field = gap.ResultOf(e.annulusField(f, all[i]))
	}
	return all
}

// sleeveOf takes what was not given of the sleeve from its material: the highest
// permittivity, which stresses the annuli most, and the least resistivity.
func sleeveOf(f *chain.Feedthrough) solid.Sleeve {
	s := solid.Sleeve{Conductor: f.Pin.Radius.V, Bore: f.Inner().V, Outside: f.Outer().V, Hole: f.Hole.Radius.V,
		Permittivity: f.Sleeve.Permittivity.V, Resistivity: f.Sleeve.Resistivity.V}
	m, err := solid.Find(f.Sleeve.Material.V)
	if err != nil {
		return s
	}
	if !f.Sleeve.Permittivity.Set() {
		s.Permittivity = m.Permittivity.Most
	}
	if !f.Sleeve.Resistivity.Set() {
		s.Resistivity = m.Resistivity.Least
	}
	return s
}

func (e *Evidence) annulus(f *chain.Feedthrough, s solid.Sleeve, slit solid.Slit, part string, fill document.Given[string], place document.Place) Annulus {
	a := Annulus{
		Name: f.Name.V + ": " + part, part: part, Medium: gap.Medium(fill.Or("air")), Assumed: !fill.Set(), Place: place, Slit: slit,
		Gap: e.gap(&chain.Spacing{}),
	}
	a.Gap.Medium, a.Gap.Shape = a.Medium, &gap.Shape{Kind: gap.Coaxial, InnerRadius: slit.From, OuterRadius: slit.To}
	a.Gap.Clearance = slit.To - slit.From
	a.Settled, _ = slit.Share(solid.Settled)
	a.Switched, _ = slit.Share(solid.Switched) // none where the permittivity is not known; the settled share judges
	settling, err := s.Settling()
	a.Settling = gap.ResultOf(gap.Answer[quantity.Time]{Value: settling}, err)
	a.Starts = gap.ResultOf(e.starts(a))
	return a
}

// starts is the voltage across the annulus itself from which it discharges or emits.
func (e *Evidence) starts(a Annulus) (gap.Answer[quantity.Voltage], error) {
	if a.Medium == gap.Vacuum {
		return a.Slit.AcrossInVacuum()
	}
	state, err := gas.StateOf(a.Gap)
	if err != nil {
		return gap.Answer[quantity.Voltage]{}, err
	}
	return a.Slit.AcrossInGas(state)
}

// Divided is the share just after switching that judges: the greater of that by layers and
// that by the computed field where there is one.
func (a Annulus) Divided() quantity.Fraction {
	if a.Field.Lack != nil {
		return a.Switched
	}
	return max(a.Switched, a.Field.Value)
}

// Takes is the highest voltage across the annulus: its settled share of the lasting part
// of the voltage and its switched share of the rest, or of all of it just after switching.
func (a Annulus) Takes(peak, lasting quantity.Voltage) quantity.Voltage {
	lasting, switched := min(lasting, peak), quantity.Voltage(a.Divided())
	settled := lasting*quantity.Voltage(a.Settled) + (peak-lasting)*switched
	return max(settled, peak*switched)
}

// Mean is the largest mean voltage between the pin and the plate of a feedthrough.
func (e *Evidence) Mean(f *chain.Feedthrough) (quantity.Voltage, error) {
	if f.Voltage.Set() {
		return f.Voltage.V, nil
	}
	most, err := Worst(e, append([]string{f.Node.V}, f.Also.V...), func(e *Evidence, n string) (quantity.Voltage, error) {
		pin, err := e.Potential(n)
		if err != nil {
			return 0, err
		}
		plate, err := e.Potential(f.To.Or("ground"))
		return magnitude(pin - plate), err
	})
	return most.Value, err
}

// AcrossPin is the voltage between the pin and the plate of a feedthrough.
func (e *Evidence) AcrossPin(f *chain.Feedthrough) (gap.Voltages, Condition, error) {
	s := &chain.Spacing{From: f.Node, Also: f.Also, Voltage: f.Voltage}
	s.To = document.Given[string]{V: f.To.Or("ground"), Place: f.Node.Place}
	v, under, _, err := e.across(s)
	return v, under, err
}

// Junction is the exponent of the field where the insulator of a spacing in vacuum meets
// its negative electrode, by the permittivity of its material.
func (e *Evidence) Junction(s *chain.Spacing, angle quantity.Angle) (quantity.Fraction, error) {
	permittivity := 0.0
	if s.Of != nil && s.Of.Sleeve != nil {
		permittivity = sleeveOf(s.Of).Permittivity
	} else if m, err := solid.Find(s.Material.V); err == nil {
		permittivity = m.Permittivity.Most
	}
	a, err := vacuum.EdgeExponent(permittivity, angle)
	return a.Value, err
}
