package evidence

import (
	"fmt"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation"
	"kilovet/rules/build"
)

// BreakdownAnswers are those of all dimensions of an arrangement for the breakdown along the
// critical line of a place, the least change first: what lets the voltage be a share of the
// estimate.
func (e *Evidence) BreakdownAnswers(f *build.Arrangement, w Where, share quantity.Fraction) ([]Answer, error) {
	key := fmt.Sprintf("breakdown answers %s %v %g", f.Name.V, w, float64(share))
	return remember(e.Under(Condition{}), key, func() ([]Answer, error) {
		c, err := e.Critical(f, w)
		if err != nil {
			return nil, err
		}
		return leastFirst(answersFor(f, c.Stress.setting(), c.Stress.At, atPlace(w, func(f *build.Arrangement, p Stress, w Where) (float64, error) {
			return e.demandedBreakdown(f, p, w, share)
		})))
	})
}

// demandedBreakdown is the voltage along the critical line over a share of the breakdown
// there.
func (e *Evidence) demandedBreakdown(f *build.Arrangement, p Stress, w Where, share quantity.Fraction) (float64, error) {
	traced, l, reversed, err := lineFrom(p)
	if traced.Closed {
		return 0, lack.Failed("an insulator stands in the way of the line")
	}
	if err != nil {
		return 0, err
	}
	volts, polarity := across(traced, w, f)
	stands, err := insulation.StrengthAlong(e.Filling(f, p.Body), l, sharpEnd(polarity, reversed)).Breakdown.Get()
	return float64(volts) / float64(stands*quantity.Voltage(share)), err
}
