package evidence

import (
	"math"

	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
)

// OfAPicofarad is what a picofarad between the columns at every stage would take from the
// output without load, where no strays are.
func (e *Evidence) OfAPicofarad() (quantity.Voltage, error) {
	c, err := e.Cascade()
	if err != nil {
		return 0, err
	}
	c.BetweenColumns, c.ToGround, c.Junction = 1e-12, 0, 0
	s, err := c.NoLoadWithStrays()
	if err != nil {
		return 0, err
	}
	none, err := c.NoLoad()
	return none - s.Mean, err
}

// BalancedRipple is the ripple at the top of a symmetrical multiplier with both halves of
// the drive at their mean amplitude, peak to peak.
func (e *Evidence) BalancedRipple() (quantity.Voltage, error) {
	return remember(e, "balanced ripple", func() (quantity.Voltage, error) {
		s, err := e.solution()
		if err != nil {
			return 0, err
		}
		peak, err := e.Peak()
		if err != nil {
			return 0, err
		}
		p, err := e.solve(s.Circuit.Each(func(el *circuit.Element) bool {
			if el.Kind == circuit.Source && el.Role == circuit.Ladder {
				el.Wave.Amplitude = quantity.Voltage(math.Copysign(float64(peak), float64(el.Wave.Amplitude)))
			}
			return true
		}), beside{from: s.Periodic}, true)
		if err != nil {
			return 0, err
		}
		swing, err := p.between("multiplier", "ground")
		return swing.PeakToPeak(), err
	})
}

// HalfWaveRipple is what a half-wave multiplier of the same capacitors would have, by
// charge balance, peak to peak.
func (e *Evidence) HalfWaveRipple() (quantity.Voltage, error) {
	c, err := e.Cascade()
	if err != nil {
		return 0, err
	}
	i, err := e.LoadCurrent()
	if err != nil {
		return 0, err
	}
	c.Symmetrical = false
	s, err := c.Loaded(i)
	return s.Ripple.PeakToPeak(), err
}
