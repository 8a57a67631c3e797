package chain

// alike are the shapes whose electrodes are curved alike, so that none is the sharper.
var alike = map[string]bool{"plates": true, "sphere-sphere": true, "parallel cylinders": true}

// sharperOf asks for the sharper electrode by what the ends of the spacing are, and only
// where one is sharper and decides.
func (s *survey) sharperOf(sp *Spacing) {
	key := sp.SharperElectrode
	if !s.sound(key.Place) {
		return
	}
	side := key.V == "from" || key.V == "to"
	switch {
	case s.sound(sp.Medium.Place) && sp.Medium.V != "air" && sp.Medium.V != "gas":
		s.fault(key.Place, "a key of spacings in air, not in "+sp.Medium.V, "leave it out, or correct the medium")
	case sp.Shape != nil && s.sound(sp.Shape.Kind.Place) && alike[sp.Shape.Kind.V]:
		s.fault(key.Place, "the electrodes of a shape of kind "+quoted(sp.Shape.Kind.V)+" are alike", "leave it out")
	case side && sp.Voltage.Set():
		s.fault(key.Place, "a side of a spacing that is between no nodes", "give positive or negative, the polarity of the sharper electrode")
	case !side && sp.From.Set():
		s.fault(key.Place, "a polarity where the nodes have one", "give from or to, the side of the sharper electrode")
	}
}
