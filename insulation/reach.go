package insulation

import "math"

// answered narrows a range of lengths to the part of it in which a law answers; without
// such a part the error is that of the law. Laws hold between two lengths, which only
// they themselves know.
func answered(lo, hi float64, law func(float64) (float64, error)) (float64, float64, error) {
	const steps = 60 // of a grid, even on a logarithmic scale, finer than any law is short
	answers := func(x float64) bool { _, err := law(x); return err == nil }
	_, err := law(lo)
	if err == nil && answers(hi) {
		return lo, hi, nil
	}
	ratio := math.Pow(hi/lo, 1.0/steps)
	x := lo
	for n := 0; !answers(x); n++ {
		if n == steps {
			return 0, 0, err
		}
		x *= ratio
	}
	first, last := x, x
	for last*ratio < hi && answers(last*ratio) {
		last *= ratio
	}
	return edge(first, math.Max(lo, first/ratio), answers), edge(last, math.Min(hi, last*ratio), answers), nil
}

// edge is the last answered length between one that is and one that may not be.
func edge(in, out float64, answers func(float64) bool) float64 {
	if answers(out) {
		return out
	}
	for range 50 {
		if middle := math.Sqrt(in * out); answers(middle) {
			in = middle
		} else {
			out = middle
		}
	}
	return in
}
