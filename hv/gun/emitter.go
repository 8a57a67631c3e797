package gun

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Emitter is Richardson's constant and the work function of a surface. The two
// belong together and must come from one source: for lanthanum hexaboride two
// printed pairs differ by four at 1973 K.
type Emitter struct {
	Constant     quantity.RichardsonConstant
	WorkFunction quantity.ElectronEnergy
	Source       string
	// Mark says how the source is known: "read", "memory" or "derived".
	Mark string
}

// Tungsten is the pair that was read; work functions of 4.52 and 4.54 eV are in
// use with the same constant and give 8 and 16 % less at 2700 K.
func Tungsten() Emitter {
	return Emitter{60e4, 4.5, "textbook exercise, attributed to H. C. Verma, Concepts of Physics 2: A = 60 A/cm2K2, 4.5 eV", "read"}
}

// LanthanumHexaboride is the pair of the usual polycrystal cathode.
func LanthanumHexaboride() Emitter {
	return Emitter{29e4, 2.66, "J. M. Lafferty, J. Appl. Phys. 22 (1951) 299: A = 29 A/cm2K2, 2.66 eV", "memory"}
}

// universalConstant is A₀ = 4π m k² e/h³ for a surface that reflects no electron.
const universalConstant = 120.17e4

// LanthanumHexaborideUniversal pairs the universal constant with the work
// function that was read: the upper of the two published descriptions, 4 times
// the other.
func LanthanumHexaborideUniversal() Emitter {
	return Emitter{universalConstant, 2.67, "universal constant 120.17 A/cm2K2 with 2.67 eV (AIAA paper quoted with IEEE Trans. Plasma Sci. 6 (1978) 191)", "read"}
}

// ForWorkFunction finds Richardson's constant for a work function given alone:
// that of tungsten from 4.50 to 4.54 eV, the values printed with it; a lack
// elsewhere, since no constant belongs to a work function as such.
func ForWorkFunction(w quantity.ElectronEnergy) (Emitter, error) {
	if !quantity.AtLeast(w, 4.50) || !quantity.AtMost(w, 4.54) {
		return Emitter{}, lack.Range("Richardson's constant is known for tungsten alone (4.50 to 4.54 eV), not for a work function of %s", quantity.Text(w))
	}
	e := Tungsten()
	e.WorkFunction = w
	return e, nil
}

// CurrentDensity is Richardson's law J = A T² exp(−φ/kT), without field and
// without space charge. CODATA constants; books that round k and e differ by 2 %.
func (e Emitter) CurrentDensity(t quantity.Temperature) (quantity.CurrentDensity, error) {
	if !positive(t) || !positive(e.Constant) || !positive(e.WorkFunction) {
		return 0, lack.Range("Richardson's law needs constant, work function and temperature above zero")
	}
	kT := float64(t) * float64(t) * math.Exp(-float64(e.WorkFunction/ThermalEnergy(t)))
	return quantity.CurrentDensity(float64(e.Constant) * kT), nil
}

// Limit is the most that a cathode of the area gives at its temperature.
func (e Emitter) Limit(area quantity.Area, t quantity.Temperature) (quantity.Current, error) {
	j, err := e.CurrentDensity(t)
	if err != nil {
		return 0, err
	}
	if !positive(area) {
		return 0, lack.Range("no limit for an emitting area of %s", quantity.Text(area))
	}
	return quantity.Current(float64(j) * float64(area)), nil
}

// Sensitivity is d ln J / d ln T = 2 + φ/kT of Richardson's law.
func (e Emitter) Sensitivity(t quantity.Temperature) (float64, error) {
	if !positive(t) {
		return 0, lack.Range("Richardson's law needs a temperature above zero")
	}
	return 2 + float64(e.WorkFunction/ThermalEnergy(t)), nil
}

// SchottkyLowering is how far a field at the surface lowers its work function,
// √(e³E/4πε₀): 38 meV at 1 MV/m. Zero for fields that hold electrons back.
func SchottkyLowering(field quantity.Field) quantity.ElectronEnergy {
	return quantity.ElectronEnergy(math.Sqrt(ElementaryCharge * math.Max(float64(field), 0) / (4 * math.Pi * vacuumPermittivity)))
}
