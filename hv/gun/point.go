package gun

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Transconductance is −dI/dVb in amperes per volt.
type Transconductance float64

// Point is where a gun works.
type Point struct {
	Bias     quantity.Voltage
	Emission quantity.Current
	// Headroom is what the bias lacks to cutoff, Vc − Vb.
	Headroom quantity.Voltage

	law      Law
	resistor quantity.Resistance // 0 at fixed bias
}

// FixedBias is the point at a bias made by a source.
func (l Law) FixedBias(bias quantity.Voltage) (Point, error) {
	if !(bias >= 0) || math.IsInf(float64(bias), 1) {
		return Point{}, lack.Range("the emission law holds from 0 V of bias on, not at %s", quantity.Text(bias))
	}
	return Point{Bias: bias, Emission: l.At(bias), Headroom: max(0, l.cutoff-bias), law: l}, nil
}

// SelfBias is the point where the emission through the bias resistor makes the
// bias that lets it pass, Vb = R I. Both laws hold there to 1e-9. The larger the
// resistor the nearer to cutoff, which is never reached.
func (l Law) SelfBias(resistor quantity.Resistance) (Point, error) {
	switch {
	case !(resistor >= 0) || math.IsInf(float64(resistor), 1):
		return Point{}, lack.Range("no load line for a bias resistor of %s", quantity.Text(resistor))
	case resistor == 0:
		return l.FixedBias(0)
	}
	t, err := l.loadLine(resistor)
	if err != nil {
		return Point{}, err
	}
	return Point{
		Bias:     l.cutoff * quantity.Voltage(logistic(-t)),
		Emission: l.emission(-softplus(-t)),
		Headroom: l.cutoff * quantity.Voltage(logistic(t)),
		law:      l, resistor: resistor,
	}, nil
}

// loadLine solves ln(R I) = ln Vb in t, where 1 − Vb/Vc = 1/(1 + e^−t): in this
// variable bias and headroom both keep all their digits, however small. The left
// side less the right rises with t everywhere, at most at slope n, so that Newton
// steps, kept inside the bracket they narrow, cannot miss.
func (l Law) loadLine(resistor quantity.Resistance) (t float64, err error) {
	scale := math.Log(float64(resistor) / float64(l.cutoff))
	low, high := -700.0, 700.0
	for range 200 {
		i := l.emission(-softplus(-t))
		if i == 0 {
			low, t = t, (t+high)/2
			continue
		}
		miss := scale + math.Log(float64(i)) + softplus(t)
		if math.Abs(miss) < 1e-12 {
			return t, nil
		}
		if miss > 0 {
			high = t
		} else {
			low = t
		}
		next := t - miss/(l.exponent*l.share(i)*logistic(-t)+logistic(t))
		if !(next > low && next < high) {
			next = (low + high) / 2
		}
		if next == t {
			return t, nil
		}
		t = next
	}
	return 0, lack.Failed("emission law and load line of %s were not brought together", quantity.Text(resistor))
}

func logistic(t float64) float64 { return 1 / (1 + math.Exp(-t)) }

// softplus is ln(1 + e^t).
func softplus(t float64) float64 { return max(t, 0) + math.Log1p(math.Exp(-math.Abs(t))) }

// AtFixedBias is the same point with a source in place of the resistor.
func (p Point) AtFixedBias() Point {
	p.resistor = 0
	return p
}

// Law is the law the point lies on.
func (p Point) Law() Law { return p.law }

// Transconductance is n I/(Vc − Vb), less where the cathode's limit governs;
// zero without emission.
func (p Point) Transconductance() Transconductance {
	if p.Emission == 0 {
		return 0
	}
	return Transconductance(p.law.exponent * p.law.share(p.Emission) * float64(p.Emission) / float64(p.Headroom))
}

// LoopGain is L = gm R = n Vb/(Vc − Vb) of the self-biased gun: what disturbs the
// emission is divided by 1 + L. Zero at fixed bias.
func (p Point) LoopGain() float64 { return float64(p.Transconductance()) * float64(p.resistor) }

// LoadLine is the current that a bias drives through the bias resistor, Vb/R; a lack
// without one.
func (p Point) LoadLine(bias quantity.Voltage) (quantity.Current, error) {
	if p.resistor == 0 {
		return 0, lack.Failed("a fixed bias has no load line")
	}
	return quantity.Current(float64(bias) / float64(p.resistor)), nil
}
