package evidence

import (
	"kilovet/hv/document"
	"kilovet/hv/gun"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Cutoff is the bias at which emission stops at full working voltage: as stated, else
// from the gun's geometry.
func (e *Evidence) Cutoff() (quantity.Voltage, error) {
	g := e.chain.Gun
	if g == nil {
		return 0, lack.Key("gun")
	}
	if g.Cutoff.Set() || g.Geometry == nil {
		return g.Cutoff.Need()
	}
	c, err := e.CutoffFromGeometry()
	return c.Voltage, err
}

// CutoffFromGeometry is the cutoff that the geometry gives: by the computed field; where
// that has no answer, by the table.
func (e *Evidence) CutoffFromGeometry() (EstimatedCutoff, error) {
	by, err := e.CutoffByField()
	if err == nil {
		return by.EstimatedCutoff, nil
	}
	estimate, outside := e.CutoffEstimate()
	if outside == nil {
		return estimate, nil
	}
	return estimate, joined(outside, err)
}

// CutoffByGeometry reports whether the cutoff in use comes from the gun's geometry.
func (e *Evidence) CutoffByGeometry() bool {
	g := e.chain.Gun
	return g != nil && g.Geometry != nil && !g.Cutoff.Set() && !e.DiodeGun()
}

// Ways from a gun's geometry to its cutoff.
const (
	ByField = "computed field"
	ByTable = "tabulated geometries"
)

// EstimatedCutoff is a cutoff from the geometry, with its band, at an anode voltage.
type EstimatedCutoff struct {
	By                 string // ByField or ByTable
	Ratio              gun.CutoffEstimate
	Anode              quantity.Voltage
	Voltage, Low, High quantity.Voltage
}

// Outside is by which factor a cutoff lies outside the band; below one where it lies in it.
func (c EstimatedCutoff) Outside(v quantity.Voltage) float64 {
	return max(float64(v/c.High), float64(c.Low/v))
}

// GunAssumptions are what the operating point takes for granted.
func (e *Evidence) GunAssumptions() []string {
	var all []string
	if e.CutoffByGeometry() {
		all = append(all, e.CutoffAssumption())
	}
	if g := e.chain.Gun; g.IsFitted() && !e.DiodeGun() && !g.Exponent.Set() {
		all = append(all, "emission ~ (cutoff − bias)^2")
	}
	return all
}

// CutoffAssumption says where a cutoff from the geometry comes from.
func (e *Evidence) CutoffAssumption() string {
	if c, err := e.CutoffFromGeometry(); err == nil && c.By == ByField {
		return "the cutoff is computed from the gun's geometry, as cold and as true as drawn"
	}
	return "the cutoff is the estimate from the gun's geometry"
}

// CutoffEstimate is the cutoff from the tabulated geometries at the working voltage,
// with the band of the table and of the setback's tolerance.
func (e *Evidence) CutoffEstimate() (EstimatedCutoff, error) {
	return remember(e, "cutoff estimate", func() (EstimatedCutoff, error) {
		shape, tolerance, err := e.gunShape()
		if err != nil {
			return EstimatedCutoff{}, err
		}
		ratio, err := shape.CutoffWithin(tolerance)
		if err != nil {
			return EstimatedCutoff{}, err
		}
		anode, err := e.anodeVoltage()
		return cutoffAt(ByTable, ratio, anode), err
	})
}

func cutoffAt(by string, ratio gun.CutoffEstimate, anode quantity.Voltage) EstimatedCutoff {
	return EstimatedCutoff{by, ratio, anode, ratio.Voltage(anode), anode * quantity.Voltage(ratio.Low), anode * quantity.Voltage(ratio.High)}
}

// CutoffRatio is the cutoff over the working voltage; the one goes with the other.
func (e *Evidence) CutoffRatio() (float64, error) {
	cutoff, err := e.Cutoff()
	if err != nil {
		return 0, err
	}
	v, err := e.Accelerated()
	if err != nil || v == 0 {
		return 0, joined(err, lack.Failed("the gun has no working voltage"))
	}
	return float64(cutoff / magnitude(v)), nil
}

// gunShape is the geometry of the gun and the tolerance of its setback.
func (e *Evidence) gunShape() (gun.Geometry, quantity.Length, error) {
	if e.chain.Gun == nil || e.chain.Gun.Geometry == nil {
		return gun.Geometry{}, 0, lack.Key("gun.geometry")
	}
	g := e.chain.Gun.Geometry
	err := document.Need(g.ApertureRadius, g.PlateThickness, g.Setback, g.AnodeDistance)
	flat := g.Cathode.V == "flat"
	if !flat {
		err = joined(err, document.Need(g.TipRadius))
	}
	return gun.Geometry{ApertureRadius: g.ApertureRadius.V, PlateThickness: g.PlateThickness.V, Setback: g.Setback.V,
		AnodeDistance: g.AnodeDistance.V, AnodeApertureRadius: g.AnodeApertureRadius.V,
		Tip: gun.Tip{Flat: flat, Radius: g.TipRadius.V}}, g.SetbackTolerance.V, err
}

// anodeVoltage is the working voltage that the cutoff goes with: the set one, else that
// of no load. What the bias takes of it is within the band.
func (e *Evidence) anodeVoltage() (quantity.Voltage, error) {
	if r := e.chain.Regulation; r != nil {
		return r.Set.V, nil
	}
	return e.NoLoad()
}

// joined is one lack for what two reasons miss; the first reason that is no missing key
// governs.
func joined(a, b error) error {
	la, lb := lack.Of(a), lack.Of(b)
	switch {
	case a == nil:
		return b
	case b == nil || la == nil || lb == nil || la.Kind != lack.Missing || lb.Kind != lack.Missing:
		return a
	}
	return lack.Key(append(append([]string{}, la.Keys...), lb.Keys...)...)
}
