package field

import (
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// perfect is the conductivity, relative to the best of the figure, that a perfect
// insulator counts with: its surface then takes the potential of what leaks.
const perfect = 1e-9

// SolveResistive works out the field of a steady direct voltage, when the currents
// have had time to settle: the resistivities decide, not the permittivities. All
// dielectrics need a resistivity; the medium counts as a perfect insulator unless it
// has one. A body that conducts but touches no electrode has no potential of its own.
func SolveResistive(a Arrangement) (*Solution, error) { return Fine.SolveResistive(a) }

// SolveResistive is SolveResistive with that aim.
func (aim Aim) SolveResistive(a Arrangement) (*Solution, error) {
	if err := leaks(&a); err != nil {
		return nil, err
	}
	m, err := newModel(&a, true)
	if err != nil {
		return nil, err
	}
	if err := m.held(); err != nil {
		return nil, err
	}
	return m.solution(aim)
}

// leaks reports the resistivities that are wanting, or are none.
func leaks(a *Arrangement) error {
	var missing []string
	for _, d := range a.Dielectrics {
		if d.Resistivity == 0 {
			missing = append(missing, d.Name)
		}
	}
	if len(missing) > 0 || len(a.Dielectrics) == 0 && a.Resistivity == 0 {
		return lack.Key(append(missing, "resistivity")...)
	}
	for _, d := range a.Dielectrics {
		if !(d.Resistivity > 0) || a.Resistivity < 0 {
			return lack.Range("a resistivity is positive")
		}
	}
	return nil
}

// held reports a body that conducts and has no potential of its own.
func (m *model) held() error {
	if name := m.floating(); name != "" {
		return lack.Range("%s conducts, but touches no electrode: what it is charged to is not known", name)
	}
	return nil
}

// leak is the conductivity of a material in S/m, 0 of a perfect insulator.
func (m *model) leak(material int) float64 {
	rho := m.Resistivity
	if material > 0 {
		rho = m.Dielectrics[material-1].Resistivity
	}
	if rho == 0 {
		return 0
	}
	return 1 / float64(rho)
}

// conductivity of a material, relative to the best.
func (m *model) conductivity(material int) float64 {
	return max(m.leak(material)/m.bestConductivity(), perfect)
}

// bestConductivity of all materials, in S/m.
func (m *model) bestConductivity() (best float64) {
	if m.Resistivity > 0 {
		best = 1 / float64(m.Resistivity)
	}
	for _, d := range m.Dielectrics {
		best = max(best, 1/float64(d.Resistivity))
	}
	return best
}

// floating is the name of a dielectric that touches no electrode, in a medium that
// does not conduct, not even through others; empty if there is none.
func (m *model) floating() string {
	tied := make([]bool, len(m.regions))
	conducts := func(r int) bool { return r >= 0 && m.regions[r].constant > perfect }
	for changed := true; changed; {
		changed = false
		for _, w := range m.walls {
			for _, r := range []int{w.left, w.right} {
				if !conducts(r) || tied[r] {
					continue
				}
				other := w.left + w.right - r
				if w.electrode >= 0 || w.kind == interfaces && conducts(other) && tied[other] {
					tied[r], changed = true, true
				}
			}
		}
	}
	for r := range m.regions {
		if conducts(r) && !tied[r] {
			return m.bodyName(r)
		}
	}
	return ""
}

// Current out of an electrode.
func (f *Field) Current(electrode string) (quantity.Current, error) {
	if !f.resistive {
		return 0, lack.Range("an electrostatic field has charges, not currents")
	}
	k, err := f.electrode(electrode)
	return quantity.Current(f.outflow(k) * f.bestConductivity()), err
}
