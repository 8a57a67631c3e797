package field

import (
	"slices"

	"kilovet/hv/lack"
	"kilovet/hv/profile"
	"kilovet/hv/quantity"
)

// Influence is the field along z at a place for one volt on an electrode and none on the
// others, in 1/m.
type Influence struct {
	Electrode string
	PerVolt   float64
}

// Influences are those of all electrodes on a place on a surface or in a body; where
// sides differ, that of the medium. Their sum is the field of all at one volt: none in
// an enclosed figure.
func (s *Solution) Influences(at profile.Point) ([]Influence, error) {
	var all []Influence
	for _, name := range s.names {
		if name == Earthed {
			continue
		}
		volts := map[string]quantity.Voltage{}
		for _, other := range s.names {
			if other != Earthed {
				volts[other] = 0
			}
		}
		for i, other := range s.names {
			if s.group[i] == s.group[slices.Index(s.names, name)] && other != Earthed {
				volts[other] = 1 // electrodes that touch are one
			}
		}
		f, err := s.Under(volts)
		if err != nil {
			return nil, err
		}
		axial, err := f.axialAt(at)
		if err != nil {
			return nil, err
		}
		all = append(all, Influence{name, axial})
	}
	return all, nil
}

func (f *Field) axialAt(at profile.Point) (float64, error) {
	list, err := f.At(at)
	if err != nil {
		return 0, err
	}
	for _, r := range list {
		if r.Body == Medium {
			return float64(r.Axial), nil
		}
	}
	return 0, lack.Failed("at %v there is no field in the medium", at)
}
