package steady

import (
	"testing"

	"kilovet/hv/chain"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

func precise(r *chain.Resistor, tolerance quantity.Fraction, perKelvin quantity.PerKelvin, perVolt quantity.PerVolt) {
	r.Tolerance.V, r.Tolerance.Line = tolerance, 1
	r.TemperatureCoefficient.V, r.TemperatureCoefficient.Line = perKelvin, 1
	r.VoltageCoefficient.V, r.VoltageCoefficient.Line = perVolt, 1
}

// worked is ten 200 Mohm over 200 kohm at 20 kV in air of 35 degC: 10 µA less 5 ppm,
// 2 kV and 20 mW on each upper element, 2 V and 20 µW on the lower one.
func worked() *chain.Divider {
	d := dividerOf(200e6, 200e3, 0)
	d.Upper.Count = given("count", 10)
	precise(d.Upper, 0.01, 50e-6, -1e-6)
	precise(d.Lower, 0.002, -25e-6, 0)
	d.Upper.RatedPower = given("divider.upper.rated_power", quantity.Power(0.5))
	d.Lower.RatedPower = given("divider.lower.rated_power", quantity.Power(0.25))
	return d
}

func TestBudgetWorked(t *testing.T) {
	part := worked()
	d := must(Measure(build(&chain.Chain{Divider: part}), part, 20e3, given("site.air_temperature", quantity.Temperature(308.15))))
	b := must(d.Budget())
	const i = 20e3 / 2000.2e6
	const p = i * i * 200e6
	near(t, "upper temperature", float64(b.Upper.Elements), 308.15+85*p/0.5, 1e-12)
	near(t, "upper thermal", float64(b.Upper.Temperature), 50e-6*(10+85*p/0.5), 1e-9)
	near(t, "upper voltage", float64(b.Upper.Voltage), i*200e6*1e-6, 1e-9)
	near(t, "lower thermal", float64(b.Lower.Temperature), 25e-6*(10+85*i*i*200e3/0.25), 1e-9)
	sum := 0.01 + 50e-6*(10+85*p/0.5) + i*200e6*1e-6 + 0.002 + 25e-6*(10+85*i*i*200e3/0.25)
	near(t, "total", float64(b.Total), (1-200e3/2000.2e6)*sum, 1e-9)
}

// The error of a divider is what its reading moves by when its arms move: for a
// drift d of the upper arm alone the ratio moves by (1 − 1/ratio)·d.
func TestBudgetIsTheReadingsOwnMove(t *testing.T) {
	const drift = 1e-6
	part := dividerOf(2e6, 1e6, 0)
	before := must(measured(part, 3000).Reading())
	part.Upper = resistor("divider.upper", 2e6*(1+drift))
	after := must(measured(part, 3000).Reading())
	part.Upper = resistor("divider.upper", 2e6)
	precise(part.Upper, drift, 0, 0)
	precise(part.Lower, 0, 0, 0)
	near(t, "budget", float64(must(measured(part, 3000).Budget()).Total), float64(1-after/before), 1e-5)
}

func TestThermalResistanceGoesBeforeRatedPower(t *testing.T) {
	r := resistor("r", 1e6)
	_, err := Rise(r, 1)
	wantLack(t, err, lack.Missing, "r.rated_power")
	r.RatedPower = given("r.rated_power", quantity.Power(0.5))
	near(t, "at half power", float64(must(Rise(r, 0.25))), 42.5, 1e-12)
	r.ThermalResistance = given("r.thermal_resistance", quantity.ThermalResistance(100))
	near(t, "given", float64(must(Rise(r, 0.25))), 25, 1e-12)
}

func TestBudgetNamesAllThatIsMissing(t *testing.T) {
	part := worked()
	part.Upper.RatedPower.Line = 0
	part.Lower.Tolerance.Line = 0
	_, err := measured(part, 20e3).Budget()
	wantLack(t, err, lack.Missing, "site.air_temperature", "divider.upper.rated_power", "divider.lower.tolerance")
}

// Without a temperature coefficient the temperature does not matter.
func TestBudgetWithoutTemperature(t *testing.T) {
	part := dividerOf(99e6, 1e6, 0)
	precise(part.Upper, 0.01, 0, 0)
	precise(part.Lower, 0.01, 0, 0)
	near(t, "total", float64(must(measured(part, 20e3).Budget()).Total), 0.99*0.02, 1e-12)
}
