package xray_test

import (
	"math"
	"strings"
	"testing"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/hv/xray"
)

// Half-value layers of one photon energy against beams of narrow spectrum at their mean
// energies (ISO 4037, energies from memory; NIST's layers read).
func TestHalfValueLayersOfMeanEnergies(t *testing.T) {
	for _, row := range []struct {
		energy quantity.ElectronEnergy
		in     string
		want   float64
	}{
		{16e3, "aluminium", 0.324}, {20e3, "aluminium", 0.691}, {24e3, "aluminium", 1.154},
		{33e3, "copper", 0.082}, {48e3, "copper", 0.241}, {65e3, "copper", 0.590}, {83e3, "copper", 1.14},
	} {
		got, err := material(t, row.in).HalfValueLayer(row.energy)
		if err != nil {
			t.Fatal(err)
		}
		if ratio := float64(got) * 1e3 / row.want; !(ratio > 0.96 && ratio < 1.21) {
			t.Errorf("%v eV in %s: %.3f of the table", row.energy, row.in, ratio)
		}
	}
}

// Lead is a worse shield just above its K edge of 88 keV than below; a line from the
// printed 80 to 100 keV would miss both sides.
func TestNoLineAcrossAnEdge(t *testing.T) {
	lead := material(t, "lead")
	below, _ := lead.MassAttenuation(87.9e3)
	above, _ := lead.MassAttenuation(88.1e3)
	near(t, "below", below, 0.1916, 0.003) // NIST: 1.910 cm²/g at the edge
	near(t, "above", above, 0.7662, 0.003) // 7.683 cm²/g
	at, _ := lead.MassAttenuation(88.00e3)
	near(t, "at the edge", at, 0.7683, 1e-9)
	across := 0.2419 * math.Pow(0.5549/0.2419, math.Log(88.0/80)/math.Log(100.0/80))
	if across < 1.4*float64(below) || across > 0.6*float64(above) {
		t.Errorf("a line across the edge gives %v", across)
	}
}

// NIST's printed rows come back, edges and ends too.
func TestPrintedRows(t *testing.T) {
	for _, row := range []struct {
		material string
		energy   quantity.ElectronEnergy
		want     xray.MassAttenuation // m²/kg
	}{
		{"aluminium", 1e3, 118.5}, {"aluminium", 30e3, 0.1128}, {"aluminium", 150e3, 0.01378}, {"iron", 60e3, 0.1205}, {"iron", 7.112e3, 40.76},
		{"copper", 8.979e3, 27.84}, {"molybdenum", 20e3, 8.054}, {"tungsten", 69.53e3, 1.123}, {"nickel", 10e3, 20.9}, {"air", 100e3, 0.01541},
		{"water", 15e3, 0.1673}, {"acrylic", 20e3, 0.05714}, {"borosilicate glass", 50e3, 0.03022}, {"lead glass", 88e3, 0.5824}, {"lead", 150e3, 0.2014},
	} {
		got, err := material(t, row.material).MassAttenuation(row.energy)
		if err != nil {
			t.Fatal(err)
		}
		near(t, row.material, got, row.want, 1e-9)
	}
	for _, outside := range []quantity.ElectronEnergy{999, 150.1e3, 0, quantity.ElectronEnergy(math.NaN())} {
		_, err := material(t, "lead").MassAttenuation(outside)
		lacking(t, "outside the tables", err, lack.Outside)
		_, err = material(t, "lead").HalfValueLayer(outside)
		lacking(t, "outside the tables", err, lack.Outside)
	}
}

// Stainless steel as iron of 7.7 g/cm³: 69 % iron, 19 % chromium, 9 % nickel, 2 %
// manganese in 7.93 g/cm³ (NIST's chromium and manganese from memory, cm²/g).
func TestStainlessSteelAsIron(t *testing.T) {
	for energy, others := range map[quantity.ElectronEnergy][2]float64{15e3: {45.71, 52.0}, 30e3: {6.434, 7.141}, 60e3: {0.9639, 1.06}, 100e3: {0.3166, 0.337}} {
		iron, _ := material(t, "iron").MassAttenuation(energy)
		nickel, _ := material(t, "nickel").MassAttenuation(energy)
		alloy := 7930 * (0.69*float64(iron) + 0.19*others[0]/10 + 0.09*float64(nickel) + 0.02*others[1]/10)
		half, err := material(t, "stainless steel").HalfValueLayer(energy)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "attenuation", math.Ln2/float64(half), alloy, 0.015)
	}
}

func TestWordsOfMaterialsAndTargets(t *testing.T) {
	for word, name := range map[string]string{"Stainless  Steel": "stainless steel", "aluminum": "aluminium", "PMMA": "acrylic", " lead glass ": "lead glass", "AIR": "air"} {
		if m := material(t, word); m.Name != name || m.Mark == "" {
			t.Errorf("%q is %+v", word, m.Name)
		}
	}
	for word, z := range map[string]float64{"stainless steel": 26, "Copper": 29, "carbon": 6, "tungsten": 74, "aluminum": 13} {
		if s := stop(t, word, 20, 0); s.Target.Z != z {
			t.Errorf("%q has Z %v", word, s.Target.Z)
		}
	}
	_, err := xray.FindMaterial("unobtainium")
	lacking(t, "material", err, lack.Outside)
	if err == nil || !strings.Contains(err.Error(), "aluminium") || !strings.Contains(err.Error(), "lead glass") {
		t.Errorf("the known ones must be named: %v", err)
	}
	_, err = xray.FindTarget("cheese")
	lacking(t, "target", err, lack.Outside)
	if err == nil || !strings.Contains(err.Error(), "tungsten") {
		t.Errorf("the known ones must be named: %v", err)
	}
	for _, name := range xray.Materials() {
		material(t, name)
	}
	for _, name := range xray.Targets() {
		stop(t, name, 20, 0)
	}
}
