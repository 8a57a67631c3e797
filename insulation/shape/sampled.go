package shape

import (
	"math"
	"slices"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Sample is the field at a distance along a critical line.
type Sample struct {
	Along quantity.Length
	Field quantity.Field
}

// Sampled is a critical line along which the field was computed, from the more highly
// stressed electrode on. Between the samples its logarithm runs straight. Where the
// field does not fall towards its least value it is raised to the greatest farther on:
// an upper bound. Across is the voltage between its ends. Fewer than three places, a field
// of nothing at the start, or samples that do not add up to the voltage within a
// twentieth, are a lack.
func Sampled(samples []Sample, across quantity.Voltage) (Line, error) {
	x, e := apart(samples)
	if len(x) < 3 {
		return Line{}, lack.Range("a critical line takes three places with a field, there are %d", len(x))
	}
	if sum := integral(x, e); !(math.Abs(sum/float64(across)-1) < 0.05) {
		return Line{}, lack.Range("the field along the line adds up to %s, across it are %s", quantity.Text(quantity.Voltage(sum)), quantity.Text(across))
	}
	least := slices.Index(e, slices.Min(e))
	raised := raise(e, least)
	l := Line{
		gap: quantity.Length(x[len(x)-1]), trough: quantity.Length(x[least]), bound: raised, computed: true,
		at: func(at float64) float64 { return logarithmic(x, e, at) / float64(across) },
	}
	l.radius = quantity.Length(falls(x, e))
	return l, nil
}

// Across is the voltage that samples add up to.
func Across(samples []Sample) quantity.Voltage {
	x, e := apart(samples)
	return quantity.Voltage(integral(x, e))
}

// apart takes distances and fields apart, from zero, each distance once.
func apart(samples []Sample) (x, e []float64) {
	for _, s := range samples {
		along, field := float64(s.Along-samples[0].Along), float64(s.Field)
		if !(field > 0) || len(x) > 0 && along <= x[len(x)-1] {
			continue
		}
		x, e = append(x, along), append(e, field)
	}
	return x, e
}

// raise lifts the field so that it falls from both ends to the least place; it reports
// whether that took more than a thousandth.
func raise(e []float64, least int) (lifted bool) {
	was := slices.Clone(e)
	for i := least - 1; i >= 0; i-- {
		e[i] = math.Max(e[i], e[i+1])
	}
	for i := least + 1; i < len(e); i++ {
		e[i] = math.Max(e[i], e[i-1])
	}
	for i := range e {
		lifted = lifted || e[i] > was[i]*1.001
	}
	return lifted
}

// integral of a field whose logarithm runs straight between its places.
func integral(x, e []float64) (sum float64) {
	for i := 1; i < len(x); i++ {
		sum += (x[i] - x[i-1]) * meanOf(e[i-1], e[i])
	}
	return sum
}

// meanOf is the logarithmic mean.
func meanOf(a, b float64) float64 {
	if math.Abs(a/b-1) < 1e-6 {
		return (a + b) / 2
	}
	return (a - b) / math.Log(a/b)
}

// logarithmic is the field at a place, its logarithm running straight between places.
func logarithmic(x, e []float64, at float64) float64 {
	beyond, _ := slices.BinarySearch(x, at)
	i := min(max(beyond, 1), len(x)-1)
	part := math.Min(math.Max((at-x[i-1])/(x[i]-x[i-1]), 0), 1)
	return e[i-1] * math.Pow(e[i]/e[i-1], part)
}

// falls is the length over which the field falls at the start by its own size, at most
// the whole line: the radius of a wire, half that of a ball.
func falls(x, e []float64) float64 {
	whole := x[len(x)-1]
	if slope := math.Log(e[0]/e[1]) / (x[1] - x[0]); slope*whole > 1 {
		return 1 / slope
	}
	return whole
}
