package solid

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/gas"
	"kilovet/insulation/shape"
	"kilovet/insulation/vacuum"
)

// Sleeve is a conductor through an insulating sleeve whose outside is earthed, with an
// annulus of gas or vacuum between conductor and bore.
type Sleeve struct {
	Conductor    quantity.Length // radius
	Bore         quantity.Length // inner radius of the sleeve
	Outside      quantity.Length // its outer radius, at the earthed metal
	Permittivity float64         // of the sleeve
}

// Annulus is what the annulus of a sleeve takes.
type Annulus struct {
	Voltage quantity.Voltage
	Field   quantity.Field // at the conductor
}

// Annulus is what the annulus takes of a voltage on the conductor. Switched: most of it,
// as its permittivity is 1. Settled: all of it, since no sleeve insulates as a dry gas or
// a vacuum does.
func (s Sleeve) Annulus(v quantity.Voltage, how Sharing) (Annulus, error) {
	share, err := s.share(how)
	if err != nil {
		return Annulus{}, err
	}
	l, err := s.line()
	if err != nil {
		return Annulus{}, err
	}
	u := v * quantity.Voltage(share)
	return Annulus{Voltage: u, Field: l.Peak(u)}, nil
}

func (s Sleeve) share(how Sharing) (quantity.Fraction, error) {
	if !(s.Conductor > 0 && s.Bore > s.Conductor && s.Outside > s.Bore) {
		return 0, lack.Because("conductor, bore and outside of the sleeve are not three growing radii")
	}
	if how == Settled {
		return 1, nil
	}
	w := Wall{InnerRadius: s.Conductor, Layers: []Layer{
		{Thickness: s.Bore - s.Conductor, Permittivity: 1},
		{Thickness: s.Outside - s.Bore, Permittivity: s.Permittivity},
	}}
	u, err := w.Voltages(1, Switched)
	if err != nil {
		return 0, err
	}
	return quantity.Fraction(u[0]), nil
}

// line is the critical line of the annulus alone.
func (s Sleeve) line() (shape.Line, error) {
	return shape.Of(gap.Shape{Kind: gap.Coaxial, InnerRadius: s.Conductor, OuterRadius: s.Bore}, 0)
}

// SparksInGas is the peak voltage on the conductor at which the annulus begins to spark
// in a gas. The sleeve holds the arc off, each spark is a partial discharge that eats it.
func (s Sleeve) SparksInGas(state gas.State, how Sharing) (gap.Answer[quantity.Voltage], error) {
	l, err := s.line()
	if err != nil {
		return gap.Answer[quantity.Voltage]{}, err
	}
	starts, err := gas.Onset(state, l, gap.Smooth)
	if err != nil {
		starts, err = thin(state, l)
	}
	return s.onConductor(starts, err, how)
}

// thin is the onset of an annulus under the reach of the streamer criterion, or of another
// gas: the field at the conductor reaches the mean one at which plates that far apart
// break down.
func thin(state gas.State, l shape.Line) (gap.Answer[quantity.Voltage], error) {
	a, err := gas.UniformBreakdown(state, l.Gap())
	a.Value *= quantity.Voltage(l.Utilisation())
	a.Because += ", at the field of the conductor"
	return a, err
}

// EmitsInVacuum is the voltage on the conductor at which the annulus, in vacuum, begins to
// emit or breaks down.
func (s Sleeve) EmitsInVacuum(how Sharing) (gap.Answer[quantity.Voltage], error) {
	starts, err := vacuum.Onset(gap.Gap{
		Medium: gap.Vacuum, Shape: &gap.Shape{Kind: gap.Coaxial, InnerRadius: s.Conductor, OuterRadius: s.Bore},
	})
	return s.onConductor(starts, err, how)
}

// onConductor turns an onset across the annulus into one on the conductor.
func (s Sleeve) onConductor(a gap.Answer[quantity.Voltage], err error, how Sharing) (gap.Answer[quantity.Voltage], error) {
	if err != nil {
		return gap.Answer[quantity.Voltage]{}, err
	}
	share, err := s.share(how)
	if err != nil {
		return gap.Answer[quantity.Voltage]{}, err
	}
	a.Value /= quantity.Voltage(share)
	for i := range a.Shown {
		a.Shown[i].Value /= quantity.Voltage(share)
	}
	if how == Settled {
		a.Assumptions = append(a.Assumptions, "the annulus takes the whole voltage once DC has settled")
	}
	return a, nil
}
