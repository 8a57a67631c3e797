package cascade

// share is the charge balance of one stage over a period, in units of q = I/f,
// from just after the pulse at the positive peak of the drive (the first coupling
// column's).
type share struct {
	rise   float64 // into the smoothing capacitor, pulse at the positive peak
	first  float64 // out of it to the load, first half
	fall   float64 // out of it, pulse at the negative peak
	second float64 // out of it to the load, second half

	pulse float64 // out of the coupling capacitor, pulse at the positive peak
	hold  float64 // out of it to the load, first half
}

// balance is the share of a stage with m stages above and including it. Each row
// is closed: rise = first + fall + second, and the coupling capacitor is refilled
// by pulse + hold at the other peak.
//
// Half-wave: the even diodes lift m q from the coupling to the smoothing column,
// the odd ones take (m−1) q back for the stages above. Symmetrical: each column
// does half of it, in turns, so that the columns' demands cancel but for q/2.
// Square: all but the top even diode pass their charge in the pulse; the top one
// passes a quarter of q (equal capacitors: half the load for half a period) during
// the half-period. The odd diodes block after the pulse, because the load lowers
// the smoothing column below the coupling column. Derived by charge balance.
func (c Cascade) balance(m float64) share {
	switch {
	case c.Symmetrical && c.Square:
		return share{rise: 1. / 4, first: 1. / 4, fall: -1. / 4, second: 1. / 4, pulse: m/2 - 1./4, hold: 1. / 4}
	case c.Symmetrical:
		return share{rise: 1. / 2, first: 1. / 2, fall: -1. / 2, second: 1. / 2, pulse: m / 2}
	case c.Square:
		return share{rise: m - 1./4, first: 1. / 4, fall: m - 1, second: 1. / 2, pulse: m - 1./4, hold: 1. / 4}
	default:
		return share{rise: m, first: 1. / 2, fall: m - 1, second: 1. / 2, pulse: m}
	}
}
