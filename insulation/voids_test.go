package insulation_test

import (
	"testing"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation"
	"kilovet/insulation/gap"
	"kilovet/insulation/solid"
)

// A wall of 10 mm of polyethylene: no flat void of air in it discharges under the voltage
// of the worst one, by Naidu and Kamaraju's formula with what air of its size stands.
func TestTheWorstVoidOfAWall(t *testing.T) {
	g := bench()
	g.Medium, g.Material, g.Clearance = gap.Solid, "polyethylene", 10e-3
	worst, err := insulation.WorstVoid(g)
	if err != nil {
		t.Fatal(err)
	}
	if worst.Size < 10e-6 || worst.Size > 1e-3 || worst.Voltage < 10e3 || worst.Voltage > 60e3 {
		t.Errorf("worst void %v at %v", worst.Size, worst.Voltage)
	}
	v, err := solid.Void{Cavity: solid.FlatVoid, Size: 1e-3, Wall: 10e-3, Permittivity: 2.3}.Inception(4.3e6) // 1 mm stands 4.3 kV
	if err != nil || worst.Voltage > v {
		t.Errorf("a void of 1 mm starts at %v (%v), the worst at %v", v, err, worst.Voltage)
	}
	g.Material = "PVC"
	if _, err := insulation.WorstVoid(g); err != nil {
		t.Errorf("a permittivity is enough: %v", err)
	}
	g.Material = "porcelain"
	if _, err := insulation.WorstVoid(g); lack.Of(err) == nil {
		t.Error("porcelain has no permittivity here")
	}
}

func TestDischargeTestOfSolids(t *testing.T) {
	g := bench()
	g.Medium, g.Material, g.Clearance = gap.Solid, "PTFE", 2e-3
	for v, want := range map[quantity.Voltage]bool{690: false, 1900: false, 2100: true} {
		if got, _ := insulation.DischargeTestAsked(g, gap.Voltages{Peak: v}); got != want {
			t.Errorf("%v over 2 mm: %v", v, got)
		}
	}
}
