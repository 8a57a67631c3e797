package build

import (
	"kilovet/hv/chain"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation/solid"
)

// insulation is the permittivity and resistivity of a sleeve: those given, else those
// of its material; a resistivity of 0 is not known.
func insulation(s *chain.Sleeve) (float64, quantity.Resistivity, error) {
	m, err := solid.Find(s.Material.V)
	eps, rho := s.Permittivity.V, s.Resistivity.V
	if !s.Permittivity.Set() {
		if err != nil || m.Permittivity.Most == 0 {
			return 0, 0, lack.Key(s.Permittivity.Key)
		}
		eps = m.Permittivity.Most
	}
	if !s.Resistivity.Set() && err == nil {
		rho = m.Resistivity.Least
	}
	return eps, rho, nil
}
