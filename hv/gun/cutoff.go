package gun

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Geometry is what sets the cutoff of a triode gun.
type Geometry struct {
	ApertureRadius quantity.Length // of the hole in the control electrode
	PlateThickness quantity.Length // of the control electrode at the hole
	Setback        quantity.Length // cathode behind the plate
	AnodeDistance  quantity.Length // plate to anode
	// Tip is the shape of the cathode.
	Tip Tip
	// AnodeApertureRadius is that of the hole in the anode, 0 for none.
	AnodeApertureRadius quantity.Length
}

// Tip is the cathode's end: flat, or rounded to a radius.
type Tip struct {
	Flat   bool
	Radius quantity.Length
}

// CutoffEstimate is a cutoff over the anode voltage, with the band it may lie in.
type CutoffEstimate struct{ Ratio, Low, High float64 }

// Voltage is the cutoff at an anode voltage.
func (c CutoffEstimate) Voltage(anode quantity.Voltage) quantity.Voltage {
	return anode * quantity.Voltage(c.Ratio)
}

// The tabulated solutions: axisymmetric Laplace problems solved for this purpose
// (finite volumes, 10 µm mesh, within 2 %; derived, not published), field at the
// cathode's apex zero, solid flat anode 10 mm behind the plate. Laplace's
// equation knows no length, and with the field before the anode uniform Vc goes
// with 1/distance; so the rows are one curve of Vc/Va · distance/hole radius
// against setback/hole radius:
//
//	hole  setback  plate   flat      tip r 60 µm
//	0.5   0.2      0       0.02647   0.01265
//	0.75  0.3      0       0.04042   0.01801
//	0.5   0.3      0       0.0199    0.00919
//	0.5   0.5      0       0.01191   0.00508
//	0.25  0.3      0       0.00463   0.00216
//	0.5   0.3      0.1     0.0121    0.00554
//	0.5   0.3      0.2     0.00753   0.00342
//
// The second and fifth tip rows are brought to the tip radius of the others by
// tipPower; the two rows at 0.4 agree within 1 % and are averaged.
var (
	setbacks      = [...]float64{0.4, 0.6, 1.0, 1.2}
	flatCutoff    = [...]float64{0.5342, 0.3980, 0.2382, 0.1852}
	tipCutoff     = [...]float64{0.2530, 0.1838, 0.1016, 0.0790}
	thicknesses   = [...]float64{0, 0.2, 0.4}
	flatThickness = [...]float64{1, 0.0121 / 0.0199, 0.00753 / 0.0199}
	tipThickness  = [...]float64{1, 0.00554 / 0.00919, 0.00342 / 0.00919}
)

// Ends of the table in hole radii, but the anode's hole in its distance: a hole of
// a quarter changes the uniform field by 0.3 %.
const (
	sharpestTip    = 0.08
	tabulatedTip   = 0.12
	bluntestTip    = 0.24
	nearestAnode   = 40.0 / 3
	widestAperture = 0.25
)

// tipPower is how the cutoff grows with the tip's radius at one setback:
// ln(0.2530/0.2401)/ln 1.5 from the two rows at 0.4.
const tipPower = 0.129

// Bands of the estimate: the mesh; between rows; and with a thick plate at
// another setback than the rows with one have. A second solution, on other meshes,
// lay within 1 % of the flat rows and 4 % of those with a tip (there taken as a
// rod's round end); between them the estimate was 6 % off at most, with a tip and a
// thick plate in the far corner 14 %. Of the tip's radius it gave 5 % more at the
// blunt end than tipPower; 1/distance held within 2 % up to four times as far.
const (
	meshBand   = 0.02
	rowsBand   = 0.05
	thickBand  = 0.15
	thickAt    = 0.6
	ofTheTable = "the table of cutoffs holds for "
)

// Cutoff estimates the cutoff over the anode voltage by interpolating the
// tabulated solutions: setback 0.4 to 1.2, plate 0 to 0.4 and tip radius 0.08 to
// 0.24 of the hole's radius, anode at least 13.3 of them away, its own hole not
// wider than a quarter of the distance. Outside it is a lack.
func (g Geometry) Cutoff() (CutoffEstimate, error) {
	if err := g.tabulated(); err != nil {
		return CutoffEstimate{}, err
	}
	hole := float64(g.ApertureRadius)
	setback, plate := float64(g.Setback)/hole, float64(g.PlateThickness)/hole
	curve, thickness, factor := flatCutoff[:], flatThickness[:], 1.0
	if !g.Tip.Flat {
		curve, thickness = tipCutoff[:], tipThickness[:]
		factor = math.Pow(float64(g.Tip.Radius)/hole/tabulatedTip, tipPower)
	}
	ratio := factor * between(setbacks[:], curve, setback) * between(thicknesses[:], thickness, plate) * hole / float64(g.AnodeDistance)
	band := rowsBand
	if plate > 0 && !quantity.Equal(setback, thickAt) {
		band = thickBand
	}
	band += meshBand
	return CutoffEstimate{ratio, ratio * (1 - band), ratio * (1 + band)}, nil
}

// CutoffWithin is Cutoff for a setback that may be off by a tolerance to either side:
// the band takes in that of both ends. An end outside the table is a lack.
func (g Geometry) CutoffWithin(tolerance quantity.Length) (CutoffEstimate, error) {
	middle, err := g.Cutoff()
	if err != nil || tolerance == 0 {
		return middle, err
	}
	near, far := g, g
	near.Setback -= tolerance
	far.Setback += tolerance
	most, err := near.Cutoff()
	if err != nil {
		return CutoffEstimate{}, err
	}
	least, err := far.Cutoff()
	return CutoffEstimate{middle.Ratio, min(least.Low, middle.Low), max(most.High, middle.High)}, err
}

// tabulated says where the geometry leaves the table.
func (g Geometry) tabulated() error {
	hole := g.ApertureRadius
	if !positive(hole) || !positive(g.AnodeDistance) {
		return lack.Range("%sa hole and an anode distance above zero", ofTheTable)
	}
	of := func(l quantity.Length) float64 { return float64(l / hole) }
	switch {
	case !inside(of(g.Setback), setbacks[0], setbacks[len(setbacks)-1]):
		return lack.Range("%sa setback of 0.4 to 1.2 hole radii, not %s", ofTheTable, quantity.Significant(of(g.Setback)))
	case !inside(of(g.PlateThickness), thicknesses[0], thicknesses[len(thicknesses)-1]):
		return lack.Range("%sa plate of 0 to 0.4 hole radii, not %s", ofTheTable, quantity.Significant(of(g.PlateThickness)))
	case !g.Tip.Flat && !inside(of(g.Tip.Radius), sharpestTip, bluntestTip):
		return lack.Range("%sa tip of 0.08 to 0.24 hole radii, not %s", ofTheTable, quantity.Significant(of(g.Tip.Radius)))
	case !quantity.AtLeast(of(g.AnodeDistance), nearestAnode):
		return lack.Range("%san anode at least 13.3 hole radii away, not %s", ofTheTable, quantity.Significant(of(g.AnodeDistance)))
	case !inside(float64(g.AnodeApertureRadius/g.AnodeDistance), 0, widestAperture):
		return lack.Range("%san anode with a hole of at most a quarter of its distance", ofTheTable)
	}
	return nil
}

func inside(x, low, high float64) bool { return quantity.AtLeast(x, low) && quantity.AtMost(x, high) }

// between interpolates ln y linearly in x; the ends are those of the table.
func between(xs, ys []float64, x float64) float64 {
	i := 1
	for i < len(xs)-1 && x > xs[i] {
		i++
	}
	t := (x - xs[i-1]) / (xs[i] - xs[i-1])
	t = min(max(t, 0), 1)
	return math.Exp((1-t)*math.Log(ys[i-1]) + t*math.Log(ys[i]))
}
