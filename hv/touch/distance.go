package touch

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// approach is EN 50110-1 Table A.1 (read in a tool maker's safety sheet): nominal system
// voltage in kV, r.m.s. between phases; distances of the live working zone D_L and of the
// vicinity zone D_V in mm.
var approach = [][]float64{
	{3, 60, 1120}, {6, 90, 1120}, {10, 120, 1150}, {15, 160, 1160}, {20, 220, 1220}, {30, 320, 1320}, {36, 380, 1380},
	{45, 480, 1480}, {60, 630, 1630}, {70, 750, 1750}, {110, 1000, 2000}, {132, 1100, 3000}, {150, 1200, 3000},
	{220, 1600, 3000}, {275, 1900, 4000}, {380, 2500, 4000}, {480, 3200, 6100}, {700, 5300, 8400},
}

// older is Table 2 of an older DIN VDE 0105-100, indoors (commentary GUV-I 8590 p. 33,
// read): nominal kV, danger zone in mm, rated impulse voltage in kV that it stands for.
var older = [][]float64{
	{3, 60, 40}, {6, 90, 60}, {10, 120, 75}, {15, 160, 95}, {20, 220, 125}, {30, 320, 170}, {36, 380, 200}, {45, 480, 250},
	{66, 630, 325}, {70, 750, 380}, {110, 1100, 550}, {132, 1300, 650}, {150, 1500, 750}, {220, 2100, 1050},
}

// Zones are the distances from bare live parts: within Danger a person counts as touching
// them, within Vicinity work needs measures.
type Zones struct{ Danger, Vicinity quantity.Length }

// Approach finds the zones for a nominal system voltage, r.m.s. between phases: EN 50110-1
// Table A.1, between rows linear as its note allows, or the older DIN VDE 0105-100 where
// that asks for a wider danger zone (from 70 kV on; past its end at 220 kV its last row
// stays the least). To 1 kV no contact is allowed and the
// vicinity is 300 mm; from there to 3 kV the row of 3 kV holds. Above 700 kV a lack.
func Approach(system quantity.Voltage) (Zones, error) {
	kilovolts := float64(system) / 1e3
	switch {
	case !(system >= 0) || !quantity.AtMost(kilovolts, approach[len(approach)-1][0]):
		return Zones{}, lack.Range("approach distances are tabulated to 700 kV, not for %s", quantity.Text(system))
	case quantity.AtMost(kilovolts, 1):
		return Zones{0, 300e-3}, nil
	}
	kilovolts = min(max(kilovolts, approach[0][0]), approach[len(approach)-1][0])
	danger := max(between(approach, 1, kilovolts), between(older, 1, min(kilovolts, older[len(older)-1][0])))
	return Zones{quantity.Length(danger * 1e-3), quantity.Length(between(approach, 2, kilovolts) * 1e-3)}, nil
}

// SystemVoltage is the nominal voltage of the three-phase system whose peak to earth is a
// DC level: U/0.816 = √(3/2) U (derived).
func SystemVoltage(level quantity.Voltage) quantity.Voltage {
	return level * quantity.Voltage(math.Sqrt(1.5))
}

// ApproachDC finds the zones for a DC level to earth, by the system of the same peak.
// DIN VDE 0105-100 has columns for DC of its own, which were not seen.
func ApproachDC(level quantity.Voltage) (Zones, error) { return Approach(SystemVoltage(level)) }

// ImpulseDistance is the danger zone of the older table's row whose rated impulse voltage
// covers a peak, overvoltage included: indoors, a lack above 1050 kV.
func ImpulseDistance(peak quantity.Voltage) (quantity.Length, error) {
	for _, row := range older {
		if peak >= 0 && quantity.AtMost(float64(peak), row[2]*1e3) {
			return quantity.Length(row[1] * 1e-3), nil
		}
	}
	return 0, lack.Range("danger zones are tabulated to 1050 kV of impulse voltage, not for %s", quantity.Text(peak))
}

// FlashoverDistance is the distance between a DC live part and earthed metal or a fence
// that a laboratory's rules ask for: 35 cm for 100 kV (Hochschule Hannover, read). It
// keeps the spark away from the fence, not the person from the part.
func FlashoverDistance(level quantity.Voltage) (quantity.Length, error) {
	if !notNegative(level) {
		return 0, lack.Range("no DC level: %s", quantity.Text(level))
	}
	return quantity.Length(0.35 * float64(level) / 100e3), nil
}
