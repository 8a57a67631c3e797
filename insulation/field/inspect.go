package field

import "kilovet/hv/profile"

// Inspect finds what is wrong with the outlines of an arrangement without solving it:
// open figures, bodies that overlap or lie where no field is, near misses, and
// electrodes that touch though their potentials differ. Same reports whether two
// electrodes, by name, have one potential; the earthed boundary is named Earthed.
// What only follows from another fault is not listed. The error is of type
// profile.Faults.
func Inspect(a Arrangement, same func(first, second string) bool) error {
	m := &model{Arrangement: &a}
	if faults := m.draw(); len(faults) > 0 {
		return faults
	}
	faults := m.apart(same)
	_, overlaps := m.materials()
	faults = append(append(faults, overlaps...), m.checkPlane()...)
	for _, step := range []func() profile.Faults{m.findRegions, m.findWalls, m.checkUse} {
		if len(faults) > 0 {
			return faults
		}
		faults = step()
	}
	if len(faults) > 0 {
		return faults
	}
	return nil
}

// apart lists the electrodes that touch though they have not the same potential.
func (m *model) apart(same func(first, second string) bool) (faults profile.Faults) {
	for i, pair := range m.tied {
		if !same(m.names[pair[0]], m.names[pair[1]]) {
			faults = append(faults, m.touching[i])
		}
	}
	return faults
}
