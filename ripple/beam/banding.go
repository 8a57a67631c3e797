package beam

import "kilovet/hv/quantity"

// FocusShift is how far a change of the high voltage moves the focus, Cc κ dV/V;
// peak to peak in, peak to peak out.
func (o Optics) FocusShift(e Particle, change quantity.Voltage) quantity.Length {
	return o.Chromatic * quantity.Length(e.Kappa()*float64(change)*e.charge/e.energy)
}

// DefocusFW50 is the blur while a slow line stands at one of its ends: an evenly
// filled disc of radius a Cc κ A/E, half of whose current lies within 1/√2.
func (o Optics) DefocusFW50(e Particle, l Line) quantity.Length {
	square := Line{Amplitude: l.Amplitude, Form: Square()}
	return o.ChromaticFW50(e, square.Distribution().Scaled(e.charge))
}

// Deflection is how a beam is scanned.
type Deflection int

// The two ways to deflect, at constant drive.
const (
	Magnetic Deflection = iota
	Electrostatic
)

// Sensitivity is −d ln x/d ln V of a deflection x: κ/2 for a magnetic field, x ~
// 1/p; 1 + E/(E + 2mc²) − E/(E + mc²) for an electrostatic one, x ~ 1/(pv).
func (d Deflection) Sensitivity(e Particle) float64 {
	if d == Electrostatic {
		return 1 + e.energy/(e.energy+2*e.rest) - e.energy/(e.energy+e.rest)
	}
	return e.Kappa() / 2
}

// EdgeShift is how far the edge of a scanned field moves against its middle for a
// change of the high voltage: half the field times Sensitivity times dV/V.
func (d Deflection) EdgeShift(e Particle, field quantity.Length, change quantity.Voltage) quantity.Length {
	return field / 2 * quantity.Length(d.Sensitivity(e)*float64(change)*e.charge/e.energy)
}
