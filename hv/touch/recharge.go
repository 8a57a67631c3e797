package touch

import (
	"cmp"
	"slices"
	"strings"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Absorption is the share of its voltage that a capacitor gets back by itself after it
// was discharged for a short time: dielectric absorption, as makers measure it (charged
// 15 min, discharged 10 s, read after 15 min).
type Absorption struct {
	Dielectric string
	// Least and Most are the ends of what is published; Most is to be reckoned with.
	Least, Most quantity.Fraction
	Source      string
	// Mark says how the source is known: "read" or "derived".
	Mark string
}

const (
	makerTable = "film-capacitor maker's technology table"
	digests    = "digests on dielectric absorption, and " + makerTable
	classTwo   = "as X7R and Z5U of the same class, both up to 2.5 %"
)

// absorptions are in the order of messages. An older page of the same maker has 0.6 to
// 1.0 % for X7R; its newer one and a digest have 2.0 to 2.5 %.
func absorptions() []Absorption {
	all := []Absorption{
		{"C0G", 0.003, 0.006, digests, "read"},
		{"NP0", 0.003, 0.006, digests, "read"},
		{"film", 0.0005, 0.02, "encyclopaedia article: many polymer films 1 to 2 %; " + makerTable + ": from 0.05 %", "read"},
		{"PP film", 0.0005, 0.001, makerTable, "read"},
		{"PET film", 0.002, 0.0025, makerTable, "read"},
		{"PEN film", 0.01, 0.01, makerTable, "read"},
		{"PPS film", 0.0005, 0.0005, makerTable, "read"},
		{"X7R", 0.02, 0.025, digests, "read"},
		{"Z5U", 0.02, 0.025, makerTable + ", older page", "read"},
	}
	for _, other := range []string{"X5R", "X6S", "X7S", "X7T", "X8R", "Y5P", "Y5U", "Y5V"} {
		all = append(all, Absorption{other, 0.02, 0.025, classTwo, "derived"})
	}
	return all
}

// FindAbsorption finds the absorption of a dielectric by its word. Where nothing is
// published (mica, glass, oiled paper), or the word is unknown, it is a lack that names
// the known ones.
func FindAbsorption(dielectric string) (Absorption, error) {
	all := absorptions()
	i := slices.IndexFunc(all, func(a Absorption) bool { return strings.EqualFold(a.Dielectric, strings.TrimSpace(dielectric)) })
	if i < 0 {
		var known []string
		for _, a := range all {
			known = append(known, a.Dielectric)
		}
		return Absorption{}, lack.Range("no dielectric absorption is published for %q; known are %s", dielectric, strings.Join(known, ", "))
	}
	return all[i], nil
}

// Recharged is what stands on a capacitor again.
type Recharged struct {
	Voltage quantity.Voltage
	Charge  quantity.Charge
	Energy  quantity.Energy
}

// Recharge is the most that comes back on a capacitor that stood at a voltage and was
// discharged for a short time. It is why terminals stay shorted.
func (a Absorption) Recharge(c quantity.Capacitance, u quantity.Voltage) (Recharged, error) {
	if err := charged(c, u); err != nil {
		return Recharged{}, err
	}
	back := u * quantity.Voltage(a.Most)
	return Recharged{back, Charge(c, back), Energy(c, back)}, nil
}

// LargestAbsorption is the most that is published of any dielectric here: the bound for one
// of which nothing is.
func LargestAbsorption() Absorption {
	return slices.MaxFunc(absorptions(), func(a, b Absorption) int { return cmp.Compare(a.Most, b.Most) })
}
