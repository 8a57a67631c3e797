package touch

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Body is a resistance that stands for a person.
type Body struct {
	Name       string
	Resistance quantity.Resistance
	Source     string
	// Mark says how the source is known: "read" or "memory".
	Mark string
}

// Worst is the least resistance in use: it gives the highest peak current.
func Worst() Body {
	return Body{"worst case", 500, "hand to hand, skin punctured, above about 600 V (summary of IEEE guidance)", "read"}
}

// FivePercent is the resistance that one in twenty people stays below. An older edition
// has 700 ohm at 1000 V and 650 ohm as its limit (read in a quotation).
func FivePercent() Body {
	return Body{"5 % of people", 575, "IEC TS 60479-1:2005, hand to hand, large contact, 1000 V and more", "memory"}
}

// Design is the value grounding is designed with: it gives the longer duration.
func Design() Body {
	return Body{"design value", 1000, "IEEE Std 80 eq. (10), hand to hand or hand to feet", "read"}
}

// Bodies are the models, the least resistance first. At high voltage the first two give
// the peak and the last the duration.
func Bodies() []Body { return []Body{Worst(), FivePercent(), Design()} }

// SquareTime is the integral of the square of a current, in ampere squared seconds.
type SquareTime float64

// Shock is a capacitance discharged through a resistance.
type Shock struct {
	Peak quantity.Current
	// Duration is the time 3RC that counts as the length of the shock, RMS the current
	// that does the same over it.
	Duration   quantity.Time
	RMS        quantity.Current
	SquareTime SquareTime
	Charge     quantity.Charge
	Energy     quantity.Energy
}

// Through discharges a capacitance at a voltage through a body: M. Mitolo, Electrical
// Safety of Low-Voltage Systems p. 221 (read). Skin and arc are left out, as in the
// models. A resistance of zero is a lack.
func Through(c quantity.Capacitance, u quantity.Voltage, body quantity.Resistance) (Shock, error) {
	if err := charged(c, u); err != nil {
		return Shock{}, err
	}
	if !positive(body) {
		return Shock{}, lack.Range("a shock needs a resistance above zero, not %s", quantity.Text(body))
	}
	peak := float64(u) / float64(body)
	tau := float64(body) * float64(c)
	return Shock{
		Peak:       quantity.Current(peak),
		Duration:   quantity.Time(3 * tau),
		RMS:        quantity.Current(peak / math.Sqrt(6)), // exact: √(I² RC/2 / 3RC)
		SquareTime: SquareTime(peak * peak * tau / 2),
		Charge:     Charge(c, u),
		Energy:     Energy(c, u),
	}, nil
}

// Current is what a source drives through its own resistance and a body.
func Current(u quantity.Voltage, series, body quantity.Resistance) (quantity.Current, error) {
	if err := charged(0, u); err != nil {
		return 0, err
	}
	if !(series >= 0) || !(body >= 0) || !positive(series+body) {
		return 0, lack.Range("a current needs a resistance above zero, not %s and %s", quantity.Text(series), quantity.Text(body))
	}
	return quantity.Current(float64(u) / float64(series+body)), nil
}

// charged says why a capacitance at a voltage is none.
func charged(c quantity.Capacitance, u quantity.Voltage) error {
	if !notNegative(c) || !notNegative(u) {
		return lack.Range("a capacitance and the magnitude of a voltage are needed, not %s and %s", quantity.Text(c), quantity.Text(u))
	}
	return nil
}

func notNegative[Q ~float64](q Q) bool { return q >= 0 && !math.IsInf(float64(q), 1) }
func positive[Q ~float64](q Q) bool    { return q > 0 && notNegative(q) }
