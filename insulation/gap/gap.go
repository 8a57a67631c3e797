package gap

import "kilovet/hv/quantity"

// Gap describes one gap or surface. A zero length, pressure, temperature or count
// is not given; what may be zero in truth is a pointer, nil where not given.
type Gap struct {
	Medium     Medium
	Insulation Insulation // none: basic

	Clearance quantity.Length // shortest way through the medium; thickness of a solid
	Creepage  quantity.Length // shortest way along the surface
	Shape     *Shape          // nil: not known, judged as sharp

	Material string            // of the surface or the solid
	CTI      *quantity.Voltage // comparative tracking index, in place of a material
	Board    Board             // printed boards only
	Exposed  bool              // printed boards: no coating keeps the pollution of the site away

	PollutionDegree int // 1 to 4, IEC 60664-1
	Altitude        *quantity.Length
	Temperature     quantity.Temperature // of the gas
	Pressure        quantity.Pressure    // of the gas as read; none: that of the altitude
	GaugeFactor     float64              // true pressure over reading; none: 1
	Humidity        *quantity.Humidity   // absolute; nil: as the data were taken
	Gas             Gas                  // none: air
	Surface         Surface              // of the electrodes; none: smooth

	Mains         *Mains // nil: no mains transients reach the gap
	ImpulseTested bool   // an impulse voltage test of this gap was passed

	Polished     *bool         // vacuum: electrodes polished, not only machined; nil: not said
	Conditioned  *bool         // vacuum: electrodes conditioned; nil: not said
	StressedArea quantity.Area // vacuum: above 90 % of the peak field
	Tested       Tested        // a like surface in the same medium
	Strength     quantity.Field
	Specimen     quantity.Length  // that Strength was measured at
	OilTest      quantity.Voltage // oil: mean of the standard test, rms
	Ribs         Ribs             // across the surface, which Creepage is measured over
}

// Tested is a flashover voltage that a surface was found to have, and its length.
type Tested struct {
	Voltage quantity.Voltage
	Length  quantity.Length
}

// Ribs are like ribs across a surface.
type Ribs struct {
	Count        int
	Depth, Width quantity.Length // height of a rib; clear width of the grooves between
	Thickness    quantity.Length // of a rib along the surface; zero: not given
}

// Mains is the supply whose transients reach a gap.
type Mains struct {
	LineToNeutral quantity.Voltage // rms
	Category      int              // overvoltage category, 1 to 4
	Secondary     bool             // the gap is in a circuit behind a transformer, not in the mains itself
}

// Voltages are the voltages across a gap, magnitudes.
type Voltages struct {
	// Peak is the highest recurring or temporary instant value (DC: the DC value).
	Peak quantity.Voltage
	// LongTerm is the lasting r.m.s. or DC value; it alone decides creepage.
	LongTerm quantity.Voltage
	// RatedImpulse is the 1.2/50 µs impulse the gap must withstand; zero: that of
	// the gap's mains, and none where it has no mains.
	RatedImpulse quantity.Voltage
	// Alternating is the zero-to-peak amplitude of the largest part above 30 kHz, and
	// Frequency its frequency; zero: none.
	Alternating quantity.Voltage
	Frequency   quantity.Frequency
	// Sharp is the polarity of the more highly stressed electrode.
	Sharp Polarity
}

// Class is the insulation class, basic where none is named.
func (g Gap) Class() Insulation {
	if g.Insulation == "" {
		return Basic
	}
	return g.Insulation
}

// Filling is the gas, air where none is named.
func (g Gap) Filling() Gas {
	if g.Gas == "" {
		return AirGas
	}
	return g.Gas
}

// TruePressure is the reading times the gauge factor; zero where not given.
func (g Gap) TruePressure() quantity.Pressure {
	if g.GaugeFactor == 0 {
		return g.Pressure
	}
	return g.Pressure * quantity.Pressure(g.GaugeFactor)
}

// For are the voltages that a class of insulation is dimensioned for: 160 % for
// reinforced insulation (IEC 60664-1, memory), the same for the others.
func (v Voltages) For(class Insulation) Voltages {
	if class == Reinforced {
		v.Peak, v.LongTerm = 1.6*v.Peak, 1.6*v.LongTerm
	}
	return v
}
