package gun_test

import (
	"math"
	"testing"

	"kilovet/hv/gun"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Child's law: a hundredth more voltage is one and a half hundredths more emission,
// and less as the cathode's limit takes over.
func TestDiodeGun(t *testing.T) {
	law, err := gun.Diode(1.5, 1e-3)
	if err != nil {
		t.Fatal(err)
	}
	p, _ := law.FixedBias(0)
	s, err := p.Sensitivities()
	if err != nil {
		t.Fatal(err)
	}
	near(t, "emission", p.Emission, 1e-3, 1e-12)
	near(t, "to voltage", s.Voltage, 1.5, 1e-9)
	limited, _ := law.Limited(1e-4)
	p, _ = limited.FixedBias(0)
	s, _ = p.Sensitivities()
	near(t, "limited", p.Emission, 1e-4, 1e-6)
	if s.Voltage > 1e-6 || s.Limit < 0.999 {
		t.Errorf("at its limit the temperature governs, not %v", s)
	}
}

// Small changes, against points solved anew.
func TestSwingsAreSlopes(t *testing.T) {
	free, _ := gun.Through(230, 2, 200, 100e-6)
	law, _ := free.Limited(120e-6)
	p, _ := law.SelfBias(2e6)
	fixed := p.AtFixedBias()
	got, err := fixed.Swing(0.01)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "of the bias", float64(got), math.Log(float64(law.At(p.Bias-0.005)/law.At(p.Bias+0.005))), 1e-5)
	const d = 1e-4
	more, _ := law.SelfBias(2e6 * (1 + d))
	near(t, "of the resistor", float64(p.DriftOfBias(d)), float64(more.Bias-p.Bias), 1e-3)
	up, _ := law.AtVoltage(1 + d)
	faster, _ := up.SelfBias(2e6)
	of, err := p.SwingOfVoltage(d, 1e-6, 1e-9)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "of the voltage, slowly", float64(of), float64(faster.Emission/p.Emission-1), 1e-3)
	of, _ = p.SwingOfVoltage(d, 1e9, 1e-9)
	high, _ := law.AtVoltage(1 + d/2)
	low, _ := law.AtVoltage(1 - d/2)
	near(t, "of the voltage, past the loop", float64(of), math.Log(float64(high.At(p.Bias)/low.At(p.Bias))), 1e-3)
	raised, _ := free.Limited(120e-6 * (1 + d))
	higher, _ := raised.SelfBias(2e6)
	slow := p.SwingOfLimit(d, 1e-6, 1e-9)
	near(t, "of the limit", float64(slow), float64(higher.Emission/p.Emission-1), 1e-3)
	near(t, "its bias", float64(p.SwingOfBias(slow, 1e-6, 1e-9)), float64(higher.Bias-p.Bias), 1e-3)
	if fixed.SwingOfBias(1, 50, 0) != 0 || fixed.DriftOfBias(1) != 0 {
		t.Error("a fixed bias moves with the emission")
	}
}

// Derived: 125 µm of tungsten at 2700 K on 50 Hz swings by ±12.96 K, its emission by
// ±10.24 % where temperature governs (material data from memory, so within a tenth).
func TestTemperatureSwingMovesTheLimit(t *testing.T) {
	w, err := gun.TungstenWire(125e-6, 2700)
	if err != nil {
		t.Fatal(err)
	}
	swing, err := w.TemperatureSwing(50)
	if err != nil {
		t.Fatal(err)
	}
	pp, err := gun.Tungsten().LimitSwing(2700, swing)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "half of the swing", float64(pp)/2, 0.1024, 0.1)
	near(t, "of the stated amplitude", float64(must(gun.Tungsten().LimitSwing(2700, 12.9575)))/2, 0.1024, 2e-3)
}

func must[T any](v T, err error) T {
	if err != nil {
		panic(err)
	}
	return v
}

func TestNothingSwingsWithoutEmission(t *testing.T) {
	law, _ := gun.New(230, 2, 1e-3)
	p, _ := law.FixedBias(230)
	_, err := p.Swing(1)
	lacking(t, "past cutoff", err, lack.Outside)
	if got := p.SwingOfLimit(1, 50, 0); got != quantity.Fraction(0) {
		t.Errorf("swing of %v", got)
	}
}
