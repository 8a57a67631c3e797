package xray

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Stop is a place where electrons stop: their voltage, at its highest, and current.
type Stop struct {
	Target  Target
	Voltage quantity.Voltage
	Current quantity.Current
}

// check says why nothing can be said of a stop.
func (s Stop) check() error {
	switch {
	case !(s.Target.Z >= 1):
		return lack.Range("a yield needs a target of atomic number 1 or more, not %g", s.Target.Z)
	case !(s.Voltage > 0) || quantity.AtMost(s.Voltage, lowestEnergy*1e3) || !quantity.AtMost(s.Voltage, highestEnergy*1e3):
		return lack.Range("the X-ray estimate holds above 1 kV and up to 150 kV, not at %s", quantity.Text(s.Voltage))
	case !(s.Current >= 0) || math.IsInf(float64(s.Current), 1):
		return lack.Range("the X-ray estimate needs a current of 0 A or more, not %s", quantity.Text(s.Current))
	}
	return nil
}

// scale is the kerma rate in Gy/s that a unit of the sums below stands for: k Z I over
// 4π r², with keV and cm²/g in the sums.
func (s Stop) scale(distance quantity.Length) float64 {
	const inSI = 1e3 * 1e3 / 10 // keV² cm²/g to eV² m²/kg
	r := float64(distance)
	return float64(Coefficient) * s.Target.Z * float64(s.Current) * inSI / (4 * math.Pi * r * r)
}

// beam is the continuum of electrons of an energy (keV) behind screens.
type beam struct {
	top  float64
	rays []ray
	// least is the depth of the most transparent point, taken out of all sums, so that
	// they hold where e to the minus it is no number any more.
	least float64
}

func newBeam(screens []screen, top float64) beam {
	b := beam{top: top, rays: rays(screens, top), least: math.Inf(1)}
	for _, r := range b.rays {
		b.least = min(b.least, r.depth)
	}
	return b
}

// passing is the share of a point that comes through, over that of the best.
func (b beam) passing(r ray) float64 { return r.span * math.Exp(b.least-r.depth) }

// kerma is ∫ 2 (U − E) µen/ρ e^(−µx) dE in units of Stop.scale, without e^(−least):
// Kramers's continuum of energy 2 k Z (U − E) dE an electron, whose integral is k Z U².
func (b beam) kerma() (sum float64) {
	for _, r := range b.rays {
		sum += b.passing(r) * 2 * (b.top - r.energy) * r.air
	}
	return sum
}

// lnKerma is the logarithm of the whole kerma in units of Stop.scale; −∞ where no
// energy of the tables is reached.
func (b beam) lnKerma() float64 { return math.Log(b.kerma()) - b.least }

// growth is d ln kerma / d ln U.
func (b beam) growth() float64 {
	var sum float64
	for _, r := range b.rays {
		sum += b.passing(r) * 2 * r.air
	}
	return b.top * sum / b.kerma()
}

// meanEnergy is the mean over the photons behind the wall, in keV.
func (b beam) meanEnergy() float64 {
	var photons, energy float64
	for _, r := range b.rays {
		e := b.passing(r) * (b.top - r.energy)
		photons += e / r.energy
		energy += e
	}
	return energy / photons
}
