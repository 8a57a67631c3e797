package steady

import (
	"fmt"
	"math"
	"testing"

	"kilovet/hv/quantity"
)

// Between two times a voltage that falls towards any rest, or along a line, is where it is: by
// hand, rest + (begin − rest) e^(−fold·along).
func TestStretchIsAnExponentialTowardsAnyRest(t *testing.T) {
	for _, rest := range []float64{0, 40, -300} {
		for _, fold := range []float64{1e-4, 0.3, 3, -0.5} {
			of := func(x float64) float64 { return rest + (100-rest)*math.Exp(-fold*x) }
			s := stretch{100, of(1), foldOf((of(1) - 100) / (-fold * (of(1) - rest)))}
			for _, x := range []float64{0, 0.2, 0.7, 1} {
				near(t, fmt.Sprint("at ", x), s.at(x), of(x), 1e-9)
				near(t, fmt.Sprint("along ", x), 1+s.along(of(x)), 1+x, 1e-6)
			}
		}
	}
	line := stretch{100, 20, foldOf(1)}
	near(t, "along a line", line.along(60), 0.5, 1e-9)
}

// The time at which any node of a ladder is down is the same to a part in a thousand when the
// decay is followed a hundred times as closely: of those that fall along with others, whose
// own charge hardly moves, too.
func TestTimesOfAllNodesHold(t *testing.T) {
	for _, polarity := range []string{"positive", "negative"} {
		net, from := bledLadder(polarity, 6, 1e9)
		d, close := must(Discharge(net, from, volts60)), must(discharge(net, from, volts60, 1e-5))
		for i, e := range close.Nodes() {
			if e.Time > quantity.Time(1e-3) {
				near(t, polarity+", "+e.Of, float64(d.Nodes()[i].Time), float64(e.Time), 1e-3)
			}
		}
	}
}
