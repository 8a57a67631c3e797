package evidence

import (
	"kilovet/hv/circuit"
	"kilovet/hv/quantity"
	"kilovet/ripple/network"
)

// An arc is taken as a small resistance, far below what stands in series with it. It
// strikes when the node is at its highest, loads on, and is followed twice: with the
// drive on for some periods, which gives the peaks, and with the drive off until the
// stored charge has run off, which gives the energies. Assumptions of this review.
const (
	arcResistance quantity.Resistance = 0.05
	arcPeriods    quantity.Time       = 20 // in periods of the drive
)

// Arc is what an arc from a node to ground does while the drive stays on.
func (e *Evidence) Arc(node string) (*network.Discharge, error) {
	return remember(e, "arc at "+e.canonical(node), func() (*network.Discharge, error) { return e.strike(node, true) })
}

// ArcSpent is what the stored charge does in the arc, the drive off from its first instant.
func (e *Evidence) ArcSpent(node string) (*network.Discharge, error) {
	return remember(e, "spent arc at "+e.canonical(node), func() (*network.Discharge, error) { return e.strike(node, false) })
}

func (e *Evidence) strike(node string, driven bool) (*network.Discharge, error) {
	if err := e.sound(); err != nil {
		return nil, err
	}
	s, err := e.solution()
	if err != nil {
		return nil, err
	}
	from, err := s.node(node)
	if err != nil {
		return nil, err
	}
	instant, err := s.Highest(from, 0)
	if err != nil {
		return nil, err
	}
	o := network.ArcOptions{From: from, Resistance: arcResistance}
	if driven {
		o.Until = arcPeriods * s.Period()
		return network.Arc(s.Circuit, s.State(instant), o)
	}
	return network.Arc(quietDrive(s.Circuit), s.State(instant), o)
}

// quietDrive is the circuit with the drive's sources at zero.
func quietDrive(c *circuit.Circuit) *circuit.Circuit {
	return c.Each(func(el *circuit.Element) bool {
		if el.Kind == circuit.Source && el.Role == circuit.Ladder {
			el.Wave.Amplitude = 0
		}
		return true
	})
}

// Standing is the steady state with an arc that stands: what the supply feeds into it
// until something switches off.
func (e *Evidence) Standing(node string) (*network.Periodic, error) {
	return remember(e, "standing arc at "+e.canonical(node), func() (*network.Periodic, error) {
		c, err := e.Circuit()
		if err != nil {
			return nil, err
		}
		p, err := e.solve(c.Bridge(ArcName, node, "ground", arcResistance), beside{}, true)
		return p.Periodic, err
	})
}

// ArcName is the arc's own name among the elements of a circuit.
const ArcName = "arc"

// ArcNodes are where an arc at the gun may strike.
func (e *Evidence) ArcNodes() []string {
	if e.chain.HasCathode() && e.canonical("cathode") != e.canonical("output") {
		return []string{"output", "cathode"}
	}
	return []string{"output"}
}

// arcsFor are the nodes at which an arc may stress a part: those at the gun and, for a
// loose part in the lead, its own ends.
func (e *Evidence) arcsFor(part string) []string {
	nodes := e.ArcNodes()
	el := e.Layout().Element(part)
	if el == nil || el.LoosePart == nil {
		return nodes
	}
	from, to := el.Ends()
	for _, end := range []string{from, to} {
		if !e.IsGround(end) && !e.among(end, nodes) {
			nodes = append(nodes, end)
		}
	}
	return nodes
}

func (e *Evidence) among(node string, nodes []string) bool {
	for _, n := range nodes {
		if e.canonical(n) == e.canonical(node) {
			return true
		}
	}
	return false
}

// ArcDiodePeak is the largest current that an arc at the gun drives through a diode.
func (e *Evidence) ArcDiodePeak(diode string) (quantity.Current, error) {
	s, err := e.ArcStress(diode)
	return s.Current, err
}
