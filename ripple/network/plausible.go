package network

import (
	"math"

	"kilovet/hv/lack"
)

// plausible refuses a state that only the leakage of the diodes keeps finite, beyond all
// that a ladder can put across one: a load that draws current nothing feeds.
func (p *Periodic) plausible() error {
	drawn := 0.0
	for i := range p.track.sinks {
		drawn = max(drawn, abs(p.track.sinks[i].value))
	}
	if drawn == 0 {
		return nil
	}
	most := 2 * largest(p.track.u)
	beyond := math.Max(100, 2*float64(len(p.track.diodes))) * p.track.scale
	strange := func(d *rectifier, v float64) bool { return v > beyond && v*d.leak > 1e-3*drawn }
	for i := range p.track.diodes {
		d := &p.track.diodes[i]
		if strange(d, most+d.offset.size()) && strange(d, float64(p.swing(&d.span).Peak())) {
			return lack.Failed("a load draws current that only the leakage of %s could feed", p.Circuit.Elements[d.element].Name)
		}
	}
	return nil
}
