package steady

import (
	"math"

	"kilovet/hv/circuit"
	"kilovet/hv/lack"
)

// leastOn stands for the on-resistance of a diode that has none; at a milliampere
// it drops a millivolt.
const leastOn = 1 // ohm

func onResistance(e *circuit.Element) float64 {
	return math.Max(float64(e.Rectifier.On), leastOn)
}

// ties are the ideal connections at DC beside those given: sources at their mean
// and inductors as wires. Those of the ladder are left out.
func ties(c *circuit.Circuit, given []tie) []tie {
	all := given
	for _, e := range c.Elements {
		if e.Role == circuit.Ladder {
			continue
		}
		switch e.Kind {
		case circuit.Source:
			all = append(all, tie{e.Name, e.From, e.To, mean(e.Wave)})
		case circuit.Inductor:
			all = append(all, tie{e.Name, e.From, e.To, 0})
		}
	}
	return all
}

func mean(w circuit.Wave) float64 {
	if w.Form == circuit.Direct {
		return float64(w.Amplitude)
	}
	return 0
}

// settled is the DC state with nodes held.
func settled(c *circuit.Circuit, held []tie) (*State, error) {
	if err := unknown(c); err != nil {
		return nil, err
	}
	n, err := reduce(c, ties(c, held))
	if err != nil {
		return nil, err
	}
	s := &State{Circuit: c, network: n, v: make([]float64, n.joints), loose: make([]bool, n.joints), on: make([]bool, len(c.Elements))}
	for i, e := range c.Elements {
		s.on[i] = e.Kind == circuit.Diode && e.Role != circuit.Ladder
	}
	// Once more without the sinks that turn out to have no path: they carry nothing.
	for range 2 {
		if err := s.settle(); err != nil {
			return nil, err
		}
		s.loose = s.adrift()
	}
	return s, nil
}

// settle takes all diodes as switched, then switches until each agrees with its voltage.
func (s *State) settle() error {
	for range 2*len(s.Circuit.Elements) + 2 {
		s.solve()
		if !s.switchDiodes() {
			return nil
		}
	}
	return lack.Failed("the diodes outside the multiplier do not settle")
}

// unknown is the first doubt about a value that DC rests on.
func unknown(c *circuit.Circuit) error {
	for i := range c.Elements {
		e := &c.Elements[i]
		if e.Role == circuit.Ladder || e.Kind == circuit.Capacitor {
			continue
		}
		if e.Doubt != nil {
			return e.Doubt
		}
		if e.Kind == circuit.Resistor && e.Resistance <= 0 {
			return lack.Failed("%s has no resistance given", e.Name)
		}
	}
	return nil
}

// branch conducts as i = g·(v(from) − v(to) + emf) between two joints.
type branch struct {
	from, to int
	g, emf   float64
	forward  bool // of a diode that conducts
}

// branches are all that conducts with the diodes as they are switched.
func (s *State) branches() []branch {
	var all []branch
	for i := range s.Circuit.Elements {
		e := &s.Circuit.Elements[i]
		from, to, offset := s.network.ends(e)
		if e.Role == circuit.Ladder || from == to {
			continue
		}
		if e.Kind == circuit.Resistor {
			all = append(all, branch{from, to, 1 / float64(e.Resistance), offset, false})
		}
		if e.Kind == circuit.Diode && e.Rectifier.Leakage > 0 {
			all = append(all, branch{from, to, e.Rectifier.Leakage, offset, false})
		}
		if e.Kind == circuit.Diode && s.on[i] {
			all = append(all, branch{from, to, 1 / onResistance(e), offset - float64(e.Rectifier.Drop), true})
		}
	}
	return all
}

// solve finds the potentials for the diodes as they are switched.
func (s *State) solve() {
	all := s.branches()
	pairs := make([][2]int, len(all))
	for i, b := range all {
		pairs[i] = [2]int{b.from, b.to}
	}
	m := newMesh(s.network.joints, pairs)
	g, current := make([]float64, m.size), make([]float64, m.nodes)
	for _, b := range all {
		g[m.slot(b.from, b.to)] += b.g
		current[b.from] -= b.g * b.emf
		current[b.to] += b.g * b.emf
	}
	s.sinks(current)
	f := m.newFactors()
	f.factor(g)
	f.solve(current, s.v)
}

func (s *State) sinks(current []float64) {
	for i := range s.Circuit.Elements {
		e := &s.Circuit.Elements[i]
		if e.Kind == circuit.Sink && !s.stranded(e) {
			from, to, _ := s.network.ends(e)
			current[from] -= float64(e.Current)
			current[to] += float64(e.Current)
		}
	}
}

// switchDiodes puts the diode that disagrees most with its voltage right.
func (s *State) switchDiodes() bool {
	worst, most := -1, s.noise()
	for i := range s.Circuit.Elements {
		e := &s.Circuit.Elements[i]
		if e.Kind != circuit.Diode || e.Role == circuit.Ladder {
			continue
		}
		over := s.network.across(e, s.v) - float64(e.Rectifier.Drop)
		if s.on[i] {
			over = -over
		}
		if over > most {
			worst, most = i, over
		}
	}
	if worst < 0 {
		return false
	}
	s.on[worst] = !s.on[worst]
	return true
}

// noise is the voltage below which rounding hides the sign.
func (s *State) noise() float64 {
	largest := 0.0
	for n := range s.network.spots {
		largest = math.Max(largest, math.Abs(s.network.at(circuit.Node(n), s.v)))
	}
	return 1e-13 * largest
}

// adrift finds the joints without a path to ground. A diode is a path where it
// leaks or carries current, not where it merely may.
func (s *State) adrift() []bool {
	adrift, noise := make([]bool, s.network.joints), s.noise()
	for i := 1; i < len(adrift); i++ {
		adrift[i] = true
	}
	all := s.branches()
	for spread := true; spread; {
		spread = false
		for _, b := range all {
			idle := b.forward && math.Abs(s.v[b.from]-s.v[b.to]+b.emf) <= noise
			if adrift[b.from] != adrift[b.to] && !idle {
				adrift[b.from], adrift[b.to], spread = false, false, true
			}
		}
	}
	return adrift
}
