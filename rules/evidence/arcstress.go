package evidence

import (
	"kilovet/hv/quantity"
	"kilovet/ripple/network"
)

// ArcStress is the worst an arc at the gun does to one part.
type ArcStress struct {
	Voltage quantity.Voltage // largest magnitude across it
	Current quantity.Current // largest magnitude; of a diode without its junction's
	Energy  quantity.Energy  // of the stored charge, or while the drive is followed, if that is more
}

// ArcStress is the worst that arcs at the gun do to a part; a clamp across the bias
// resistor lets no more than its voltage stand.
func (e *Evidence) ArcStress(part string) (ArcStress, error) {
	return remember(e, "arc stress of "+part, func() (ArcStress, error) {
		var most ArcStress
		for _, node := range e.arcsFor(part) {
			s, err := e.ArcStressAt(node, part)
			if err != nil {
				return ArcStress{}, err
			}
			most = ArcStress{max(most.Voltage, s.Voltage), max(most.Current, s.Current), max(most.Energy, s.Energy)}
		}
		return most, nil
	})
}

// ArcStressAt is what an arc at one node does to a part.
func (e *Evidence) ArcStressAt(node, part string) (ArcStress, error) {
	driven, err := e.Arc(node)
	if err != nil {
		return ArcStress{}, err
	}
	spent, err := e.ArcSpent(node)
	if err != nil {
		return ArcStress{}, err
	}
	d := driven.Of(part)
	s := ArcStress{size(d), d.Peak, max(d.Energy, spent.Of(part).Energy)}
	if part == "bias.resistor" && e.chain.Bias.Clamp != nil {
		s.Voltage = min(s.Voltage, e.chain.Bias.Clamp.Voltage.V)
	}
	return s, nil
}

func size(s network.Stress) quantity.Voltage { return max(s.Greatest, -s.Least) }

// ArcVoltage is the largest voltage that an arc at the gun puts across a part.
func (e *Evidence) ArcVoltage(part string) (quantity.Voltage, error) {
	s, err := e.ArcStress(part)
	return s.Voltage, err
}

// ArcEnergy is the most that an arc at the gun turns into heat in a part.
func (e *Evidence) ArcEnergy(part string) (quantity.Energy, error) {
	s, err := e.ArcStress(part)
	return s.Energy, err
}

// ArcFullVoltage is what no arc can pass across a part, whatever the network says: the
// full voltage of its higher end.
func (e *Evidence) ArcFullVoltage(part string) (quantity.Voltage, error) {
	from, to := e.Layout().Element(part).Ends()
	a, err := e.Between(from, "ground")
	if err != nil {
		return 0, err
	}
	b, err := e.Between(to, "ground")
	return max(a, b), err
}

// ArcFullEnergy is the most of the stored energy that an arc can turn into heat in a
// part: all that a short where it strikes releases.
func (e *Evidence) ArcFullEnergy(part string) (quantity.Energy, error) {
	var most quantity.Energy
	for _, node := range e.arcsFor(part) {
		s, err := e.ShortAt(node)
		if err != nil {
			return 0, err
		}
		most = max(most, s.Energy)
	}
	return most, nil
}

// StandingPower is the most that the drive turns into heat in a part while an arc stands.
func (e *Evidence) StandingPower(part string) (quantity.Power, error) {
	var most quantity.Power
	for _, node := range e.arcsFor(part) {
		p, err := e.Standing(node)
		if err != nil {
			return 0, err
		}
		most = max(most, p.Power(part))
	}
	return most, nil
}

// FollowCurrent is the mean current that the supply feeds into an arc that stands.
func (e *Evidence) FollowCurrent(node string) (quantity.Current, error) {
	p, err := e.Standing(node)
	if err != nil {
		return 0, err
	}
	f, err := p.Through(ArcName)
	return max(f.Mean, -f.Mean), err
}
