package beam

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// RippleAllowed is the peak to peak of the disturbance, its form kept and all of
// it scaled alike, with which the whole spot just meets an allowance; solved to
// 1e-8. It is a lack where the spot exceeds the allowance without any disturbance,
// where there is none whose form could be scaled, and where none blurs.
func (s Spot) RippleAllowed(allowanceFW50 quantity.Length) (quantity.Voltage, error) {
	switch {
	case !quantity.AtMost(s.TotalWithoutRippleFW50, allowanceFW50):
		return 0, lack.Failed("the spot without any ripple is %s, more than the %s allowed",
			quantity.Text(s.TotalWithoutRippleFW50), quantity.Text(allowanceFW50))
	case s.Disturbance.Energies.narrow():
		return 0, lack.Failed("there is no disturbance whose wave-form could be scaled")
	case s.Optics.Chromatic == 0:
		return 0, lack.Failed("without chromatic aberration no ripple blurs the spot")
	}
	geometric := s.Terms.geometric()
	room := (float64(allowanceFW50) - geometric) * (float64(allowanceFW50) + geometric)
	disc := math.Sqrt(max(room, 0)) / float64(s.Optics.perEnergy(s.Particle))
	scale, err := s.scaleTo(disc)
	return s.Disturbance.PeakToPeak * quantity.Voltage(scale), err
}

// scaleTo is the factor of the disturbance with which the disc reaches an energy.
// The disc's square is nearly straight in that of the factor, so the root is sought
// between squares, by false position (Illinois). Two discs are known, without the
// disturbance and with it as it is; where that falls short, the bracket goes on to where
// the disturbance would do alone, and further where that does not hold.
func (s Spot) scaleTo(disc float64) (float64, error) {
	source := float64(s.Source.DiscFW50())
	if quantity.AtMost(disc, source) {
		return 0, nil
	}
	over := func(energies float64) float64 { return (energies/disc - 1) * (energies/disc + 1) }
	excess := func(square float64) float64 {
		return over(float64(Convolve(s.Source, s.Disturbance.Energies.Scaled(math.Sqrt(square))).DiscFW50()))
	}
	low, high := 0.0, 1.0
	below, above := over(source), over(float64(s.Energies.DiscFW50()))
	if above < 0 {
		ripple := float64(s.Disturbance.Energies.DiscFW50())
		low, below, high = high, above, math.Max(2, disc*disc/(ripple*ripple))
		above = excess(high)
	}
	for i := 0; above < 0 && i < widenings; i++ {
		low, below, high = high, above, high*2
		above = excess(high)
	}
	return closeIn(excess, low, high, below, above)
}

// widenings and steps bound the search of a root.
const (
	widenings = 40
	steps     = 60
)

// closeIn finds the square root of the argument where a function crosses zero
// between low, where it is below, and high, where it is above.
func closeIn(excess func(float64) float64, low, high, below, above float64) (float64, error) {
	if above < 0 {
		return 0, lack.Failed("no factor of the disturbance brings the spot to its allowance")
	}
	last := 0 // the side moved last
	for range steps {
		middle := low
		if above > below {
			middle = (low*above - high*below) / (above - below)
		}
		miss := excess(middle)
		switch {
		case math.Abs(miss) < 1e-9 || high-low < 1e-10*high:
			return math.Sqrt(middle), nil
		case miss > 0:
			high, above = middle, miss
			if last > 0 {
				below /= 2 // else one end could stay for ever
			}
			last = 1
		default:
			low, below = middle, miss
			if last < 0 {
				above /= 2
			}
			last = -1
		}
	}
	return 0, lack.Failed("the ripple that meets the allowance was not found in %d steps", steps)
}
