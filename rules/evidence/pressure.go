package evidence

import (
	"math"

	"kilovet/hv/chain"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/gas"
	"kilovet/insulation/vacuum"
)

// Highest is the highest voltage to ground of the output, or across any spacing where no
// supply is described.
func (e *Evidence) Highest() (quantity.Voltage, error) {
	if e.HasSupply() {
		most, err := Largest(e, Ratings(), []string{"output"}, func(e *Evidence, n string) (quantity.Voltage, error) { return e.Between(n, "ground") })
		return most.Value, err
	}
	var most quantity.Voltage
	for _, s := range e.Spacings() {
		if x, err := e.Spacing(s); err == nil {
			most = max(most, x.Voltages.Peak)
		}
	}
	if most == 0 {
		return 0, lack.Because("no voltage is known")
	}
	return most, nil
}

// siteAir is the air of the site.
func (e *Evidence) siteAir() (gas.State, error) {
	return gas.StateOf(e.gap(&chain.Spacing{}))
}

// SphereGap is a pair of measuring spheres and the distance at which they spark.
type SphereGap struct {
	Diameter, Distance quantity.Length
	Source             gap.Source
}

// SphereGaps are the pairs that spark at the highest voltage within their tables.
func (e *Evidence) SphereGaps() ([]SphereGap, quantity.Voltage) {
	v, err := e.Highest()
	if err != nil {
		return nil, 0
	}
	air, err := e.siteAir()
	if err != nil {
		return nil, 0
	}
	var all []SphereGap
	for _, diameter := range gas.MeasuringSpheres() {
		if d, source, err := gas.SparkingDistance(air, diameter, v); err == nil {
			all = append(all, SphereGap{diameter, d, source})
		}
	}
	return all, v
}

// PaschenPoint is a place on or beside the curve of a gas.
type PaschenPoint struct {
	Name    string
	Product quantity.PressureLength
	Voltage quantity.Voltage
	Share   float64 // of a path: its voltage over that of the curve there, the lowest where there is none
}

// Paschen is the curve of the vessel's gas at 20 °C and what of the chain lies on it.
type Paschen struct {
	Gas    gap.Gas
	Lowest PaschenPoint // the measured minimum
	Law    []PaschenPoint
	Paths  []PaschenPoint
}

// pointsOfPaschen are how many points the curve has over its seven decades.
const pointsOfPaschen = 120

// Paschen is the breakdown of the vessel's gas between plates, from the measured minimum
// on by the law of the gas; and the paths of the chain at the voltages across them.
func (e *Evidence) Paschen() (Paschen, error) {
	vessel := e.Vessel()
	p := Paschen{Gas: gap.Gap{Gas: vessel.Gas}.Filling()}
	m, err := gas.MeasuredMinimum(p.Gas)
	if err != nil {
		return p, err
	}
	p.Lowest = PaschenPoint{Product: m.At, Voltage: m.Voltage}
	for i := range pointsOfPaschen {
		product := quantity.PressureLength(1e-2 * math.Pow(10, 7*float64(i)/(pointsOfPaschen-1)))
		if v, err := gas.AtProduct(p.Gas, product); err == nil && product >= m.At {
			p.Law = append(p.Law, PaschenPoint{Product: product, Voltage: v})
		}
	}
	p.Paths = e.pathsInGas(p.Gas)
	for i, q := range p.Paths {
		stands := m.Voltage
		if v, err := gas.AtProduct(p.Gas, q.Product); err == nil && q.Product >= m.At {
			stands = v
		}
		p.Paths[i].Share = float64(q.Voltage / stands)
	}
	if len(p.Law) == 0 || len(p.Paths) == 0 {
		return p, lack.Because("no path of the chain lies in a gas with a known law")
	}
	return p, nil
}

// pathsInGas are the longest path at its permit, and the gaps in the same gas.
func (e *Evidence) pathsInGas(filling gap.Gas) []PaschenPoint {
	var all []PaschenPoint
	highest, err := e.Highest()
	if v := e.chain.Vacuum; err == nil && v != nil && v.PressurePermit.Set() && v.LongestPath.Set() {
		pressure := float64(v.PressurePermit.V) * v.GaugeFactor.Or(1)
		all = append(all, PaschenPoint{Name: "longest path at its permit", Product: quantity.PressureLength(pressure * float64(v.LongestPath.V)), Voltage: highest})
	}
	for _, s := range e.Spacings() {
		x, err := e.Spacing(s)
		if err != nil || x.Gap.Clearance <= 0 || x.Gap.Medium != gap.Air && x.Gap.Medium != gap.InGas || x.Gap.Filling() != filling {
			continue
		}
		state, err := gas.StateOf(x.Gap)
		if err != nil || x.Voltages.Peak <= 0 {
			continue
		}
		all = append(all, PaschenPoint{Name: s.Name.V, Product: quantity.PressureLength(float64(state.Density()) * 101325 * float64(x.Gap.Clearance)), Voltage: x.Voltages.Peak})
	}
	return all
}

// Pumping is what matters of a gas while the vessel is pumped.
type Pumping struct {
	Gas      gap.Gas
	Permit   vacuum.Permit
	Worst    gap.Result[quantity.Pressure]
	Band     vacuum.Band
	BandLack error
}

// PumpDown is that of the vessel's gas, and of helium.
func (e *Evidence) PumpDown() ([]Pumping, error) {
	if e.chain.Vacuum == nil {
		return nil, lack.Key("vacuum")
	}
	highest, err := e.Highest()
	if err != nil {
		return nil, err
	}
	vessel := e.Vessel()
	gases := []gap.Gas{gap.Gap{Gas: vessel.Gas}.Filling()}
	if gases[0] != gap.Helium {
		gases = append(gases, gap.Helium)
	}
	var all []Pumping
	for _, vessel.Gas = range gases {
		row := Pumping{Gas: vessel.Gas, Worst: gap.ResultOf(vessel.WorstPressure())}
		if row.Permit, err = vessel.Permit(); err != nil {
			return nil, err
		}
		row.Band, row.BandLack = vessel.Band(highest)
		all = append(all, row)
	}
	return all, nil
}
