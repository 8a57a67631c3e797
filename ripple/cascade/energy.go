package cascade

import "kilovet/hv/quantity"

// StoredEnergy is held by the capacitors of the ladder without load: the first
// coupling capacitor stands at one peak, all others at two. Equal capacitors and no
// forward drop: C peak² (4N − 3/2) for a half-wave cascade.
func (c Cascade) StoredEnergy() (quantity.Energy, error) {
	if err := c.sound(); err != nil {
		return 0, err
	}
	return c.climb(0).Energy(c), nil
}

// Energy is held by the capacitors of the cascade at their mean voltages.
func (s State) Energy(c Cascade) quantity.Energy {
	columns := 1.0
	if c.Symmetrical {
		columns = 2
	}
	var sum float64
	for k := range s.Smoothing {
		sum += columns*half(c.Coupling[k], s.Coupling[k].Mean) + half(c.Smoothing[k], s.Smoothing[k].Mean)
	}
	return quantity.Energy(sum)
}

func half(c quantity.Capacitance, v quantity.Voltage) float64 {
	return float64(c) * float64(v) * float64(v) / 2
}
