package field

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

const (
	mostPassing = 6    // solutions on the way, at most
	nearEnough  = 0.02 // of the time between two of them
	// leastPassage is the part of the field by which both distributions differ, below
	// which there is no passage to time.
	leastPassage = 1e-3
)

// RelaxationTime is how long the field at the place of a peak takes from this, the
// distribution at once after switching on, to the settled one: its time constant where
// it has one, else the time T over which the mean with the weight e^(−t/T)/T lies half
// way. At most six further solutions, which reuse the integrals of this one. Where both
// distributions are the same there, it is a lack.
func (f *Field) RelaxationTime(settled *Solution, at Peak) (quantity.Time, error) {
	volts := f.potentials()
	end, err := settled.strengthAt(volts, at)
	if err != nil {
		return 0, err
	}
	begin, err := f.strengthAt(volts, at)
	if err != nil {
		return 0, err
	}
	if math.Abs(end-begin) < leastPassage*math.Max(begin, end) {
		return 0, lack.Failed("the field at %v is the same at once and settled", at.At)
	}
	over := f.slowest()
	for range mostPassing {
		s, err := f.Passing(quantity.Time(over))
		if err != nil {
			return 0, err
		}
		way, err := s.strengthAt(volts, at)
		if err != nil {
			return 0, err
		}
		left := math.Min(math.Max((way-end)/(begin-end), 1e-3), 1-1e-3)
		next := over * left / (1 - left) // of an exponential: left = τ/(τ + T)
		if math.Abs(next-over) <= nearEnough*over {
			return quantity.Time(next), nil
		}
		over = next
	}
	return quantity.Time(over), nil
}

// slowest is the longest product of resistivity and permittivity, a first guess.
func (m *model) slowest() (seconds float64) {
	for k := range len(m.Dielectrics) + 1 {
		if sigma := m.leak(k); sigma > 0 {
			seconds = math.Max(seconds, vacuumPermittivity*m.permittivity(k)/sigma)
		}
	}
	return seconds
}

func (f *Field) potentials() map[string]quantity.Voltage {
	all := map[string]quantity.Voltage{}
	for i, name := range f.names {
		all[name] = quantity.Voltage(f.volts[f.group[i]])
	}
	return all
}

// strengthAt is the field at the place of a peak, in its body.
func (s *Solution) strengthAt(volts map[string]quantity.Voltage, at Peak) (float64, error) {
	f, err := s.Under(volts)
	if err != nil {
		return 0, err
	}
	list, err := f.At(at.At)
	if err != nil {
		return 0, err
	}
	for _, r := range list {
		if r.Body == at.Body {
			return float64(r.Strength()), nil
		}
	}
	return 0, lack.Failed("no reading of %s at %v", at.Body, at.At)
}
