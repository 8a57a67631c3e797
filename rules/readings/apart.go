package readings

import (
	"math"

	"kilovet/rules/evidence"
)

// Apart is a voltage that would tell suspects apart.
type Apart struct {
	Node, Step string
	Expected   []float64 // volts to ground, magnitudes, in the order of the suspects
}

// certain is the relative difference that a further reading can be relied on to show:
// common practice, no source.
const certain = 0.1

// apart looks for the node whose voltage differs most among the suspects that fit
// about as well as the best, in the step with the highest drive.
func (b *bench) apart(suspects []Suspect) []Apart {
	var rivals []*trial
	for _, s := range suspects {
		if s.Fit <= suspects[0].Fit+1 {
			rivals = append(rivals, s.trial)
		}
	}
	if len(rivals) < 2 {
		return nil
	}
	highest := b.all[0]
	for _, t := range b.all {
		if t.at.Peak > highest.at.Peak {
			highest = t
		}
	}
	best, found := Apart{Step: highest.step.Name}, certain
	for _, node := range b.e.Nodes() {
		volts, least := b.among(node, highest.at, rivals)
		if least > found {
			best.Node, best.Expected, found = node, volts, least
		}
	}
	if best.Node == "" {
		return nil
	}
	return []Apart{best}
}

// among is a node's voltage under each rival, and the least relative difference
// between any two.
func (b *bench) among(node string, at evidence.Condition, rivals []*trial) (volts []float64, least float64) {
	least = math.Inf(1)
	for _, r := range rivals {
		under := at
		under.Fault = both(r.change, at.Fault)
		v, err := b.e.Under(under).Reads(node, "ground")
		if err != nil {
			return nil, 0
		}
		for _, other := range volts {
			least = min(least, math.Abs(float64(v)-other)/max(float64(v), other, 1))
		}
		volts = append(volts, float64(v))
	}
	return volts, least
}
