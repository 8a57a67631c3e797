package evidence

import (
	"kilovet/hv/chain"
	"kilovet/insulation/gap"
)

// sharp is the polarity of the sharper electrode of a spacing in air: as stated, or by the
// potentials of its nodes where the description says on which side it is. Unknown where it
// does not, changing where the nodes change sign and at the mains.
func (e *Evidence) sharp(s *chain.Spacing) (gap.Polarity, error) {
	side := s.SharperElectrode.V
	if !s.SharperElectrode.Set() || side != "from" && side != "to" {
		return gap.Polarity(side), nil
	}
	p, err := e.polarityOf(s, side)
	if err == nil && p == gap.Unknown {
		p = gap.Changing
	}
	return p, err
}

// polarityOf is the lasting sign of one side of a spacing against the other, over all nodes
// and conditions that ratings are judged under.
func (e *Evidence) polarityOf(s *chain.Spacing, side string) (gap.Polarity, error) {
	positive, negative := true, true
	for _, c := range e.Ratings() {
		for _, n := range nodesOf(s) {
			if n == mainsNode || s.To.V == mainsNode {
				return gap.Unknown, nil
			}
			v, err := e.Under(c).swing(n, s.To.V)
			if err != nil {
				return gap.Unknown, err
			}
			positive, negative = positive && v.Least >= 0, negative && v.Greatest <= 0
		}
	}
	switch {
	case positive == negative: // of no voltage, or of both signs
		return gap.Unknown, nil
	case positive == (side == "from"):
		return gap.Positive, nil
	}
	return gap.Negative, nil
}
