package xray

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// HalfValueLayers are the thicknesses of a material that halve the kerma rate behind a
// wall, and halve it again: the first and the second half-value layer.
func (s Stop) HalfValueLayers(w Wall, m Material) (first, second quantity.Length, err error) {
	if err := s.check(); err != nil {
		return 0, 0, err
	}
	if err := w.check(); err != nil {
		return 0, 0, err
	}
	return newBeam(w.with(m, 0).screens(false), s.kilovolts()).halfValueLayers(m)
}

// halfValueLayers adds a material until half and a quarter is left.
func (b beam) halfValueLayers(m Material) (first, second quantity.Length, err error) {
	weights, linear := make([]float64, len(b.rays)), make([]float64, len(b.rays))
	for i, r := range b.rays {
		weights[i] = b.passing(r) * (b.top - r.energy) * r.air
		linear[i] = m.linear(r.energy)
	}
	half, err := thickness(weights, linear, 0.5)
	if err != nil {
		return 0, 0, err
	}
	quarter, err := thickness(weights, linear, 0.25)
	return quantity.Length(half / 100), quantity.Length((quarter - half) / 100), err
}

// thickness solves Σ w e^(−µx) = left Σ w for x. The logarithm of a sum of falling
// exponentials is convex, so that Newton steps from zero never pass the answer.
func thickness(weights, linear []float64, left float64) (float64, error) {
	var x, aim float64
	for _, w := range weights {
		aim += left * w
	}
	for range 200 {
		var sum, slope float64
		for i, w := range weights {
			part := w * math.Exp(-linear[i]*x)
			sum, slope = sum+part, slope+part*linear[i]
		}
		step := math.Log(sum/aim) * sum / slope
		x += step
		if step <= 1e-12*x {
			return x, nil
		}
	}
	return 0, lack.Failed("the half-value layer was not reached")
}

// VoltageFor is the voltage at which the best estimate behind a wall reaches a rate;
// the stop's own voltage does not count. A rate not reached at 150 kV is a lack, and
// so is one passed at 1 kV already.
func (s Stop) VoltageFor(w Wall, rate quantity.KermaRate) (quantity.Voltage, error) {
	s.Voltage = highestEnergy * 1e3
	aim, err := s.aim(w, rate)
	if err != nil {
		return 0, err
	}
	const low, high = lowestEnergy * (1 + 1e-6), highestEnergy
	screens := w.screens(false)
	switch {
	case newBeam(screens, high).lnKerma() < aim:
		return 0, lack.Range("%s are not reached behind this wall up to 150 kV", quantity.Text(rate))
	case newBeam(screens, low).lnKerma() >= aim:
		return 0, lack.Range("%s are passed behind this wall from 1 kV on", quantity.Text(rate))
	}
	u, err := topFor(screens, aim, low, high)
	return quantity.Voltage(u * 1e3), err
}

// topFor finds the greatest photon energy (keV), between two, at which the logarithm of
// the kerma behind screens is aim. It rises everywhere, and in the logarithm of the
// energy bends down but at edges: Newton steps are kept inside the bracket they narrow.
func topFor(screens []screen, aim, low, high float64) (float64, error) {
	b := newBeam(screens, high)
	for range 200 {
		miss := b.lnKerma() - aim
		if miss > 0 {
			high = b.top
		} else {
			low = b.top
		}
		next := b.top * math.Exp(-miss/b.growth())
		if !(next > low && next < high) {
			next = math.Sqrt(low * high)
		}
		if math.Abs(next-b.top) <= 1e-9*next {
			return next, nil
		}
		b = newBeam(screens, next)
	}
	return 0, lack.Failed("the voltage for a rate behind this wall was not found")
}

// ThicknessFor is how much of a material on top of a wall brings the best estimate
// down to a rate; zero where it is there already. For a rate that the upper figure
// must keep, ask for the rate over Band and look at the upper figure again.
func (s Stop) ThicknessFor(w Wall, m Material, rate quantity.KermaRate) (quantity.Length, error) {
	aim, err := s.aim(w, rate)
	if err != nil {
		return 0, err
	}
	if len(m.parts) == 0 {
		return 0, lack.Range("a thickness needs a known material")
	}
	var x quantity.Length
	for range 200 {
		b := newBeam(w.with(m, x).screens(false), s.kilovolts())
		miss := b.lnKerma() - aim
		if miss <= 1e-10 {
			return x, nil
		}
		x += quantity.Length(miss / b.meanLinear(m) / 100)
	}
	return 0, lack.Failed("the thickness for %s was not found", quantity.Text(rate))
}

// aim is the logarithm of a rate in units of Stop.scale.
func (s Stop) aim(w Wall, rate quantity.KermaRate) (float64, error) {
	if err := s.check(); err != nil {
		return 0, err
	}
	if err := w.check(); err != nil {
		return 0, err
	}
	if !positive(rate) || !positive(s.Current) {
		return 0, lack.Range("a rate and a current above zero are needed, not %s and %s", quantity.Text(rate), quantity.Text(s.Current))
	}
	return math.Log(float64(rate) / s.scale(w.Distance)), nil
}

// meanLinear is µ of a material in 1/cm, the mean over the kerma of the beam.
func (b beam) meanLinear(m Material) float64 {
	var sum float64
	for _, r := range b.rays {
		sum += b.passing(r) * 2 * (b.top - r.energy) * r.air * m.linear(r.energy)
	}
	return sum / b.kerma()
}
