package evidence

import (
	"math"
	"slices"

	"kilovet/hv/gun"
	"kilovet/hv/lack"
	"kilovet/hv/profile"
	"kilovet/hv/quantity"
	"kilovet/insulation/field"
	"kilovet/rules/build"
)

// FieldCutoff is the cutoff from the computed field of the gun's geometry, with the band
// of the setback's tolerance, over the working voltage and at it.
type FieldCutoff struct {
	Control, Anode     float64 // field at the cathode's apex for one volt on each, in 1/m
	Ratio              gun.CutoffEstimate
	Voltage, Low, High quantity.Voltage
}

// CutoffByField is the cutoff from the computed field of the gun.
func (e *Evidence) CutoffByField() (FieldCutoff, error) {
	c, err := remember(e.Under(Condition{}), "cutoff by field", e.fieldCutoff)
	if err != nil {
		return c, err
	}
	anode, err := e.anodeVoltage()
	c.Voltage = c.Ratio.Voltage(anode)
	c.Low, c.High = anode*quantity.Voltage(c.Ratio.Low), anode*quantity.Voltage(c.Ratio.High)
	return c, err
}

// fieldCutoff is what does not depend on the voltage.
func (e *Evidence) fieldCutoff() (c FieldCutoff, err error) {
	f := e.gunArrangement()
	if f == nil {
		return c, lack.Key("gun.geometry")
	}
	s, err := e.FieldOf(f)
	if err != nil {
		return c, err
	}
	setback := e.chain.Gun.Geometry.Setback.V
	if c.Control, c.Anode, c.Ratio.Ratio, err = cutoffOf(s, setback); err != nil {
		return c, err
	}
	return c, c.band(f, setback, e.chain.Gun.Geometry.SetbackTolerance.V)
}

func (e *Evidence) gunArrangement() *build.Arrangement {
	all := e.Arrangements()
	if i := slices.IndexFunc(all, func(a *build.Arrangement) bool { return a.From == build.FromGun }); i >= 0 {
		return all[i]
	}
	return nil
}

// cutoffOf is the influence of control electrode and anode on the apex, and their ratio.
func cutoffOf(s *field.Solution, setback quantity.Length) (control, anode, ratio float64, err error) {
	all, err := s.Influences(profile.Point{Z: -setback})
	if err != nil {
		return 0, 0, 0, err
	}
	for _, i := range all {
		switch i.Electrode {
		case build.Control:
			control = i.PerVolt
		case build.Anode:
			anode = i.PerVolt
		}
	}
	ratio, err = gun.CutoffOf(control, anode)
	return control, anode, ratio, err
}

// band is the cutoff with the setback at both ends of its tolerance.
func (c *FieldCutoff) band(f *build.Arrangement, setback, tolerance quantity.Length) error {
	c.Ratio.Low, c.Ratio.High = c.Ratio.Ratio, c.Ratio.Ratio
	if tolerance == 0 {
		return nil
	}
	i := slices.IndexFunc(f.Dimensions, func(d build.Dimension) bool { return d.Name == build.Setback })
	for _, v := range []quantity.Length{setback - tolerance, setback + tolerance} {
		s, err := solve(f.Dimensions[i].With(v))
		if err != nil {
			return err
		}
		_, _, ratio, err := cutoffOf(s, v)
		if err != nil {
			return err
		}
		c.Ratio.Low, c.Ratio.High = math.Min(c.Ratio.Low, ratio), math.Max(c.Ratio.High, ratio)
	}
	return nil
}
