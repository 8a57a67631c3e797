package gas

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

// PerPressureLength is Townsend's A, ionising collisions per Pa m; FieldPerPressure is
// his B and the reduced field E/p, V/(Pa m).
type (
	PerPressureLength float64
	FieldPerPressure  float64
)

const (
	torrCentimetre quantity.PressureLength = 133.322e-2 // Pa m
	perTorrCm                              = 1 / 1.33322
)

// Townsend are constants of α/p = A exp(−B p/E) and of the cathode, with the reduced
// fields they were fitted in.
type Townsend struct {
	A     PerPressureLength
	B     FieldPerPressure
	Gamma float64 // new electrons from the cathode for each ion
	Least FieldPerPressure
	Most  FieldPerPressure
	gap.Source
}

// losses is ln(1 + 1/γ), the ionisations one electron must lead to.
func (c Townsend) losses() float64 { return math.Log1p(1 / c.Gamma) }

// Voltage is Paschen's law V = B pd/ln(A pd/ln(1 + 1/γ)), on both sides of its
// minimum. Outside the reduced fields the constants were fitted in there is a lack.
func (c Townsend) Voltage(pd quantity.PressureLength) (quantity.Voltage, error) {
	bottom := math.Log(float64(c.A) * float64(pd) / c.losses())
	if bottom <= 0 {
		return 0, lack.Range("at %.3g Pa m Paschen's law has no value: too few collisions", float64(pd))
	}
	e := c.B / FieldPerPressure(bottom) // V/(pd)
	if !quantity.AtLeast(e, c.Least) || !quantity.AtMost(e, c.Most) {
		return 0, lack.Range("%s hold for E/p of %.3g to %.3g V/(Pa m), asked for %.3g", c.Text, float64(c.Least), float64(c.Most), float64(e))
	}
	return quantity.Voltage(float64(e) * float64(pd)), nil
}

// Minimum is the lowest voltage of the law, V = (e B/A) ln(1 + 1/γ), and where it
// lies, pd = (e/A) ln(1 + 1/γ) (Wadhwa, High Voltage Engineering, ch. 1). Townsend's
// constants are not to be trusted near it to better than a factor of two: MeasuredMinimum
// judges.
func (c Townsend) Minimum() (quantity.Voltage, quantity.PressureLength) {
	pd := math.E / float64(c.A) * c.losses()
	return quantity.Voltage(float64(c.B) * pd), quantity.PressureLength(pd)
}

// perTorr makes constants from the units of the books, 1/(cm Torr) and V/(cm Torr).
func perTorr(a, b, gamma, least, most float64, text string, mark gap.Mark) Townsend {
	return Townsend{
		A: PerPressureLength(a * perTorrCm), B: FieldPerPressure(b * perTorrCm), Gamma: gamma,
		Least: FieldPerPressure(least * perTorrCm), Most: FieldPerPressure(most * perTorrCm),
		Source: gap.Source{Text: text, Mark: mark},
	}
}

// AirConstants are 15 and 365 for each cm Torr with γ 0.01 (Bazelyan and Raizer;
// Abdel-Salam et al., ex. 4.7), for E/p of 100 to 800 V/(cm Torr): under a millimetre
// at normal pressure, or low pressures. At 1 cm and 1 atm they are 17 % above the law
// of uniform fields.
var AirConstants = perTorr(15, 365, 0.01, 100, 800, "Townsend constants of air, Bazelyan and Raizer", gap.Read)

// Minimum is the lowest breakdown voltage of a gas and the product of pressure and
// gap at which it was measured.
type Minimum struct {
	Voltage quantity.Voltage
	At      quantity.PressureLength
	gap.Source
}

const minimaText = "lowest breakdown voltages, Meek and Craggs; Naidu and Kamaraju, Table 2.1"

var minima = map[gap.Gas]Minimum{
	gap.AirGas:              {327, 0.567 * torrCentimetre, gap.Source{Text: minimaText, Mark: gap.Read}},
	gap.Argon:               {137, 0.9 * torrCentimetre, gap.Source{Text: minimaText, Mark: gap.Memory}},
	gap.Hydrogen:            {273, 1.15 * torrCentimetre, gap.Source{Text: minimaText, Mark: gap.Memory}},
	gap.Helium:              {156, 4 * torrCentimetre, gap.Source{Text: minimaText, Mark: gap.Memory}},
	gap.CarbonDioxide:       {420, 0.51 * torrCentimetre, gap.Source{Text: minimaText, Mark: gap.Memory}},
	gap.Nitrogen:            {251, 0.67 * torrCentimetre, gap.Source{Text: minimaText, Mark: gap.Memory}},
	gap.SulphurHexafluoride: {507, 0.26 * torrCentimetre, gap.Source{Text: "lowest breakdown voltage of SF6", Mark: gap.Memory}},
}

// MeasuredMinimum is the lowest breakdown voltage measured in a gas between plates, at
// any pressure and gap: at or below it nothing breaks down by collisions.
func MeasuredMinimum(g gap.Gas) (Minimum, error) {
	m, known := minima[g]
	if !known {
		return m, lack.Range("no lowest breakdown voltage is known here for %q", string(g))
	}
	return m, nil
}

// paschenAnswer is the lowest of Paschen's laws known for a gas, never under the
// measured minimum, and that minimum left of it.
func paschenAnswer(g gap.Gas, pd quantity.PressureLength) (gap.Answer[quantity.Voltage], error) {
	m, err := MeasuredMinimum(g)
	if err != nil {
		return gap.Answer[quantity.Voltage]{}, err
	}
	floor := gap.Answer[quantity.Voltage]{
		Value: m.Voltage, Because: "lowest breakdown voltage of " + string(g) + " at any pressure and gap",
		Sources: []gap.Source{m.Governing()},
	}
	floor = remembered(g, m.Source, floor)
	if pd <= m.At {
		return floor, nil
	}
	best, source, err := lowestLaw(g, pd)
	if err != nil {
		return gap.Answer[quantity.Voltage]{}, err
	}
	if best <= m.Voltage {
		return floor, nil
	}
	return remembered(g, source, gap.Answer[quantity.Voltage]{
		Value: best, Because: "Paschen's law of " + string(g),
		Sources: []gap.Source{source.Governing(), m.Source},
	}), nil
}

// remembered says of an answer that it rests on constants from memory.
func remembered(g gap.Gas, source gap.Source, a gap.Answer[quantity.Voltage]) gap.Answer[quantity.Voltage] {
	if source.Mark == gap.Memory {
		a.Assumptions = append(a.Assumptions, "the figures of "+string(g)+" are from memory, and hold for the pure gas: "+source.Text)
	}
	return a
}

// AtProduct is the breakdown voltage between plates at a product of pressure, at 20 °C,
// and gap: that of UniformBreakdown, which by similarity holds for any such pair. Where only
// a lower bound is known there is a lack.
func AtProduct(g gap.Gas, pd quantity.PressureLength) (quantity.Voltage, error) {
	d := math.Max(float64(pd)/float64(referencePressure), 1e-3)
	a, err := UniformBreakdown(State{Gas: g, Pressure: quantity.Pressure(float64(pd) / d), Temperature: referenceTemperature}, quantity.Length(d))
	if err == nil && a.AtLeast {
		err = lack.Range("only a lower bound of the breakdown of %s is known at %s", string(g), quantity.Text(pd))
	}
	return a.Value, err
}

// RightOfMinimum reports whether a gas over a distance has more of pressure times gap than
// where its lowest breakdown voltage was measured.
func RightOfMinimum(s State, d quantity.Length) (bool, error) {
	m, err := MeasuredMinimum(s.Gas)
	return err == nil && quantity.AtLeast(s.reduced(d), m.At), err
}
