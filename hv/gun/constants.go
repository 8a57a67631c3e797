// Package gun holds the law by which a triode electron gun emits, the load line
// of its bias resistor, the limit its cathode's temperature sets, and what
// heater and noise do to the cathode's potential. It takes plain quantities and
// knows no description.
//
// The bias is a positive magnitude throughout: the control electrode is that far
// below the cathode. Less bias, more emission.
package gun

import "kilovet/hv/quantity"

// Constants, CODATA 2018; the first two are exact by definition.
const (
	// ElementaryCharge is e in coulombs.
	ElementaryCharge = 1.602176634e-19
	// Boltzmann is k in joules per kelvin.
	Boltzmann = 1.380649e-23
	// vacuumPermittivity is ε₀ in farads per metre, ± 1.3e-21.
	vacuumPermittivity = 8.8541878128e-12
	// stefanBoltzmann is σ in watts per square metre and K⁴, exact (2π⁵k⁴/15h³c²), rounded.
	stefanBoltzmann = 5.670374419e-8
)

// ThermalEnergy is kT in electronvolts.
func ThermalEnergy(t quantity.Temperature) quantity.ElectronEnergy {
	return quantity.ElectronEnergy(Boltzmann / ElementaryCharge * float64(t))
}
