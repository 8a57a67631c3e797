package solid

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/gas"
	"kilovet/insulation/shape"
	"kilovet/insulation/vacuum"
)

// Slit is an annulus of gas or vacuum beside a sleeve.
type Slit struct {
	From, To quantity.Length // its radii
	sleeve   Sleeve
}

// Stress is what an annulus takes of a voltage on the conductor.
type Stress struct {
	Voltage quantity.Voltage
	Field   quantity.Field // at its inner face
}

// Takes is what the annulus takes of a voltage on the conductor.
func (s Slit) Takes(v quantity.Voltage, how Sharing) (Stress, error) {
	share, err := s.Share(how)
	if err != nil {
		return Stress{}, err
	}
	l, err := s.line()
	if err != nil {
		return Stress{}, err
	}
	u := v * quantity.Voltage(share)
	return Stress{Voltage: u, Field: l.Peak(u)}, nil
}

// Share is the part of the voltage on the conductor that the annulus takes.
func (s Slit) Share(how Sharing) (quantity.Fraction, error) {
	inner, _, outer, err := s.sleeve.Shares(how)
	switch {
	case err != nil:
		return 0, err
	case s.To <= s.From:
		return 0, lack.Range("there is no annulus between %s and %s", quantity.Text(s.From), quantity.Text(s.To))
	case s.From < s.sleeve.Bore:
		return inner, nil
	}
	return outer, nil
}

// line is the critical line of the annulus alone.
func (s Slit) line() (shape.Line, error) {
	return shape.Of(gap.Shape{Kind: gap.Coaxial, InnerRadius: s.From, OuterRadius: s.To}, 0)
}

// SparksInGas is the peak voltage on the conductor at which the annulus begins to spark
// in a gas. The sleeve holds the arc off, each spark is a partial discharge that eats it.
func (s Slit) SparksInGas(state gas.State, how Sharing) (gap.Answer[quantity.Voltage], error) {
	starts, err := s.AcrossInGas(state)
	return s.onConductor(starts, err, how)
}

// AcrossInGas is the voltage across the annulus itself at which a gas in it sparks.
func (s Slit) AcrossInGas(state gas.State) (gap.Answer[quantity.Voltage], error) {
	l, err := s.line()
	if err != nil {
		return gap.Answer[quantity.Voltage]{}, err
	}
	starts, err := gas.Onset(state, l, gap.Smooth)
	if err != nil {
		return thin(state, l)
	}
	return starts, nil
}

// thin is the onset of an annulus under the reach of the streamer criterion, or of another
// gas: the field at the inner face reaches the mean one at which plates that far apart
// break down.
func thin(state gas.State, l shape.Line) (gap.Answer[quantity.Voltage], error) {
	a, err := gas.UniformBreakdown(state, l.Gap())
	a.Value *= quantity.Voltage(l.Utilisation())
	a.Because += ", at the field of the inner face"
	return a, err
}

// EmitsInVacuum is the voltage on the conductor at which the annulus, in vacuum, begins to
// emit or breaks down.
func (s Slit) EmitsInVacuum(how Sharing) (gap.Answer[quantity.Voltage], error) {
	starts, err := s.AcrossInVacuum()
	return s.onConductor(starts, err, how)
}

// AcrossInVacuum is the voltage across the annulus itself at which it emits or breaks
// down in vacuum.
func (s Slit) AcrossInVacuum() (gap.Answer[quantity.Voltage], error) {
	return vacuum.Onset(gap.Gap{
		Medium: gap.Vacuum, Shape: &gap.Shape{Kind: gap.Coaxial, InnerRadius: s.From, OuterRadius: s.To},
	})
}

// onConductor turns an onset across the annulus into one on the conductor.
func (s Slit) onConductor(a gap.Answer[quantity.Voltage], err error, how Sharing) (gap.Answer[quantity.Voltage], error) {
	if err != nil {
		return gap.Answer[quantity.Voltage]{}, err
	}
	share, err := s.Share(how)
	if err != nil {
		return gap.Answer[quantity.Voltage]{}, err
	}
	a.Value /= quantity.Voltage(share)
	for i := range a.Shown {
		a.Shown[i].Value /= quantity.Voltage(share)
	}
	if how == Settled {
		a.Assumptions = append(a.Assumptions, "the annuli take the whole voltage once DC has settled")
	}
	return a, nil
}
