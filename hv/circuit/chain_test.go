package circuit

import (
	"fmt"
	"testing"

	"kilovet/hv/chain"
	"kilovet/hv/document"
	"kilovet/hv/quantity"
)

// given is a leaf as if it stood in a description.
func given[T any](key string, v T) document.Given[T] {
	return document.Given[T]{V: v, Place: document.Place{Key: key, Line: 1, Column: 1}}
}

func resistor(ohms quantity.Resistance) *chain.Resistor {
	return &chain.Resistor{Value: given("value", ohms)}
}

func capacitor(farads ...quantity.Capacitance) *chain.Capacitor {
	return &chain.Capacitor{Value: given("value", farads)}
}

func multiplier(topology, polarity string, stages int) *chain.Chain {
	return &chain.Chain{
		Site:  &chain.Site{MainsFrequency: given("mains_frequency", quantity.Frequency(50))},
		Drive: &chain.Drive{Frequency: given("frequency", quantity.Frequency(38e3)), Peak: given("peak", quantity.Voltage(1750))},
		Multiplier: &chain.Multiplier{Topology: given("topology", topology), Polarity: given("polarity", polarity), Stages: given("stages", stages),
			CouplingCapacitor: capacitor(2e-9), SmoothingCapacitor: capacitor(3e-9)},
	}
}

// whole is a chain with every kind of part.
func whole() *chain.Chain {
	c := multiplier("half-wave", "negative", 6)
	c.Drive.Resistance = given("resistance", quantity.Resistance(900))
	c.Drive.Inductance = given("inductance", quantity.Inductance(1e-3))
	c.Multiplier.Diode = &chain.Diode{RatedVoltage: given("rated_voltage", quantity.Voltage(8e3)), ForwardDrop: given("forward_drop", quantity.Voltage(12)),
		Resistance: given("resistance", quantity.Resistance(40)), Capacitance: given("capacitance", quantity.Capacitance(1e-12)), Leakage: given("leakage", quantity.Current(100e-9))}
	c.Multiplier.StrayBetweenColumns = given("stray_between_columns", quantity.Capacitance(0.5e-12))
	c.Multiplier.StrayToGround = given("stray_to_ground", quantity.Capacitance(1e-12))
	c.Filters = []chain.Filter{{Resistor: resistor(1e6), Capacitor: capacitor(470e-12)}, {Resistor: resistor(2e6)}}
	c.Cable = &chain.Cable{Length: given("length", quantity.Length(1.2)), Capacitance: given("capacitance", quantity.LinearCapacitance(110e-12)), GunEndResistor: resistor(47e3)}
	c.Loads = []chain.Load{{Name: given("name", "monitor"), At: given("at", "output"), Current: given("current", quantity.Current(10e-6))},
		{Name: given("name", "probe"), At: given("at", "supply"), Resistance: given("resistance", quantity.Resistance(2e9)), Permanent: given("permanent", true)}}
	c.Divider = &chain.Divider{Upper: resistor(200e6), Lower: resistor(200e3), Meter: &chain.Meter{Resistance: given("resistance", quantity.Resistance(10e6))},
		Clamp: &chain.Clamp{Voltage: given("voltage", quantity.Voltage(90)), Leakage: given("leakage", quantity.Current(1e-9))}, Permanent: given("permanent", true)}
	c.Divider.Upper.Count = given("count", 10)
	c.Divider.Lower.Strings = given("strings", 2)
	c.Bleeders = []chain.Bleeder{{At: given("at", "supply"), Resistor: resistor(2e9), Permanent: given("permanent", true)}}
	c.Bleeders[0].Resistor.Count, c.Bleeders[0].Resistor.Strings = given("count", 4), given("strings", 2)
	c.Bias = &chain.Bias{Kind: given("kind", "self"), Resistor: resistor(4.7e6), Bypass: capacitor(1e-9),
		Clamp: &chain.Clamp{Voltage: given("voltage", quantity.Voltage(1200))}}
	c.Gun = &chain.Gun{}
	c.Heater = &chain.Heater{Supply: given("supply", "dc"), Voltage: given("voltage", quantity.Voltage(1.9)),
		CentreResistors:     &chain.CentreResistors{Value: given("value", []quantity.Resistance{22, 23})},
		CapacitanceToGround: given("capacitance_to_ground", quantity.Capacitance(60e-12)),
		Feed: &chain.Feed{Kind: given("kind", "isolation transformer"), Capacitance: given("capacitance", quantity.Capacitance(45e-12)),
			CommonMode: given("common_mode", quantity.Voltage(115))}}
	return c
}

func build(c *chain.Chain) *Circuit { return Build(c, Setting{Peak: 1750, Emission: 60e-6}) }

// wantEnds checks that an element joins two named nodes, in that direction.
func wantEnds(t *testing.T, c *Circuit, name, from, to string) {
	t.Helper()
	e := c.Element(name)
	if e == nil {
		t.Errorf("no element %s", name)
		return
	}
	f, okFrom := c.Node(from)
	g, okTo := c.Node(to)
	if !okFrom || !okTo || e.From != f || e.To != g {
		t.Errorf("%s runs from %v to %v, want from %s to %s", name, c.Labels(e.From), c.Labels(e.To), from, to)
	}
}

func wantSame(t *testing.T, c *Circuit, names ...string) {
	t.Helper()
	first, ok := c.Node(names[0])
	for _, name := range names[1:] {
		if n, there := c.Node(name); !ok || !there || n != first {
			t.Errorf("%s is node %d (%t), want that of %s, %d (%t)", name, n, there, names[0], first, ok)
		}
	}
}

func alike(got, want float64) bool { return fmt.Sprintf("%.9g", got) == fmt.Sprintf("%.9g", want) }
