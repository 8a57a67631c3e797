package insulation

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// stretch is a range of lengths over which a law answers without a break.
type stretch struct{ from, to float64 }

// stretches are the parts of a range of lengths in which a law answers, shortest first;
// without any the error is that of the law. Laws hold between two lengths, which only they
// themselves know, and some begin anew further on.
func stretches(lo, hi float64, law func(float64) (float64, error)) ([]stretch, error) {
	const steps = 60 // of a grid, even on a logarithmic scale, finer than any law is short
	answers := func(x float64) bool { _, err := law(x); return err == nil }
	ratio := math.Pow(hi/lo, 1.0/steps)
	var all []stretch
	open := false
	for n := range steps + 1 {
		x := math.Min(lo*math.Pow(ratio, float64(n)), hi)
		switch is := answers(x); {
		case is && !open:
			all = append(all, stretch{edge(x, math.Max(lo, x/ratio), answers), x})
			open = true
		case is:
			all[len(all)-1].to = x
		case open:
			last := &all[len(all)-1]
			last.to = edge(last.to, x, answers)
			open = false
		}
	}
	if all == nil {
		_, err := law(lo)
		return nil, err
	}
	return all, nil
}

// holding is the stretch in which a rising answer takes a value: the first whose end gives
// as much, or the last. A value that lies between two is a lack.
func holding(all []stretch, want float64, law func(float64) (float64, error)) (stretch, error) {
	for i, s := range all {
		end, err := law(s.to)
		if err != nil || end < want && i < len(all)-1 {
			continue
		}
		if start, err := law(s.from); i > 0 && err == nil && start > want {
			return s, lack.Range("no law answers between %s, where it is less than is asked for, and %s, where it is more", quantity.Text(quantity.Length(all[i-1].to)), quantity.Text(quantity.Length(s.from)))
		}
		return s, nil
	}
	return all[len(all)-1], nil
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
