package chain

import (
	"errors"

	"kilovet/hv/document"
	"kilovet/hv/quantity"
)

// checkParts reads the value of each loose part as its kind wants it.
func checkParts(s *survey) {
	for i := range s.Parts {
		if p := &s.Parts[i]; s.sound(p.Kind.Place) {
			s.partValue(p)
			s.partKeys(p)
		}
	}
}

func (s *survey) partValue(p *Part) {
	d := p.Dimension()
	switch {
	case d == nil && p.Value.Set():
		s.fault(p.Value.Place, withArticle(p.Kind.V)+" has no value", "leave it out")
	case d == nil || !s.sound(p.Value.Place):
		if d != nil && s.lacks(p.Value.Place) {
			s.fault(p.Here(), withArticle(p.Kind.V)+" without a value", "give its "+d.Name+", as in value = "+quoted(d.Example))
		}
	default:
		s.partAmount(p, d)
	}
}

func (s *survey) partAmount(p *Part, d *quantity.Dimension) {
	v, err := d.Parse(p.Value.V)
	var refusal *quantity.Refusal
	switch {
	case errors.As(err, &refusal):
		s.fault(p.Value.Place, quoted(p.Value.V)+": "+refusal.What, refusal.Remedy)
	case v <= 0:
		s.fault(p.Value.Place, quoted(p.Value.V)+" is out of range", "accepted: more than 0 "+d.SI)
	}
}

// partKeys asks for and refuses the keys that belong to diodes and meters only.
func (s *survey) partKeys(p *Part) {
	kind := p.Kind.V
	if kind == "meter" && s.lacks(p.Resistance.Place) {
		s.fault(p.Here(), "a meter without a resistance", `give resistance, as in resistance = "10 Mohm"`)
	}
	if p.Resistance.Set() && kind != "meter" && kind != "diode" {
		s.fault(p.Resistance.Place, withArticle(kind)+" has no such key", "its value is given by value")
	}
	if kind == "diode" {
		return
	}
	for _, at := range []document.Place{p.ForwardDrop.Place, p.Capacitance.Place, p.Leakage.Place} {
		if at.Line > 0 {
			s.fault(at, "only a diode has such a key", "leave it out")
		}
	}
}
