package xray

import (
	"math"

	"kilovet/hv/quantity"
)

// Band is how far the upper figure stands above the best estimate at least: for build-up
// in heavy walls, for the K lines of heavy targets and for straight lines between rows.
// The continuum's level needs none: behind filters the best estimate came out 1.0 to 2.6
// times published figures (tube output at 50 to 90 kV behind 1 to 3 mm aluminium,
// radiographic output, ISO quality N-30), never below.
const Band = 2.0

// Estimate is the air kerma rate at a point behind a wall.
type Estimate struct {
	// Rate is the best estimate that is not low: with Coefficient.
	Rate quantity.KermaRate
	// Low is the same with LowCoefficient, the usual textbook figure. It is no lower
	// bound: published beams lie down to Rate/2.6.
	Low quantity.KermaRate
	// Upper is what to judge by: the greater of Band times the rate and of the rate of a
	// wide beam, whose scatter in light layers (aluminium, glass, plastics, water, air)
	// reaches the point too (µen in place of µ, the usual approximation); and Lines.
	Upper quantity.KermaRate
	// Lines is more than the target's characteristic lines may add: the energy of the
	// whole continuum put into the line of each series that does most behind the wall.
	// It matters behind thin windows only.
	Lines quantity.KermaRate
	// MeanEnergy is that of the photons behind the wall.
	MeanEnergy quantity.ElectronEnergy
	// HalfValue and NextHalf are the thicknesses of the last layer's material that halve
	// the rate, and halve it again.
	HalfValue, NextHalf quantity.Length
}

// Behind estimates the air kerma rate at the point of a wall. The electrons' voltage
// must lie above 1 kV and not above 150 kV, the wall must have a layer, the distance
// be above zero; else it is a lack. Photons below 1 keV are left out: no wall passes
// them. Build-up in heavy walls is within the band. A rate too small to be a number is
// zero; the energies and half-value layers hold all the same.
func (s Stop) Behind(w Wall) (Estimate, error) {
	if err := s.check(); err != nil {
		return Estimate{}, err
	}
	if err := w.check(); err != nil {
		return Estimate{}, err
	}
	b := newBeam(w.screens(false), s.kilovolts())
	rate := s.rate(b, w.Distance)
	lines := s.lines(w)
	half, next, err := b.halfValueLayers(w.last())
	if err != nil {
		return Estimate{}, err
	}
	return Estimate{
		Rate: rate, Low: rate * quantity.KermaRate(LowCoefficient/Coefficient),
		Upper: max(Band*rate, s.wide(w)) + lines, Lines: lines,
		MeanEnergy: quantity.ElectronEnergy(b.meanEnergy() * 1e3),
		HalfValue:  half, NextHalf: next,
	}, nil
}

// kilovolts is the voltage, which is the greatest photon energy in keV.
func (s Stop) kilovolts() float64 { return min(float64(s.Voltage)/1e3, highestEnergy) }

// rate is the kerma rate of a beam at a distance.
func (s Stop) rate(b beam, distance quantity.Length) quantity.KermaRate {
	return quantity.KermaRate(s.scale(distance) * math.Exp(b.lnKerma()))
}

// wide is the rate of a wide beam; zero where no layer is light, since there it is the
// narrow one's.
func (s Stop) wide(w Wall) quantity.KermaRate {
	if !w.isLight() {
		return 0
	}
	return s.rate(newBeam(w.screens(true), s.kilovolts()), w.Distance)
}

// lines is Estimate.Lines: k Z U² an electron at the energy of a line.
func (s Stop) lines(w Wall) (sum quantity.KermaRate) {
	top, screens := s.kilovolts(), w.screens(false)
	for _, series := range s.Target.series {
		if top <= series.edge {
			continue
		}
		var most float64
		for _, energy := range series.lines {
			most = max(most, kermaAt(screens, energy))
		}
		sum += quantity.KermaRate(s.scale(w.Distance) * top * top * most)
	}
	return sum
}

// kermaAt is µen/ρ of air (cm²/g) times what screens pass of an energy (keV).
func kermaAt(screens []screen, energy float64) float64 {
	return math.Exp(airTable.at(energy, absorption).ln(math.Log(energy)) - depthAt(screens, energy))
}

// depthAt is µx of screens at an energy.
func depthAt(screens []screen, energy float64) (sum float64) {
	x := math.Log(energy)
	for _, s := range screens {
		sum += math.Exp(s.areal + s.table.at(energy, s.of).ln(x))
	}
	return sum
}
