package gun

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// knee is how sharply emission bends from the space-charge law to the limit of
// the cathode: 1/I^knee = 1/I_law^knee + 1/I_limit^knee.
//
// The form is J. M. Vaughan's (IEEE Trans. Electron Devices 33 (1986) 1925, from
// memory, after R. T. Longo), who found 6 to 10 for good cathodes; the sharp end
// is taken, which leaves the law untouched (1e-6) below a quarter of the limit.
// At equality 0.933 of either is emitted.
const knee = 10

// Law is the emission of a triode gun against its bias,
//
//	I = K (Vc − Vb)^n,   K = I₀ / Vc^n,
//
// zero at and past cutoff, and never more than the cathode can give. The form
// is common practice: n = 1.5 for a fixed emitting area (Child's law), 2 to 2.5
// where the area grows, 3.5 for a cathode-ray tube driven at its grid (H. Moss,
// from memory).
type Law struct {
	cutoff   quantity.Voltage
	exponent float64
	zeroBias quantity.Current // the law's own, before any limit
	limit    quantity.Current // +Inf where none is set
}

// New makes a law from the emission without bias. Cutoff and emission must be
// positive and the exponent at least 1, else the law is outside its model.
func New(cutoff quantity.Voltage, exponent float64, zeroBias quantity.Current) (Law, error) {
	l := Law{cutoff, exponent, zeroBias, quantity.Current(math.Inf(1))}
	switch {
	case !positive(cutoff):
		return Law{}, lack.Range("the emission law needs a cutoff above 0 V, not %s", quantity.Text(cutoff))
	case !(exponent >= 1) || math.IsInf(exponent, 1):
		return Law{}, lack.Range("the emission law holds for exponents of at least 1, not %g", exponent)
	case !positive(zeroBias):
		return Law{}, lack.Range("the emission law needs an emission above 0 A, not %s", quantity.Text(zeroBias))
	}
	return l, nil
}

// Through makes the law that gives an emission read at its bias. It is a lack
// where that bias is at or past cutoff: such a reading has no law.
func Through(cutoff quantity.Voltage, exponent float64, bias quantity.Voltage, emission quantity.Current) (Law, error) {
	return ThroughLimited(cutoff, exponent, bias, emission, quantity.Current(math.Inf(1)))
}

// ThroughLimited is Through for a cathode that can give no more than limit; an
// emission at or above it is a lack.
func ThroughLimited(cutoff quantity.Voltage, exponent float64, bias quantity.Voltage, emission, limit quantity.Current) (Law, error) {
	l, err := New(cutoff, exponent, emission)
	if err != nil {
		return Law{}, err
	}
	if l, err = l.Limited(limit); err != nil {
		return Law{}, err
	}
	if !(bias >= 0) || quantity.AtLeast(bias, cutoff) {
		return Law{}, lack.Range("a bias of %s lies outside 0 V to the cutoff of %s, where the gun emits", quantity.Text(bias), quantity.Text(cutoff))
	}
	own, err := l.unlimited(emission)
	if err != nil {
		return Law{}, err
	}
	l.zeroBias = own / quantity.Current(math.Pow(1-float64(bias/cutoff), exponent))
	return l, nil
}

// Limited is the law of a cathode that can give no more than limit at its
// temperature (see Emitter.Limit); the law's scale stays.
func (l Law) Limited(limit quantity.Current) (Law, error) {
	if !(limit > 0) {
		return Law{}, lack.Range("a cathode that gives %s does not emit", quantity.Text(limit))
	}
	l.limit = limit
	return l, nil
}

// AtVoltage is the law at a working voltage ratio times that of the given one.
// The cutoff goes with the voltage (D = Vc/Va is geometry), K stays.
func (l Law) AtVoltage(ratio float64) (Law, error) {
	if !positive(ratio) {
		return Law{}, lack.Range("cutoff goes with the working voltage, which cannot change by a factor of %g", ratio)
	}
	l.cutoff *= quantity.Voltage(ratio)
	l.zeroBias *= quantity.Current(math.Pow(ratio, l.exponent))
	return l, nil
}

// Cutoff is the bias at which emission stops.
func (l Law) Cutoff() quantity.Voltage { return l.cutoff }

// Exponent is n.
func (l Law) Exponent() float64 { return l.exponent }

// ZeroBias is the emission without bias, the cathode's limit observed.
func (l Law) ZeroBias() quantity.Current { return l.At(0) }

// At is the emission at a bias; zero at and past cutoff. A bias below zero draws
// grid current, which the law does not know: it answers as at zero.
func (l Law) At(bias quantity.Voltage) quantity.Current {
	if bias >= l.cutoff {
		return 0
	}
	return l.emission(math.Log1p(-float64(max(bias, 0) / l.cutoff)))
}

// BiasFor is the bias at which the gun gives an emission; a lack where it cannot.
func (l Law) BiasFor(emission quantity.Current) (quantity.Voltage, error) {
	if !(emission > 0) {
		return 0, lack.Range("every bias from the cutoff of %s on gives no emission", quantity.Text(l.cutoff))
	}
	own, err := l.unlimited(emission)
	if err != nil {
		return 0, err
	}
	if !quantity.AtMost(own, l.zeroBias) {
		return 0, lack.Range("the gun gives %s at most, without bias, not %s", quantity.Text(l.ZeroBias()), quantity.Text(emission))
	}
	root := math.Log(float64(own/l.zeroBias)) / l.exponent
	return max(0, l.cutoff*quantity.Voltage(-math.Expm1(root))), nil
}

// ResistorFor is the bias resistor with which the gun gives an emission.
func (l Law) ResistorFor(emission quantity.Current) (quantity.Resistance, error) {
	bias, err := l.BiasFor(emission)
	return quantity.Resistance(float64(bias) / float64(emission)), err
}

// Ratio is the law's own emission over an emission given for the same bias.
func (l Law) Ratio(bias quantity.Voltage, given quantity.Current) (float64, error) {
	if !(given > 0) {
		return 0, lack.Range("no ratio to an emission of %s", quantity.Text(given))
	}
	return float64(l.At(bias) / given), nil
}

// emission is the law at ln(1 − Vb/Vc), its limit observed.
func (l Law) emission(logBelow float64) quantity.Current {
	own := float64(l.zeroBias) * math.Exp(l.exponent*logBelow)
	if own == 0 {
		return 0
	}
	return quantity.Current(own * math.Pow(1+math.Pow(own/float64(l.limit), knee), -1.0/knee))
}

// unlimited is the emission the law alone must give for the cathode to give i.
func (l Law) unlimited(i quantity.Current) (quantity.Current, error) {
	if quantity.AtLeast(i, l.limit) {
		return 0, lack.Range("the cathode gives less than %s at its temperature, not %s", quantity.Text(l.limit), quantity.Text(i))
	}
	return i * quantity.Current(math.Pow(-math.Expm1(knee*math.Log(float64(i/l.limit))), -1.0/knee)), nil
}

// share is how far the law rather than the cathode governs an emission:
// d ln I / d ln I_law = 1 − (I/limit)^knee.
func (l Law) share(i quantity.Current) float64 { return 1 - math.Pow(float64(i/l.limit), knee) }

func positive[Q ~float64](q Q) bool { return q > 0 && !math.IsInf(float64(q), 1) }
