package solid

import (
	"math"

	"kilovet/hv/lack"
	"kilovet/hv/quantity"
)

// Layer is one layer of insulation. What a way of sharing does not need may be zero.
type Layer struct {
	Thickness    quantity.Length
	Permittivity float64 // relative
	Resistivity  quantity.Resistivity
}

// Wall is layers of insulation between two electrodes, flat or coaxial, from the inner
// electrode outwards.
type Wall struct {
	InnerRadius quantity.Length // of the conductor; zero: flat
	Layers      []Layer
}

// Sharing says what divides a voltage among layers.
type Sharing int

const (
	// Switched: by permittivity, under AC and at once after any step.
	Switched Sharing = iota
	// Settled: by resistivity, under DC after many times the settling.
	Settled
)

// weight is how much voltage a layer takes for its extent.
func (l Layer) weight(s Sharing) float64 {
	if s == Settled {
		return float64(l.Resistivity)
	}
	return 1 / l.Permittivity
}

// lacking names what a layer lacks for a way of sharing.
func (l Layer) lacking(s Sharing) error {
	switch {
	case l.Thickness <= 0:
		return lack.Because("the thickness of a layer is not given")
	case s == Switched && l.Permittivity < 1:
		return lack.Because("the relative permittivity of a layer is not given, 1 or more")
	case s == Settled && l.Resistivity <= 0:
		return lack.Because("the resistivity of a layer is not given: where DC settles is not known")
	}
	return nil
}

// radii are those of the inner faces, then of the outermost.
func (w Wall) radii() []float64 {
	r := []float64{float64(w.InnerRadius)}
	for i, l := range w.Layers {
		r = append(r, r[i]+float64(l.Thickness))
	}
	return r
}

// extents are the thicknesses of a flat wall, the logarithms of a coaxial one.
func (w Wall) extents() []float64 {
	var e []float64
	r := w.radii()
	for i, l := range w.Layers {
		if w.InnerRadius == 0 {
			e = append(e, float64(l.Thickness))
			continue
		}
		e = append(e, math.Log(r[i+1]/r[i]))
	}
	return e
}

// Voltages are the voltages across the layers: in proportion to d/ε or d ρ of flat, ln
// R/r over ε or times ρ of coaxial ones. What a layer lacks is a lack.
func (w Wall) Voltages(v quantity.Voltage, s Sharing) ([]quantity.Voltage, error) {
	if len(w.Layers) == 0 || w.InnerRadius < 0 {
		return nil, lack.Because("the wall has no layers")
	}
	sum, parts := 0.0, w.extents()
	for i, l := range w.Layers {
		if err := l.lacking(s); err != nil {
			return nil, err
		}
		parts[i] *= l.weight(s)
		sum += parts[i]
	}
	voltages := make([]quantity.Voltage, len(parts))
	for i, part := range parts {
		voltages[i] = v * quantity.Voltage(part/sum) // electrostatics; Gönen, Electric Power Transmission System Engineering, ex. 5.2
	}
	return voltages, nil
}

// Fields are the highest field in each layer, at its inner face where the wall is
// coaxial. After a step the field of each of two layers runs from its switched to its
// settled value and does not leave the range between them.
func (w Wall) Fields(v quantity.Voltage, s Sharing) ([]quantity.Field, error) {
	voltages, err := w.Voltages(v, s)
	if err != nil {
		return nil, err
	}
	radii, extents := w.radii(), w.extents()
	fields := make([]quantity.Field, len(voltages))
	for i, u := range voltages {
		e := float64(u) / extents[i]
		if w.InnerRadius > 0 {
			e /= radii[i]
		}
		fields[i] = quantity.Field(e)
	}
	return fields, nil
}

// Withstand is the voltage at which the first layer reaches its limit, and which layer
// that is. There must be a limit for each layer.
func (w Wall) Withstand(limits []quantity.Field, s Sharing) (quantity.Voltage, int, error) {
	if len(limits) != len(w.Layers) {
		panic("solid: not one limit for each layer")
	}
	perVolt, err := w.Fields(1, s)
	if err != nil {
		return 0, 0, err
	}
	least, first := math.Inf(1), 0
	for i, e := range perVolt {
		if limits[i] <= 0 {
			return 0, 0, lack.Because("the strength of a layer is not given")
		}
		if v := float64(limits[i] / e); v < least {
			least, first = v, i
		}
	}
	return quantity.Voltage(least), first, nil
}

// Settling is the time constant with which two layers pass from switched to settled
// sharing, τ = (ε₁ d₂ + ε₂ d₁)/(σ₁ d₂ + σ₂ d₁) of flat ones (Maxwell and Wagner), the
// extents in place of the thicknesses of coaxial ones. Other numbers of layers have more
// than one and are a lack.
func (w Wall) Settling() (quantity.Time, error) {
	if len(w.Layers) != 2 {
		return 0, lack.Range("one time constant is that of two layers, asked for %d", len(w.Layers))
	}
	extents := w.extents()
	var capacitance, conductance float64
	for i, l := range w.Layers {
		for _, s := range []Sharing{Switched, Settled} {
			if err := l.lacking(s); err != nil {
				return 0, err
			}
		}
		capacitance += vacuumPermittivity * l.Permittivity / extents[i]
		conductance += 1 / (float64(l.Resistivity) * extents[i])
	}
	return quantity.Time(capacitance / conductance), nil // Maxwell and Wagner, memory
}
