package chain

import (
	"kilovet/hv/document"
	"kilovet/hv/quantity"
)

// checkBeam holds the keys of the beam against its particle.
func checkBeam(s *survey) {
	b := s.Beam
	if b == nil || b.Particle.Place.Line > 0 && !s.sound(b.Particle.Place) {
		return
	}
	ions := b.Particle.V == "ion"
	switch {
	case ions && s.lacks(b.MassNumber.Place):
		s.fault(b.Particle.Place, "ions without a mass", "give mass_number, as in mass_number = 40")
	case !ions && b.MassNumber.Set():
		s.fault(b.MassNumber.Place, "only an ion has such a key", `leave it out, or write particle = "ion"`)
	}
	if !ions && b.ChargeNumber.Set() {
		s.fault(b.ChargeNumber.Place, "only an ion has such a key", `leave it out, or write particle = "ion"`)
	}
	if ions && s.Gun != nil {
		s.fault(b.Particle.Place, "ions from an electron gun", "leave [gun] out and give what the ion source draws as a [[load]]")
	}
	if b.Measurement != nil && s.lacks(b.MeasuredRipple.Place) {
		s.fault(b.Measurement.Here(), "how a record is to be read, and no record", "give measured_ripple, the file of the record")
	}
	s.node(b.From)
}

// checkAdjustment holds the ends of a bias's adjustment against each other and its kind.
func checkAdjustment(s *survey) {
	b := s.Bias
	if b == nil || !s.sound(b.Kind.Place) {
		return
	}
	ordered(s, b.Lowest, b.Highest, func(text string) {
		s.fault(b.Highest.Place, "the upper end is not above the lower one of "+text, "exchange the two")
	})
	ordered(s, b.LowestResistance, b.HighestResistance, func(text string) {
		s.fault(b.HighestResistance.Place, "the upper end is not above the lower one of "+text, "exchange the two")
	})
	if b.Kind.V == "self" && (b.Lowest.Set() || b.Highest.Set()) {
		place := b.Lowest.Place
		if !b.Lowest.Set() {
			place = b.Highest.Place
		}
		s.fault(place, "self-bias is adjusted by its resistor", "give lowest_resistance and highest_resistance")
	}
}

func ordered[Q quantity.Number](s *survey, lowest, highest document.Given[Q], fault func(string)) {
	if s.sound(lowest.Place) && s.sound(highest.Place) && !(highest.V > lowest.V) {
		fault(quantity.Text(lowest.V))
	}
}
