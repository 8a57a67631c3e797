package steady

import (
	"fmt"
	"math"
	"testing"

	"kilovet/hv/chain"
	"kilovet/hv/circuit"
	"kilovet/hv/document"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// given is a leaf as if it stood in a description.
func given[T any](key string, v T) document.Given[T] {
	return document.Given[T]{V: v, Place: document.Place{Key: key, Line: 1, Column: 1}}
}

// missing is a leaf that the description does not hold.
func missing[T any](key string) document.Given[T] {
	return document.Given[T]{Place: document.Place{Key: key}}
}

func resistor(key string, ohms quantity.Resistance) *chain.Resistor {
	return &chain.Resistor{
		Value:                  given(key+".value", ohms),
		Tolerance:              missing[quantity.Fraction](key + ".tolerance"),
		TemperatureCoefficient: missing[quantity.PerKelvin](key + ".temperature_coefficient"),
		VoltageCoefficient:     missing[quantity.PerVolt](key + ".voltage_coefficient"),
		RatedPower:             missing[quantity.Power](key + ".rated_power"),
	}
}

func capacitor(farads quantity.Capacitance) *chain.Capacitor {
	return &chain.Capacitor{Value: given("value", []quantity.Capacitance{farads})}
}

// part is a loose part between two nodes; permanent, so that it is no load.
func part(name, kind, from, to, value string) chain.Part {
	return chain.Part{Name: given("name", name), Kind: given("kind", kind), From: given("from", from), To: given("to", to),
		Value: given("value", value), Permanent: given("permanent", true)}
}

// supplyOf is a bare multiplier of N equal stages.
func supplyOf(polarity string, stages int, farads quantity.Capacitance) *chain.Chain {
	return &chain.Chain{
		Drive: &chain.Drive{Waveform: given("waveform", "sine"), Frequency: given("frequency", quantity.Frequency(40e3)),
			Peak: given("peak", quantity.Voltage(1000))},
		Multiplier: &chain.Multiplier{Topology: given("topology", "half-wave"), Polarity: given("polarity", polarity),
			Stages: given("stages", stages), CouplingCapacitor: capacitor(farads), SmoothingCapacitor: capacitor(farads)},
	}
}

func build(c *chain.Chain) *circuit.Circuit { return circuit.Build(c, circuit.Setting{Peak: 1000}) }

func near(t *testing.T, what string, got, want, relative float64) {
	t.Helper()
	if !(math.Abs(got-want) <= relative*math.Abs(want)) {
		t.Errorf("%s = %.10g, want %.10g within %g", what, got, want, relative)
	}
}

// must unwraps an answer that may not be wanting.
func must[T any](v T, err error) T {
	if err != nil {
		panic(fmt.Sprintf("unexpected lack: %v", err))
	}
	return v
}

func wantLack(t *testing.T, err error, kind lack.Kind, keys ...string) {
	t.Helper()
	l := lack.Of(err)
	if l == nil || l.Kind != kind || fmt.Sprint(l.Keys) != fmt.Sprint(keys) {
		t.Errorf("error %v (%+v), want a lack of kind %d naming %v", err, l, kind, keys)
	}
}
