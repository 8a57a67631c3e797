package quantity

import (
	"fmt"
	"math"
	"testing"

	"pgregory.net/rapid"

	"kilovet/hv/chance"
)

func TestText(t *testing.T) {
	for _, row := range []struct{ got, want string }{
		{Text(Voltage(0)), "0 V"}, {Text(Voltage(20000)), "20 kV"}, {Text(Voltage(-19612.4)), "-19.61 kV"}, {Text(Voltage(999.96)), "1 kV"}, {Text(Voltage(999.94)), "999.9 V"}, {Text(Voltage(0.0123456)), "12.35 mV"},
		{Text(Current(60e-6)), "60 µA"}, {Text(Capacitance(2.2e-9)), "2.2 nF"}, {Text(Capacitance(1e-18)), "below 1 fF"}, {Text(Resistance(4.7e6)), "4.7 MΩ"}, {Text(Resistance(1e15)), "1000 TΩ"},
		{Text(Temperature(303.15)), "30 °C"}, {Text(Temperature(2700)), "2700 K"}, {Text(TemperatureRise(85)), "85 K"},
		{Text(Fraction(0.1)), "10 %"}, {Text(Fraction(0)), "0 %"}, {Text(Fraction(50e-6)), "50 ppm"}, {Text(Fraction(-0.12)), "-12 %"}, {Text(Fraction(5.6e-12)), "below 0.001 ppm"}, {Text(Fraction(-1e-12)), "above -0.001 ppm"}, {Text(Fraction(0.99996e-9)), "0.001 ppm"},
		{Text(Area(3e-8)), "0.03 mm2"}, {Text(Pressure(4e-3)), "4e-5 mbar"}, {Text(Pressure(101325)), "1013 mbar"}, {Text(Pressure(4.444e-2)), "4.444e-4 mbar"}, {Text(Pressure(0.1)), "0.001 mbar"}, {Text(Pressure(0)), "0 mbar"}, {Text(KermaRate(1e-6 / 3600)), "1 µGy/h"}, {Text(Humidity(0.011)), "11 g/m3"},
		{Text(PerKelvin(50e-6)), "50 ppm/K"}, {Text(PerVolt(-1e-6)), "-1 ppm/V"}, {Text(Field(3e6)), "3 MV/m"}, {Text(Angle(5e-3)), "5 mrad"}, {Text(Angle(math.Pi / 2)), "90 deg"}, {Text(Angle(0.0999)), "99.9 mrad"},
		{Text(Time(60)), "60 s"}, {Text(Time(600)), "600 s"}, {Text(Time(1800)), "30 min"}, {Text(Time(36000)), "10 h"}, {Text(Time(80e-9)), "80 ns"},
		{Text(Length(0.06)), "60 mm"}, {Text(Length(12e-9)), "12 nm"}, {Text(ThermalResistance(85)), "85 K/W"}, {Text(LinearCapacitance(110e-12)), "110 pF/m"},
		{Text(Length(6.629e-20)), "below 1 fm"}, {Text(Length(0.99996e-15)), "1 fm"}, {Text(Length(-1e-18)), "above -1 fm"}, {Text(Energy(1e-30)), "below 1 fJ"},
		{Text(KermaRate(1.948e-28 / 3600)), "below 1e-6 µGy/h"}, {Text(KermaRate(0)), "0 µGy/h"}, {Text(KermaRate(2e-12 / 3600)), "2e-6 µGy/h"}, {Text(Resistivity(1e12)), "1 TΩ m"},
		{Significant(1.5e15), "1.5e15"}, {Significant(-4e-12), "-4e-12"}, {Significant(123456), "1.235e5"},
	} {
		if row.got != row.want {
			t.Errorf("got %q, want %q", row.got, row.want)
		}
	}
}

func TestTextOfWhatIsNoNumberDoesNotPanic(t *testing.T) {
	for _, d := range dimensions {
		for _, v := range []float64{math.NaN(), math.Inf(1), math.Inf(-1), math.MaxFloat64, math.SmallestNonzeroFloat64} {
			if d.Text(v) == "" {
				t.Errorf("%s %v: nothing written", d.Name, v)
			}
		}
	}
}

// TestComparisons: what differs by less than 1e-9 counts as equal, what differs by
// more does not, whatever the size.
func TestComparisons(t *testing.T) {
	chance.Check(t, func(t *rapid.T) {
		size := math.Pow(10, rapid.Float64Range(-15, 15).Draw(t, "decade"))
		v := Voltage(rapid.Float64Range(1, 10).Draw(t, "value") * size * float64(rapid.SampledFrom([]int{-1, 1}).Draw(t, "sign")))
		within := v * Voltage(1+rapid.Float64Range(-0.9e-9, 0.9e-9).Draw(t, "within"))
		beyond := v + Voltage(math.Abs(float64(v))*rapid.Float64Range(1.1e-9, 1).Draw(t, "beyond"))
		if !Equal(v, within) || !AtLeast(v, within) || !AtMost(v, within) {
			t.Errorf("%v and %v differ", v, within)
		}
		if Equal(v, beyond) || AtLeast(v, beyond) || !AtMost(v, beyond) || AtMost(beyond, v) {
			t.Errorf("%v is not below %v", v, beyond)
		}
	})
}

func TestZeroEqualsOnlyZero(t *testing.T) {
	if !Equal(Voltage(0), 0) || Equal(Voltage(0), 1e-300) || AtLeast(Voltage(0), 1e-300) || !AtMost(Voltage(0), 1e-300) {
		t.Error("zero")
	}
}

func ExampleText() {
	fmt.Println(Text(Voltage(-19612.4)), Text(Capacitance(4.7e-10)), Text(Temperature(303.15)))
	// Output: -19.61 kV 470 pF 30 °C
}
