package solid_test

import (
	"math"
	"testing"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
	"kilovet/insulation/gas"
	"kilovet/insulation/solid"
	"kilovet/insulation/vacuum"

	"pgregory.net/rapid"
)

var sleeve = solid.Sleeve{Conductor: 3 * mm, Bore: 4 * mm, Outside: 12 * mm, Permittivity: 9}

// Switched: ln(4/3) against ln(12/4)/9, 70 % of the voltage in a tenth of the distance, and
// 3.8 times the field that voltage over the whole insulation would give at the conductor.
func TestAnnulusTakesMostOfTheVoltage(t *testing.T) {
	a, err := sleeve.Annulus(10*kV, solid.Switched)
	if err != nil {
		t.Fatal(err)
	}
	u := 10 * kV * math.Log(4.0/3) / (math.Log(4.0/3) + math.Log(3)/9)
	near(t, "voltage", float64(a.Voltage), u, 1e-9)
	near(t, "field", float64(a.Field), u/(3*mm*math.Log(4.0/3)), 1e-9)
	if a.Voltage < 7*kV {
		t.Errorf("the annulus takes %v", a.Voltage)
	}
	settled, err := sleeve.Annulus(10*kV, solid.Settled)
	if err != nil || settled.Voltage != 10*kV {
		t.Errorf("settled %v (%v)", settled.Voltage, err)
	}
}

// The field at the conductor rises with the permittivity of the sleeve: the better the
// ceramic, the worse the annulus. Without a difference the sleeve is air.
func TestBetterSleevesStressTheAnnulusMore(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := sleeve
		s.Permittivity = rapid.Float64Range(1, 10).Draw(t, "permittivity")
		more := s
		more.Permittivity *= 1.5
		a, err := s.Annulus(1*kV, solid.Switched)
		b, err2 := more.Annulus(1*kV, solid.Switched)
		if err != nil || err2 != nil || b.Field <= a.Field {
			t.Fatalf("%v, then %v (%v, %v)", a.Field, b.Field, err, err2)
		}
	})
	s := sleeve
	s.Permittivity = 1
	a, _ := s.Annulus(10*kV, solid.Switched)
	near(t, "no sleeve", float64(a.Field), 10*kV/(3*mm*math.Log(4)), 1e-9)
}

// At the voltage at which it sparks the annulus has its onset across it.
func TestSparksInAir(t *testing.T) {
	for _, how := range []solid.Sharing{solid.Switched, solid.Settled} {
		v, err := sleeve.SparksInGas(air, how)
		if err != nil {
			t.Fatal(err)
		}
		marked(t, "sparks", v)
		a, _ := sleeve.Annulus(v.Value, how)
		plane, _ := gas.UniformAir(1, 1*mm)
		if part := float64(a.Voltage / plane); part < 0.8 || part > 1.05 {
			t.Errorf("1 mm of air sparks at %v, plates at %v", a.Voltage, plane)
		}
	}
	switched, _ := sleeve.SparksInGas(air, solid.Switched)
	settled, _ := sleeve.SparksInGas(air, solid.Settled)
	if settled.Value >= switched.Value {
		t.Errorf("settled %v, switched %v", settled.Value, switched.Value)
	}
	if len(settled.Assumptions) != len(switched.Assumptions)+1 {
		t.Errorf("assumptions %v", settled.Assumptions)
	}
}

// A slit under a tenth of a millimetre has no streamer law: Paschen's of plates serves.
func TestThinSlitsSparkByPaschen(t *testing.T) {
	s := solid.Sleeve{Conductor: 3 * mm, Bore: 3.05 * mm, Outside: 12 * mm, Permittivity: 9}
	v, err := s.SparksInGas(air, solid.Settled)
	if err != nil {
		t.Fatal(err)
	}
	plane, _ := gas.UniformBreakdown(air, 0.05*mm)
	near(t, "slit", float64(v.Value), float64(plane.Value), 0.01)
	s.Bore = 3.005 * mm
	_, err = s.SparksInGas(air, solid.Settled)
	lacks(t, "5 µm", err, lack.Outside)
}

func TestEmitsInVacuumAtTheFieldOfTheConductor(t *testing.T) {
	v, err := sleeve.EmitsInVacuum(solid.Switched)
	if err != nil {
		t.Fatal(err)
	}
	marked(t, "emits", v)
	a, _ := sleeve.Annulus(v.Value, solid.Switched)
	near(t, "field", float64(a.Field), float64(vacuum.EmissionField), 1e-9)
}

func TestSleeveLacks(t *testing.T) {
	broken := sleeve
	broken.Bore = 2 * mm
	_, err := broken.Annulus(1, solid.Switched)
	lacks(t, "bore under conductor", err, lack.Missing)
	_, err = broken.SparksInGas(air, solid.Switched)
	if lack.Of(err) == nil {
		t.Error("bore under conductor sparks")
	}
	broken = sleeve
	broken.Permittivity = 0
	_, err = broken.EmitsInVacuum(solid.Switched)
	lacks(t, "no permittivity", err, lack.Missing)
	_, err = sleeve.SparksInGas(gas.State{Gas: gap.Helium, Pressure: quantity.Pressure(3e5), Temperature: 293}, solid.Switched)
	lacks(t, "helium past its laws", err, lack.Outside)
}
