package evidence

import (
	"math"
	"slices"
	"strings"

	"kilovet/hv/chain"
	"kilovet/hv/lack"
	"kilovet/hv/quantity"
	"kilovet/insulation"
	"kilovet/insulation/gap"
)

// peakOver is the largest voltage between two nodes that a spacing between them is judged
// by. On the mains it is that of its live conductor: the common mode of a heater feed
// tells only of its earthed side and counts where it is larger.
func (e *Evidence) peakOver(a, b string) (quantity.Voltage, error) {
	peak, err := e.Between(a, b)
	if err != nil || !e.OnMains(a) && !e.OnMains(b) {
		return peak, err
	}
	stated, err := e.mainsPeak()
	if err != nil {
		return 0, err
	}
	line, err := e.lineVoltage()
	return peak + max(0, line*math.Sqrt2-stated), err
}

// Touched is the largest voltage to ground that whoever reaches a node can touch there: on
// the mains that of its live conductor.
func (e *Evidence) Touched(node string) (quantity.Voltage, error) {
	return e.peakOver(node, "ground")
}

// lastingOver is the r.m.s. voltage between two nodes that a spacing between them is
// judged by. That of the mains has another frequency than what the steady state holds:
// their squares add.
func (e *Evidence) lastingOver(a, b string) (quantity.Voltage, error) {
	rms, err := e.RMS(a, b)
	if err != nil || !e.OnMains(a) && !e.OnMains(b) {
		return rms, err
	}
	stated, err := e.mainsPeak()
	if err != nil {
		return 0, err
	}
	line, err := e.lineVoltage()
	return quantity.Voltage(math.Hypot(float64(rms), float64(max(line, stated/math.Sqrt2)))), err
}

// acrossMains is the voltage over a spacing between the mains and ground where no supply is
// described, whatever its state would be.
func (e *Evidence) acrossMains(s *chain.Spacing) (gap.Voltages, error) {
	line, err := e.lineVoltage()
	if err != nil {
		return gap.Voltages{}, err
	}
	stated, err := e.mainsPeak()
	if err != nil {
		return gap.Voltages{}, err
	}
	sharp, err := e.sharp(s)
	peak := max(line*math.Sqrt2, stated)
	return gap.Voltages{Peak: peak, LongTerm: peak / math.Sqrt2, Sharp: sharp}, err
}

// lineVoltage is the r.m.s. voltage of the live conductor of the mains to ground.
func (e *Evidence) lineVoltage() (quantity.Voltage, error) {
	if e.chain.Site == nil || !e.chain.Site.Mains.Set() {
		return 0, lack.Key("site.mains")
	}
	return e.chain.Site.Mains.V, nil
}

// Discharged are the nodes that discharge: all but the mains.
func (e *Evidence) Discharged() []string {
	return slices.DeleteFunc(slices.Clone(e.Nodes()), e.OnMains)
}

// OnMains reports whether a node is that of the mains, which no charge, energy or time ends.
func (e *Evidence) OnMains(name string) bool {
	return e.sameNode(name, mainsNode)
}

// sameNode reports whether two names are one node other than ground.
func (e *Evidence) sameNode(a, b string) bool {
	return e.Same(a, b) && !e.IsGround(a)
}

// mains is the supply whose transients reach a spacing: that of one any node of which is
// mains or drive. It is a secondary circuit's where drive stands without the mains.
func (e *Evidence) mains(s *chain.Spacing) *gap.Mains {
	reached, secondary := false, false
	for _, n := range nodesOf(s) {
		line := e.OnMains(n) || e.OnMains(s.To.V)
		driven := e.atDrive(n) || e.atDrive(s.To.V)
		reached = reached || line || driven
		secondary = secondary || driven && !line
	}
	if !reached && s.Transients.V {
		reached, secondary = true, !s.Voltage.Set()
	}
	if e.chain.Site == nil || !reached {
		return nil
	}
	return e.mainsOf(secondary)
}

func (e *Evidence) mainsOf(secondary bool) *gap.Mains {
	return &gap.Mains{LineToNeutral: e.chain.Site.Mains.V, Category: e.chain.Site.OvervoltageCategory.V, Secondary: secondary}
}

// TransientsTaken is what is taken for granted of the transients of a mains that is described
// where nothing tells whether they reach a gap in air and they would ask for more than is
// there: its voltage is stated by hand, or it is at a node that the drive feeds through a capacitor.
func (e *Evidence) TransientsTaken(s *chain.Spacing, x Spacing, enough func(quantity.Length) bool) []string {
	if e.chain.Site == nil || !e.chain.Site.Mains.Set() || s.Transients.Set() || x.Gap.Mains != nil {
		return nil
	}
	stated, coupled := s.Voltage.Set(), s.From.Set() && e.coupled(s)
	if !stated && !coupled {
		return nil
	}
	with := x.Gap
	with.Mains = e.mainsOf(!stated)
	more, err := insulation.ClearanceNeeded(with, x.Voltages)
	need := x.Assessment.ClearanceNeeded
	if need.Lack != nil || err == nil && (quantity.AtMost(more.Value, need.Value) || enough(more.Value)) {
		return nil
	}
	text := "no transients of the mains reach it, its voltage being stated: give its nodes, or spacing.mains_transients"
	switch {
	case s.Of != nil:
		text = "no transients of the mains reach it, its voltage being stated: give feedthrough.node in place of feedthrough.voltage"
	case !stated:
		text = "no transients of the drive reach it through the coupling capacitors: give spacing.mains_transients"
	}
	if err == nil {
		text += "; with them " + quantity.Text(more.Value) + " would be needed"
	}
	return []string{text}
}

// coupled reports whether a spacing is at a node of the coupling column.
func (e *Evidence) coupled(s *chain.Spacing) bool {
	return slices.ContainsFunc(append(nodesOf(s), s.To.V), func(n string) bool { return strings.HasPrefix(n, "coupling.") })
}

// atDrive reports whether a node is one of the drive.
func (e *Evidence) atDrive(name string) bool {
	return e.sameNode(name, "drive") || e.sameNode(name, "drive.a") || e.sameNode(name, "drive.b")
}
