package beam

import (
	"math"

	"kilovet/hv/gun"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// cells is into how many cells the laws of sources are cut.
const cells = 2048

// GaussianFWHM is a source of measured energy width, given as FWHM; the usual
// reading of a measured width, W/2.355 for the standard deviation.
func GaussianFWHM(width quantity.ElectronEnergy) (Distribution, error) {
	if !positive(width) {
		return Distribution{}, lack.Range("a source has an energy width above zero, not %s", quantity.Text(width))
	}
	const tails = 7 // standard deviations; 3e-12 lie beyond
	t := tabulate(func(u float64) (x, c float64) {
		x = tails * (2*u - 1)
		return x, math.Erfc(-x/math.Sqrt2) / 2
	})
	t.variance, t.fwhm = 1, 2*math.Sqrt(2*math.Ln2)
	return Distribution{t, float64(width) / t.fwhm}, nil
}

// Thermionic is the source of a hot cathode: total energies by x exp(−x) with x =
// E/kT, whose mean is 2 kT, rms √2 kT and FWHM 2.446 kT (2.45 in textbooks, from
// memory). Beams of high current are wider (H. Boersch: 1 to 2 eV where kT is
// 0.2 eV, after F. Lenz 1960, read); then the width must be measured.
func Thermionic(t quantity.Temperature) (Distribution, error) {
	if !positive(t) {
		return Distribution{}, lack.Range("a thermionic source has a temperature above zero")
	}
	const end = 32 // kT; 4e-13 lie beyond
	table := tabulate(func(u float64) (x, c float64) {
		x = end * u * u // closer where most electrons are
		return x - 2, -math.Expm1(math.Log1p(x) - x)
	})
	table.variance, table.fwhm = 2, thermalFWHM
	return Distribution{table, float64(gun.ThermalEnergy(t))}, nil
}

// thermalFWHM is the distance of the two roots of x exp(1 − x) = 1/2.
const thermalFWHM = 2.446385547

// ThermalFWHM is the least width a hot cathode's beam can have: one given below it
// is a mistake.
func ThermalFWHM(t quantity.Temperature) quantity.ElectronEnergy {
	return thermalFWHM * gun.ThermalEnergy(t)
}

// tabulate takes a law of finite density and endless tails at even steps of u from
// 0 to 1.
func tabulate(law func(u float64) (x, c float64)) *table {
	t := &table{x: make([]float64, cells+1), c: make([]float64, cells+1), full: math.Inf(1), bounded: true}
	for i := range t.x {
		t.x[i], t.c[i] = law(float64(i) / cells)
	}
	t.c[0], t.c[cells] = 0, 1
	return t
}
