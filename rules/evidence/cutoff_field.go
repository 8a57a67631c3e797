package evidence

import (
	"math"
	"slices"

	"kilovet/hv/chain"
	"kilovet/hv/gun"
	"kilovet/hv/lack"
	"kilovet/hv/profile"
	"kilovet/hv/quantity"
	"kilovet/insulation/field"
	"kilovet/rules/build"
)

// FieldCutoff is the cutoff from the computed field of the gun's geometry, over the working
// voltage and at it. Its band is that of the setback's tolerance, of the edges of the hole
// in the control electrode, between fully rounded and sharp, and of the computation.
type FieldCutoff struct {
	ToControl, ToAnode float64 // field at the cathode's apex for one volt on each, in 1/m
	EstimatedCutoff
}

// computedBand is five times what the computed cutoff of a gun was off an independent
// solution of the same figure by finite elements (see the tests).
const computedBand = 0.005

// CutoffByField is the cutoff from the computed field of the gun.
func (e *Evidence) CutoffByField() (FieldCutoff, error) {
	c, err := e.gunField()
	if err != nil {
		return c, err
	}
	anode, err := e.anodeVoltage()
	c.EstimatedCutoff = cutoffAt(ByField, c.Ratio, anode)
	return c, err
}

// gunField is what does not depend on the voltage; a change of another part leaves it.
func (e *Evidence) gunField() (FieldCutoff, error) {
	if e.before != nil && e.before.chain.Gun == e.chain.Gun {
		return e.before.gunField()
	}
	return remember(e.Under(Condition{}), "cutoff by field", e.fieldCutoff)
}

func (e *Evidence) fieldCutoff() (c FieldCutoff, err error) {
	f := e.gunArrangement()
	if f == nil {
		return c, lack.Key("gun.geometry")
	}
	s, err := e.FieldOf(f)
	if err != nil {
		return c, err
	}
	g := e.chain.Gun.Geometry
	if c.ToControl, c.ToAnode, c.Ratio.Ratio, err = cutoffOf(s, g.Setback.V); err != nil {
		return c, err
	}
	c.Ratio.Low, c.Ratio.High, err = cutoffBand(f, g)
	return c, err
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

// cutoffBand is between which ratios the cutoff lies with the setback at both ends of its
// tolerance and the hole's edges rounded or sharp.
func cutoffBand(f *build.Arrangement, g *chain.GunGeometry) (low, high float64, err error) {
	i := slices.IndexFunc(f.Dimensions, func(d build.Dimension) bool { return d.Name == build.Setback })
	low, high = math.Inf(1), math.Inf(-1)
	ends := []quantity.Length{g.Setback.V - g.SetbackTolerance.V, g.Setback.V + g.SetbackTolerance.V}
	if g.SetbackTolerance.V == 0 {
		ends = ends[:1]
	}
	for _, setback := range ends {
		for _, other := range []*build.Arrangement{f.Dimensions[i].With(setback), build.SharpGun(g, setback)} {
			s, err := solve(other)
			if err != nil {
				return 0, 0, err
			}
			_, _, ratio, err := cutoffOf(s, setback)
			if err != nil {
				return 0, 0, err
			}
			low, high = math.Min(low, ratio), math.Max(high, ratio)
		}
	}
	return low * (1 - computedBand), high * (1 + computedBand), nil
}
