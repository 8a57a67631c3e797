package circuit

import (
	"fmt"
	"testing"

	"kilovet/hv/chain"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// The half-wave ladder: coupling capacitor k from coupling.k to the one below, the
// lowest to the drive; smoothing capacitor k likewise from the foot; diode 2k−1 from
// stage k−1 to coupling k, diode 2k from there to stage k, for a positive output.
func TestHalfWaveLadder(t *testing.T) {
	for _, polarity := range []string{"positive", "negative"} {
		c := build(multiplier("half-wave", polarity, 3))
		for k := 1; k <= 3; k++ {
			coupling, below := fmt.Sprint("coupling.", k), fmt.Sprint("coupling.", k-1)
			stage, foot := fmt.Sprint("stage.", k), fmt.Sprint("stage.", k-1)
			if k == 1 {
				below, foot = "drive", "foot"
			}
			wantEnds(t, c, fmt.Sprint("multiplier.coupling_capacitor.", k), coupling, below)
			wantEnds(t, c, fmt.Sprint("multiplier.smoothing_capacitor.", k), stage, foot)
			one, two := [2]string{foot, coupling}, [2]string{coupling, stage}
			if polarity == "negative" {
				one, two = [2]string{coupling, foot}, [2]string{stage, coupling}
			}
			wantEnds(t, c, fmt.Sprint("multiplier.diode.", 2*k-1), one[0], one[1])
			wantEnds(t, c, fmt.Sprint("multiplier.diode.", 2*k), two[0], two[1])
		}
		wantSame(t, c, "stage.3", "multiplier", "supply", "output")
		wantSame(t, c, "ground", "foot")
		wantEnds(t, c, "drive.source", "drive", "ground")
		if c.Negative != (polarity == "negative") {
			t.Errorf("%s: Negative is %t", polarity, c.Negative)
		}
	}
}

func TestSymmetricalLadder(t *testing.T) {
	described := multiplier("symmetrical", "positive", 2)
	described.Drive.Unbalance = given("unbalance", quantity.Fraction(0.02))
	c := build(described)
	counts := map[Kind]int{}
	for _, e := range c.Elements {
		counts[e.Kind]++
	}
	if counts[Capacitor] != 6 || counts[Diode] != 8 || counts[Source] != 2 {
		t.Errorf("capacitors, diodes, sources: %d, %d, %d", counts[Capacitor], counts[Diode], counts[Source])
	}
	for _, mark := range []string{"a", "b"} {
		wantEnds(t, c, "multiplier.coupling_capacitor."+mark+".1", "coupling."+mark+".1", "drive."+mark)
		wantEnds(t, c, "multiplier.coupling_capacitor."+mark+".2", "coupling."+mark+".2", "coupling."+mark+".1")
		wantEnds(t, c, "multiplier.diode."+mark+".3", "stage.1", "coupling."+mark+".2")
		wantEnds(t, c, "multiplier.diode."+mark+".4", "coupling."+mark+".2", "stage.2")
	}
	wantSame(t, c, "drive", "drive.a")
	a, b := c.Element("drive.source.a").Wave.Amplitude, c.Element("drive.source.b").Wave.Amplitude
	if !alike(float64(a), 1750*1.01) || !alike(float64(b), -1750*0.99) {
		t.Errorf("amplitudes %g V and %g V, want 1 ± u/2 of 1750 V in antiphase", a, b)
	}
}

// Source, resistance and inductance stand in series before the drive node.
func TestDriveInSeries(t *testing.T) {
	c := build(whole())
	wantEnds(t, c, "drive.source", "drive.source", "foot")
	wantEnds(t, c, "drive.resistance", "drive.source", "drive.inner")
	wantEnds(t, c, "drive.inductance", "drive.inner", "drive")
}

func TestWholeChainIsConnected(t *testing.T) {
	c := build(whole())
	ends := []struct{ name, from, to string }{
		{"filter.1.resistor", "multiplier", "filter.1"},
		{"filter.1.bypass", "multiplier", "filter.1"},
		{"filter.1.capacitor", "filter.1", "ground"},
		{"filter.2.resistor", "filter.1", "filter.2"},
		{"cable", "supply", "ground"},
		{"cable.gun_end_resistor", "supply", "output"},
		{"divider.upper", "output", "divider.tap"},
		{"divider.lower", "divider.tap", "ground"},
		{"divider.meter", "divider.tap", "ground"},
		{"divider.clamp", "divider.tap", "ground"},
		{"divider.clamp.leakage", "divider.tap", "ground"},
		{"bleeder.1", "supply", "ground"},
		{"load.probe", "supply", "ground"},
		{"load.monitor", "ground", "output"}, // negative: the current enters the node
		{"bias.resistor", "cathode", "control"},
		{"bias.bypass", "cathode", "control"},
		{"gun", "ground", "cathode"}, // inside the gun the current runs from anode to cathode
		{"heater.supply", "heater.a", "heater.b"},
		{"heater.centre_resistors.1", "heater.a", "cathode"},
		{"heater.centre_resistors.2", "heater.b", "cathode"},
		{"heater.capacitance_to_ground", "cathode", "ground"},
		{"mains", "mains", "ground"},
		{"heater.feed", "mains", "cathode"},
		{"stray.columns.4", "coupling.4", "stage.4"},
		{"stray.ground.4", "stage.4", "ground"},
		{"stray.pickup", "coupling.6", "output"},
	}
	for _, e := range ends {
		wantEnds(t, c, e.name, e.from, e.to)
	}
	wantSame(t, c, "filter.2", "supply")
	wantSame(t, c, "output", "control")
	seen := map[string]bool{}
	for _, e := range c.Elements {
		if seen[e.Name] {
			t.Errorf("two elements %s", e.Name)
		}
		seen[e.Name] = true
	}
}

func TestValues(t *testing.T) {
	c := build(whole())
	for name, want := range map[string]float64{
		"divider.upper": 2000e6, "divider.lower": 100e3, "bleeder.1": 4e9, "load.probe": 2e9,
		"divider.clamp.leakage": 90e9, "heater.centre_resistors.2": 23,
	} {
		if got := float64(c.Element(name).Resistance); !alike(got, want) {
			t.Errorf("%s: %g ohm, want %g", name, got, want)
		}
	}
	for name, want := range map[string]float64{
		"cable": 132e-12, "filter.1.bypass": 0.5e-12, "stray.pickup": 0.1e-12, "heater.feed": 45e-12,
		"multiplier.coupling_capacitor.3": 2e-9, "multiplier.smoothing_capacitor.3": 3e-9,
	} {
		if got := float64(c.Element(name).Capacitance); !alike(got, want) {
			t.Errorf("%s: %g F, want %g", name, got, want)
		}
	}
	d := c.Element("multiplier.diode.5").Rectifier
	if d.Drop != 12 || d.On != 40 || d.Junction != 1e-12 || !alike(d.Leakage, 12.5e-12) {
		t.Errorf("diode: %+v", d)
	}
	if got := c.Element("mains").Wave; !alike(float64(got.Amplitude), 162.634559673) || got.Frequency != 50 {
		t.Errorf("common mode: %+v, want 115 V rms as an amplitude at 50 Hz", got)
	}
}

func TestScreenDividesTheCommonMode(t *testing.T) {
	described := whole()
	bare := build(described).Element("heater.feed").Capacitance
	described.Heater.Feed.Screen = given("screen", true)
	screened := build(described)
	through, taken := screened.Element("heater.feed").Capacitance, screened.Element("heater.feed.screen").Capacitance
	if !alike(float64(through*1000), float64(bare)) || !alike(float64(through+taken), float64(bare)) {
		t.Errorf("screened %g F through and %g F to ground, bare %g F", through, taken, bare)
	}
	described.Heater.Feed.Kind = given("kind", "battery")
	if build(described).Element("mains") != nil {
		t.Error("a battery has a common mode")
	}
}

// What can be unplugged is not permanent; meters always can.
func TestPermanence(t *testing.T) {
	c := build(whole())
	for name, want := range map[string]bool{
		"divider.upper": true, "divider.lower": true, "divider.meter": false, "bleeder.1": true, "load.probe": true, "load.monitor": false,
		"filter.1.resistor": true, "bias.resistor": true, "multiplier.diode.1": true, "cable": true, "divider.clamp.leakage": false, "gun": false,
	} {
		if got := c.Element(name).Permanent; got != want {
			t.Errorf("%s: permanent %t, want %t", name, got, want)
		}
	}
}

func TestOneValueAStage(t *testing.T) {
	described := multiplier("half-wave", "positive", 3)
	described.Multiplier.CouplingCapacitor = capacitor(3e-9, 2e-9, 1e-9)
	c := build(described)
	for k, want := range []quantity.Capacitance{3e-9, 2e-9, 1e-9} {
		if got := c.Element(fmt.Sprint("multiplier.coupling_capacitor.", k+1)).Capacitance; got != want {
			t.Errorf("coupling capacitor %d: %g F, want %g", k+1, got, want)
		}
	}
}

func TestClassTwoIsDoubtedWithoutItsValue(t *testing.T) {
	described := multiplier("half-wave", "positive", 2)
	part := described.Multiplier.SmoothingCapacitor
	part.Dielectric = given("dielectric", "X7R")
	part.ValueAtVoltage.Key = "multiplier.smoothing_capacitor.value_at_voltage"
	c := build(described)
	if l := lack.Of(c.Doubt()); l == nil || l.Keys[0] != part.ValueAtVoltage.Key {
		t.Errorf("doubt: %v", c.Doubt())
	}
	part.ValueAtVoltage = given(part.ValueAtVoltage.Key, []quantity.Capacitance{1.4e-9})
	c = build(described)
	if got := c.Element("multiplier.smoothing_capacitor.2").Capacitance; got != 1.4e-9 || c.Doubt() != nil {
		t.Errorf("%g F, doubt %v", got, c.Doubt())
	}
}

func TestCornersScaleWithinTolerance(t *testing.T) {
	described := whole()
	described.Filters[0].Resistor.Tolerance = given("tolerance", quantity.Fraction(0.05))
	c := Build(described, Setting{Corner: func(name string, tolerance quantity.Fraction) float64 {
		if name == "filter.1.resistor" {
			return 1 + float64(tolerance)
		}
		return 1
	}})
	if got := c.Element("filter.1.resistor").Resistance; !alike(float64(got), 1.05e6) {
		t.Errorf("%g ohm", got)
	}
	if got := c.Element("filter.2.resistor").Resistance; got != 2e6 {
		t.Errorf("%g ohm", got)
	}
}

func TestBiasKinds(t *testing.T) {
	described := whole()
	described.Bias.Kind, described.Bias.Voltage = given("kind", "fixed"), given("voltage", quantity.Voltage(300))
	c := build(described)
	wantEnds(t, c, "bias.source", "cathode", "control")
	if got := c.Element("bias.source").Wave; got.Amplitude != 300 || got.Form != Direct {
		t.Errorf("bias source %+v", got)
	}
	described.Bias.Fed = given("fed", "cathode")
	wantSame(t, build(described), "output", "cathode")
	described.Bias = nil
	wantSame(t, build(described), "output", "cathode", "control")
}

func TestHeaterReturnsToTheCathodeWithoutCentre(t *testing.T) {
	described := whole()
	described.Heater.CentreResistors = nil
	described.Heater.Supply = given("supply", "ac")
	c := build(described)
	wantSame(t, c, "heater.a", "cathode")
	if got := c.Element("heater.supply").Wave; got.Form != Sine || got.Frequency != 50 || !alike(float64(got.Amplitude), 2.68700576851) {
		t.Errorf("heater: %+v", got)
	}
}

func TestGunNotFitted(t *testing.T) {
	described := whole()
	described.Gun.Fitted = given("fitted", false)
	if build(described).Element("gun") != nil {
		t.Error("a gun that is not fitted draws current")
	}
}

func part(name, kind, from, to, value string) chain.Part {
	return chain.Part{Name: given("name", name), Kind: given("kind", kind), From: given("from", from), To: given("to", to), Value: given("value", value)}
}

func TestLooseParts(t *testing.T) {
	described := whole()
	meter := part("meter", "meter", "supply", "ground", "")
	meter.Resistance = given("resistance", quantity.Resistance(1e9))
	described.Parts = []chain.Part{part("limiter", "resistor", "output", "gun.inner", "22 kohm"), part("drain", "resistor", "gun.inner", "ground", "1 Gohm"),
		part("store", "capacitor", "ground", "gun.inner", "100 pF"), part("choke", "inductor", "supply", "choked", "3 mH"),
		part("gap", "spark gap", "gun.inner", "ground", "25 kV"), meter}
	c := build(described)
	wantEnds(t, c, "part.limiter", "output", "gun.inner")
	cases := []struct {
		name      string
		kind      Kind
		role      Role
		permanent bool
		value     float64
	}{
		{"part.limiter", Resistor, Series, true, 22e3},
		{"part.drain", Resistor, Load, false, 1e9},
		{"part.store", Capacitor, Shunt, true, 100e-12},
		{"part.choke", Inductor, Series, true, 3e-3},
		{"part.gap", Gap, Limiter, true, 25e3},
		{"part.meter", Resistor, Load, false, 1e9},
	}
	for _, w := range cases {
		e := c.Element(w.name)
		value := float64(e.Resistance) + float64(e.Capacitance) + float64(e.Inductance) + float64(e.Strikes)
		if e.Kind != w.kind || e.Role != w.role || e.Permanent != w.permanent || !alike(value, w.value) || e.Doubt != nil {
			t.Errorf("%s: %+v", w.name, e)
		}
	}
}

func TestLoosePartWithoutValueIsDoubted(t *testing.T) {
	described := whole()
	described.Parts = []chain.Part{part("store", "capacitor", "output", "ground", "")}
	described.Parts[0].Value.Line, described.Parts[0].Value.Key = 0, "part.value"
	if l := lack.Of(build(described).Doubt()); l == nil || l.Keys[0] != "part.value" {
		t.Errorf("doubt: %v", l)
	}
}
