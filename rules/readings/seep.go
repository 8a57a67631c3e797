package readings

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"kilovet/hv/circuit"
	"kilovet/hv/parallel"
	"kilovet/hv/quantity"
	"kilovet/rules/evidence"
)

// seep is a load from a node to ground that the description does not have: leakage, and
// above a voltage corona or a partial breakdown.
type seep struct {
	node    string
	load    evidence.Fault // a load of the size below, to learn what such loads do
	size    []float64      // of that load, in amperes, by reading
	volts   []float64      // healthy voltage of the node, by reading
	effect  []float64      // what that load changes, by reading
	highest int            // the reading with the highest voltage
}

// seeps tries a load at every node at high voltage, from zero on, and beginning where it
// explains the readings best.
func (b *bench) seeps() []trial {
	nodes := b.live()
	found := make([][]trial, len(nodes))
	parallel.Each(len(nodes), func(i int) {
		s, err := b.learn(nodes[i])
		if err != nil {
			found[i] = []trial{{hypothesis: hypothesis{name: "leakage or corona at " + nodes[i]}, err: err}}
			return
		}
		found[i] = b.ways(s)
	})
	var all []trial
	for _, f := range found {
		all = append(all, f...)
	}
	return all
}

// live are the nodes that have a good part of the highest voltage: a tenth of that of the
// output (common practice, no source). The leads of a heater are at its cathode.
func (b *bench) live() (nodes []string) {
	at := b.e.Under(b.highest().at)
	output, err := at.Reads("output", "ground")
	for _, node := range b.e.Nodes() {
		if v, no := at.Reads(node, "ground"); err == nil && no == nil && v > output/10 && !strings.HasPrefix(node, "heater.") {
			nodes = append(nodes, node)
		}
	}
	return nodes
}

// highest is the reading taken at the highest drive, the first of several.
func (b *bench) highest() taken {
	highest := b.all[0]
	for _, t := range b.all {
		if t.at.Peak > highest.at.Peak {
			highest = t
		}
	}
	return highest
}

// learn computes in the highest step of each state what a load changes that takes as much
// as the chain itself does. Readings change in proportion to a load as they do to the
// drive, but for the drop of the diodes.
func (b *bench) learn(node string) (*seep, error) {
	s := &seep{node: node, size: make([]float64, len(b.all)), volts: make([]float64, len(b.all)), effect: make([]float64, len(b.all))}
	top := b.e.Under(b.highest().at)
	volts, err := top.Reads(node, "ground")
	if err != nil {
		return nil, err
	}
	current, err := top.ReturnCurrent()
	if err != nil {
		return nil, err
	}
	across := volts / quantity.Voltage(max(current, microampere))
	s.load = evidence.Fault{Name: "a load at " + node + ", as much as the chain itself", Edit: func(c *circuit.Circuit) *circuit.Circuit {
		return c.Bridge("load at "+node, node, "ground", quantity.Resistance(across))
	}}
	for _, state := range evidence.States {
		if _, high := b.span(state); high != nil {
			if err := b.learnIn(s, *high, float64(across)); err != nil {
				return nil, err
			}
		}
	}
	for i := range s.volts {
		if s.volts[i] > s.volts[s.highest] {
			s.highest = i
		}
	}
	return s, nil
}

const microampere quantity.Current = 1e-6

func (b *bench) learnIn(s *seep, high evidence.Condition, ohms float64) error {
	loaded, err := b.reads(high, s.load)
	if err != nil {
		return err
	}
	sound, err := b.reads(high, evidence.Fault{})
	if err != nil {
		return err
	}
	under := high
	under.Fault = both(s.load, high.Fault)
	left, err := b.e.Under(under).Reads(s.node, "ground")
	if err != nil {
		return err
	}
	for i, t := range b.all {
		if t.at.State != high.State {
			continue
		}
		v, err := b.e.Under(t.at).Reads(s.node, "ground")
		if err != nil {
			return err
		}
		s.volts[i], s.size[i], s.effect[i] = float64(v), float64(left)/ohms, loaded[t.place]-sound[t.place]
	}
	return nil
}

// ways are the load from zero on, and the one that begins at a voltage where that explains
// the readings clearly better.
func (b *bench) ways(s *seep) []trial {
	always := b.sized(s, 0)
	always.name = "leakage from " + s.node + " to ground"
	best := always
	for _, onset := range s.onsets() {
		if t := b.sized(s, onset); t.misfit < best.misfit {
			t.name = s.begins(onset)
			best = t
		}
	}
	if always.misfit-best.misfit < alike {
		return []trial{always}
	}
	return []trial{best, always}
}

// onsets are voltages between those of the steps that were read, the last eighth of the
// highest left out: what begins there has no size.
func (s *seep) onsets() (all []float64) {
	const parts = 8
	low, found := s.above(0)
	for found {
		var high float64
		if high, found = s.above(low); found {
			for k := range parts {
				all = append(all, low+(high-low)*float64(k)/parts)
			}
		}
		low = high
	}
	return all
}

// above is the least voltage of a step above another.
func (s *seep) above(v float64) (next float64, found bool) {
	for _, u := range s.volts {
		if u > v*(1+1e-3) && (!found || u < next) {
			next, found = u, true
		}
	}
	return next, found
}

// begins names a load by the steps between which it begins.
func (s *seep) begins(onset float64) string {
	low := 0.0
	for _, v := range s.volts {
		if v <= onset {
			low = max(low, v)
		}
	}
	high, _ := s.above(onset)
	return fmt.Sprintf("corona, leakage or partial breakdown at %s that begins between %s and %s", s.node, quantity.Text(quantity.Voltage(low)), quantity.Text(quantity.Voltage(high)))
}

// sized is the load beginning at a voltage, with the size that explains the readings best.
func (b *bench) sized(s *seep, onset float64) trial {
	predict := func(log float64) []float64 {
		p := make([]float64, len(b.all))
		for i := range p {
			p[i] = max(0, b.healthy[i]+s.times(math.Exp(log), onset, i)*s.effect[i])
		}
		return p
	}
	size := least(func(log float64) float64 { return b.misfit(b.read, predict(log)) }, math.Log(1e-3), math.Log(1e2))
	t := trial{hypothesis: hypothesis{change: s.load}, predicted: predict(size)}
	t.misfit = b.misfit(b.read, t.predicted)
	highest := slices.IndexFunc(b.all, func(t taken) bool { return t.at.Peak >= b.highest().at.Peak })
	t.share = 1 - s.times(math.Exp(size), onset, highest)
	return t
}

// times is how many times the load that was learned from the one takes in a step that begins
// at a voltage, grows in proportion above it and, at the highest, is a number of times that
// load.
func (s *seep) times(k, onset float64, i int) float64 {
	grown := max(0, s.volts[i]-onset) / (s.volts[s.highest] - onset)
	return k * grown * s.size[s.highest] / s.size[i]
}

// least is where a function of one number is least between two bounds: the least of an even
// row of points, and again between its neighbours.
func least(f func(float64) float64, low, high float64) float64 {
	const parts, times = 24, 3
	best := low
	for range times {
		step, value := (high-low)/parts, math.Inf(1)
		for k := range parts + 1 {
			x := low + float64(k)*step
			if v := f(x); v < value {
				best, value = x, v
			}
		}
		low, high = best-step, best+step
	}
	return best
}
