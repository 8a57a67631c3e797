package network

// way is the derivative of a convex function along a correction: a line, and what the diodes
// add to it.
type way struct {
	start, curve float64
	kinks        []kink
}

// kink is a diode's part: its weight times the voltage above its drop, where it conducts.
type kink struct{ over, rate, weight float64 }

func (w *way) at(t float64) float64 {
	sum := w.start + t*w.curve
	for i := range w.kinks {
		k := &w.kinks[i]
		if over := k.over + t*k.rate; !(over <= 0) {
			sum += k.weight * over
		}
	}
	return sum
}

// least finds where on (0, 1] the function is least.
func (w *way) least() float64 {
	if w.at(1) <= 0 {
		return 1
	}
	low, high := 0.1, 1.0
	for low > 1e-25 && w.at(low) > 0 {
		low, high = low/10, low
	}
	for range 50 {
		if t := (low + high) / 2; w.at(t) > 0 {
			high = t
		} else {
			low = t
		}
	}
	return low
}
