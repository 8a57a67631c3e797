package gas

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/gap"
)

// sparking is a law of breakdown between plates over pressure times gap.
type sparking interface {
	Voltage(quantity.PressureLength) (quantity.Voltage, error)
	Minimum() (quantity.Voltage, quantity.PressureLength)
	Farthest() quantity.PressureLength // the largest product the constants hold to
	origin() gap.Source
}

func (c Townsend) origin() gap.Source { return c.Source }

// Farthest is the product at which E/p has fallen to the least the constants hold for.
func (c Townsend) Farthest() quantity.PressureLength {
	return quantity.PressureLength(c.losses() / float64(c.A) * math.Exp(float64(c.B/c.Least)))
}

// Ward are constants of α/p = C exp(−D √(p/E)), which fits noble gases to lower fields than
// Townsend's law does: C, ionising collisions per Pa m; D² in V/(Pa m).
type Ward struct {
	C       PerPressureLength
	Squared FieldPerPressure
	Losses  float64 // ln(1 + 1/γ)
	Least   FieldPerPressure
	Most    FieldPerPressure
	gap.Source
}

func (c Ward) origin() gap.Source { return c.Source }

// Voltage is the law that Paschen's becomes with these constants, V = D² pd/ln²(C pd/ln(1 +
// 1/γ)). Outside the reduced fields the constants hold for there is a lack.
func (c Ward) Voltage(pd quantity.PressureLength) (quantity.Voltage, error) {
	bottom := math.Log(float64(c.C) * float64(pd) / c.Losses)
	if bottom <= 0 {
		return 0, lack.Range("at %.3g Pa m Paschen's law has no value: too few collisions", float64(pd))
	}
	e := c.Squared / FieldPerPressure(bottom*bottom)
	if !quantity.AtLeast(e, c.Least) || !quantity.AtMost(e, c.Most) {
		return 0, lack.Range("%s hold for E/p of %.3g to %.3g V/(Pa m), asked for %.3g", c.Text, float64(c.Least), float64(c.Most), float64(e))
	}
	return quantity.Voltage(float64(e) * float64(pd)), nil
}

// Minimum is the lowest voltage of the law, D² pd/4, at pd = e² ln(1 + 1/γ)/C (derived).
func (c Ward) Minimum() (quantity.Voltage, quantity.PressureLength) {
	pd := math.E * math.E * c.Losses / float64(c.C)
	return quantity.Voltage(float64(c.Squared) * pd / 4), quantity.PressureLength(pd)
}

// Farthest is the product at which E/p has fallen to the least the constants hold for.
func (c Ward) Farthest() quantity.PressureLength {
	return quantity.PressureLength(c.Losses / float64(c.C) * math.Exp(math.Sqrt(float64(c.Squared/c.Least))))
}

// noble makes Ward's constants from the units of the books, 1/(cm Torr) and √V/√(cm Torr).
func noble(c, d, losses, least, most float64, text string) Ward {
	return Ward{C: PerPressureLength(c * perTorrCm), Squared: FieldPerPressure(d * d * perTorrCm), Losses: losses,
		Least: FieldPerPressure(least * perTorrCm), Most: FieldPerPressure(most * perTorrCm),
		Source: gap.Source{Text: text, Mark: gap.Memory}}
}

// constants are those of the gases; A and B were read where so marked, in ranges of E/p that
// are von Engel's (memory); γ is the largest of the metals read (Beroual and Fofana 2016),
// which gives the lowest voltage. What reaches further is from memory as a whole:
//
//   - nitrogen to E/p of 27 V/(cm Torr): Raizer, Gas Discharge Physics, ch. 4;
//   - hydrogen to 15: the range of the table of Lieberman and Lichtenberg;
//   - helium and argon by Ward's form, for E/p under 100 and 700 (Raizer, Table 4.2), here
//     from 10, for no lower end is remembered. With the largest γ read, 0.021, every law of
//     helium that reaches past 8 Torr cm lies twofold above the lowest voltage measured: its
//     γ, 0.18, is the one that gives that voltage.
//
// The lowest law that holds judges, so where a read one holds too it is never overruled upwards.
var constants = map[gap.Gas][]sparking{
	gap.AirGas: {AirConstants},
	gap.Nitrogen: {
		perTorr(11.8, 325, 0.1, 100, 600, "Townsend constants of nitrogen, Lieberman and Lichtenberg, Table 14.1", gap.Read),
		perTorr(12, 342, 0.1, 100, 600, "Townsend constants of nitrogen, Nasser 1971", gap.Read),
		perTorr(8.8, 275, 0.1, 27, 200, "Townsend constants of nitrogen at low fields, 8.8 and 275, Raizer, Gas Discharge Physics", gap.Memory),
	},
	gap.Hydrogen: {
		perTorr(4.8, 136, 0.095, 150, 600, "Townsend constants of hydrogen, Lieberman and Lichtenberg, Table 14.1", gap.Read),
		perTorr(5.07, 138.7, 0.095, 150, 600, "Townsend constants of hydrogen, Nasser 1971", gap.Read),
		perTorr(4.8, 136, 0.095, 15, 600, "Townsend constants of hydrogen, Lieberman and Lichtenberg, Table 14.1, over all of its range", gap.Memory),
	},
	gap.Helium: {
		perTorr(2.8, 77, 0.021, 30, 150, "Townsend constants of helium, Lieberman and Lichtenberg, Table 14.1", gap.Read),
		perTorr(3.07, 34.7, 0.021, 20, 150, "Townsend constants of helium, Nasser 1971", gap.Read),
		noble(4.4, 14, 1.896, 10, 100, "Ward's constants of helium, 4.4 and 14, Raizer, Gas Discharge Physics"),
	},
	gap.Argon: {
		perTorr(11.5, 176, 0.12, 100, 600, "Townsend constants of argon, Lieberman and Lichtenberg, Table 14.1", gap.Read),
		perTorr(14.67, 180, 0.12, 100, 600, "Townsend constants of argon, Nasser 1971", gap.Read),
		noble(29.2, 26.6, math.Log1p(1/0.12), 10, 700, "Ward's constants of argon, 29.2 and 26.6, Raizer, Gas Discharge Physics"),
	},
}

// lowestLaw is the lowest voltage among the constants that hold; left of its own
// minimum a law says no more than that minimum.
func lowestLaw(g gap.Gas, pd quantity.PressureLength) (best quantity.Voltage, source gap.Source, err error) {
	err = lack.Range("no Townsend constants are known here for %q", string(g))
	for _, c := range constants[g] {
		_, bottom := c.Minimum()
		v, outside := c.Voltage(max(pd, bottom))
		switch {
		case outside == nil && (err != nil || v < best):
			best, source, err = v, c.origin(), nil
		case outside != nil && err != nil:
			err = beyond(g, pd)
		}
	}
	return best, source, err
}

// beyond is the lack of a figure at a product, with what the figures of the gas reach to.
func beyond(g gap.Gas, pd quantity.PressureLength) error {
	m := minima[g]
	end, asked := m.At, quantity.Text(pd)
	for _, c := range constants[g] {
		end = max(end, c.Farthest())
	}
	if g == gap.Nitrogen {
		return lack.Range("figures of nitrogen reach to 5 cm at normal density, asked for %s of pressure times gap", asked)
	}
	return lack.Range("figures of %s reach to %s of pressure times gap, asked for %s", string(g), quantity.Text(end), asked)
}
