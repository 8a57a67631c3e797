package evidence

import (
	"fmt"
	"math"
	"strings"

	"kilovet/hv/circuit"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/hv/steady"
	"kilovet/ripple/cascade"
)

// closed is the steady state by charge balance inside the multiplier and by DC
// outside it.
type closed struct {
	circuit *circuit.Circuit
	outside *steady.State
	cascade cascade.Cascade
	inside  cascade.State
	spans   map[circuit.Node]span
}

// solveClosed finds the steady state of a circuit by closed forms.
func (e *Evidence) solveClosed(c *circuit.Circuit) (solution, error) {
	peak := e.chain.Drive.Peak.V
	if source := c.Element(e.firstSource()); source != nil {
		peak = source.Wave.Amplitude
	}
	ladder, err := e.cascadeAt(peak)
	if err != nil {
		return nil, err
	}
	supply, err := ladder.Supply()
	if err != nil {
		return nil, err
	}
	outside, err := steady.Potentials(c, steady.Linear(supply.NoLoad, supply.OutputResistance))
	if err != nil {
		return nil, err
	}
	inside, err := ladder.Loaded(outside.Drawn)
	if err != nil {
		return nil, err
	}
	s := &closed{circuit: c, outside: outside, cascade: ladder, inside: inside, spans: map[circuit.Node]span{}}
	s.ladder()
	return s, nil
}

func (e *Evidence) firstSource() string {
	if e.chain.Multiplier.Symmetrical() {
		return "drive.source.a"
	}
	return "drive.source"
}

// ladder notes how the nodes of the multiplier and its drive move.
func (s *closed) ladder() {
	sign := quantity.Voltage(1)
	if s.circuit.Negative {
		sign = -1
	}
	for k, w := range s.inside.Nodes {
		s.note(fmt.Sprintf("stage.%d", k+1), sign*w.Mean, w.Maximum-w.Minimum)
		for _, mark := range []string{"", "a.", "b."} {
			s.note(fmt.Sprintf("coupling.%s%d", mark, k+1), sign*s.inside.CouplingDC[k], 2*s.cascade.Peak)
		}
	}
	for _, name := range []string{"drive", "drive.a", "drive.b", "drive.source", "drive.inner"} {
		s.note(name, 0, 2*s.cascade.Peak)
	}
}

func (s *closed) note(name string, mean, swing quantity.Voltage) {
	if n, ok := s.circuit.Node(name); ok && n != circuit.Ground {
		rms := math.Sqrt(float64(mean*mean + swing*swing/8))
		s.spans[n] = span{mean - swing/2, mean + swing/2, mean, quantity.Voltage(rms)}
	}
}

func (s *closed) mean(node string) (quantity.Voltage, error) {
	w, err := s.between(node, "ground")
	return w.mean, err
}

func (s *closed) between(node, reference string) (span, error) {
	a, err := s.at(node)
	if err != nil {
		return span{}, err
	}
	b, err := s.at(reference)
	if err != nil {
		return span{}, err
	}
	mean := a.mean - b.mean
	return span{a.least - b.most, a.most - b.least, mean, max(magnitude(mean), max(a.rms, b.rms)-min(a.rms, b.rms))}, nil
}

func (s *closed) at(node string) (span, error) {
	n, ok := s.circuit.Node(node)
	if !ok {
		return span{}, lack.Failed("there is no node %s", node)
	}
	if w, ok := s.spans[n]; ok {
		return w, nil
	}
	v, err := s.outside.At(n)
	return span{v, v, v, magnitude(v)}, err
}

func (s *closed) diode(name string) (carried, error) {
	fields := strings.Split(name, ".")
	var j int
	fmt.Sscan(fields[len(fields)-1], &j)
	return carried{reverse: s.inside.DiodeReverse[j-1], mean: s.outside.Drawn}, nil
}

func (s *closed) power(el *circuit.Element) (quantity.Power, error) {
	v, err := s.outside.Across(el.Name)
	return quantity.Power(float64(v*v) / float64(el.Resistance)), err
}

func (s *closed) harmonic(node, _ string, k int) (complex128, error) {
	if strings.HasPrefix(node, "coupling") && k == 1 {
		return complex(float64(s.cascade.Peak), 0), nil
	}
	if node == "multiplier" {
		return s.inside.Ripple.Harmonic(k), nil
	}
	return 0, nil
}

func (s *closed) basis() string { return "ripple.cascade" }

// solve finds the steady state of a circuit.
func (e *Evidence) solve(c *circuit.Circuit) (solution, error) { return e.solveClosed(c) }
