package vacuum

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/solve"
)

// Fields at the tip of a microscopic projection, which is the field at the electrode
// times its enhancement.
const (
	weakestLocal  quantity.Field = 1e9     // under it the emission law gives nothing to count
	onsetLocal    quantity.Field = 2.5e9   // emission of a nanoampere begins at 2.5 to 3 GV/m
	onsetUpper    quantity.Field = 3e9     //
	barrierPerEV2                = 1.44e-9 // e³/4πε₀ in eV² m/V: at E = φ²/1.44e-9 the barrier is gone
	smoothBeta                   = 100     // found on optically polished cathodes, projections 2 µm high (read)
)

// FowlerNordheim is the current density that a cold surface emits in a local field,
// j = 1.54e-6 E²/φ 10^(4.52/√φ) exp(−6.53e9 φ^1.5/E), E in V/m, φ in eV. It holds from
// 1 GV/m to where the barrier vanishes, 14 GV/m for 4.5 eV, and for work functions of
// 2 to 6 eV.
func FowlerNordheim(local quantity.Field, workFunction quantity.ElectronEnergy) (quantity.CurrentDensity, error) {
	phi, e := float64(workFunction), float64(local)
	switch {
	case !quantity.AtLeast(phi, 2) || !quantity.AtMost(phi, 6):
		return 0, lack.Range("the emission law is used for work functions of 2 to 6 eV, asked for %s", quantity.Text(workFunction))
	case !quantity.AtLeast(local, weakestLocal) || !quantity.AtMost(e, strongest(workFunction)):
		return 0, lack.Range("the emission law holds for local fields of 1 GV/m to %s, asked for %s",
			quantity.Text(quantity.Field(strongest(workFunction))), quantity.Text(local))
	}
	return quantity.CurrentDensity(1.54e-6 * e * e / phi * math.Pow(10, 4.52/math.Sqrt(phi)) * math.Exp(-6.53e9*math.Pow(phi, 1.5)/e)), nil // Wang and Loew's form, memory
}

// strongest is the field at which the barrier vanishes.
func strongest(workFunction quantity.ElectronEnergy) float64 {
	return float64(workFunction*workFunction) / barrierPerEV2
}

// EmissionSource is where the emission law comes from.
var EmissionSource = gap.Source{Text: "Fowler-Nordheim law in the form of Wang and Loew", Mark: gap.Memory}

// Emitter is a spot of a cold electrode.
type Emitter struct {
	WorkFunction quantity.ElectronEnergy
	Enhancement  float64 // local field over field of the smooth electrode, β
	Area         quantity.Area
}

// Current is what the spot emits at a field of the electrode.
func (s Emitter) Current(applied quantity.Field) (quantity.Current, error) {
	if err := s.complete(); err != nil {
		return 0, err
	}
	j, err := FowlerNordheim(applied*quantity.Field(s.Enhancement), s.WorkFunction)
	return quantity.Current(float64(j) * float64(s.Area)), err
}

// FieldFor is the field of the electrode at which the spot emits a current. Currents
// past the ends of the law are a lack.
func (s Emitter) FieldFor(i quantity.Current) (quantity.Field, error) {
	if err := s.complete(); err != nil {
		return 0, err
	}
	surplus := func(e float64) (float64, error) {
		got, err := s.Current(quantity.Field(e))
		return math.Log(float64(got / i)), err
	}
	lo := float64(weakestLocal) / s.Enhancement
	hi := strongest(s.WorkFunction) / s.Enhancement
	least, err := surplus(lo)
	if err != nil {
		return 0, err
	}
	if most, _ := surplus(hi); i <= 0 || least > 0 || most < 0 {
		return 0, lack.Range("%s lies outside what the emission law gives for this spot", quantity.Text(i))
	}
	e, err := solve.Rise(lo, hi, surplus)
	return quantity.Field(e), err
}

func (s Emitter) complete() error {
	switch {
	case s.Enhancement < 1:
		return lack.Because("the field enhancement of the emitting spot is not given, 1 or more")
	case s.Area <= 0:
		return lack.Because("the area of the emitting spot is not given")
	}
	return nil
}

// EmissionOnset is the field of an electrode at which projections with an enhancement
// between 1 and 1000 begin to emit, 2.5 GV/m over the enhancement; beside it 3 GV/m.
func EmissionOnset(enhancement float64) (gap.Answer[quantity.Field], error) {
	if !quantity.AtLeast(enhancement, 1) || !quantity.AtMost(enhancement, 1000) {
		return gap.Answer[quantity.Field]{}, lack.Range("enhancements of 1 to 1000 are known, asked for %.4g", enhancement)
	}
	source := gap.Source{Text: "local field of 2.5 to 3 GV/m for emission of a nanoampere, by the " + EmissionSource.Text, Mark: gap.Derived}
	return gap.Answer[quantity.Field]{
		Value:   onsetLocal / quantity.Field(enhancement),
		Because: "the field at the projections reaches 2.5 GV/m",
		Sources: []gap.Source{source.Governing()},
		Shown:   []gap.Beside[quantity.Field]{{Value: onsetUpper / quantity.Field(enhancement), Source: source}},
	}, nil
}

// LocalBreakdown is a local field at which a metal's projections are destroyed and the
// gap breaks down, whatever its length; the enhancement is this field over that of the
// electrode at breakdown.
type LocalBreakdown struct {
	Metal  string
	Field  quantity.Field
	Spread quantity.Field // plus or minus, 0: not said
	gap.Source
}

// LocalBreakdowns are those that were read.
func LocalBreakdowns() []LocalBreakdown {
	return []LocalBreakdown{
		{"copper", 10.8e9, 0, gap.Source{Text: "DC breakdown study (Descoeudres, Levinsen, Calatroni, Taborelli, Wuensch), abstract", Mark: gap.Read}},
		{"aluminium", 5.7e9, 1.7e9, gap.Source{Text: "Vacuum breakdown and its effect on subsequent current emission, abstract", Mark: gap.Read}},
		{"tungsten", 6.5e9, 0, gap.Source{Text: "10 nm gap, Lyon and Hubler, Gap size dependence of the dielectric strength in nano vacuum gaps, abstract", Mark: gap.Read}},
	}
}

// Enhancement is the β that a local and an applied field imply.
func Enhancement(local, applied quantity.Field) float64 { return float64(local / applied) }
