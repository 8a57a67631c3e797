package evidence

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// OfReturn is what the over-current trip senses where nothing else is said: the current
// that returns to the multiplier.
const OfReturn = "return"

// TripSenses is the part whose current the over-current trip senses, OfReturn for the
// multiplier's return.
func (e *Evidence) TripSenses() string {
	if p := e.chain.Protection; p != nil && p.OverCurrent != nil {
		return p.OverCurrent.Senses.Or(OfReturn)
	}
	return OfReturn
}

// TripAssumptions are what the over-current trip takes for granted.
func (e *Evidence) TripAssumptions() []string {
	if p := e.chain.Protection; p != nil && p.OverCurrent != nil && !p.OverCurrent.Senses.Set() {
		return []string{"the over-current trip senses the current that returns to the multiplier: what it senses is not described"}
	}
	return nil
}

// TripCurrent is the magnitude of the mean current that the over-current trip senses; a lack
// where it senses what is no part of the circuit.
func (e *Evidence) TripCurrent() (quantity.Current, error) {
	part := e.TripSenses()
	if part == OfReturn {
		return e.SupplyCurrent()
	}
	if e.Layout().Element(part) == nil {
		return 0, lack.Because("the over-current trip senses "+part+", which is no part of the circuit", "protection.over_current.senses")
	}
	s, err := e.solution()
	if err != nil {
		return 0, err
	}
	if s.Circuit.Element(part) == nil {
		return 0, lack.Failed("%s, which the over-current trip senses, carries nothing any more", part)
	}
	f, err := s.Through(part)
	return quantity.Current(math.Abs(float64(f.Mean))), err
}
