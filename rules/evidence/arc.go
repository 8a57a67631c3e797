package evidence

import (
	"kilovet/hv/quantity"
	"kilovet/ripple/network"
)

// An arc is taken as a small resistance, far below what stands in series with it, and
// followed while the stored charge runs off; the supply's own current stays small
// beside it. Assumptions of this review.
const (
	arcResistance quantity.Resistance = 1
	arcPeriods    quantity.Time       = 20 // in periods of the drive
)

// Arc is what an arc from a node to ground does, struck when the node is at its highest,
// drive and loads on.
func (e *Evidence) Arc(node string) (*network.Discharge, error) {
	return remember(e, "arc at "+e.canonical(node), func() (*network.Discharge, error) {
		if err := e.sound(); err != nil {
			return nil, err
		}
		s, err := e.solution()
		if err != nil {
			return nil, err
		}
		from, err := s.node(node)
		if err != nil {
			return nil, err
		}
		instant, err := s.Highest(from, 0)
		if err != nil {
			return nil, err
		}
		return network.Arc(s.Circuit, s.State(instant), network.ArcOptions{From: from, Resistance: arcResistance, Until: arcPeriods * s.Period()})
	})
}

// ArcNodes are where an arc at the gun may strike.
func (e *Evidence) ArcNodes() []string {
	if e.chain.HasCathode() && e.canonical("cathode") != e.canonical("output") {
		return []string{"output", "cathode"}
	}
	return []string{"output"}
}

// ArcDiodePeak is the largest current that an arc at the gun drives through a diode.
func (e *Evidence) ArcDiodePeak(diode string) (quantity.Current, error) {
	var most quantity.Current
	for _, node := range e.ArcNodes() {
		d, err := e.Arc(node)
		if err != nil {
			return 0, err
		}
		most = max(most, d.Of(diode).Peak)
	}
	return most, nil
}
