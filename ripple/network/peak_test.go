package network

import (
	"math"
	"testing"
)

// humped is a current that turns within a step at one and a half, its start beside by an amount.
func humped(beside float64) samples {
	at := func(x float64) float64 { return 1 + 2*x*(1-x) }
	return samples{1 + beside, at(node1), at(node2), 1}
}

// A turn within a step counts up to a start a fiftieth beside the stages, none from two
// fiftieths on, and a part between, without a leap.
func TestATurnWithinAStepIsLostSmoothly(t *testing.T) {
	const apart = 1e-4
	last := math.NaN()
	for i := -500; i <= 500; i++ {
		y := humped(apart * float64(i))
		p := through(y[0], y[1], y[2], y[3])
		_, turn := p.extremes()
		got := y.peak(false, 0)
		beside := math.Abs(y[0] - 1)
		switch {
		case beside < 0.02-1e-9 && math.Abs(got-turn) > 1e-12:
			t.Errorf("start %g: peak %g, turn %g", y[0], got, turn)
		case beside > 0.04+1e-9 && got != 1:
			t.Errorf("start %g: peak %g", y[0], got)
		case !(got >= 1 && got <= turn+1e-12):
			t.Errorf("start %g: peak %g, turn %g", y[0], got, turn)
		}
		if math.Abs(got-last) > 0.005 { // the ramp falls by half over two hundredths
			t.Errorf("start %g: from %g to %g", y[0], last, got)
		}
		last = got
	}
}

// A pulse that starts and ends at zero has a peak.
func TestATurnCountsWhereTheStartIsZero(t *testing.T) {
	y := samples{0, node1 * (1 - node1), node2 * (1 - node2), 0}
	if b := parabola(y[1], y[2], y[3]); b[0] != 0 {
		t.Fatalf("starts at %g", b[0])
	}
	if got := y.peak(false, 0); math.Abs(got-0.25) > 1e-12 {
		t.Errorf("peak %g", got)
	}
}
