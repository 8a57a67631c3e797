package gas

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

// The law of uniform fields in air, V = 24.22 x + 6.08 √x kV with x = δ d in cm
// (Naidu and Kamaraju, High Voltage Engineering, ch. 2; read).
const (
	uniformField quantity.Field = 24.22e5 // V/m
	uniformRoot  float64        = 6.08e4  // V/√m: 6.08 kV/√cm
)

// The law was measured from about 0.1 mm to 10 cm and is used to 20 cm (the book's
// example 2.3).
const (
	shortestUniform quantity.Length = 0.1e-3
	longestUniform  quantity.Length = 0.2
)

// UniformAir is the breakdown voltage of air between plates. It holds for δ d from
// 0.1 mm to 20 cm; outside there is a lack.
func UniformAir(density quantity.Fraction, d quantity.Length) (quantity.Voltage, error) {
	x := quantity.Length(density) * d
	if !quantity.AtLeast(x, shortestUniform) || !quantity.AtMost(x, longestUniform) {
		return 0, lack.Range("the uniform-field law holds for gaps of 0.1 mm to 20 cm at normal density, asked for %s", quantity.Text(x))
	}
	return uniformLaw(x), nil
}

func uniformLaw(x quantity.Length) quantity.Voltage {
	return quantity.Voltage(float64(uniformField)*float64(x) + uniformRoot*math.Sqrt(float64(x)))
}

// UniformBreakdown is the breakdown voltage of a gas between plates a distance d
// apart, right of the Paschen minimum.
//
// Air: the law of uniform fields; under δ d = 0.1 mm Paschen's law, not below the
// measured minimum. Nitrogen: Paschen's law; from 1 mm to 5 cm at normal density the law
// of air, which it meets within 1 % at 1 cm. Sulphur hexafluoride: the streamer criterion,
// under 0.1 mm at normal density a lower bound. Carbon dioxide: past its minimum a lower
// bound. The other gases: Paschen's law where its constants hold: hydrogen to some 4400,
// argon to 340, helium to 36 Torr cm. Left of the minimum the longest path breaks down first:
// the answer is the minimum itself. Gaps under 10 µm and pressures above 1 MPa are a lack.
func UniformBreakdown(s State, d quantity.Length) (gap.Answer[quantity.Voltage], error) {
	switch {
	case d < shortestGap:
		return gap.Answer[quantity.Voltage]{}, lack.Range("gaps under 10 µm break down by field emission, asked for %s", quantity.Text(d))
	case s.Pressure > highestPressure:
		return gap.Answer[quantity.Voltage]{}, lack.Range("above 1 MPa the roughness of the electrodes decides, asked for %s", quantity.Text(s.Pressure))
	}
	switch s.Gas {
	case gap.AirGas:
		return uniformAir(s, d)
	case gap.Nitrogen:
		return uniformNitrogen(s, d)
	case gap.SulphurHexafluoride:
		return uniformSF6(s, d)
	case gap.CarbonDioxide:
		return uniformCO2(s, d)
	}
	return paschenAnswer(s.Gas, s.reduced(d))
}

// shortestGap is where Paschen's law ends at atmospheric pressure, about 5 to 10 µm
// (memory); highestPressure is a bound of practice.
const (
	shortestGap     quantity.Length   = 10e-6
	highestPressure quantity.Pressure = 1e6
)

var uniformSource = gap.Source{Text: "uniform-field law 24.22 x + 6.08 √x, Naidu and Kamaraju, High Voltage Engineering, ch. 2", Mark: gap.Read}

func uniformAir(s State, d quantity.Length) (gap.Answer[quantity.Voltage], error) {
	if x := quantity.Length(s.Density()) * d; quantity.AtLeast(x, shortestUniform) {
		v, err := UniformAir(s.Density(), d)
		return ofUniform.applied(s, gap.Answer[quantity.Voltage]{
			Value: v, Because: "breakdown of air in a uniform field", Sources: []gap.Source{uniformSource.Governing()},
		}), err
	}
	a, err := paschenAnswer(gap.AirGas, s.reduced(d))
	if law := ofUniform.applied(s, gap.Answer[quantity.Voltage]{Value: uniformLaw(shortestUniform)}); err == nil {
		a.Value = min(a.Value, law.Value) // the two laws meet within 2 % here
	}
	return a, err
}

// uniformNitrogen: 30.4 kV at 1 cm against 30.3 kV of air, linear from 1 mm to 5 cm
// (G. G. Raju, Dielectrics in Electric Fields, ch. 8; read).
func uniformNitrogen(s State, d quantity.Length) (gap.Answer[quantity.Voltage], error) {
	x := quantity.Length(s.Density()) * d
	switch {
	case !quantity.AtLeast(x, quantity.Length(1e-3)):
		return paschenAnswer(gap.Nitrogen, s.reduced(d))
	case !quantity.AtMost(x, quantity.Length(50e-3)):
		return gap.Answer[quantity.Voltage]{}, beyond(gap.Nitrogen, s.reduced(d))
	}
	source := gap.Source{Text: "nitrogen as air within 1 % at 1 cm, G. G. Raju, Dielectrics in Electric Fields, ch. 8", Mark: gap.Derived}
	return gap.Answer[quantity.Voltage]{
		Value: uniformLaw(x), Because: "breakdown of nitrogen in a uniform field",
		Sources: []gap.Source{source.Governing(), uniformSource},
	}, nil
}
