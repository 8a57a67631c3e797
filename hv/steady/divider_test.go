package steady

import (
	"fmt"
	"testing"

	"kilovet/hv/chain"
	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

func dividerOf(upper, lower, meter quantity.Resistance) *chain.Divider {
	d := &chain.Divider{Upper: resistor("divider.upper", upper), Lower: resistor("divider.lower", lower)}
	if meter > 0 {
		d.Meter = &chain.Meter{Resistance: given("divider.meter.resistance", meter)}
	}
	return d
}

func measured(d *chain.Divider, sensed quantity.Voltage) *Divider {
	return must(Measure(build(&chain.Chain{Divider: d}), d, sensed, missing[quantity.Temperature]("site.air_temperature")))
}

// A 50 Mohm/50 kohm divider at 50 kV reads 50 V; with its lower arm open a 10 Mohm
// meter sees 8.3 kV (derived).
func ExampleDivider_OpenLowerArmMetered() {
	part := dividerOf(50e6, 50e3, 10e6)
	d, _ := Measure(circuit.Build(&chain.Chain{Divider: part}, circuit.Setting{}), part, -50e3, missing[quantity.Temperature]("site.air_temperature"))
	reading, _ := d.Reading()
	open, _ := d.OpenLowerArmMetered()
	unplugged, _ := d.OpenLowerArm()
	fmt.Printf("%.1f V, then %.1f kV, unplugged %.0f kV\n", reading, open/1000, unplugged/1000)
	// Output: 49.7 V, then 8.3 kV, unplugged 50 kV
}

func TestDividerReads(t *testing.T) {
	cases := []struct {
		what                string
		upper, lower, meter quantity.Resistance
		sensed              quantity.Voltage
		ratio, reading      float64
	}{
		// An amateur laboratory page calls this 100:1 and prints 75 V; it is 101:1.
		{"100 Mohm/1 Mohm at 7.5 kV", 100e6, 1e6, 0, 7500, 101, 7500.0 / 101},
		// The same page's 1.11 Mohm beside a 10 Mohm meter: 0.9991 Mohm.
		{"1.11 Mohm beside 10 Mohm", 100e6, 1.11e6, 10e6, 7500, 1 + 100/0.99909991, 7500 / (1 + 100/0.99909991)},
		{"50 Mohm/50 kohm at -50 kV", 50e6, 50e3, 0, -50e3, 1001, 50e3 / 1001.0},
	}
	for _, c := range cases {
		d := measured(dividerOf(c.upper, c.lower, c.meter), c.sensed)
		near(t, c.what+": ratio", must(d.Ratio()), c.ratio, 1e-8)
		near(t, c.what+": reading", float64(must(d.Reading())), c.reading, 1e-8)
	}
}

func TestDividerStresses(t *testing.T) {
	part := dividerOf(200e6, 200e3, 0)
	part.Upper.Count = given("count", 10)
	part.Lower.Strings = given("strings", 2)
	d := measured(part, -20e3)
	const i = 20e3 / 2000.1e6
	near(t, "current", float64(must(d.Current())), i, 1e-12)
	near(t, "dissipation", float64(must(d.Dissipation())), i*20e3, 1e-12)
	near(t, "element voltage", float64(must(d.ElementVoltage())), i*200e6, 1e-12)
	near(t, "element dissipation", float64(must(d.ElementDissipation())), i*i*200e6, 1e-12)
}

// A lower arm can be the one that bears most.
func TestDividerStressOfTheLowerArm(t *testing.T) {
	part := dividerOf(1e6, 3e6, 0)
	part.Upper.Count = given("count", 2)
	d := measured(part, 5000)
	near(t, "element voltage", float64(must(d.ElementVoltage())), 3000, 1e-12)
	near(t, "element dissipation", float64(must(d.ElementDissipation())), 3, 1e-12)
}

func clamped(leakage quantity.Current) *chain.Divider {
	d := dividerOf(2000e6, 100e3, 10e6)
	d.Clamp = &chain.Clamp{Voltage: given("divider.clamp.voltage", quantity.Voltage(90)), Leakage: given("divider.clamp.leakage", leakage)}
	return d
}

func TestOpenLowerArm(t *testing.T) {
	d := measured(clamped(1e-9), -20e3)
	near(t, "unplugged", float64(must(d.OpenLowerArm())), 20e3, 1e-12)
	near(t, "metered", float64(must(d.OpenLowerArmMetered())), 20e3*10.0/2010, 1e-12)
	near(t, "clamped", float64(must(d.OpenLowerArmClamped())), 90, 1e-12)
}

// The upper arm gives (20 kV − 90 V)/2 Gohm ≈ 10 µA: a clamp that leaks 20 µA at
// 90 V, 4.5 Mohm, is never driven to it.
func TestLeakyClampIsNotDriven(t *testing.T) {
	d := measured(clamped(20e-6), -20e3)
	near(t, "clamped", float64(must(d.OpenLowerArmClamped())), 20e3*4.5/2004.5, 1e-12)
}

func TestOpenLowerArmNeedsWhatItAsksAbout(t *testing.T) {
	d := measured(dividerOf(50e6, 50e3, 0), 50e3)
	_, err := d.OpenLowerArmMetered()
	wantLack(t, err, lack.Missing, "divider.meter")
	_, err = d.OpenLowerArmClamped()
	wantLack(t, err, lack.Missing, "divider.clamp")
	_, err = Measure(build(&chain.Chain{}), nil, 1, missing[quantity.Temperature](""))
	wantLack(t, err, lack.Missing, "divider")
}

// An arm that is open already, as a fault, has no ratio that means anything.
func TestDividerWithAnArmOpen(t *testing.T) {
	part := dividerOf(50e6, 50e3, 0)
	c := build(&chain.Chain{Divider: part})
	air := missing[quantity.Temperature]("site.air_temperature")
	lower := must(Measure(c.Open("divider.lower"), part, 50e3, air))
	near(t, "reading with the lower arm open", float64(must(lower.Reading())), 50e3, 1e-12)
	upper := must(Measure(c.Open("divider.upper"), part, 50e3, air))
	_, err := upper.Ratio()
	wantLack(t, err, lack.Outside)
}
