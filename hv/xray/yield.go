package xray

import "kilovet/hv/quantity"

// Coefficients k of the yield η = k Z U of a thick target. The first is the one that
// did not come out below any published filtered beam; the second, the usual textbook
// value, came out 20 % low against one of them.
const (
	// Coefficient is P. Kirkpatrick and L. Wiedmann, Phys. Rev. 67 (1945) 321: 1.4e-6 Z
	// per kV (read in the abstract).
	Coefficient quantity.PerVolt = 1.4e-9
	// LowCoefficient is Kramers's in textbooks (memory; 0.9e-9 to 1.1e-9 were read).
	LowCoefficient quantity.PerVolt = 1.1e-9
)

// Yield is the share η = k Z U of the electrons' energy that a thick target turns into
// its continuum. Linear far below the electron's rest energy alone: at 2.35 MV it is
// three times too high.
func Yield(k quantity.PerVolt, z float64, u quantity.Voltage) quantity.Fraction {
	return quantity.Fraction(float64(k) * z * float64(u)) // H. A. Kramers, Phil. Mag. 46 (1923) 836
}

// DosePerKerma is the most ambient dose equivalent H*(10), in sieverts, that a gray of
// air kerma stands for, at 60 keV; at 100 keV it is 1.65, at 30 keV 1.10, at 15 keV 0.26
// (ICRP Publication 74, memory).
const DosePerKerma = 1.74

// KermaPerRoentgen is the air kerma, in grays, of one roentgen: 2.58e-4 C/kg (exact by
// definition) times 33.97 J/C, the energy spent in air per charge set free (± 0.2 %).
const KermaPerRoentgen = 2.58e-4 * 33.97
